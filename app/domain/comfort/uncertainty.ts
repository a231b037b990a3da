import { feelsLikePerField } from '#app/domain/comfort/feels-like.ts'
import { headPoint, heatAtSeat, type SeatHeat } from '#app/domain/comfort/seat-heat.ts'
import {
  conditionsAt,
  warmthOfSeat,
  type SeatWarmth,
  type WarmthInput,
  type WindName,
} from '#app/domain/comfort/seat-warmth.ts'
import { sourcesOf, type Source } from '#app/domain/comfort/sources.ts'
import { irradianceAt } from '#app/domain/flux/irradiance.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { MountedHeater } from '#app/domain/layout/layout.ts'
import { houseRules } from '#app/domain/rules/house-rules.ts'
import type { Seat, Site } from '#app/domain/site/site.ts'

/** A figure of a seat whose tolerance is asked for. */
export type SeatFigure =
  | { readonly quantity: 'body' }
  | { readonly quantity: 'head' }
  | { readonly quantity: 'feels-like'; readonly wind: WindName }

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

/** Where nothing else is known. Voltage: service range A of ANSI C84.1, ± 5 % (from memory); the rest house rules. */
export const defaultFluxTolerances: FluxTolerances = {
  heaterPosition: houseRules.tolerance.value,
  heaterHeight: houseRules.tolerance.value,
  seat: houseRules.tolerance.value,
  efficiency: 0.05,
  voltage: 0.05,
}

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

/** A seat's figures and what each element gives to them. */
type SeatFigures = ReturnType<typeof warmthOfSeat>

/** The figure itself; null without heaters that can be told. */
export function figureOf(warmth: SeatWarmth, figure: SeatFigure): number | null {
  if (figure.quantity === 'feels-like') return warmth.feelsLike[figure.wind].after
  return figure.quantity === 'body' ? warmth.body : warmth.head
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
 * Tolerance of a seat's figure to first order: positions and heights of the heaters and of the seat by central
 * differences, radiant efficiency (one error for all heaters of a model) and voltage (one for all) by their parts. Taken
 * as independent. Null without heaters that can be told.
 */
export function seatTolerance(
  input: WarmthInput,
  seat: Seat,
  figure: SeatFigure,
  tolerances: FluxTolerances = defaultFluxTolerances,
): FigureTolerance | null {
  const all = sourcesOf(input.layout, input.models)
  const { warmth, heat } = warmthOfSeat(seat, all, input)
  if (figureOf(warmth, figure) === null) return null
  const parts = figureParts(warmth, heat, figure, input)
  const shares = [
    ...input.layout.heaters.flatMap((heater) => placeShares(heater, input, { warmth, heat }, figure, tolerances)),
    ...seatShares(input, seat, figure, tolerances),
    ...supplyShares(input, all.sources, parts, tolerances),
  ]
  const total = Math.hypot(...shares.map(({ change }) => change))
  return { total, shares: shares.toSorted((a, b) => Math.abs(b.change) - Math.abs(a.change)) }
}

/** Change of a figure per metre of a length, by the central difference. */
function slope(figureWith: (delta: number) => number | null): number {
  return ((figureWith(step) ?? 0) - (figureWith(-step) ?? 0)) / (2 * step)
}

/** What one heater gives to the figure. At the head in the direction that is largest for all: to first order it stays. */
function heaterPart(
  heater: MountedHeater,
  input: WarmthInput,
  { warmth, heat }: SeatFigures,
  figure: SeatFigure,
): number {
  const { sources } = sourcesOf({ heaters: [heater] }, input.models)
  const point = headPoint(warmth.seat)
  const parts =
    figure.quantity === 'head'
      ? sources.map(({ emitter }) => irradianceAt(emitter, point, heat.head.direction, input.obstructions))
      : figureParts(warmth, heatAtSeat(warmth.seat, sources, input.obstructions), figure, input)
  return parts.reduce((sum, part) => sum + part, 0)
}

function placeShares(
  heater: MountedHeater,
  input: WarmthInput,
  figures: SeatFigures,
  figure: SeatFigure,
  tolerances: FluxTolerances,
): ToleranceShare[] {
  const share = (of: string, tolerance: number, moved: (delta: number) => MountedHeater): ToleranceShare => ({
    of: `${heater.id} ${of}`,
    tolerance,
    unit: 'm',
    change: slope((delta) => heaterPart(moved(delta), input, figures, figure)) * tolerance,
  })
  return [
    share('x', tolerances.heaterPosition, (delta) => ({ ...heater, x: heater.x + delta })),
    share('y', tolerances.heaterPosition, (delta) => ({ ...heater, y: heater.y + delta })),
    share('height', tolerances.heaterHeight, (delta) => ({ ...heater, lowestPoint: heater.lowestPoint + delta })),
  ]
}

function seatShares(input: WarmthInput, seat: Seat, figure: SeatFigure, tolerances: FluxTolerances): ToleranceShare[] {
  const sources = sourcesOf(input.layout, input.models)
  const figureWith = (moved: Seat) => figureOf(warmthOfSeat(moved, sources, input).warmth, figure)
  const height = figure.quantity === 'head' ? 'headHeight' : 'bodyHeight'
  const share = (coordinate: 'x' | 'y' | typeof height): ToleranceShare => {
    const tolerance = seatCoordinateTolerance(input.site, seat, coordinate) ?? tolerances.seat
    const change = slope((delta) => figureWith({ ...seat, [coordinate]: seat[coordinate] + delta })) * tolerance
    const name = coordinate === height ? 'height' : coordinate
    return { of: `seat ${seat.id} ${name}`, tolerance, unit: 'm', change }
  }
  return [share('x'), share('y'), share(height)]
}

/** Tolerance of a seat's coordinate from the dimensions that move it; null when none does. */
function seatCoordinateTolerance(site: Site, seat: Seat, coordinate: string): number | null {
  const moved = site.dimensions.flatMap((dimension) =>
    dimension.moves
      .filter((move) => move.of === 'seat' && move.id === seat.id && move.coordinate === coordinate)
      .map((move) => move.by * dimension.tolerance),
  )
  return moved.length > 0 ? Math.hypot(...moved) : null
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
function efficiencyTolerance({ radiantEfficiency, radiantEfficiencyRange: range }: HeaterModel): number | null {
  if (!range) return null
  return Math.max(range.high - radiantEfficiency, radiantEfficiency - range.low) / radiantEfficiency
}
