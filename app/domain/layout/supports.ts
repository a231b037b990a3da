import type { HeaterModel, Mount } from '#app/domain/heaters/heater-model.ts'
import { bayOf } from '#app/domain/layout/bay.ts'
import { bodyOf, type Body } from '#app/domain/layout/body.ts'
import type { MountedHeater } from '#app/domain/layout/layout.ts'
import { splayAngleDeg, splayedLegs, type SplayedLeg } from '#app/domain/layout/splayed-pair.ts'
import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'
import { coverHeightAt } from '#app/domain/site/cover.ts'
import { nearestOnSegment } from '#app/domain/site/geometry.ts'
import { undersideAt } from '#app/domain/site/member.ts'
import type { Member, Site } from '#app/domain/site/site.ts'
import { add, scale, type Vec2, type Vec3 } from '#app/domain/vector.ts'

/** Something a heater can be fixed to, as seen from a place in plan. */
export interface SupportPlace {
  readonly kind: 'member' | 'wall' | 'pole'
  readonly id: string
  readonly name: string
  /** The point of it nearest to the place, in plan. */
  readonly point: Vec2
  /** Sideways distance in plan: to a member's axis, a wall's face, a pole's surface, m. */
  readonly distance: number
  /** Lowest and highest point that may carry a heater there, m; null when not known. */
  readonly from: number | null
  readonly to: number | null
}

/** What carries one suspension eye. */
interface EyeSupport {
  readonly eye: Vec3
  readonly place: SupportPlace | null
  /** Its two hangers where it hangs from a splayed pair; null where it hangs plumb from `place`. */
  readonly legs: readonly [SplayedLeg, SplayedLeg] | null
}

/** Why a heater is held or not. */
export type SupportReason =
  | 'held'
  | 'nothing to fix to'
  | 'out of reach'
  | 'an eye has no member'
  | 'not between members'
  | 'splayed too flat'
  | 'support too low'
  | 'tilt not held'
  | 'not in a bay'
  | 'no cover above'
  | 'reach not stated'
  | 'eyes not stated'
  | 'height not known'

/** How a heater is carried. Distances in plan, m. */
export interface Support {
  readonly outcome: 'held' | 'not held' | 'cannot tell'
  readonly reason: SupportReason
  /** Ids of what carries it, each once. */
  readonly ids: readonly string[]
  /** Distance that decides: the worst eye's, or the heater's centre from its nearest support. */
  readonly distance: number | null
  readonly reach: number | null
  /** The nearest thing this mount could be fixed to. */
  readonly nearest: SupportPlace | null
  /** For chain and drop rods: each suspension eye with its member. */
  readonly eyes: readonly EyeSupport[]
}

const kindOf: Record<Mount, SupportPlace['kind']> = {
  chain: 'member',
  'drop rods': 'member',
  'ceiling bracket': 'member',
  'beam clamp': 'member',
  'recess box': 'member',
  'wall bracket': 'wall',
  'pole clamp': 'pole',
}

/** Distances within this of a reach count as within it, m. */
export const closeEnough = 1e-9

/** Angles smaller than this are level, degrees. */
const levelDeg = 1e-6

/** Everything that this mount could be fixed to, seen from a place in plan, nearest first. */
export function supportPlaces(site: Site, mount: Mount, [x, y]: Vec2): SupportPlace[] {
  return placesOf(site, kindOf[mount], x, y).sort((a, b) => a.distance - b.distance)
}

function placesOf(site: Site, kind: SupportPlace['kind'], x: number, y: number): SupportPlace[] {
  if (kind === 'member') {
    return site.members.map((member) => {
      const { point, distance } = nearestOnSegment(member.from, member.to, x, y)
      const height = undersideAt(site, member, x, y)
      return { kind, id: member.id, name: member.name, point, distance, from: null, to: height }
    })
  }
  if (kind === 'wall') {
    return site.walls.map((wall) => {
      const { point, distance } = nearestOnSegment(wall.from, wall.to, x, y)
      return { kind, id: wall.id, name: wall.name, point, distance, from: 0, to: wall.top ?? Infinity }
    })
  }
  return site.poles.map(({ id, name, at, diameter, top }) => {
    const distance = Math.max(0, Math.hypot(x - at[0], y - at[1]) - diameter / 2)
    return { kind, id, name, point: at, distance, from: 0, to: top }
  })
}

