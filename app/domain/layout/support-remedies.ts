import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import { bayOf } from '#app/domain/layout/bay.ts'
import { bodyOf } from '#app/domain/layout/body.ts'
import { roundTurn } from '#app/domain/layout/edits.ts'
import { facingMembers, firstMet, type FacingMember } from '#app/domain/layout/facing-members.ts'
import type { MountedHeater } from '#app/domain/layout/layout.ts'
import { railKind } from '#app/domain/layout/support-loads.ts'
import { reachOf, supportPlaces, type SupportPlace } from '#app/domain/layout/supports.ts'
import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'
import { unusedId } from '#app/domain/site/edits.ts'
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
export function movedToSupport(
  site: Site,
  heater: MountedHeater,
  model: HeaterModel,
  rules: HouseRules,
): MountedHeater | null {
  const [place] = supportPlaces(site, heater.mount, [heater.x, heater.y])
  if (!place) return null
  const tiltDeg = model.mountsThatHoldTilt.includes(heater.mount) ? heater.tiltDeg : 0
  const moved = { ...heater, memberId: place.id, tiltDeg, ...(heater.splayed ? { splayed: false } : {}) }
  if (heater.mount === 'recess box') return movedIntoBay(site, moved, model)
  if (place.kind !== 'member') return movedBeside(site, moved, place, reachOf(model, heater.mount, rules) ?? 0)
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
 * Rails that would carry a heater where it is, each from a member on one side to a member on the other, its underside
 * straight between theirs: one along the element, under both of its eyes; where the element runs along the members, one
 * square to them through each eye; one through the middle for what hangs at one point. Span and load are for the
 * structure's engineer to confirm. Null for walls, poles and bays, without a member on both sides, with a height that is
 * not known, and where the rail would be lower than the heater.
 */
export function railsFor(site: Site, heater: MountedHeater, model: HeaterModel): readonly Member[] | null {
  const hung = heater.mount === 'chain' || heater.mount === 'drop rods'
  if (!hung && heater.mount !== 'ceiling bracket' && heater.mount !== 'beam clamp') return null
  const members = site.members.filter(({ kind }) => kind !== railKind)
  const body = bodyOf(heater, model)
  const half = hung ? (model.suspensionEyePitch ?? 0) / 2 : 0
  const [x, y, along] = [heater.x, heater.y, [body.u[0], body.u[1]] as const]
  const least = body.centre[2] + body.half.w
  const through = spanThrough(members, [x, y], along, half)
  if (through) return railsOf(site, [through], least)
  const eyes: Vec2[] = half === 0 ? [[x, y]] : [-half, half].map((d): Vec2 => [x + along[0] * d, y + along[1] * d])
  const spans = eyes.map((eye) => facingMembers(members, eye))
  return spans.every((span) => span !== null) ? railsOf(site, spans, least) : null
}

type Span = readonly [FacingMember, FacingMember]

/** From member to member along the element, reaching beyond both eyes. */
function spanThrough(members: readonly Member[], at: Vec2, [ux, uy]: Vec2, half: number): Span | null {
  const [back, ahead] = [firstMet(members, at, [-ux, -uy]), firstMet(members, at, [ux, uy])]
  if (!back || !ahead) return null
  return Math.min(back.distance, ahead.distance) > half ? [back, ahead] : null
}

function railsOf(site: Site, spans: readonly Span[], least: number): readonly Member[] | null {
  let taken = site
  const rails: Member[] = []
  for (const [near, far] of spans) {
    const rail = railOf(taken, near, far)
    if (!rail || !('from' in rail.underside)) return null
    if (Math.min(rail.underside.from, rail.underside.to) < least) return null
    rails.push(rail)
    taken = { ...taken, members: [...taken.members, rail] }
  }
  return rails
}

function railOf(site: Site, near: FacingMember, far: FacingMember): Member | null {
  const from = undersideAt(site, near.member, near.point[0], near.point[1])
  const to = undersideAt(site, far.member, far.point[0], far.point[1])
  if (from === null || to === null) return null
  const id = unusedId(site, 'rail')
  return {
    id,
    name: id.replace('-', ' '),
    kind: railKind,
    from: [rounded(near.point[0]), rounded(near.point[1])],
    to: [rounded(far.point[0]), rounded(far.point[1])],
    underside: { from: rounded(from), to: rounded(to) },
    ...railSection,
    material: 'non-combustible',
    allowedPointLoad: null,
    loadStatus: 'span and load to be confirmed',
  }
}
