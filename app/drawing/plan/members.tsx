import type { Member } from '#app/domain/site/site.ts'
import { isClear, patch, type Patch } from '#app/drawing/plan/occupied.ts'
import { toScreen, type PlanView } from '#app/drawing/plan/plan-view.ts'
import type { Pen } from '#app/drawing/pen.ts'
import { textWidth } from '#app/drawing/text/widths.ts'
import { Words } from '#app/drawing/text/words.tsx'
import type { Vec2 } from '#app/domain/vector.ts'

/** A beam, rafter, joist or purlin: its two edges; dashed by day because it is overhead. */
export function MemberLines({ member, view, pen }: { member: Member; view: PlanView; pen: Pen }) {
  const a = toScreen(view, member.from)
  const b = toScreen(view, member.to)
  const length = Math.hypot(b[0] - a[0], b[1] - a[1]) || 1
  const half = Math.max(2.5 * pen.k, member.width * view.scale) / 2
  const aside: Vec2 = [(-(b[1] - a[1]) / length) * half, ((b[0] - a[0]) / length) * half]
  return (
    <g data-member={member.id} stroke={pen.colours.line} strokeWidth={0.75 * pen.k}>
      <line x1={a[0]} y1={a[1]} x2={b[0]} y2={b[1]} stroke="transparent" strokeWidth={14} pointerEvents="stroke" />
      {[1, -1].map((side) => (
        <line
          key={side}
          x1={a[0] + side * aside[0]}
          y1={a[1] + side * aside[1]}
          x2={b[0] + side * aside[0]}
          y2={b[1] + side * aside[1]}
          opacity={pen.theme === 'dusk' ? 0.72 : 0.8}
          strokeDasharray={pen.theme === 'day' ? `${5 * pen.k} ${2 * pen.k}` : undefined}
        />
      ))}
    </g>
  )
}

interface Name {
  readonly id: string
  readonly text: string
  readonly x: number
  readonly y: number
  readonly from: number
  readonly to: number
  readonly anchor: 'start' | 'middle' | 'end'
}

const shortName = (member: Member): string => member.name.charAt(0).toUpperCase() + member.name.slice(1)

/** The end of a member whose name it carries: the upper one on the drawing, the left one of a level member. */
function nameEnd(member: Member, view: PlanView): { at: Vec2; level: boolean } {
  const a = toScreen(view, member.from)
  const b = toScreen(view, member.to)
  const level = Math.abs(b[0] - a[0]) > Math.abs(b[1] - a[1])
  if (level) return { at: a[0] < b[0] ? a : b, level }
  return { at: a[1] < b[1] ? a : b, level }
}

/** Names that have room, the outermost first; `cuts` are x of section lines that a name must not cross. */
function namesOf(members: readonly Member[], view: PlanView, pen: Pen, cuts: readonly number[]): Name[] {
  const upright = members.map((member) => ({ member, ...nameEnd(member, view) })).filter((end) => !end.level)
  const fromOutside = upright
    .sort((a, b) => a.at[0] - b.at[0])
    .map((end, i, all) => ({
      ...end,
      rank: Math.min(i, all.length - 1 - i) % 2 === 0 ? (i && i < all.length - 1 ? 1 : 0) : 2,
    }))
    .sort((a, b) => a.rank - b.rank)
  const taken: Name[] = []
  for (const { member, at } of fromOutside) {
    const text = shortName(member)
    const width = textWidth(text, pen.text, 500)
    const isCut = cuts.some((x) => Math.abs(x - at[0]) < width / 2 + 3)
    const middle = Math.min(view.width - width / 2 - 2, Math.max(width / 2 + 2, at[0]))
    const from = isCut ? at[0] + 7 : middle - width / 2
    const name = { id: member.id, text, x: isCut ? at[0] + 7 : middle, y: at[1] - 9 * pen.k, from, to: from + width }
    const anchor = isCut ? ('start' as const) : ('middle' as const)
    const clear = taken.every(
      (other) => Math.abs(other.y - name.y) > pen.text || other.to + 6 < from || name.to + 6 < other.from,
    )
    if (clear) taken.push({ ...name, anchor })
  }
  return taken
}

const roomOf = ({ from, to, y }: Name, pen: Pen): Patch =>
  patch((from + to) / 2, y - pen.text * 0.35, to - from, pen.text)

/** Names of level members at their left ends: above the line, or under it where another name stands above. */
function levelNames(members: readonly Member[], view: PlanView, pen: Pen, others: readonly Name[]): Name[] {
  const taken = others.map((name) => roomOf(name, pen))
  return members.flatMap((member) => {
    const { at, level } = nameEnd(member, view)
    if (!level) return []
    const text = shortName(member)
    const x = at[0] + 6
    const named = (y: number): Name => ({ id: member.id, text, x, y, from: x, to: x + textWidth(text, pen.text), anchor: 'start' }) // prettier-ignore
    const above = named(at[1] - 5)
    const under = named(at[1] + pen.text + 4 * pen.k)
    const name = [above, under].find((one) => isClear(roomOf(one, pen), taken, 2)) ?? above
    taken.push(roomOf(name, pen))
    return [name]
  })
}

function allNames(members: readonly Member[], view: PlanView, pen: Pen, cuts: readonly number[]): Name[] {
  const upright = namesOf(members, view, pen, cuts)
  return [...upright, ...levelNames(members, view, pen, upright)]
}

/** The room that the names of members take on a plan, px; `cuts` are x of section lines. */
export const takenByMemberNames = (
  members: readonly Member[],
  view: PlanView,
  pen: Pen,
  cuts: readonly number[],
): Patch[] =>
  // prettier-ignore
  allNames(members, view, pen, cuts).map((name) => roomOf(name, pen))

/** Names of the members above the floor's upper edge, those left out for which there is no room. */
export function MemberNames({
  members,
  view,
  pen,
  cuts,
}: {
  members: readonly Member[]
  view: PlanView
  pen: Pen
  cuts: readonly number[]
}) {
  return (
    <g>
      {allNames(members, view, pen, cuts).map((name) => (
        <Words
          key={name.id}
          x={name.x}
          y={name.y}
          anchor={name.anchor}
          size={pen.text}
          colour={pen.colours.line}
          opacity={0.85}
          halo={pen.colours.halo}
        >
          {name.text}
        </Words>
      ))}
    </g>
  )
}
