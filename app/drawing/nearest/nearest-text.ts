import { formatLength, type DisplayUnits } from '#app/domain/units.ts'

const eighth = 0.0254 / 8

/** A clearance is finer than a size of the floor: metres to the millimetre, or feet and inches to the eighth. */
function fineText(metres: number, units: DisplayUnits): string {
  if (units === 'metric') return metres.toFixed(3)
  return formatLength(Math.round(metres / eighth) * eighth, 'imperial')
    .replace(' ft', '′')
    .replace(' in', '″')
}

/** The distance of a pair with its tolerance: "0.178 ± 0.025"; without one where none is known. */
export function nearestText(metres: number, tolerance: number | null, units: DisplayUnits): string {
  return tolerance ? `${fineText(metres, units)} ± ${fineText(tolerance, units)}` : fineText(metres, units)
}
