import { feelsLikePerField } from '#app/domain/comfort/feels-like.ts'
import { bodyPoint, fieldAtSeat, headPoint, heatAtSeat, type SeatHeat } from '#app/domain/comfort/seat-heat.ts'
import { conditionsAt, type SeatWarmth, type WarmthInput, type WindName } from '#app/domain/comfort/seat-warmth.ts'
import { sourcesOf, type Source } from '#app/domain/comfort/sources.ts'
import { surroundingsAt } from '#app/domain/comfort/surroundings.ts'
import { irradianceAt } from '#app/domain/flux/irradiance.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { MountedHeater } from '#app/domain/layout/layout.ts'
import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'
import type { Seat, Site } from '#app/domain/site/site.ts'
import { shiftsOf } from '#app/domain/site/tolerance.ts'
import type { Vec3 } from '#app/domain/vector.ts'

/** A figure of a seat whose tolerance is asked for. */
export type SeatFigure =
  | { readonly quantity: 'body' }
  | { readonly quantity: 'head' }
  | { readonly quantity: 'feels-like'; readonly wind: WindName }

/** Figures that have a tolerance: those, and the largest irradiance at the body's height, which the stop line is about. */
export type TolerancedFigure = SeatFigure | { readonly quantity: 'body-largest' }

/**
 * What counts as uncertain. `everything` is for the figure as it will be on an evening: the seat's place, the heaters'
 * places, their efficiency and the voltage. `seat` is for a rule's margin: the measured sizes that place the seat alone,
 * as a layout is judged with its heaters where they are drawn and powered by the data sheet, and measuring the site can
 * settle no more than the site's own sizes.
 */
export type Uncertain = 'everything' | 'seat'

/** How exact the things are that a flux rests on: lengths m, efficiency and voltage as shares. */
export interface FluxTolerances {
  readonly heaterPosition: number
  readonly heaterHeight: number
  /** Of a seat's coordinate that no dimension moves. */
  readonly seat: number
  /** Of the radiant efficiency when the data sheet states no range. */
  readonly efficiency: number
  readonly voltage: number
}

/** Of the supply where nothing else is known. Voltage: service range A of ANSI C84.1, ± 5 % (from memory). */
export const supplyTolerances = { efficiency: 0.05, voltage: 0.05 } as const

/** Where nothing else is known: lengths by house rule. */
export const fluxTolerances = ({ toleranceUnstated }: Pick<HouseRules, 'toleranceUnstated'>): FluxTolerances => ({
  heaterPosition: toleranceUnstated,
  heaterHeight: toleranceUnstated,
  seat: toleranceUnstated,
  ...supplyTolerances,
})

/** What one uncertain thing does to the figure: change per unit × its tolerance, in the figure's unit. */
interface ToleranceShare {
  readonly of: string
  readonly tolerance: number
  readonly unit: 'm' | 'share'
  readonly change: number
}

/** Tolerance of a figure: root of the sum of squares of its shares, the largest first. */
export interface FigureTolerance {
  readonly total: number
  readonly shares: readonly ToleranceShare[]
}

/** Step of the central differences, m: their error is of the order of (step / distance)². */
const step = 1e-3

/** The figure itself; null without heaters that can be told. */
export function figureOf(warmth: SeatWarmth, figure: TolerancedFigure): number | null {
  switch (figure.quantity) {
    case 'body':
      return warmth.body
    case 'body-largest':
      return warmth.bodyLargest
    case 'head':
      return warmth.head
    case 'feels-like':
      return warmth.feelsLike[figure.wind].after
  }
}

/** What each source gives to the figure, in the figure's unit: W/m², or K of feels-like. */
export function figureParts(warmth: SeatWarmth, heat: SeatHeat, figure: SeatFigure, input: WarmthInput): number[] {
  if (figure.quantity === 'body') return [...heat.body]
  if (figure.quantity === 'head') return [...heat.head.parts]
  const conditions = conditionsAt(warmth.seat, input.brief, warmth.surroundings, figure.wind)
  const perField = feelsLikePerField(conditions)
  return heat.field.map((field) => field * perField)
}

/**
 * Tolerance of a seat's figure to first order, the things it rests on taken as independent: lengths by central
 * differences; radiant efficiency (one error for all heaters of a model) and voltage (one for all) by their parts. Null
 * without heaters that can be told.
 */
export function seatTolerance(
  input: WarmthInput,
  seat: Seat,
  figure: TolerancedFigure,
  uncertain: Uncertain,
  tolerances: FluxTolerances,
): FigureTolerance | null {
  const { sources } = sourcesOf(input.layout, input.models)
  if (sources.length === 0) return null
  const partsOf = partsNear(input, seat, figure, sources)
  const everything = uncertain === 'everything'
  const shares = [
    ...seatShares(input.site, seat, figure, tolerances, (moved) => sum(partsOf(sources, moved))),
    ...(everything ? placeShares(input, tolerances, (moved) => sum(partsOf(moved, seat))) : []),
    ...(everything ? supplyShares(input, sources, partsOf(sources, seat), tolerances) : []),
  ]
  const total = Math.hypot(...shares.map(({ change }) => change))
  return { total, shares: shares.toSorted((a, b) => Math.abs(b.change) - Math.abs(a.change)) }
}

