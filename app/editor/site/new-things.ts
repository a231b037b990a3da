import { addMember, addSeat, unusedId } from '#app/domain/site/edits.ts'
import type { Member, Seat, Site } from '#app/domain/site/site.ts'
import type { Vec2 } from '#app/domain/vector.ts'
import { extentOf } from '#app/drawing/plan/plan-view.ts'

const rounded = (metres: number): number => Math.round(metres * 100) / 100
const turn = (degrees: number): number => ((Math.round(degrees) % 360) + 360) % 360

/** Seated heights of ISO 7726, from memory; a site's own last seat wins. */
const firstHeights = { bodyHeight: 0.6, headHeight: 1.1 }

/** The middle of the floor's extent, m. */
export function middleOf(site: Site): Vec2 {
  const { x, y } = extentOf(site.floor)
  return [rounded((x[0] + x[1]) / 2), rounded((y[0] + y[1]) / 2)]
}

/** The direction from a place to the nearest table within 1.5 m; along y when there is none. */
function facingFrom(site: Site, [x, y]: Vec2): number {
  const near = site.tables
    .map(({ centre: [cx, cy] }) => ({ dx: cx - x, dy: cy - y }))
    .sort((a, b) => Math.hypot(a.dx, a.dy) - Math.hypot(b.dx, b.dy))[0]
  if (!near || Math.hypot(near.dx, near.dy) > 1.5) return 90
  return turn((Math.atan2(near.dy, near.dx) * 180) / Math.PI)
}

/** The site with a seat at a place; group, priority and heights are those of the last seat. */
export function withSeatAt(site: Site, at: Vec2): { site: Site; id: string } {
  const last = site.seats.at(-1)
  const id = unusedId(site, 'seat')
  const seat: Seat = {
    id,
    group: last?.group ?? '',
    priority: last?.priority ?? 'primary',
    posture: last?.posture ?? 'seated',
    bodyHeight: last?.bodyHeight ?? firstHeights.bodyHeight,
    headHeight: last?.headHeight ?? firstHeights.headHeight,
    x: rounded(at[0]),
    y: rounded(at[1]),
    facingDeg: facingFrom(site, at),
  }
  return { site: addSeat(site, seat), id }
}

const firstUnderside = 2.6

/** The site with a member across the floor at a place, under the first cover when there is one. */
export function withMemberAt(site: Site, [x]: Vec2): { site: Site; id: string } {
  const { y } = extentOf(site.floor)
  const last = site.members.at(-1)
  const [cover] = site.covers
  const id = unusedId(site, 'member')
  const member: Member = {
    id,
    name: id.replace('-', ' '),
    kind: last?.kind ?? 'beam',
    from: [rounded(x), y[0]],
    to: [rounded(x), y[1]],
    underside: cover ? { follows: cover.id } : { from: firstUnderside, to: firstUnderside },
    width: last?.width ?? 0.06,
    depth: last?.depth ?? 0.12,
    material: last?.material ?? 'unknown',
    allowedPointLoad: last?.allowedPointLoad ?? null,
    loadStatus: last?.loadStatus ?? 'not known',
  }
  return { site: addMember(site, member), id }
}
