import { cautionLimits, type CautionLimit } from '#app/domain/comfort/cautions.ts'
import { formulas, shadedFormula } from '#app/domain/comfort/explained-formulas.ts'
import { inputsOf, type ExplainedInput } from '#app/domain/comfort/explained-inputs.ts'
import { indoorsAt } from '#app/domain/comfort/indoors.ts'
import { bodyPoint, headPoint } from '#app/domain/comfort/seat-heat.ts'
import { warmthOfSeat, type SeatWarmth, type WarmthInput } from '#app/domain/comfort/seat-warmth.ts'
import { seenHeaters, type SeenHeater } from '#app/domain/comfort/seen-heaters.ts'
import type { SensationWord } from '#app/domain/comfort/sensation.ts'
import { obstructionsUnder, type Shade } from '#app/domain/comfort/shade.ts'
import { sourcesOf, type Source, type Sources } from '#app/domain/comfort/sources.ts'
import {
  figureOf,
  figureParts,
  fluxTolerances,
  heightsOf,
  seatTolerance,
  type FigureTolerance,
  type SeatFigure,
} from '#app/domain/comfort/uncertainty.ts'
import type { Layout } from '#app/domain/layout/layout.ts'
import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'
import { lengthOf, subtract } from '#app/domain/vector.ts'

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

/** A figure of a seat taken apart: where it is a sum, `value` is `base` plus the sum of the parts. */
export interface Explanation {
  readonly seatId: string
  readonly figure: SeatFigure
  readonly shade: Shade
  readonly unit: 'W/m²' | '°C' | 'none'
  /** Null when there is none: `whyNone` says why. */
  readonly value: number | null
  readonly whyNone: string | null
  /** The figure with every heater off: 0, or feels-like at the same wind. Null where the figure is no sum. */
  readonly base: number | null
  /** Of a sensation: its words with the heaters off and on. */
  readonly words: { readonly before: SensationWord; readonly after: SensationWord | null } | null
  readonly formula: string
  readonly source: string
  readonly notModelled: string
  /** What cautions judge the figure by. */
  readonly limits: readonly (CautionLimit & { readonly name: 'stop line' | 'caution' })[]
  /** Of a feels-like temperature: what it would take to feel like indoors, in a sentence. */
  readonly indoors: string | null
  readonly inputs: readonly ExplainedInput[]
  /** None where the figure is no sum: the inputs then make it. */
  readonly parts: readonly ExplainedPart[]
  readonly byHeater: readonly { readonly heaterId: string; readonly value: number; readonly share: number }[]
  /** What the seat sees of each heater; null without shade. */
  readonly seen: readonly SeenHeater[] | null
  readonly tolerance: FigureTolerance | null
  /** Heaters that the figure is without: unknown model or no beam data. */
  readonly cannotTell: readonly string[]
}

/** What an explanation rests on: shade makes what stands in the way. */
export interface ExplainInput extends Omit<WarmthInput, 'obstructions' | 'layout'> {
  readonly layout: Layout
  readonly shade: Shade
}

const notModelled =
  'Reflector near field, reflection from floor and tables, loss of radiant efficiency in wind. Calculated, not measured.'

/**
 * Any figure of a seat with its inputs, formula, source, tolerance and the share of every element. The parts come from
 * the call that makes the figure everywhere else. Null for a seat that the site does not have.
 */
export function explainSeat(
  { shade, ...given }: ExplainInput,
  seatId: string,
  figure: SeatFigure,
  rules: HouseRules,
): Explanation | null {
  const seat = given.site.seats.find(({ id }) => id === seatId)
  if (!seat) return null
  const obstructions = obstructionsUnder(shade, given.site, given.layout, given.models)
  const input: WarmthInput = { ...given, obstructions }
  const all = sourcesOf(input.layout, input.models)
  const { warmth, heat } = warmthOfSeat(seat, all, input)
  const values = figureParts(warmth, heat, figure, input)
  const seen = shade === 'none' ? null : seenHeaters(seat, figure, all.sources, obstructions)
  const parts = values ? explainedParts(warmth, all.sources, values, figure) : []
  const value = figureOf(warmth, figure)
  const { formula, source } = formulas[figure.quantity]
  return {
    seatId,
    figure,
    shade,
    unit: unitOf(figure),
    value,
    whyNone: value === null ? whyNone(figure, warmth, all) : null,
    base: baseOf(warmth, figure),
    words: figure.quantity === 'sensation' ? wordsOf(warmth.sensation[figure.wind]) : null,
    formula: shade === 'none' ? formula : `${formula}. ${shadedFormula}`,
    source,
    notModelled,
    limits: limitsOf(figure, input, rules),
    indoors: figure.quantity === 'feels-like' ? indoorsAt(warmth, input.brief, figure.wind, rules).sentence : null,
    inputs: inputsOf({ warmth, figure, input, sources: all.sources, shade, obstructions, seen }),
    parts,
    byHeater: heaterShares(parts),
    seen,
    tolerance: value === null ? null : seatTolerance(input, seat, figure, 'everything', fluxTolerances(rules)),
    cannotTell: all.cannotTell,
  }
}

function unitOf({ quantity }: SeatFigure): Explanation['unit'] {
  if (quantity === 'head-to-body' || quantity === 'sensation') return 'none'
  return quantity === 'feels-like' ? '°C' : 'W/m²'
}

function baseOf(warmth: SeatWarmth, figure: SeatFigure): number | null {
  if (figure.quantity === 'feels-like') return warmth.feelsLike[figure.wind].before
  return unitOf(figure) === 'none' ? null : 0
}

const wordsOf = ({ before, after }: SeatWarmth['sensation']['calm']): Explanation['words'] => ({
  before: before.word,
  after: after?.word ?? null,
})

/** Why a figure is not there, in a sentence. */
function whyNone({ quantity }: SeatFigure, { body }: SeatWarmth, { sources }: Sources): string {
  if (sources.length === 0) return 'No heater with beam data is placed.'
  if (quantity === 'sensation') return 'Outside the range of the vote.'
  if (quantity === 'head-to-body') return `Hardly any heat on the body plane (${(body ?? 0).toFixed(0)} W/m²).`
  const unknown = new Set(sources.flatMap(({ heaterId, nearInfrared }) => (nearInfrared === null ? heaterId : [])))
  return `Cannot tell: no element temperature of ${[...unknown].join(', ')}.`
}

function limitsOf({ quantity }: SeatFigure, { brief }: WarmthInput, rules: HouseRules): Explanation['limits'] {
  const { stop, head, eye } = cautionLimits(brief, rules)
  const line = { name: 'stop line', ...stop } as const
  if (quantity === 'body-largest') return [line]
  if (quantity === 'head') return [{ name: 'caution', ...head }, line]
  return quantity === 'near-infrared' ? [{ name: 'caution', ...eye }] : []
}

function explainedParts(
  { seat }: SeatWarmth,
  sources: readonly Source[],
  values: readonly number[],
  figure: SeatFigure,
): ExplainedPart[] {
  const point = heightsOf(figure)[0] === 'headHeight' ? headPoint(seat) : bodyPoint(seat)
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
