import type { Vec2 } from '#app/domain/vector.ts'

interface MagnifierProps {
  readonly picture: string
  readonly width: number
  readonly height: number
  /** px of the photo in its middle. */
  readonly at: Vec2
  /** Screen px per px of the photo behind it. */
  readonly scale: number
  /** At the left, because the hand is at the right. */
  readonly left: boolean
}

const side = 148

/** The photo around a place, several times larger, with a cross on it: in the corner away from the hand. */
export function Magnifier({ picture, width, height, at, scale, left }: MagnifierProps) {
  const size = Math.max(3, scale * 3)
  return (
    <div
      aria-hidden="true"
      data-magnifier=""
      className={`pointer-events-none absolute top-2 overflow-hidden rounded-md border border-rule-strong bg-dusk-ground shadow-lift ${left ? 'left-2' : 'right-2'}`}
      style={{ width: side, height: side }}
    >
      <div
        className="absolute inset-0 bg-no-repeat [image-rendering:pixelated]"
        style={{
          backgroundImage: `url("${picture}")`,
          backgroundSize: `${width * size}px ${height * size}px`,
          backgroundPosition: `${side / 2 - at[0] * size}px ${side / 2 - at[1] * size}px`,
        }}
      />
      <svg width={side} height={side} className="absolute inset-0">
        {[
          ['#0c1322', 3],
          ['#ffffff', 1],
        ].map(([stroke, strokeWidth]) => (
          <path
            key={stroke}
            d={`M${side / 2} 0V${side / 2 - 7}M${side / 2} ${side / 2 + 7}V${side}M0 ${side / 2}H${side / 2 - 7}M${side / 2 + 7} ${side / 2}H${side}`}
            stroke={`${stroke}`}
            strokeWidth={strokeWidth}
          />
        ))}
        <circle cx={side / 2} cy={side / 2} r="1" fill="#ffb27a" />
      </svg>
    </div>
  )
}
