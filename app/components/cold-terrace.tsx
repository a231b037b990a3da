const columns = 5
const bay = 150
const left = 24
const top = 22

const teeth = (y: number, up: number) => `M${left} ${y}${`l5 ${up}l5 ${-up}`.repeat((columns * bay) / 10)}`

const ripple = (y: number) => `M0 ${y}${'q12 -6 24 0t24 0'.repeat(17)}`

function Setting({ x, y }: { x: number; y: number }) {
  const seats = [
    [0, -46, 'M-13 -54a15 15 0 0 1 26 0'],
    [0, 46, 'M-13 54a15 15 0 0 0 26 0'],
    [-46, 0, 'M-54 -13a15 15 0 0 0 0 26'],
    [46, 0, 'M54 -13a15 15 0 0 1 0 26'],
  ] as const
  return (
    <g transform={`translate(${x} ${y})`}>
      <rect x="-23" y="-23" width="46" height="46" rx="4" strokeWidth="1" />
      {seats.map(([sx, sy, back]) => (
        <g key={back}>
          <circle cx={sx} cy={sy} r="12" strokeWidth="1" strokeDasharray="2.6 2.2" />
          <path d={back} strokeWidth="2" />
        </g>
      ))}
    </g>
  )
}

/** The cold terrace drawn by day: what an empty list of jobs looks at. */
export function ColdTerrace() {
  const [width, depth] = [columns * bay, 300]
  return (
    <svg viewBox="0 0 798 372" className="h-auto w-full text-ink" fill="none" stroke="currentColor" aria-hidden="true">
      <path d={`${ripple(6)}${ripple(13)}`} strokeWidth="0.8" opacity="0.4" />
      <rect x={left} y={top} width={width} height={depth} className="fill-paper-raised" strokeWidth="1.3" />
      <path d={`${teeth(top, 4)}${teeth(top + depth, -4)}`} strokeWidth="0.8" />
      {Array.from({ length: columns - 1 }, (_, i) => (
        <path
          key={i}
          d={`M${left + bay * (i + 1) - 2} ${top}v${depth}m4 0v${-depth}`}
          strokeWidth="0.8"
          strokeDasharray="5 3"
          opacity="0.7"
        />
      ))}
      <path d={`M${left} ${top + depth / 2}h${width}`} strokeWidth="0.8" opacity="0.7" />
      {Array.from({ length: columns * 2 }, (_, i) => (
        <Setting key={i} x={left + bay * ((i % columns) + 0.5)} y={top + depth * (i < columns ? 0.26 : 0.74)} />
      ))}
      <rect
        x={left - 13}
        y={top + depth}
        width={width + 26}
        height="14"
        className="fill-paper-raised"
        strokeWidth="1.2"
      />
      <path
        d={Array.from({ length: 78 }, (_, i) => `M${left - 10 + i * 10} ${top + depth + 14}l8 -14`).join('')}
        strokeWidth="0.6"
        opacity="0.5"
      />
    </svg>
  )
}
