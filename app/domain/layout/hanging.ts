import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { HangingData } from '#app/domain/layout/hanging-data.ts'
import type { MountedHeater } from '#app/domain/layout/layout.ts'
import { splayedPair } from '#app/domain/layout/splayed-pair.ts'
import { supportOf, type Support } from '#app/domain/layout/supports.ts'
import { fixedRules } from '#app/domain/rules/fixed-rules.ts'
import type { House } from '#app/domain/rules/house.ts'
import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'
import type { Site } from '#app/domain/site/site.ts'
import { degrees, type Vec3 } from '#app/domain/vector.ts'

/** What becomes of a hanger: it can be made; its fittings alone are too long; a turnbuckle cannot take up the rest. */
type HangerOutcome = 'can be made' | 'too short' | 'beyond the turnbuckle'

/** One hanger: from a suspension eye up to its member, plumb or splayed. Lengths m. */
export interface Hanger {
  /** 0: the end against the element's direction; 1: the end along it. */
  readonly end: 0 | 1
  readonly eye: Vec3
  /** Where it meets its member's underside. */
  readonly anchor: Vec3
  readonly memberId: string
  readonly underside: number
  /** From the eye up to the underside, plumb. */
  readonly drop: number
  /** How far aside of the eye its member is; 0 when it hangs plumb. */
  readonly sideways: number
  /** From eye to underside along the hanger: √(δ² + Δz²). */
  readonly length: number
  /** What pulls in it, N. */
  readonly tension: number
  /** Length left for chain or rod when the fittings are taken off. */
  readonly net: number
  /** Whole links, the number nearest to the net length; null for rods. */
  readonly links: number | null
  /** Chain or rod as cut. */
  readonly cutLength: number
  /** What chain or rod leaves over (positive) or lacks. */
  readonly residual: number
  /** How the turnbuckle is set from rest: longer (positive) or shorter. */
  readonly takeUp: number
  /** What the turnbuckle cannot take up. */
  readonly left: number
  readonly outcome: HangerOutcome
  /** A secondary safety line at this eye: slack beside its hanger. */
  readonly safetyLine: number
}

/**
 * The hangers of one heater, those of its first end first. Tilts of the element's axis in degrees, positive when the
 * first end is higher. Across its axis a heater on two eyes over its middle hangs level by its own weight, and rods hold
 * the tilt set at their heads: hangers of other lengths change nothing there.
 */
export interface HangSchedule {
  readonly heaterId: string
  readonly hangers: readonly Hanger[]
  /** What whole links or rods as cut would leave without turnbuckles. */
  readonly residualTiltDeg: number
  /** What is left after them: along the element, and across it. */
  readonly tiltLeftDeg: number
  readonly tiltAcrossDeg: 0
}

/** Without what binary fractions add: to a nanometre. */
const settled = (metres: number): number => Math.round(metres * 1e9) / 1e9

/** The hang schedule of a heater on chain or drop rods; null for other mounts and while an eye has nothing to hang from. */
export function hangScheduleOf(
  site: Site,
  heater: MountedHeater,
  model: HeaterModel,
  { rules, hanging }: House,
): HangSchedule | null {
  const pitch = model.suspensionEyePitch
  const hung = hungPlaces(site, heater, model, rules)
  if (!hung || pitch === null) return null
  const hangers = hung.map((place) => hangerOf(place, heater.mount === 'chain', hanging))
  const tilt = (of: (hanger: Hanger) => number) =>
    degrees(Math.atan2(eyeRise(hangers, 0, of) - eyeRise(hangers, 1, of), pitch))
  return {
    heaterId: heater.id,
    hangers,
    residualTiltDeg: tilt(({ residual }) => residual),
    tiltLeftDeg: tilt(({ left }) => left),
    tiltAcrossDeg: 0,
  }
}

/** How much higher than drawn an eye hangs when each of its hangers is shorter by `lack`, m. */
function eyeRise(hangers: readonly Hanger[], end: 0 | 1, lack: (hanger: Hanger) => number): number {
  const [a, b] = hangers.filter((hanger) => hanger.end === end)
  if (!a) return 0
  if (!b) return lack(a)
  return lowestBelow(
    { y: -a.sideways, z: a.drop, length: a.length - lack(a) },
    { y: b.sideways, z: b.drop, length: b.length - lack(b) },
  )
}

