import type { Brief } from '#app/domain/brief/brief.ts'
import { feelsLike, type Conditions } from '#app/domain/comfort/feels-like.ts'
import { heatAtSeat, plainHeatAtSeat, type PlainHeat, type SeatHeat } from '#app/domain/comfort/seat-heat.ts'
import { sensationOf, type Sensation } from '#app/domain/comfort/sensation.ts'
import { sourcesOf, type Sources } from '#app/domain/comfort/sources.ts'
import { surroundingsAt, type Surroundings } from '#app/domain/comfort/surroundings.ts'
import type { Obstruction } from '#app/domain/flux/shading.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import { electricalPower } from '#app/domain/heaters/power.ts'
import type { Layout } from '#app/domain/layout/layout.ts'
import { isInside } from '#app/domain/site/geometry.ts'
import type { Seat, Site } from '#app/domain/site/site.ts'

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
 * What the heaters of one layout do at one seat, as far as it follows a drag. Irradiances in W/m², null when no heater
 * (with beam data) is placed: the page then shows "–".
 */
export interface SeatFigures {
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
  /** Horizontal irradiance at the head ÷ on the body: hot head, cold feet. Null without heat on the body. */
  readonly headToBody: number | null
  readonly target: TargetOutcome
  /** Effective radiant field on the body, W/m² of body surface. */
  readonly field: number | null
  readonly surroundings: Surroundings
  readonly feelsLike: Readonly<Record<WindName, FeelsLikePair>>
  readonly sensation: Readonly<Record<WindName, { readonly before: Sensation; readonly after: Sensation | null }>>
  /** Heaters whose model is unknown or has no beam data: the figures are without them. */
  readonly cannotTell: readonly string[]
}

