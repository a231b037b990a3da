import type { Brief } from '#app/domain/brief/brief.ts'
import type { SeatWarmth } from '#app/domain/comfort/seat-warmth.ts'
import { houseRules } from '#app/domain/rules/house-rules.ts'

/** A limit on what falls on a guest, with where it comes from. Irradiances W/m², always by the largest direction. */
export interface CautionLimit {
  readonly caution: 'stop line' | 'head' | 'near infrared at the eye'
  readonly limit: number
  /** The same limit as it is relaxed in the cold; null where it is not. */
  readonly relaxed: number | null
  readonly source: string
  /** The source's text was not open when the figure was written down: check it before quoting a clause. */
  readonly fromMemory: boolean
  /** What the limit does not say. */
  readonly note: string
}

/** What one limit comes to at one seat. */
export interface SeatCaution extends CautionLimit {
  readonly seatId: string
  readonly at: 'body' | 'head'
  /** Null when no heater is placed or the figure cannot be told. */
  readonly irradiance: number | null
  /** Limit (relaxed where it is) less irradiance; null without the figure. */
  readonly margin: number | null
}

/** Exposures longer than this count as continuous for the eye, s (ICNIRP). */
const continuous = 1000

/**
 * Limit of infrared at the eye, 0.78–3 µm, W/m²: 18 t^−0.75 kW/m² for t seconds, 100 W/m² beyond 1,000 s (ICNIRP; the
 * first from memory).
 */
export const eyeLimit = (seconds: number): number => (seconds > continuous ? 100 : 18_000 * seconds ** -0.75)

/**
 * The continuous limit as relaxed in the cold: 400 W/m² at 0 °C, 300 at 10 °C (from memory), linear between; colder as at
 * 0 °C. Above 10 °C no figure is at hand: null.
 */
export const relaxedEyeLimit = (airTemperature: number): number | null =>
  airTemperature > 10 ? null : 400 - 10 * Math.max(0, airTemperature)

/** The house caution at the head by length of stay, W/m². */
export const headCaution = (stayMinutes: number): number =>
  stayMinutes >= houseRules.longStayMinutes.value
    ? houseRules.headCautionLongStay.value
    : houseRules.headCautionShortStay.value

/** The limits that hold for a brief: the stop line, the house caution and the eye's. */
export function cautionLimits({ stayMinutes, airTemperature }: Brief): CautionLimit[] {
  const seconds = stayMinutes * 60
  const relaxed = seconds > continuous ? relaxedEyeLimit(airTemperature) : null
  return [
    {
      caution: 'stop line',
      limit: houseRules.irradianceStop.value,
      relaxed: null,
      source: houseRules.irradianceStop.source,
      fromMemory: true,
      note: 'Workers, suitably clothed, continuous. It is not a comfort limit and not one for the public.',
    },
    {
      caution: 'head',
      limit: headCaution(stayMinutes),
      relaxed: null,
      source: houseRules.headCautionLongStay.source,
      fromMemory: false,
      note: 'Covers children and bare skin. An engineer may set another figure.',
    },
    {
      caution: 'near infrared at the eye',
      limit: eyeLimit(seconds),
      relaxed,
      source: 'ICNIRP guidelines on incoherent infrared radiation: 100 W/m² beyond 1,000 s; 18 t^−0.75 kW/m² below',
      fromMemory: true,
      note: 'Share of 0.78–3 µm by Planck’s law at the element’s temperature, for an eye that looks at the heaters.',
    },
  ]
}

/** Every limit at every height where it holds: the stop line at body and head, the others at the head. */
export function cautionsAt(warmth: SeatWarmth, brief: Brief): SeatCaution[] {
  const [stop, head, eye] = cautionLimits(brief)
  const one = (limit: CautionLimit | undefined, at: SeatCaution['at'], irradiance: number | null): SeatCaution[] => {
    if (!limit) return []
    const margin = irradiance === null ? null : (limit.relaxed ?? limit.limit) - irradiance
    return [{ ...limit, seatId: warmth.seat.id, at, irradiance, margin }]
  }
  return [
    ...one(stop, 'body', warmth.bodyLargest),
    ...one(stop, 'head', warmth.head),
    ...one(head, 'head', warmth.head),
    ...one(eye, 'head', warmth.nearInfraredAtEye),
  ]
}