interface Strand {
  readonly y: number
  readonly z: number
  readonly length: number
}

/**
 * Height at which a weight on two strands comes to rest: the lowest point within both their lengths. That is plumb under
 * one end where the other strand is slack there, else where both circles cross.
 */
function lowestBelow(a: Strand, b: Strand): number {
  for (const [one, other] of [
    [a, b],
    [b, a],
  ] as const) {
    const z = one.z - one.length
    if (Math.hypot(one.y - other.y, z - other.z) <= other.length) return z
  }
  const [dy, dz] = [b.y - a.y, b.z - a.z]
  const apart = Math.hypot(dy, dz)
  const along = (a.length ** 2 - b.length ** 2 + apart ** 2) / (2 * apart)
  const aside = Math.sqrt(Math.max(0, a.length ** 2 - along ** 2))
  return a.z + (along * dz - aside * Math.abs(dy)) / apart
}

/** From where to where a hanger goes and what pulls in it, whatever it is made of. */
type HungPlace = Pick<Hanger, 'end' | 'eye' | 'anchor' | 'memberId' | 'underside' | 'sideways' | 'length' | 'tension'>

/** Where each hanger of a heater on chain or drop rods goes; null for other mounts and without something to hang from. */
export function hungPlaces(
  site: Site,
  heater: MountedHeater,
  model: HeaterModel,
  rules: HouseRules,
): readonly HungPlace[] | null {
  if (heater.mount !== 'chain' && heater.mount !== 'drop rods') return null
  return hungFrom(supportOf(site, heater, model, rules), (model.body.mass * fixedRules.gravity.value) / 2)
}

/** Every hanger's two ends and its tension under `weight` N at each eye; null without something above or beside an eye. */
function hungFrom({ eyes }: Support, weight: number): HungPlace[] | null {
  if (eyes.length === 0) return null
  const hung = eyes.flatMap(({ eye, place, legs }, i): (HungPlace | null)[] => {
    const end = i === 0 ? 0 : 1
    if (legs) {
      const [a, b] = legs
      if (a.underside === null || b.underside === null) return [null]
      const rises = [a, b].map(({ sideways, underside }) => ({ sideways, rise: (underside ?? 0) - eye[2] }))
      const [first, second] = rises
      if (!first || !second || Math.min(first.rise, second.rise) <= 0) return [null]
      const pair = splayedPair([first, second], weight)
      return legs.map((leg, k) => {
        const { length, tension } = pair[k === 0 ? 0 : 1]
        const underside = leg.underside ?? 0
        const anchor: Vec3 = [leg.point[0], leg.point[1], underside]
        return { end, eye, anchor, memberId: leg.memberId, underside, sideways: leg.sideways, length, tension }
      })
    }
    if (!place || place.to === null) return [null]
    const length = place.to - eye[2]
    const anchor: Vec3 = [eye[0], eye[1], place.to]
    return [{ end, eye, anchor, memberId: place.id, underside: place.to, sideways: 0, length, tension: weight }]
  })
  const known = hung.flatMap((hanger) => hanger ?? [])
  return known.length === hung.length ? known : null
}

function hangerOf(place: HungPlace, chain: boolean, data: HangingData): Hanger {
  const net = settled(place.length - data.hardwareAllowance)
  const step = chain ? data.linkPitch : data.rodStep
  const count = Math.max(0, Math.round(net / step))
  const cutLength = settled(count * step)
  const residual = settled(net - cutLength)
  const takeUp = Math.min(data.lengthens, Math.max(-data.shortens, residual))
  const left = settled(residual - takeUp)
  return {
    ...place,
    drop: place.underside - place.eye[2],
    net,
    links: chain ? count : null,
    cutLength,
    residual,
    takeUp,
    left,
    outcome: left === 0 ? 'can be made' : net < -data.shortens ? 'too short' : 'beyond the turnbuckle',
    safetyLine: place.length + data.safetySlack,
  }
}

/** Chain to order for some hang schedules, m: all that is cut, rounded up to whole order lengths. */
export function chainToOrder(schedules: readonly HangSchedule[], data: HangingData): number {
  const cut = schedules.flatMap(({ hangers }) => hangers.filter(({ links }) => links !== null))
  const length = cut.reduce((sum, { cutLength }) => sum + cutLength, 0)
  return Math.ceil(settled(length / data.orderStep)) * data.orderStep
}
