import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { MountedHeater } from '#app/domain/layout/layout.ts'
import { supportOf } from '#app/domain/layout/supports.ts'
import type { Site } from '#app/domain/site/site.ts'
import { degrees, type Vec3 } from '#app/domain/vector.ts'

/** How chain is made and taken up; lengths m. */
export interface HangingData {
  readonly linkPitch: number
  /** Clamp, screw links and turnbuckle at rest, of each hanger. */
  readonly hardwareAllowance: number
  /** How much a turnbuckle shortens (negative) and lengthens. */
  readonly takeUp: readonly [shorter: number, longer: number]
}

/** Chain of 28 mm pitch with the usual fittings (hanging data of the demo catalogue). */
const plainHanging: HangingData = { linkPitch: 0.028, hardwareAllowance: 0.095, takeUp: [-0.04, 0.04] }

/** One hanger: from a suspension eye plumb up to its member. Lengths m. */
interface Hanger {
  readonly eye: Vec3
  readonly memberId: string
  /** Underside of the member over the eye. */
  readonly underside: number
  readonly drop: number
  /** Length left for chain or rod when the fittings are taken off. */
  readonly net: number
  /** Whole links, the number nearest to the net length; null for rods. */
  readonly links: number | null
  /** Chain or rod as cut. */
  readonly cutLength: number
  /** What the whole links leave over (positive) or lack. */
  readonly residual: number
  /** What the turnbuckle cannot take up of it. */
  readonly left: number
  /** The fittings alone are longer than the drop: a short bracket is wanted. */
  readonly tooShort: boolean
}

/** The hangers of one heater. Angles in degrees, positive when the first end (against the element's direction) is higher. */
export interface HangSchedule {
  readonly heaterId: string
  readonly hangers: readonly [Hanger, Hanger]
  /** Tilt of the element's axis that whole links alone would leave. */
  readonly residualTiltDeg: number
  /** Tilt that is left after the turnbuckles. */
  readonly tiltLeftDeg: number
}

/** The hang schedule of a heater on chain or drop rods; null for other mounts and while an eye has no member above it. */
export function hangScheduleOf(
  site: Site,
  heater: MountedHeater,
  model: HeaterModel,
  data: HangingData = plainHanging,
): HangSchedule | null {
  if (heater.mount !== 'chain' && heater.mount !== 'drop rods') return null
  const [first, second] = supportOf(site, heater, model).eyes.map(({ eye, place }) => {
    if (!place || place.to === null) return null
    return hangerOf(eye, place.id, place.to, heater.mount === 'chain', data)
  })
  const pitch = model.suspensionEyePitch
  if (!first || !second || pitch === null) return null
  const tilt = (a: number, b: number) => degrees(Math.atan2(a - b, pitch))
  return {
    heaterId: heater.id,
    hangers: [first, second],
    residualTiltDeg: tilt(first.residual, second.residual),
    tiltLeftDeg: tilt(first.left, second.left),
  }
}

function hangerOf(eye: Vec3, memberId: string, underside: number, chain: boolean, data: HangingData): Hanger {
  const drop = underside - eye[2]
  const net = drop - data.hardwareAllowance
  const links = chain ? Math.max(0, Math.round(net / data.linkPitch)) : null
  const cutLength = links === null ? Math.max(0, net) : links * data.linkPitch
  const residual = net - cutLength
  const left = residual - Math.min(data.takeUp[1], Math.max(data.takeUp[0], residual))
  return { eye, memberId, underside, drop, net, links, cutLength, residual, left, tooShort: net < data.takeUp[0] }
}

/**
 * A splayed pair: two hangers from one eye up to points `sideways` to either side of it and `drop` above it, m. Length of
 * each, √(δ² + Δz²), m, and its tension W/(2 cos φ), N, for a weight in N.
 */
export function splayedPair(sideways: number, drop: number, weight: number): { length: number; tension: number } {
  const length = Math.hypot(sideways, drop)
  return { length, tension: (weight * length) / (2 * drop) }
}