/** All that the heaters of one layout do at one seat: with what cautions go by. */
export interface SeatWarmth extends SeatFigures {
  /** Largest irradiance over all directions at the body's height. */
  readonly bodyLargest: number | null
  /**
   * Near-infrared irradiance (0.78–3 µm) at the eye, at the head's height: the largest over all level directions, on
   * vertical planes, as a guest looks level and not up into a heater. Null when it cannot be told.
   */
  readonly nearInfraredAtEye: number | null
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

/** What a seat's figures depend on. Obstructions absent: nothing stands in the way (the reference case). */
export interface WarmthInput {
  readonly site: Site
  readonly brief: Brief
  readonly layout: Pick<Layout, 'heaters'>
  readonly models: ReadonlyMap<string, HeaterModel>
  readonly obstructions?: readonly Obstruction[]
}

const sum = (values: readonly number[]): number => values.reduce((total, value) => total + value, 0)

/** Air speed of the calm evening, m/s: the least at which air counts as moving. */
const calmWind = 0.2

/** Air speed at the seats for each of the three winds, m/s. */
export const windOf = (brief: Brief, name: WindName): number =>
  ({ calm: calmWind, design: brief.windDesign, gust: brief.windGust })[name]

/** What the air does to a guest of this seat at one of the three winds. */
export const conditionsAt = (seat: Seat, brief: Brief, surroundings: Surroundings, wind: WindName): Conditions => ({
  airTemperature: brief.airTemperature,
  surroundingsTemperature: surroundings.temperature,
  wind: windOf(brief, wind),
  clothing: brief.clothing,
  posture: seat.posture,
})

/**
 * How warm every seat of the site is under a layout: the one function behind the page, the CSV, the comparison and the
 * API. Throws a RangeError for figures that are not finite.
 */
export function seatWarmth(input: WarmthInput): SeatWarmth[] {
  const sources = sourcesOf(input.layout, input.models)
  return input.site.seats.map((seat) => warmthOfSeat(seat, sources, input).warmth)
}

/** Less than this on the body is no heat to compare with, W/m². */
const noHeat = 1e-6

/** Elements × seats up to which a layout's heat is kept between calls: 100 MB. */
const mostRemembered = 100_000

/** The figures of every seat that follow a drag: `seatWarmth` without what only cautions ask for, in half the time. */
export function seatFigures(input: WarmthInput): SeatFigures[] {
  const sources = sourcesOf(input.layout, input.models)
  return input.site.seats.map((seat) => {
    const heat = plainHeatAtSeat(seat, sources.sources, input.obstructions, isRemembered(sources, input))
    return figuresOfSeat(seat, sources, input, heat)
  })
}

const isRemembered = ({ sources }: Sources, { site }: WarmthInput): boolean =>
  sources.length * site.seats.length <= mostRemembered

/** The figures of one seat and, from the same call, what each element gives to them. */
export function warmthOfSeat(
  seat: Seat,
  sources: Sources,
  input: WarmthInput,
): { readonly warmth: SeatWarmth; readonly heat: SeatHeat } {
  const heat = heatAtSeat(seat, sources.sources, input.obstructions, isRemembered(sources, input))
  const warmth: SeatWarmth = {
    ...figuresOfSeat(seat, sources, input, heat),
    bodyLargest: told(sources, heat.bodyLargest.parts),
    nearInfraredAtEye: told(sources, heat.nearInfrared?.parts),
  }
  return { warmth, heat }
}

/** The sum of what the sources give; null without a source or with one that cannot be told. */
const told = ({ sources }: Sources, parts: readonly number[] | undefined): number | null =>
  sources.length > 0 && parts ? sum(parts) : null

function figuresOfSeat(seat: Seat, all: Sources, { site, brief }: WarmthInput, heat: PlainHeat): SeatFigures {
  const { sources, cannotTell } = all
  const [body, headHorizontal] = [told(all, heat.body), told(all, heat.headHorizontal)]
  const field = told(all, heat.field)
  const surroundings = surroundingsAt(seat, site, brief)
  const pairAt = (name: WindName): FeelsLikePair => {
    const conditions = conditionsAt(seat, brief, surroundings, name)
    const after = field === null ? null : feelsLike(field, conditions)
    return { wind: conditions.wind, before: feelsLike(0, conditions), after }
  }
  const pairs = { calm: pairAt('calm'), design: pairAt('design'), gust: pairAt('gust') }
  const sensed = ({ wind, before, after }: FeelsLikePair) => ({
    before: sensationOf(before, wind, brief),
    after: after === null ? null : sensationOf(after, wind, brief),
  })
  return {
    seat,
    onFloor: isInside(site.floor, seat.x, seat.y),
    body,
    byHeater: sharesByHeater(sources, heat.body),
    head: told(all, heat.head.parts),
    headDirection: sources.length > 0 ? heat.head.direction : null,
    headHorizontal,
    headToBody: body === null || headHorizontal === null || body < noHeat ? null : headHorizontal / body,
    target: targetOutcome(seat, body, brief),
    field,
    surroundings,
    feelsLike: pairs,
    sensation: { calm: sensed(pairs.calm), design: sensed(pairs.design), gust: sensed(pairs.gust) },
    cannotTell,
  }
}

function sharesByHeater(sources: Sources['sources'], parts: readonly number[]): SeatWarmth['byHeater'] {
  const shares = new Map<string, number>()
  sources.forEach(({ heaterId }, i) => shares.set(heaterId, (shares.get(heaterId) ?? 0) + (parts[i] ?? 0)))
  return [...shares].map(([heaterId, irradiance]) => ({ heaterId, irradiance }))
}

/** The ends of the band belong to it. */
function targetOutcome(seat: Seat, body: number | null, { target }: Brief): TargetOutcome {
  if (seat.priority === 'not heated') return 'not heated'
  if (body === null) return 'no heater'
  if (body < target.low) return 'below'
  return body > target.high ? 'above' : 'in target'
}

/** Whether seats on the floor count that are not primary: figures of the primary ones alone then say so. */
export const hasOthersThanPrimary = (warmth: readonly Pick<SeatWarmth, 'seat' | 'onFloor'>[]): boolean =>
  warmth.some(({ seat, onFloor }) => onFloor && seat.priority === 'secondary')

/** What a layout comes to over the seats on the floor: statistics over the primary seats, the head over every seat. */
export function layoutTotals(
  warmth: readonly SeatFigures[],
  layout: Pick<Layout, 'heaters'>,
  models: ReadonlyMap<string, HeaterModel>,
  brief: Brief,
): LayoutTotals {
  const standing = warmth.filter(({ onFloor }) => onFloor)
  const counted = standing.filter(({ seat }) => seat.priority !== 'not heated')
  const primary = standing.filter(({ seat }) => seat.priority === 'primary')
  const bodies = figuresOf(primary, ({ body }) => body)
  const mean = bodies.length === 0 ? null : sum(bodies.map(({ irradiance }) => irradiance)) / bodies.length
  const [coldest = null, hottest = null] = [bodies[0], bodies.at(-1)]
  const even = coldest && mean !== null && mean > 0 && bodies.length > 1
  const power = sum(layout.heaters.map((heater) => powerOf(heater, models)))
  return {
    heaters: layout.heaters.length,
    seatsCounted: counted.length,
    seatsInTarget: counted.filter(({ target }) => target === 'in target').length,
    coldest,
    hottest,
    mean,
    evenness: even ? coldest.irradiance / mean : null,
    headMaximum: figuresOf(standing, ({ head }) => head).at(-1) ?? null,
    power,
    ...eveningOf(power, brief),
    cannotTell: warmth[0]?.cannotTell ?? sourcesOf(layout, models).cannotTell,
  }
}

/**
 * Figures nearer together than this are equal, W/m²: two machines differ in the last digits, and seats that lie alike
 * must not change places for it.
 */
const alike = 1e-6

/** The figure of each seat that has one, from the least to the most; equal ones by the seat's id. */
const figuresOf = (warmth: readonly SeatFigures[], figure: (each: SeatFigures) => number | null) =>
  warmth
    .map((each) => ({ seatId: each.seat.id, irradiance: figure(each) }))
    .filter((each): each is { seatId: string; irradiance: number } => each.irradiance !== null)
    .sort((a, b) => {
      const [left, right] = [Math.round(a.irradiance / alike), Math.round(b.irradiance / alike)]
      return left - right || (a.seatId < b.seatId ? -1 : 1)
    })

function powerOf(heater: Layout['heaters'][number], models: ReadonlyMap<string, HeaterModel>): number {
  const model = models.get(heater.model)
  return model ? electricalPower(heater, model).power : 0
}

/** Energy and cost of one evening: power × hours × the share of the time that the heaters are on. */
function eveningOf(power: number, { energy }: Brief): Pick<LayoutTotals, 'energyPerEvening' | 'costPerEvening'> {
  if (!energy) return { energyPerEvening: null, costPerEvening: null }
  const kilowattHours = (power / 1000) * energy.hoursPerEvening * energy.dutyFraction
  const cost = { amount: kilowattHours * energy.pricePerKwh, currency: energy.currency }
  return { energyPerEvening: kilowattHours, costPerEvening: cost }
}
