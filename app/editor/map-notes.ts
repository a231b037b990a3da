import { fromSi } from '#app/domain/units.ts'
import type { MapAnswer } from '#app/drawing/heat/map-picture.ts'
import type { FluxUnit, ViewChoice } from '#app/editor/view-choice.ts'

/** At most this much, rounded up as it is a bound. */
function boundText(irradiance: number, unit: FluxUnit): string {
  const [digits, system] = unit === 'W/m²' ? [0, 'metric' as const] : [1, 'imperial' as const]
  const whole = 10 ** digits
  return `${(Math.ceil(fromSi(irradiance, 'irradiance', system) * whole) / whole).toFixed(digits)} ${unit}`
}

/** What maps may lack, the most of them, because they leave far heaters out; null where none does. */
export function farHeatersNote(
  answers: readonly (Pick<MapAnswer, 'errorBound'> | null)[],
  unit: FluxUnit,
): string | null {
  const bound = Math.max(0, ...answers.map((answer) => answer?.errorBound ?? 0))
  return bound > 0 ? `Far heaters left out: at most ${boundText(bound, unit)} missing at any place.` : null
}

/** What stands beside the scale where a map is not plain: which efficiency it takes, what it leaves out. */
export function mapNotes(
  { efficiency, fluxUnit }: ViewChoice,
  answer: Pick<MapAnswer, 'errorBound'> | null,
): readonly string[] {
  const far = farHeatersNote([answer], fluxUnit)
  return [
    ...(efficiency === 'nominal' ? [] : [`Heat with ${efficiency} radiant efficiency; seat figures stay nominal.`]),
    ...(far === null ? [] : [far]),
  ]
}