/**
 * The suspension eyes of a body: over the element's axis, at the height of the middle of its back, first the one against
 * u; null when not stated. A tilted body turns about its axis, so its eyes stay over it in plan.
 */
function suspensionEyes(body: Body, model: HeaterModel): readonly [Vec3, Vec3] | null {
  if (model.suspensionEyePitch === null) return null
  const [x, y, z] = body.centre
  const over: Vec3 = [x, y, z - body.half.w * body.w[2]]
  const toEye = scale(body.u, model.suspensionEyePitch / 2)
  return [add(over, scale(toEye, -1)), add(over, toEye)]
}

/** How far a mount of this model may hold it from its support, m; null when its manual does not say. */
export function reachOf(model: HeaterModel, mount: Mount, { chainSideways }: HouseRules): number | null {
  return model.mountReach[mount] ?? (mount === 'chain' ? chainSideways : null)
}

/**
 * How a heater is carried where it is. Chains on one member hang plumb, so each eye of a chain pair must be under a
 * member (within the house's sideways limit); rods, brackets and clamps reach as far as the model's manual says; a recess box
 * lies in a bay under a cover. The support it names is taken when in reach; a heater that names none takes the nearest.
 */
export function supportOf(site: Site, heater: MountedHeater, model: HeaterModel, rules: HouseRules): Support {
  const body = bodyOf(heater, model)
  const support = carried(site, heater, model, body, rules)
  if (support.outcome !== 'held' || Math.abs(heater.tiltDeg) < levelDeg) return support
  if (model.mountsThatHoldTilt.includes(heater.mount)) return support
  return { ...support, outcome: 'not held', reason: 'tilt not held' }
}

function carried(site: Site, heater: MountedHeater, model: HeaterModel, body: Body, rules: HouseRules): Support {
  const places = supportPlaces(site, heater.mount, [heater.x, heater.y])
  const reach = reachOf(model, heater.mount, rules)
  const none = { ids: [], distance: places[0]?.distance ?? null, reach, nearest: places[0] ?? null, eyes: [] }
  if (!places[0]) return { ...none, outcome: 'not held', reason: 'nothing to fix to' }
  switch (heater.mount) {
    case 'chain':
    case 'drop rods':
      return heater.splayed
        ? carriedBySplayedPairs(site, suspensionEyes(body, model), none, rules)
        : carriedByEyes(site, heater, suspensionEyes(body, model), none)
    case 'recess box':
      return carriedInBay(site, body, none)
    default:
      return carriedRigidly(heater, body, places, none)
  }
}

type Uncarried = Omit<Support, 'outcome' | 'reason'>

function carriedByEyes(
  site: Site,
  heater: MountedHeater,
  eyes: readonly [Vec3, Vec3] | null,
  none: Uncarried,
): Support {
  if (!eyes) return { ...none, outcome: 'cannot tell', reason: 'eyes not stated' }
  const { reach } = none
  if (reach === null) return { ...none, outcome: 'cannot tell', reason: 'reach not stated' }
  const supports = eyes.map((eye) => eyeSupport(site, heater, eye, reach))
  const worst = Math.max(...supports.map(({ distance }) => distance))
  const found = { ...none, eyes: supports.map(({ eye, place }): EyeSupport => ({ eye, place, legs: null })) }
  if (supports.some(({ place }) => !place)) {
    const aside = (none.distance ?? 0) > reach + closeEnough
    return aside
      ? { ...found, outcome: 'not held', reason: 'out of reach' }
      : { ...found, distance: worst, outcome: 'not held', reason: 'an eye has no member' }
  }
  const ids = [...new Set(supports.flatMap(({ place }) => place?.id ?? []))]
  const named = site.members.find(({ id }) => id === heater.memberId)
  const distance = named && !ids.includes(named.id) ? distanceTo(named, heater) : worst
  if (named && !ids.includes(named.id)) return { ...found, distance, outcome: 'not held', reason: 'out of reach' }
  const carriedBy = { ...found, ids, distance: worst }
  if (supports.some(({ place }) => place?.to === null)) {
    return { ...carriedBy, outcome: 'cannot tell', reason: 'height not known' }
  }
  const low = supports.some(({ eye, place }) => (place?.to ?? Infinity) < eye[2] - closeEnough)
  return low
    ? { ...carriedBy, outcome: 'not held', reason: 'support too low' }
    : { ...carriedBy, outcome: 'held', reason: 'held' }
}

