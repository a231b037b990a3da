import type { MapConditions } from '#app/domain/flux/map-question.ts'

/**
 * Refuses conditions that would give a feels-like map without meaning: a RangeError that states the limit.
 */
export function requireConditions(conditions: MapConditions, emitters: number): void {
  const { airTemperature, surroundingsTemperature, wind, clothing, absorptance } = conditions
  if (![airTemperature, surroundingsTemperature].every(Number.isFinite))
    throw new RangeError('air and surroundings temperature must be finite')
  if (![wind, clothing].every((figure) => figure >= 0 && figure < Infinity))
    throw new RangeError('wind and clothing must be finite and 0 or more')
  if (absorptance.length !== emitters || !absorptance.every((share) => share >= 0 && share <= 1))
    throw new RangeError('each heater needs an absorptance from 0 to 1')
}