const sum = (values: readonly number[]): number => values.reduce((total, value) => total + value, 0)

/** What each source gives to a figure, in its unit. */
type PartsOf = (sources: readonly Source[], seat: Seat) => number[]

/**
 * The parts of a figure with sources or the seat moved a little. The plane of a largest irradiance stays as it was: to
 * first order turning it changes nothing.
 */
function partsNear(input: WarmthInput, seat: Seat, figure: TolerancedFigure, placed: readonly Source[]): PartsOf {
  const { brief, obstructions } = input
  const onPlane =
    (pointOf: (seat: Seat) => Vec3, normal: Vec3): PartsOf =>
    (sources, at) =>
      sources.map(({ emitter }) => irradianceAt(emitter, pointOf(at), normal, obstructions))
  switch (figure.quantity) {
    case 'body':
      return onPlane(bodyPoint, [0, 0, 1])
    case 'body-largest':
      return onPlane(bodyPoint, heatAtSeat(seat, placed, obstructions, true).bodyLargest.direction)
    case 'head':
      return onPlane(headPoint, heatAtSeat(seat, placed, obstructions, true).head.direction)
    case 'feels-like': {
      const perField = feelsLikePerField(
        conditionsAt(seat, brief, surroundingsAt(seat, input.site, brief), figure.wind),
      )
      return (sources, at) => sources.map((source) => perField * fieldAtSeat(source, at, obstructions))
    }
  }
}

/** Change of a figure per metre of a length, by the central difference. */
const slope = (figureWith: (delta: number) => number): number => (figureWith(step) - figureWith(-step)) / (2 * step)

function placeShares(
  { layout, models }: WarmthInput,
  tolerances: FluxTolerances,
  partOf: (sources: readonly Source[]) => number,
): ToleranceShare[] {
  return layout.heaters.flatMap((heater) => {
    const share = (of: string, tolerance: number, moved: (delta: number) => MountedHeater): ToleranceShare => ({
      of: `${heater.id} ${of}`,
      tolerance,
      unit: 'm',
      change: slope((delta) => partOf(sourcesOf({ heaters: [moved(delta)] }, models).sources)) * tolerance,
    })
    return [
      share('x', tolerances.heaterPosition, (delta) => ({ ...heater, x: heater.x + delta })),
      share('y', tolerances.heaterPosition, (delta) => ({ ...heater, y: heater.y + delta })),
      share('height', tolerances.heaterHeight, (delta) => ({ ...heater, lowestPoint: heater.lowestPoint + delta })),
    ]
  })
}

/** The sizes that place the seat: what one dimension moves, it moves together. */
function seatShares(
  site: Site,
  seat: Seat,
  figure: TolerancedFigure,
  tolerances: FluxTolerances,
  figureAt: (moved: Seat) => number,
): ToleranceShare[] {
  const height = figure.quantity === 'head' ? 'headHeight' : 'bodyHeight'
  const coordinates = ['x', 'y', height] as const
  return shiftsOf(site, { of: 'seat', id: seat.id }, coordinates, tolerances.seat).map(({ label, by }) => {
    const tolerance = Math.hypot(...by)
    const moved = (delta: number): Seat => {
      const [x, y, z] = by.map((shift) => (shift / tolerance) * delta)
      return { ...seat, x: seat.x + (x ?? 0), y: seat.y + (y ?? 0), [height]: seat[height] + (z ?? 0) }
    }
    const names = ['x', 'y', 'height'].filter((_, i) => by[i] !== 0).join(' and ')
    const of = `seat ${seat.id} ${names}${label === null ? '' : `, ${label}`}`
    return { of, tolerance, unit: 'm', change: slope((delta) => figureAt(moved(delta))) * tolerance }
  })
}

/** Radiant efficiency by model and the voltage of all: the figure is linear in the radiant power of its parts. */
function supplyShares(
  { layout, models }: WarmthInput,
  sources: readonly Source[],
  parts: readonly number[],
  tolerances: FluxTolerances,
): ToleranceShare[] {
  const modelOf = new Map(layout.heaters.map((heater) => [heater.id, models.get(heater.model)]))
  const byModel = new Map<HeaterModel, number>()
  sources.forEach(({ heaterId }, i) => {
    const model = modelOf.get(heaterId)
    if (model) byModel.set(model, (byModel.get(model) ?? 0) + (parts[i] ?? 0))
  })
  const efficiencies = [...byModel].map(([model, part]): ToleranceShare => {
    const tolerance = efficiencyTolerance(model) ?? tolerances.efficiency
    return { of: `radiant efficiency of ${model.name}`, tolerance, unit: 'share', change: part * tolerance }
  })
  const perVoltage = [...byModel].reduce((sum, [model, part]) => sum + part * model.powerVoltageExponent, 0)
  const voltage: ToleranceShare = {
    of: 'voltage',
    tolerance: tolerances.voltage,
    unit: 'share',
    change: perVoltage * tolerances.voltage,
  }
  return [...efficiencies, voltage]
}

/** The farther end of the data sheet's range from its nominal figure, as a share of it; null without a range. */
export function efficiencyTolerance({ radiantEfficiency, radiantEfficiencyRange: range }: HeaterModel): number | null {
  if (!range) return null
  return Math.max(range.high - radiantEfficiency, radiantEfficiency - range.low) / radiantEfficiency
}
