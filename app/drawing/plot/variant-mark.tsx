import type { Pen } from '#app/drawing/pen.ts'

/** Marks by which two to four variants are told apart in one plot, in their order. */
const variantMarks = ['triangle', 'disc', 'bar', 'cross'] as const
export type VariantMarkKind = (typeof variantMarks)[number]

/** The mark of the i-th variant that is compared. */
export const markOf = (i: number): VariantMarkKind => variantMarks[i % variantMarks.length] ?? 'disc'

const rounded = (value: number): number => Math.round(value * 10) / 10

/** A variant's mark about a point: hollow triangle, ember disc, upright bar, cross. */
export function VariantMark({
  kind,
  x,
  y,
  r,
  pen,
  ink = pen.colours.line,
  paper = pen.colours.ground,
  ember = pen.colours.element,
}: {
  kind: VariantMarkKind
  x: number
  y: number
  r: number
  pen: Pen
  ink?: string
  paper?: string
  ember?: string
}) {
  const at = (dx: number, dy: number) => `${rounded(x + dx * r)} ${rounded(y + dy * r)}`
  const line = { stroke: ink, strokeWidth: 1.5 * pen.k, strokeLinejoin: 'round' as const }
  if (kind === 'triangle')
    return <path d={`M${at(0, -1.05)}L${at(1.05, 0.8)}L${at(-1.05, 0.8)}Z`} fill={paper} {...line} />
  if (kind === 'disc')
    return <circle cx={rounded(x)} cy={rounded(y)} r={r * 0.92} fill={ember} stroke={paper} strokeWidth={0.8 * pen.k} />
  if (kind === 'bar')
    return (
      <rect
        x={rounded(x - r * 1.1)}
        y={rounded(y - r * 0.42)}
        width={rounded(r * 2.2)}
        height={rounded(r * 0.84)}
        rx={0.8}
        fill={ink}
        stroke={paper}
        strokeWidth={0.8 * pen.k}
      />
    )
  const arms = `M${at(-0.8, -0.8)}L${at(0.8, 0.8)}M${at(0.8, -0.8)}L${at(-0.8, 0.8)}`
  return (
    <>
      <path d={arms} fill="none" stroke={paper} strokeWidth={4.2 * pen.k} strokeLinecap="round" />
      <path d={arms} fill="none" {...line} strokeWidth={2 * pen.k} strokeLinecap="round" />
    </>
  )
}
