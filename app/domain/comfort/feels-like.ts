import { effectiveAreaShare, type Posture } from '#app/domain/comfort/projected-area.ts'

/** What the air, the wind and the clothes do to a guest: °C, m/s, clo. */
export interface Conditions {
  readonly airTemperature: number
  /** Mean radiant temperature of the surroundings without heaters, °C. */
  readonly surroundingsTemperature: number
  readonly wind: number
  readonly clothing: number
  readonly posture: Posture
}

/** Linear radiant coefficient of a body per degree and per share of effective area, W/m²K (ASHRAE 55 Appendix C). */
const radiantCoefficient = 6.012

/** Convective coefficient of still air, W/m²K (ASHRAE, seated, below 0.2 m/s). */
const stillAirCoefficient = 3.1

/** Mean skin temperature to which the equivalent temperature refers, °C. */
const skinTemperature = 33

/** Thermal resistance of one clo, m²K/W (ISO 9920). */
const clo = 0.155

/** Convective coefficient of a seated body, W/m²K: ASHRAE Fundamentals, 8.3 v^0.6 and at least 3.1. Wind in m/s. */
export const convectiveCoefficient = (wind: number): number => Math.max(stillAirCoefficient, 8.3 * wind ** 0.6)

/** Radiant coefficient of a body whose effective area share is that of the posture, W/m²K. */
const radiantCoefficientOf = (posture: Posture): number => radiantCoefficient * effectiveAreaShare[posture]

/** How much a radiant field of `field` W/m² (effective, per body area) raises the mean radiant temperature, K. */
export const radiantTemperatureRise = (field: number, posture: Posture): number => field / radiantCoefficientOf(posture)

/** How much it raises the operative temperature in this wind, K. */
export const operativeRise = (field: number, conditions: Conditions): number =>
  field / (convectiveCoefficient(conditions.wind) + radiantCoefficientOf(conditions.posture))

/** Operative temperature under an effective radiant field, °C (ASHRAE 55: weighted by h_c and h_r). */
export function operativeTemperature(field: number, conditions: Conditions): number {
  const convective = convectiveCoefficient(conditions.wind)
  const radiant = radiantCoefficientOf(conditions.posture)
  const without =
    (convective * conditions.airTemperature + radiant * conditions.surroundingsTemperature) / (convective + radiant)
  return without + operativeRise(field, conditions)
}

/** Share of the loss at this wind that still air would take for the same clothes: at least 1, growing with wind. */
function windFactor(conditions: Conditions): number {
  const clothing = clo * conditions.clothing
  const enlarged = 1.05 + 0.645 * clothing
  const radiant = radiantCoefficientOf(conditions.posture)
  const resistance = (convective: number) => clothing + 1 / (enlarged * (convective + radiant))
  return resistance(stillAirCoefficient) / resistance(convectiveCoefficient(conditions.wind))
}

/**
 * "Feels like": the still-air temperature, °C, at which the clothed body would lose as much heat. Equals the air
 * temperature with no heater, no wind and surroundings as warm as the air. For steady sitting, not for walking.
 */
export const feelsLike = (field: number, conditions: Conditions): number =>
  skinTemperature - (skinTemperature - operativeTemperature(field, conditions)) * windFactor(conditions)

/** Degrees of "feels like" per W/m² of effective radiant field: the figure is linear in the field. */
export const feelsLikePerField = (conditions: Conditions): number =>
  operativeRise(1, conditions) * windFactor(conditions)

/** Effective radiant field at which it would feel like `target` °C in these conditions, W/m²; 0 when it already does. */
export const fieldToFeelLike = (target: number, conditions: Conditions): number =>
  Math.max(0, (target - feelsLike(0, conditions)) / feelsLikePerField(conditions))
