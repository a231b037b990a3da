import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import { bayOf } from '#app/domain/layout/bay.ts'
import { bodyOf } from '#app/domain/layout/body.ts'
import { roundTurn } from '#app/domain/layout/edits.ts'
import type { MountedHeater } from '#app/domain/layout/layout.ts'
import { reachOf, supportPlaces, type SupportPlace } from '#app/domain/layout/supports.ts'
import { unusedId } from '#app/domain/site/edits.ts'
import { nearestOnSegment } from '#app/domain/site/geometry.ts'
import { memberDirectionDeg, undersideAt } from '#app/domain/site/member.ts'
import type { Member, Site } from '#app/domain/site/site.ts'
import type { Vec2 } from '#app/domain/vector.ts'

/** Lengths are kept to 0.1 mm. */
const rounded = (metres: number): number => Math.round(metres * 1e4) / 1e4

/** A bracket or clamp is moved to this share of its reach. */
const shareOfReach = 0.75

/**
 * The heater moved to the nearest thing that its mount can be fixed to, and naming it: under a member with its element
 * along it (level, when the mount cannot hold a tilt), in the middle of a bay, or beside a wall or pole at three quarters
 * of the reach. Null when the site has no such thing. Height stays.
 */
export function movedToSupport(site: Site, heater: MountedHeater, model: HeaterModel): MountedHeater | null {
  const [place] = supportPlaces(site, heater.mount, [heater.x, heater.y])
  if (!place) return null
  const tiltDeg = model.mountsThatHoldTilt.includes(heater.mount) ? heater.tiltDeg : 0
  const moved = { ...heater, memberId: place.id, tiltDeg }
  if (heater.mount === 'recess box') return movedIntoBay(site, moved, model)
  if (place.kind !== 'member') return movedBeside(site, moved, place, reachOf(model, heater.mount) ?? 0)
  const member = site.members.find(({ id }) => id === place.id)
  const turnDeg = member ? parallelTurn(memberDirectionDeg(member), heater.turnDeg) : heater.turnDeg
  return { ...moved, x: rounded(place.point[0]), y: rounded(place.point[1]), turnDeg }
}

/** The direction along an axis, or against it, that is nearer to a turn, degrees. */
function parallelTurn(axisDeg: number, turnDeg: number): number {
  const away = ((((turnDeg - axisDeg) % 180) + 270) % 180) - 90
  return roundTurn(turnDeg - away)
}

function movedBeside(site: Site, heater: MountedHeater, place: SupportPlace, reach: number): MountedHeater {
  const pole = site.poles.find(({ id }) => id === place.id)
  const wanted = Math.min(place.distance, shareOfReach * reach) + (pole ? pole.diameter / 2 : 0)
  const [dx, dy] = [heater.x - place.point[0], heater.y - place.point[1]]
  const away = Math.hypot(dx, dy)
  const [ux, uy] = away > 0 ? [dx / away, dy / away] : [1, 0]
  return { ...heater, x: rounded(place.point[0] + ux * wanted), y: rounded(place.point[1] + uy * wanted) }
}

/** Into the middle of the bay it is in, square to its members; unchanged where there is no bay. */
function movedIntoBay(site: Site, heater: MountedHeater, model: HeaterModel): MountedHeater | null {
  const bay = bayOf(site, bodyOf(heater, model))
  if (!bay?.left || !bay.right) return null
  const across = (bay.left.clear - bay.right.clear) / 2
  const { from, to, id } = bay.left.member
  const length = Math.hypot(to[0] - from[0], to[1] - from[1]) || 1
  return {
    ...heater,
    memberId: id,
    x: rounded(heater.x - ((to[1] - from[1]) / length) * across),
    y: rounded(heater.y + ((to[0] - from[0]) / length) * across),
  }
}

/** Section of a rail that is only proposed, m. */
const railSection = { width: 0.04, depth: 0.04 }

/**
 * A rail through a heater's place from the nearest member on one side to the nearest on the other, square to the nearer
 * one, its underside straight between theirs. Span and load are for the structure's engineer to confirm. Null without a
 * member on both sides or with a height that is not known.
 */
export function railBetween(site: Site, { x, y }: MountedHeater): Member | null {
  const places = site.members
    .map((member) => ({ member, ...nearestOnSegment(member.from, member.to, x, y) }))
    .filter(({ distance }) => distance > 1e-6)
    .sort((a, b) => a.distance - b.distance)
  const near = places[0]
  if (!near) return null
  const away: Vec2 = [near.point[0] - x, near.point[1] - y]
  const opposite = places.find(({ point }) => {
    const [dx, dy] = [point[0] - x, point[1] - y]
    const against = -(dx * away[0] + dy * away[1])
    return against > 0 && Math.abs(dx * away[1] - dy * away[0]) < 1e-6 * against
  })
  if (!opposite) return null
  const from = undersideAt(site, near.member, x, y)
  const to = undersideAt(site, opposite.member, x, y)
  if (from === null || to === null) return null
  const id = unusedId(site, 'rail')
  return {
    id,
    name: id.replace('-', ' '),
    kind: 'rail between members',
    from: [rounded(near.point[0]), rounded(near.point[1])],
    to: [rounded(opposite.point[0]), rounded(opposite.point[1])],
    underside: { from: rounded(from), to: rounded(to) },
    ...railSection,
    material: 'non-combustible',
    allowedPointLoad: null,
    loadStatus: 'span and load to be confirmed',
  }
}
