import { fromSi } from '#app/domain/units.ts'
import type { MapAnswer } from '#app/drawing/heat/map-picture.ts'
import type { FluxUnit, ViewChoice } from '#app/editor/view-choice.ts'

/** At most this much, rounded up as it is a bound. */
function boundText(irradiance: number, unit: FluxUnit): string {
  const [digits, system] = unit === 'W/m²' ? [0, 'metric' as const] : [1, 'imperial' as const]
  const whole = 10 ** digits
  return `${(Math.ceil(fromSi(irradiance, 'irradiance', system) * whole) / whole).toFixed(digits)} ${unit}`
}

/** What stands beside the scale where a map is not plain: which efficiency it takes, what it leaves out. */
export function mapNotes(
  { efficiency, fluxUnit }: ViewChoice,
  answer: Pick<MapAnswer, 'errorBound'> | null,
): readonly string[] {
  const bound = answer?.errorBound ?? 0
  return [
    ...(efficiency === 'nominal' ? [] : [`Heat with ${efficiency} radiant efficiency; seat figures stay nominal.`]),
    ...(bound > 0 ? [`Far heaters left out: at most ${boundText(bound, fluxUnit)} missing at any place.`] : []),
  ]
}