const distanceTo = (member: Member, { x, y }: MountedHeater): number =>
  nearestOnSegment(member.from, member.to, x, y).distance

/** The member that carries an eye: the one the heater names when in reach, else the nearest in reach. */
function eyeSupport(site: Site, heater: MountedHeater, eye: Vec3, reach: number): PlumbEye {
  const places = supportPlaces(site, heater.mount, [eye[0], eye[1]])
  const within = places.filter(({ distance }) => distance <= reach + closeEnough)
  const place = within.find(({ id }) => id === heater.memberId) ?? within[0] ?? null
  return { eye, place, distance: place?.distance ?? places[0]?.distance ?? Infinity }
}

interface PlumbEye {
  readonly eye: Vec3
  readonly place: SupportPlace | null
  readonly distance: number
}

/** Each eye between two members, both within reach and steep enough. */
function carriedBySplayedPairs(
  site: Site,
  eyes: readonly [Vec3, Vec3] | null,
  none: Uncarried,
  { splayReach: reach, splayAngleDeg: most }: HouseRules,
): Support {
  if (!eyes) return { ...none, outcome: 'cannot tell', reason: 'eyes not stated' }
  const pairs = eyes.map((eye): EyeSupport => ({ eye, place: null, legs: splayedLegs(site, eye) }))
  const legs = pairs.flatMap((pair) => (pair.legs ?? []).map((leg) => ({ ...leg, rise: riseOf(leg, pair.eye) })))
  const distance = legs.length > 0 ? Math.max(...legs.map(({ sideways }) => sideways)) : none.distance
  const found = { ...none, reach, distance, eyes: pairs }
  if (pairs.some((pair) => !pair.legs)) return { ...found, outcome: 'not held', reason: 'not between members' }
  const carriedBy = { ...found, ids: [...new Set(legs.map(({ memberId }) => memberId))] }
  if (legs.some(({ sideways }) => sideways > reach + closeEnough)) {
    return { ...found, outcome: 'not held', reason: 'out of reach' }
  }
  if (legs.some(({ rise }) => rise === null))
    return { ...carriedBy, outcome: 'cannot tell', reason: 'height not known' }
  if (legs.some(({ rise }) => (rise ?? 0) < closeEnough)) {
    return { ...carriedBy, outcome: 'not held', reason: 'support too low' }
  }
  const flat = legs.some(({ sideways, rise }) => splayAngleDeg(sideways, rise ?? 0) > most + levelDeg)
  return flat
    ? { ...carriedBy, outcome: 'not held', reason: 'splayed too flat' }
    : { ...carriedBy, outcome: 'held', reason: 'held' }
}

const riseOf = ({ underside }: SplayedLeg, eye: Vec3): number | null => (underside === null ? null : underside - eye[2])

function carriedInBay(site: Site, body: Body, none: Uncarried): Support {
  const bay = bayOf(site, body)
  const beside = [bay?.left, bay?.right].flatMap((side) => side ?? [])
  const covered = site.covers.some((cover) => coverHeightAt(cover, body.centre[0], body.centre[1]) !== null)
  if (!covered) return { ...none, outcome: 'not held', reason: 'no cover above' }
  const ids = beside.map(({ member }) => member.id)
  if (beside.length < 2) return { ...none, ids, outcome: 'not held', reason: 'not in a bay' }
  return { ...none, ids, reach: null, distance: null, outcome: 'held', reason: 'held' }
}

function carriedRigidly(heater: MountedHeater, body: Body, places: readonly SupportPlace[], none: Uncarried): Support {
  const named = places.find(({ id }) => id === heater.memberId)
  const place = named ?? places[0]
  if (!place) return { ...none, outcome: 'not held', reason: 'nothing to fix to' }
  const found = { ...none, distance: place.distance }
  if (none.reach === null) return { ...found, outcome: 'cannot tell', reason: 'reach not stated' }
  if (place.distance > none.reach + closeEnough) return { ...found, outcome: 'not held', reason: 'out of reach' }
  const carriedBy = { ...found, ids: [place.id] }
  if (place.to === null) return { ...carriedBy, outcome: 'cannot tell', reason: 'height not known' }
  const low = place.to < (place.kind === 'member' ? heater.lowestPoint : body.centre[2]) - closeEnough
  return low
    ? { ...carriedBy, outcome: 'not held', reason: 'support too low' }
    : { ...carriedBy, outcome: 'held', reason: 'held' }
}
