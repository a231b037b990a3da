import type { Brief } from '#app/domain/brief/brief.ts'
import { convectiveCoefficient } from '#app/domain/comfort/feels-like.ts'
import { indoorsAt } from '#app/domain/comfort/indoors.ts'
import { effectiveAreaShare } from '#app/domain/comfort/projected-area.ts'
import { bodyPoint, headPoint } from '#app/domain/comfort/seat-heat.ts'
import { conditionsAt, warmthOfSeat, type SeatWarmth, type WarmthInput } from '#app/domain/comfort/seat-warmth.ts'
import { sourcesOf, type Source } from '#app/domain/comfort/sources.ts'
import {
  figureOf,
  figureParts,
  fluxTolerances,
  seatTolerance,
  type FigureTolerance,
  type SeatFigure,
} from '#app/domain/comfort/uncertainty.ts'
import { electricalPower } from '#app/domain/heaters/power.ts'
import type { Layout } from '#app/domain/layout/layout.ts'
import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'
import { lengthOf, subtract } from '#app/domain/vector.ts'

/** One figure that went in, in SI and °C. */
export interface ExplainedInput {
  readonly name: string
  readonly value: number
  readonly unit: 'm' | '°' | '°C' | 'm/s' | 'clo' | 'W' | 'W/m²' | 'W/m²K' | 'V' | 'none'
  readonly source: string
  /** Nobody has confirmed it: it stays an assumption until somebody does. */
  readonly assumed: boolean
}

/** What one element gives to the figure. */
interface ExplainedPart {
  readonly heaterId: string
  readonly element: number
  /** In the figure's unit. */
  readonly value: number
  /** Of all that the heaters give; 0 when they give nothing. */
  readonly share: number
  /** From the seat's point to the middle of the element, m. */
  readonly distance: number
  readonly radiantPower: number
}

/** A figure of a seat taken apart: `value` is `base` plus the sum of the parts. */
export interface Explanation {
  readonly seatId: string
  readonly figure: SeatFigure
  readonly unit: 'W/m²' | '°C'
  /** Null when no heater that can be told is placed. */
  readonly value: number | null
  /** The figure with every heater off: 0, or feels-like at the same wind. */
  readonly base: number
  readonly formula: string
  readonly source: string
  readonly notModelled: string
  /** Of a feels-like temperature: what it would take to feel like indoors, in a sentence. */
  readonly indoors: string | null
  readonly inputs: readonly ExplainedInput[]
  readonly parts: readonly ExplainedPart[]
  readonly byHeater: readonly { readonly heaterId: string; readonly value: number; readonly share: number }[]
  readonly tolerance: FigureTolerance | null
  /** Heaters that the figure is without: unknown model or no beam data. */
  readonly cannotTell: readonly string[]
}

const formulas = {
  body: {
    formula:
      'E = Σ elements I0 f(α) / (L h) · [n_h C(β) − n_u cos^(b+1) β / (b+1)], I0 = η_r P / (W(a) W(b+1)), n straight up at the body’s height',
    source:
      'Closed form for a tubular element with a separable beam; tabulated beams by the same integral of their table.',
  },
  head: {
    formula: 'The same sum at the head’s height, n the direction in which it is largest',
    source:
      'Irradiance is convex in the direction of the plane; its largest value is found by turning to the net flux.',
  },
  'feels-like': {
    formula:
      't_eq = 33 − (33 − t_o) · (R_cl + 1/(f_cl (3.1 + h_r))) / (R_cl + 1/(f_cl (h_c + h_r))), t_o = (h_c t_a + h_r t_r + Σ elements α f_eff Σ f_p E_n) / (h_c + h_r)',
    source:
      'ASHRAE 55 Appendix C (effective radiant field, projected areas), ASHRAE Fundamentals (h_c = 8.3 v^0.6, at least 3.1), ISO 9920 (clothing).',
  },
} as const

const notModelled =
  'Reflector near field, reflection from floor and tables, loss of radiant efficiency in wind. Calculated, not measured.'

/**
 * Any figure of a seat with its inputs, formula, source, tolerance and the share of every element. The parts come from
 * the call that makes the figure everywhere else. Null for a seat that the site does not have.
 */
export function explainSeat(
  input: WarmthInput,
  seatId: string,
  figure: SeatFigure,
  rules: HouseRules,
): Explanation | null {
  const seat = input.site.seats.find(({ id }) => id === seatId)
  if (!seat) return null
  const all = sourcesOf(input.layout, input.models)
  const { warmth, heat } = warmthOfSeat(seat, all, input)
  const values = figureParts(warmth, heat, figure, input)
  const feelsLike = figure.quantity === 'feels-like'
  const parts = explainedParts(warmth, all.sources, values, figure)
  return {
    seatId,
    figure,
    unit: feelsLike ? '°C' : 'W/m²',
    value: figureOf(warmth, figure),
    base: feelsLike ? warmth.feelsLike[figure.wind].before : 0,
    ...formulas[figure.quantity],
    notModelled,
    indoors: feelsLike ? indoorsAt(warmth, input.brief, figure.wind, rules).sentence : null,
    inputs: [
      ...seatInputs(warmth, figure),
      ...(feelsLike ? feelingInputs(warmth, input.brief, figure) : []),
      ...heaterInputs(input),
    ],
    parts,
    byHeater: heaterShares(parts),
    tolerance: seatTolerance(input, seat, figure, 'everything', fluxTolerances(rules)),
    cannotTell: all.cannotTell,
  }
}

