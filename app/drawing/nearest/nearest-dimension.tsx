import type { Vec2, Vec3 } from '#app/domain/vector.ts'
import { placeFigure } from '#app/drawing/nearest/label-place.ts'
import type { Patch } from '#app/drawing/plan/occupied.ts'
import type { Pen } from '#app/drawing/pen.ts'
import { Words } from '#app/drawing/text/words.tsx'

/** The nearest pair of points of a finding: a heater's and that of what it comes near to, with the figure between. */
export interface NearestPair {
  readonly from: Vec3
  readonly to: Vec3
  /** Their distance with its tolerance: "0.178 ± 0.025". */
  readonly figure: string
  /** Chosen in the list of findings; else the tightest of the chosen heater. */
  readonly chosen: boolean
}

const rounded = (value: number): number => Math.round(value * 10) / 10

/** Shorter than this on the drawing, px, a pair is a ring: the line runs towards the eye. */
const shortest = 7

/** A pair as a dimension on a drawing, its ends given in px: line, 45° ticks and figure; a ring where it runs away from the eye. */
export function NearestDimension(props: {
  readonly from: Vec2
  readonly to: Vec2
  readonly figure: string
  readonly chosen: boolean
  /** What the figure keeps clear of. */
  readonly taken: readonly Patch[]
  readonly pen: Pen
}) {
  const { from, to, figure, chosen, taken, pen } = props
  const colour = chosen ? pen.colours.selection : pen.colours.line
  const isShort = Math.hypot(to[0] - from[0], to[1] - from[1]) < shortest
  const [x, y] = placeFigure(from, to, figure, taken, pen)
  const middle: Vec2 = [(from[0] + to[0]) / 2, (from[1] + to[1]) / 2]
  const isFar = Math.hypot(x - middle[0], y - middle[1]) > pen.text * 2.6
  return (
    <g fill="none" stroke={colour} strokeWidth={(chosen ? 1.4 : 1) * pen.k} opacity={chosen ? 1 : 0.85}>
      {isFar ? <path d={pathOf(middle, [x, y + pen.text * 0.6])} strokeDasharray="2 2" opacity={0.6} /> : null}
      {isShort ? (
        <>
          <circle cx={rounded(middle[0])} cy={rounded(middle[1])} r={5 * pen.k} />
          <circle cx={rounded(middle[0])} cy={rounded(middle[1])} r={1.4 * pen.k} fill={colour} stroke="none" />
        </>
      ) : (
        <>
          <path d={pathOf(from, to)} />
          {[from, to].map((end, i) => (
            <path key={i} d={tick(end, 3.6 * pen.k)} />
          ))}
        </>
      )}
      <g stroke="none">
        <Words
          {...{ x, y }}
          anchor="middle"
          centred
          size={pen.text}
          weight={600}
          colour={colour}
          halo={pen.colours.halo}
          haloWidth={3.4 * pen.k}
        >
          {figure}
        </Words>
      </g>
    </g>
  )
}

const pathOf = (a: Vec2, b: Vec2): string => `M${a.map(rounded).join(' ')}L${b.map(rounded).join(' ')}`

const tick = ([x, y]: Vec2, arm: number): string => pathOf([x - arm, y + arm], [x + arm, y - arm])
