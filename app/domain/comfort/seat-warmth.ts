import type { Sensation } from '#app/domain/comfort/sensation.ts'
import type { Surroundings } from '#app/domain/comfort/surroundings.ts'
import type { Seat } from '#app/domain/site/site.ts'

/** The three winds every figure of "feels like" is given for; never one alone. */
export const windNames = ['calm', 'design', 'gust'] as const
export type WindName = (typeof windNames)[number]

/** "Feels like" with the heaters off and on at the same wind, °C; `after` is null without a heater that can be told. */
export interface FeelsLikePair {
  /** Air speed at the seat, m/s. */
  readonly wind: number
  readonly before: number
  readonly after: number | null
}

/** How warm a seat is against its target band of horizontal irradiance on the body plane. */
export type TargetOutcome = 'below' | 'in target' | 'above' | 'not heated' | 'no heater'

/**
 * What the heaters of one layout do at one seat. Irradiances in W/m², null when no heater (with beam data) is placed:
 * the page then shows "–".
 */
export interface SeatWarmth {
  readonly seat: Seat
  /** A seat outside the floor is not counted in any total until it is moved. */
  readonly onFloor: boolean
  /** Horizontal irradiance on the body plane; it is what the target band is about. */
  readonly body: number | null
  /** The share of each heater in `body`, in the layout's order. */
  readonly byHeater: readonly { readonly heaterId: string; readonly irradiance: number }[]
  /** Largest irradiance over all directions at the head; cautions go by it. */
  readonly head: number | null
  readonly headDirection: readonly [x: number, y: number, z: number] | null
  /** Horizontal irradiance at the head. */
  readonly headHorizontal: number | null
  /** Largest irradiance over all directions at the body's height. */
  readonly bodyLargest: number | null
  /** Horizontal irradiance at the head ÷ on the body: hot head, cold feet. */
  readonly headToBody: number | null
  /** Largest near-infrared irradiance (0.78–3 µm) over all directions at the eye; null when it cannot be told. */
  readonly nearInfraredAtEye: number | null
  readonly target: TargetOutcome
  /** Effective radiant field on the body, W/m² of body surface. */
  readonly field: number | null
  readonly surroundings: Surroundings
  readonly feelsLike: Readonly<Record<WindName, FeelsLikePair>>
  readonly sensation: Readonly<Record<WindName, { readonly before: Sensation; readonly after: Sensation | null }>>
  /** Heaters whose model is unknown or has no beam data: the figures are without them. */
  readonly cannotTell: readonly string[]
}

/** What a layout comes to. Powers W; irradiances W/m². */
export interface LayoutTotals {
  readonly heaters: number
  /** Seats that are to be heated and stand on the floor. */
  readonly seatsCounted: number
  readonly seatsInTarget: number
  /** The primary seats with the least and the most on the body plane; null without figures. */
  readonly coldest: { readonly seatId: string; readonly irradiance: number } | null
  readonly hottest: { readonly seatId: string; readonly irradiance: number } | null
  readonly mean: number | null
  /** Least ÷ mean of the primary seats; null below two of them or without heat. */
  readonly evenness: number | null
  /** The largest irradiance, over all directions, at any head on the site. */
  readonly headMaximum: { readonly seatId: string; readonly irradiance: number } | null
  /** Electrical power at the supply voltage. */
  readonly power: number
  /** kWh of one evening at the brief's hours and duty; null without energy data in the brief. */
  readonly energyPerEvening: number | null
  readonly costPerEvening: { readonly amount: number; readonly currency: 'EUR' | 'USD' } | null
  /** Heaters whose model is unknown or has no beam data. */
  readonly cannotTell: readonly string[]
}