function explainedParts(
  { seat }: SeatWarmth,
  sources: readonly Source[],
  values: readonly number[],
  figure: SeatFigure,
): ExplainedPart[] {
  const point = figure.quantity === 'head' ? headPoint(seat) : bodyPoint(seat)
  const whole = values.reduce((sum, value) => sum + value, 0)
  return sources.map(({ heaterId, element, emitter }, i) => {
    const value = values[i] ?? 0
    const own = emitter.elements[0]
    return {
      heaterId,
      element,
      value,
      share: whole === 0 ? 0 : value / whole,
      distance: own ? lengthOf(subtract(own.centre, point)) : 0,
      radiantPower: own?.radiantPower ?? 0,
    }
  })
}

function heaterShares(parts: readonly ExplainedPart[]): Explanation['byHeater'] {
  return [...new Set(parts.map(({ heaterId }) => heaterId))].map((heaterId) => {
    const own = parts.filter((part) => part.heaterId === heaterId)
    const total = (pick: (part: ExplainedPart) => number) => own.reduce((sum, part) => sum + pick(part), 0)
    return { heaterId, value: total(({ value }) => value), share: total(({ share }) => share) }
  })
}

const known = (name: string, value: number, unit: ExplainedInput['unit'], source: string): ExplainedInput => ({
  name,
  value,
  unit,
  source,
  assumed: false,
})

function seatInputs({ seat }: SeatWarmth, { quantity }: SeatFigure): ExplainedInput[] {
  const height = quantity === 'head' ? known('head height', seat.headHeight, 'm', 'site') : null
  return [
    known('seat x', seat.x, 'm', 'site'),
    known('seat y', seat.y, 'm', 'site'),
    height ?? known('body height', seat.bodyHeight, 'm', 'site'),
    ...(quantity === 'feels-like' ? [known('facing', seat.facingDeg, '°', 'site')] : []),
  ]
}

function feelingInputs(
  { seat, surroundings, field }: SeatWarmth,
  brief: Brief,
  { wind }: Extract<SeatFigure, { quantity: 'feels-like' }>,
): ExplainedInput[] {
  const conditions = conditionsAt(seat, brief, surroundings, wind)
  const fromBrief = (name: string, value: number, unit: ExplainedInput['unit'], key: string): ExplainedInput => {
    const assumed = brief.assumed.includes(key)
    return { name, value, unit, source: assumed ? 'brief, assumed' : 'brief', assumed }
  }
  const windKey = { calm: null, design: 'windDesign', gust: 'windGust' }[wind]
  return [
    fromBrief('air temperature', brief.airTemperature, '°C', 'airTemperature'),
    windKey
      ? fromBrief(`wind, ${wind}`, conditions.wind, 'm/s', windKey)
      : known('wind, calm', conditions.wind, 'm/s', 'house rule: air that hardly moves'),
    fromBrief('clothing', brief.clothing, 'clo', 'clothing'),
    {
      name: 'surroundings',
      value: surroundings.temperature,
      unit: '°C',
      source: surroundingsSource(surroundings),
      assumed: surroundings.assumed,
    },
    known('convection h_c', convectiveCoefficient(conditions.wind), 'W/m²K', 'ASHRAE Fundamentals, seated'),
    known(
      'effective area share f_eff',
      effectiveAreaShare[seat.posture],
      'none',
      `${seat.posture}, ASHRAE Fundamentals`,
    ),
    known('effective radiant field', field ?? 0, 'W/m²', 'sum of the elements, absorbed'),
  ]
}

function surroundingsSource({ underCover, assumed }: SeatWarmth['surroundings']): string {
  if (underCover) return 'under a cover: the air temperature'
  return assumed ? 'open sky: the air temperature until it is entered' : 'brief, open sky'
}

/** Power, voltage and place of every heater that the figure is made with. */
function heaterInputs({ layout, models }: WarmthInput): ExplainedInput[] {
  return layout.heaters.flatMap((heater) => heaterInput(heater, models.get(heater.model)))
}

function heaterInput(
  heater: Layout['heaters'][number],
  model: ReturnType<WarmthInput['models']['get']>,
): ExplainedInput[] {
  if (!model?.beam) return []
  const { power } = electricalPower(heater, model)
  const of = (name: string) => `${heater.id} ${name}`
  return [
    known(of('x'), heater.x, 'm', 'layout'),
    known(of('y'), heater.y, 'm', 'layout'),
    known(of('lowest point'), heater.lowestPoint, 'm', 'layout'),
    known(of('turn'), heater.turnDeg, '°', 'layout'),
    known(of('tilt'), heater.tiltDeg, '°', 'layout'),
    known(of('supply voltage'), heater.supplyVoltage, 'V', 'layout'),
    known(of('power'), power, 'W', `${model.name}, data sheet: P ∝ V^${model.powerVoltageExponent}`),
    known(of('radiant efficiency'), model.radiantEfficiency, 'none', `${model.name}, data sheet`),
  ]
}
