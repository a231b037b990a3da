import type { Brief } from '#app/domain/brief/brief.ts'
import { cautionLimits, type CautionLimits } from '#app/domain/comfort/cautions.ts'
import { fieldToFeelLike } from '#app/domain/comfort/feels-like.ts'
import { effectiveAreaShare, projectedAreaFactor } from '#app/domain/comfort/projected-area.ts'
import { conditionsAt, type SeatFigures, type WindName } from '#app/domain/comfort/seat-warmth.ts'
import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'

/** What "like indoors" means here, °C of feels-like (house rule, no published source). */
const indoorsTemperature = 20

/** What it would take at one seat and wind to feel like indoors. */
export interface Indoors {
  /** How many times the heat of this layout; null without heaters. */
  readonly times: number | null
  /** Largest irradiance at the head that this means, W/m²; without heaters, from straight above. */
  readonly head: number
  readonly answer: 'it does' | 'within the caution' | 'over the caution' | 'over the stop line'
  /** In a sentence, with the wind it holds for. */
  readonly sentence: string
}

/** Absorptance taken for a heater that is not placed yet: that of long and medium wave, the most favourable. */
const mostAbsorbed = 0.95

/**
 * Heat that would make a seat feel like indoors, against the house caution and the stop line: feels-like is linear in
 * the heat, so the whole layout is thought stronger by one factor.
 */
export function indoorsAt(warmth: SeatFigures, brief: Brief, wind: WindName, rules: HouseRules): Indoors {
  const { seat, field, head } = warmth
  const conditions = conditionsAt(seat, brief, warmth.surroundings, wind)
  const needed = fieldToFeelLike(indoorsTemperature, conditions)
  const times = field !== null && field > 0 ? needed / field : null
  const fromAbove = mostAbsorbed * effectiveAreaShare[seat.posture] * projectedAreaFactor(seat.posture, Math.PI / 2, 0)
  const headNeeded = times !== null && head !== null ? times * head : needed / fromAbove
  const answer = answerOf(needed <= (field ?? 0), headNeeded, cautionLimits(brief, rules))
  return { times, head: headNeeded, answer, sentence: sentenceOf(answer, headNeeded, conditions.wind) }
}

function answerOf(enough: boolean, head: number, limits: CautionLimits): Indoors['answer'] {
  if (enough) return 'it does'
  if (head <= limits.head.value) return 'within the caution'
  return head <= limits.stop.value ? 'over the caution' : 'over the stop line'
}

function sentenceOf(answer: Indoors['answer'], head: number, wind: number): string {
  const where = `at ${wind.toFixed(1)} m/s of wind`
  const figure = `${Math.round(head)} W/m² at the head`
  switch (answer) {
    case 'it does':
      return `It feels like indoors ${where}.`
    case 'within the caution':
      return `To feel like indoors ${where} takes ${figure}.`
    case 'over the caution':
      return `To feel like indoors ${where} takes ${figure}, over the caution.`
    case 'over the stop line':
      return `No heater makes it feel like indoors ${where}: it would take ${figure}, over the stop line.`
  }
}
