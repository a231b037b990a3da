import { findingOf, type LayoutCheck, type Rule } from '#app/domain/rules/check.ts'
import type { Finding } from '#app/domain/rules/finding.ts'

/** Near-infrared at the eye for long exposure, by the air temperature: in the cold the eye is cooled, W/m². */
const limits: readonly (readonly [airBelow: number, limit: number])[] = [
  [0, 400],
  [10, 300],
]

const source = 'ICNIRP, 100 W/m² beyond 1,000 s; about 300 at 10 °C and 400 at 0 °C (from memory)'

/** The figure that long exposure of the eye is kept under at an air temperature, straight between the stated ones, W/m². */
export function eyeLimit(airTemperature: number): number {
  const [[cold, most], [cool, more]] = [limits[0] ?? [0, 400], limits[1] ?? [10, 300]]
  if (airTemperature <= cold) return most
  if (airTemperature > cool) return 100
  return most + ((more - most) * (airTemperature - cold)) / (cool - cold)
}

/** The near-infrared share of the heat at each eye stays under what long exposure allows; advice, as guests look away. */
export function nearInfrared({ brief, layout, warmth }: LayoutCheck): Finding[] {
  if (layout.heaters.length === 0) return []
  const rule: Rule = { rule: 'near-infrared', weight: 'advice', subject: { kind: 'layout', id: 'layout' }, source, unit: 'W/m²' } // prettier-ignore
  const known = warmth.flatMap(({ seat, nearInfraredAtEye }) => (nearInfraredAtEye === null ? [] : [{ seat, value: nearInfraredAtEye }])) // prettier-ignore
  if (known.length < warmth.length || known.length === 0) {
    return [findingOf(rule, 'cannot tell', { title: 'Near-infrared at the eye cannot be told', remedy: 'Give every model its element temperature.' })] // prettier-ignore
  }
  const limit = eyeLimit(brief.airTemperature)
  const most = known.reduce((a, b) => (b.value > a.value ? b : a))
  const over = known.filter(({ value }) => value > limit).length
  const figures = { value: most.value, limit, margin: limit - most.value }
  return over === 0
    ? [findingOf(rule, 'pass', { title: 'Near-infrared at the eyes under the limit', ...figures })]
    : [findingOf(rule, 'fails', { title: `Near-infrared over the limit at ${over === 1 ? 'one seat' : `${over} seats`}`, ...figures, remedy: 'Turn heaters out of the line of sight, or choose a longer wave.' })] // prettier-ignore
}
