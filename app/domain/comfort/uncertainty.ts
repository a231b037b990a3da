import { feelsLike, feelsLikePerField } from '#app/domain/comfort/feels-like.ts'
import { bodyPoint, fieldAtSeat, headPoint, heatAtSeat, type SeatHeat } from '#app/domain/comfort/seat-heat.ts'
import { conditionsAt, type SeatWarmth, type WarmthInput, type WindName } from '#app/domain/comfort/seat-warmth.ts'
import { predictedVote } from '#app/domain/comfort/sensation.ts'
import { sourcesOf, type Source } from '#app/domain/comfort/sources.ts'
import { surroundingsAt } from '#app/domain/comfort/surroundings.ts'
import { irradianceAt } from '#app/domain/flux/irradiance.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { MountedHeater } from '#app/domain/layout/layout.ts'
import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'
import type { Seat, Site } from '#app/domain/site/site.ts'
import { shiftsOf } from '#app/domain/site/tolerance.ts'
import type { Vec3 } from '#app/domain/vector.ts'

/**
 * A figure of a seat that can be taken apart: irradiance on the body plane; the largest at the body's and at the head's
 * height; near infrared at the eye; head to body; feels-like and the vote of sensation at one of the winds.
 */
export type SeatFigure =
  | { readonly quantity: 'body' | 'body-largest' | 'head' | 'near-infrared' | 'head-to-body' }
  | { readonly quantity: 'feels-like' | 'sensation'; readonly wind: WindName }

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

/** The figure itself; null without heaters that can be told, or where it has no meaning. */
export function figureOf(warmth: SeatWarmth, figure: SeatFigure): number | null {
  switch (figure.quantity) {
    case 'body':
      return warmth.body
    case 'body-largest':
      return warmth.bodyLargest
    case 'head':
      return warmth.head
    case 'near-infrared':
      return warmth.nearInfraredAtEye
    case 'head-to-body':
      return warmth.headToBody
    case 'feels-like':
      return warmth.feelsLike[figure.wind].after
    case 'sensation':
      return warmth.sensation[figure.wind].after?.vote ?? null
  }
}

/** What each source gives to the figure, in its unit: W/m², or K of feels-like; null where the figure is no sum. */
export function figureParts(
  warmth: SeatWarmth,
  heat: SeatHeat,
  figure: SeatFigure,
  input: WarmthInput,
): readonly number[] | null {
  switch (figure.quantity) {
    case 'body':
      return heat.body
    case 'body-largest':
      return heat.bodyLargest.parts
    case 'head':
      return heat.head.parts
    case 'near-infrared':
      return heat.nearInfrared?.parts ?? null
    case 'feels-like': {
      const perField = feelsLikePerField(conditionsAt(warmth.seat, input.brief, warmth.surroundings, figure.wind))
      return heat.field.map((field) => field * perField)
    }
    default:
      return null
  }
}

/**
 * Tolerance of a seat's figure to first order, the things it rests on taken as independent: lengths by central
 * differences; radiant efficiency (one error for all heaters of a model) and voltage (one for all) by their parts. Null
 * without heaters that can be told and for near infrared that cannot be.
 */
