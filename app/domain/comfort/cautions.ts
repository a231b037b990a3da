import type { Brief } from '#app/domain/brief/brief.ts'
import { fixedRules } from '#app/domain/rules/fixed-rules.ts'
import { houseFigure } from '#app/domain/rules/house-rules.ts'
import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'
import { figureOfRuleSet } from '#app/domain/rules/sourced-figure.ts'

/** A limit on what falls on a guest, with where it comes from. */
export interface CautionLimit {
  /** What is judged by, W/m². */
  readonly value: number
  /** The published figure where this one is relaxed in the cold; null where it is not. */
  readonly relaxedFrom: number | null
  readonly source: string
  /** The source's text was not open when the figure was written down: check it before quoting a clause. */
  readonly fromMemory: boolean
  /** What the limit does not say. */
  readonly note: string
}

/** The limits that hold for a brief. */
export interface CautionLimits {
  /** For the largest irradiance over all directions, at body and head. */
  readonly stop: CautionLimit
  /** For the largest irradiance over all directions at the head. */
  readonly head: CautionLimit
  /** For the near infrared at the eye of a guest who looks level. */
  readonly eye: CautionLimit
}

/** Exposures longer than this count as continuous for the eye, s (ICNIRP). */
const continuous = 1000

/** The eye's limit for a continuous exposure, W/m² (ICNIRP). */
const continuousLimit = 100

/** What it is relaxed to in the cold, W/m² at °C (from memory). */
const cold = { air: 0, limit: 400 }
const cool = { air: 10, limit: 300 }

/**
 * Limit of infrared at the eye as published, 0.78–3 µm, W/m²: 18 t^−0.75 kW/m² for t seconds, 100 W/m² beyond 1,000 s
 * (ICNIRP; the first from memory).
 */
export const eyeLimit = (seconds: number): number =>
  seconds > continuous ? continuousLimit : 18_000 * seconds ** -0.75

/**
 * The continuous limit at an air temperature, °C: 400 W/m² at 0 °C and colder, 300 at 10 °C (from memory), from there
 * straight down to the published 100 at 25 °C (house rule), so that no degree more or less makes a step.
 */
export function eyeLimitInAir(airTemperature: number): number {
  const warm = { air: fixedRules.eyeRelaxedBelow.value, limit: continuousLimit }
  const [from, to] = airTemperature <= cool.air ? [cold, cool] : [cool, warm]
  const share = Math.min(1, Math.max(0, (airTemperature - from.air) / (to.air - from.air)))
  return from.limit + (to.limit - from.limit) * share
}

/** The house caution at the head by length of stay. */
const headRule = (stayMinutes: number, rules: HouseRules) =>
  houseFigure(rules, stayMinutes >= rules.longStayMinutes ? 'headCautionLongStay' : 'headCautionShortStay')

/** The limits that hold for a brief in a house: the one source of every caution on what falls on a guest. */
export function cautionLimits({ stayMinutes, airTemperature, ruleSet }: Brief, rules: HouseRules): CautionLimits {
  return {
    stop: {
      ...fixedRules.irradianceStop,
      relaxedFrom: null,
      fromMemory: true,
      note: 'Workers, suitably clothed, continuous. It is not a comfort limit and not one for the public.',
    },
    head: {
      ...(figureOfRuleSet(ruleSet, 'head-caution') ?? headRule(stayMinutes, rules)),
      relaxedFrom: null,
      fromMemory: false,
      note: 'Covers children and bare skin. An engineer may set another figure.',
    },
    eye: eyeCaution(stayMinutes * 60, airTemperature),
  }
}

/** What a continuous exposure may have, a shorter one may have too: the cold relaxes short stays as far. */
function eyeCaution(seconds: number, airTemperature: number): CautionLimit {
  const published = eyeLimit(seconds)
  const inAir = eyeLimitInAir(airTemperature)
  const relaxed = inAir > published
  return {
    value: relaxed ? inAir : published,
    relaxedFrom: relaxed ? published : null,
    source: [
      'ICNIRP guidelines on incoherent infrared radiation: 100 W/m² beyond 1,000 s; 18 t^−0.75 kW/m² below (from memory)',
      ...(relaxed ? ['relaxed in the cold to about 400 W/m² at 0 °C and 300 at 10 °C (from memory)'] : []),
      ...(relaxed && airTemperature > cool.air ? [fixedRules.eyeRelaxedBelow.source] : []),
    ].join('; '),
    fromMemory: true,
    note: 'Share of 0.78–3 µm by Planck’s law at the element’s temperature, on a vertical plane: a guest looks level.',
  }
}
