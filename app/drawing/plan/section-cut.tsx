import { extentOf, type PlanView } from '#app/drawing/plan/plan-view.ts'
import type { Site } from '#app/domain/site/site.ts'
import type { Pen } from '#app/drawing/pen.ts'
import type { Vec2 } from '#app/domain/vector.ts'
import { Words } from '#app/drawing/text/words.tsx'

/**
 * Where the site is cut: along y at a place on x, or along x at a place on y, m. `looking` is the direction of view: 1
 * towards greater x (or y), −1 towards less.
 */
export interface SectionCut {
  readonly letter: string
  readonly along: 'x' | 'y'
  readonly at: number
  readonly looking: 1 | -1
}

function Disc({ at: [x, y], toward, letter, pen }: { at: Vec2; toward: Vec2; letter: string; pen: Pen }) {
  const r = 7.5 * pen.k
  const [dx, dy] = toward
  const side = 9.5 * pen.k
  const tip = 11.5 * pen.k
  return (
    <>
      <path
        d={`M${x - dy * side} ${y + dx * side}L${x + dx * tip} ${y + dy * tip}L${x + dy * side} ${y - dx * side}Z`}
        fill={pen.colours.line}
      />
      <circle cx={x} cy={y} r={r} fill={pen.colours.ground} stroke={pen.colours.line} strokeWidth={pen.k} />
      <Words x={x} y={y} centred anchor="middle" size={pen.text} weight={600} colour={pen.colours.line}>
        {letter}
      </Words>
    </>
  )
}

/** Marks of a section: dash-dot outside the floor and a lettered disc with a pointer in the direction of view. */
export function SectionCutMark({ cut, site, view, pen }: { cut: SectionCut; site: Site; view: PlanView; pen: Pen }) {
  const { x, y } = extentOf(site.floor)
  const line = {
    stroke: pen.colours.line,
    strokeWidth: pen.k,
    strokeDasharray: `${8 * pen.k} ${3 * pen.k} ${2 * pen.k} ${3 * pen.k}`,
  }
  if (cut.along === 'y') {
    const at = view.x0 + view.scale * cut.at
    const top = view.y0 - view.scale * y[1]
    const toward: Vec2 = [cut.looking, 0]
    const foot = view.height - 24
    return (
      <g data-section={cut.letter}>
        <line x1={at} y1={top - 35} x2={at} y2={top - 3} {...line} />
        <Disc at={[at, top - 43]} toward={toward} letter={cut.letter} pen={pen} />
        <line x1={at} y1={foot - 21} x2={at} y2={foot - 9} {...line} />
        <Disc at={[at, foot]} toward={toward} letter={cut.letter} pen={pen} />
      </g>
    )
  }
  const at = view.y0 - view.scale * cut.at
  const left = view.x0 + view.scale * x[0]
  return (
    <g data-section={cut.letter}>
      <line x1={left - 29} y1={at} x2={left - 3} y2={at} {...line} />
      <Disc at={[Math.max(14, left - 39), at]} toward={[0, -cut.looking]} letter={cut.letter} pen={pen} />
    </g>
  )
}