export function seatTolerance(
  input: WarmthInput,
  seat: Seat,
  figure: SeatFigure,
  uncertain: Uncertain,
  tolerances: FluxTolerances,
): FigureTolerance | null {
  const { sources } = sourcesOf(input.layout, input.models)
  if (sources.length === 0) return null
  const partsOf = partsNear(input, seat, figure, sources)
  if (!partsOf) return null
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
 * The parts of a figure with sources or the seat moved a little; of a figure that is no sum, what each adds to its
 * change. The plane of a largest irradiance stays as it was: to first order turning it changes nothing. Null for near
 * infrared of an element that cannot be told.
 */
function partsNear(input: WarmthInput, seat: Seat, figure: SeatFigure, placed: readonly Source[]): PartsOf | null {
  const { obstructions } = input
  const onPlane =
    (pointOf: (seat: Seat) => Vec3, normal: Vec3): PartsOf =>
    (sources, at) =>
      sources.map(({ emitter }) => irradianceAt(emitter, pointOf(at), normal, obstructions))
  const heat = () => heatAtSeat(seat, placed, obstructions, true)
  switch (figure.quantity) {
    case 'body':
      return onPlane(bodyPoint, up)
    case 'body-largest':
      return onPlane(bodyPoint, heat().bodyLargest.direction)
    case 'head':
      return onPlane(headPoint, heat().head.direction)
    case 'near-infrared': {
      const { nearInfrared } = heat()
      const all = nearInfrared && onPlane(headPoint, nearInfrared.direction)
      return all && ((sources, at) => all(sources, at).map((part, i) => part * (sources[i]?.nearInfrared ?? 0)))
    }
    case 'head-to-body':
      return ratioNear(onPlane(headPoint, up), onPlane(bodyPoint, up), placed, seat)
    case 'feels-like':
    case 'sensation':
      return feelingNear(input, seat, figure, placed)
  }
}

const up: Vec3 = [0, 0, 1]

/** Change of A ÷ B to first order: (dA − A/B · dB) ÷ B, each source adding its own. */
function ratioNear(above: PartsOf, below: PartsOf, placed: readonly Source[], seat: Seat): PartsOf {
  const divisor = sum(below(placed, seat))
  const ratio = sum(above(placed, seat)) / divisor
  return (sources, at) => {
    const own = below(sources, at)
    return above(sources, at).map((part, i) => (part - ratio * (own[i] ?? 0)) / divisor)
  }
}

/** Step of the vote's slope, K. */
const feelingStep = 0.01

/** Degrees of feels-like by source, or their votes: the slope of the vote at what it feels like. */
function feelingNear(
  { site, brief, obstructions }: WarmthInput,
  seat: Seat,
  figure: Extract<SeatFigure, { wind: WindName }>,
  placed: readonly Source[],
): PartsOf {
  const conditions = conditionsAt(seat, brief, surroundingsAt(seat, site, brief), figure.wind)
  const fields: PartsOf = (sources, at) => sources.map((source) => fieldAtSeat(source, at, obstructions))
  const perField = feelsLikePerField(conditions)
  const felt = () => feelsLike(sum(fields(placed, seat)), conditions)
  const perDegree = figure.quantity === 'feels-like' ? 1 : voteSlope(felt(), brief)
  return (sources, at) => fields(sources, at).map((field) => field * perField * perDegree)
}

const voteSlope = (felt: number, brief: WarmthInput['brief']): number =>
  (predictedVote(felt + feelingStep, brief) - predictedVote(felt - feelingStep, brief)) / (2 * feelingStep)

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
  figure: SeatFigure,
  tolerances: FluxTolerances,
  figureAt: (moved: Seat) => number,
): ToleranceShare[] {
  const coordinates = ['x', 'y', ...heightsOf(figure)] as const
  return shiftsOf(site, { of: 'seat', id: seat.id }, coordinates, tolerances.seat).map(({ label, by }) => {
    const tolerance = Math.hypot(...by)
    const moved = (delta: number): Seat => {
      const places = coordinates.map((name, i) => [name, seat[name] + ((by[i] ?? 0) / tolerance) * delta])
      return { ...seat, ...Object.fromEntries(places) }
    }
    const names = coordinates.filter((_, i) => by[i] !== 0).map((name) => coordinateWords[name])
    const of = `seat ${seat.id} ${names.join(' and ')}${label === null ? '' : `, ${label}`}`
    return { of, tolerance, unit: 'm', change: slope((delta) => figureAt(moved(delta))) * tolerance }
  })
}

/** The heights of a seat that a figure is taken at. */
export function heightsOf({ quantity }: SeatFigure): readonly ('bodyHeight' | 'headHeight')[] {
  if (quantity === 'head-to-body') return ['bodyHeight', 'headHeight']
  return quantity === 'head' || quantity === 'near-infrared' ? ['headHeight'] : ['bodyHeight']
}

const coordinateWords = { x: 'x', y: 'y', bodyHeight: 'body height', headHeight: 'head height' } as const

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
