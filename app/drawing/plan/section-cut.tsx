import type { SVGProps } from 'react'
import { extentOf, toScreen, type PlanView } from '#app/drawing/plan/plan-view.ts'
import type { Site } from '#app/domain/site/site.ts'
import type { Pen } from '#app/drawing/pen.ts'
import type { Vec2 } from '#app/domain/vector.ts'
import { Words } from '#app/drawing/text/words.tsx'

/**
 * Where the site is cut: from the left end of the section's drawing to its right end, m in plan. The direction of view is
 * to the left of that way, so that changing the ends turns it round.
 */
export interface SectionCut {
  readonly letter: string
  readonly from: Vec2
  readonly to: Vec2
  /** Put there by a person: its line is drawn across the plan. */
  readonly placed?: boolean
}

/** A cut across the whole floor along an axis, at a place on the other one, looking to where that grows (1) or not (−1). */
export function cutAlong(site: Site, letter: string, axis: 'x' | 'y', at: number, looking: 1 | -1): SectionCut {
  const [low, high] = extentOf(site.floor)[axis]
  const end = (along: number): Vec2 => (axis === 'x' ? [along, at] : [at, along])
  const rising = axis === 'x' ? looking === 1 : looking === -1
  return { letter, from: end(rising ? low : high), to: end(rising ? high : low) }
}

/** The same line looked at from the other side. */
export const turnCut = (cut: SectionCut): SectionCut => ({ ...cut, from: cut.to, to: cut.from })

/** Length of a cut in plan, m. */
export const cutLength = ({ from, to }: SectionCut): number => Math.hypot(to[0] - from[0], to[1] - from[1])

/** Unit direction along a cut, to the right on its drawing; along +x for a cut of no length. */
export function alongDirection(cut: SectionCut): Vec2 {
  const length = cutLength(cut)
  return length === 0 ? [1, 0] : [(cut.to[0] - cut.from[0]) / length, (cut.to[1] - cut.from[1]) / length]
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
  const line = {
    stroke: pen.colours.line,
    strokeWidth: pen.k,
    strokeDasharray: `${8 * pen.k} ${3 * pen.k} ${2 * pen.k} ${3 * pen.k}`,
  }
  const [ux, uy] = alongDirection(cut)
  const toward: Vec2 = [-uy, -ux]
  const mark = { toward, letter: cut.letter, pen }
  if (cut.placed) return <PlacedMark cut={cut} view={view} line={line} mark={mark} />
  const { x, y } = extentOf(site.floor)
  if (Math.abs(ux) < Math.abs(uy)) {
    const at = view.x0 + view.scale * cut.from[0]
    const top = view.y0 - view.scale * y[1]
    const foot = view.height - 24
    return (
      <g data-section={cut.letter}>
        <line x1={at} y1={top - 35} x2={at} y2={top - 3} {...line} />
        <Disc at={[at, top - 43]} {...mark} />
        <line x1={at} y1={foot - 21} x2={at} y2={foot - 9} {...line} />
        <Disc at={[at, foot]} {...mark} />
      </g>
    )
  }
  const at = view.y0 - view.scale * cut.from[1]
  const left = view.x0 + view.scale * x[0]
  return (
    <g data-section={cut.letter}>
      <line x1={left - 29} y1={at} x2={left - 3} y2={at} {...line} />
      <Disc at={[Math.max(14, left - 39), at]} {...mark} />
    </g>
  )
}

/** How far beyond its ends the discs of a placed cut stand, px. */
const discBeyond = 16

/** A line that a person put: dash-dot from end to end, a disc beyond each. */
function PlacedMark({
  cut,
  view,
  line,
  mark,
}: {
  cut: SectionCut
  view: PlanView
  line: SVGProps<SVGLineElement>
  mark: { toward: Vec2; letter: string; pen: Pen }
}) {
  const [a, b] = discPlaces(cut, view)
  return (
    <g data-section={cut.letter}>
      <line x1={a[0]} y1={a[1]} x2={b[0]} y2={b[1]} {...line} />
      <Disc at={a} {...mark} />
      <Disc at={b} {...mark} />
    </g>
  )
}

/** Where the discs of a placed cut stand, px: at its left end and at its right end. */
export function discPlaces(cut: SectionCut, view: PlanView): readonly [Vec2, Vec2] {
  const [ux, uy] = alongDirection(cut)
  const [ax, ay] = toScreen(view, cut.from)
  const [bx, by] = toScreen(view, cut.to)
  return [
    [ax - ux * discBeyond, ay + uy * discBeyond],
    [bx + ux * discBeyond, by - uy * discBeyond],
  ]
}
