import type { DoubtfulSize } from '#app/domain/doubt/doubtful-size.ts'
import { largestChange, rankEffects, relativeEffect } from '#app/domain/doubt/ranking.ts'
import type { Settling } from '#app/domain/doubt/settling.ts'
import type { SizeEffect } from '#app/domain/doubt/size-effects.ts'
import type { Figures } from '#app/domain/doubt/weighed.ts'
import type { Finding } from '#app/domain/rules/finding.ts'
import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'
import { formatLength, formatQuantity, type DisplayUnits } from '#app/domain/units.ts'

const sources: Record<DoubtfulSize['source'], string> = {
  laser: 'measured with a laser',
  tape: 'measured with a tape',
  drawing: 'from a drawing',
  photo: 'scaled from a photo',
  told: 'as told by the customer',
  guessed: 'guessed',
  'not stated': 'not stated',
  'data sheet': 'data sheet',
  supply: 'supply',
}

/** Where a size came from, in words. */
export const sourceWords = ({ source }: DoubtfulSize): string => sources[source]

/** A small length: whole millimetres, or inches. */
export const smallLength = (metres: number, units: DisplayUnits): string =>
  units === 'metric' ? `${Math.round(metres * 1000)} mm` : formatLength(metres, units)

/** "2.62 m ± 80 mm", "± 25 mm each" of a group, "62 ± 4 %". */
export function sizeText({ value, tolerance, unit, kind }: DoubtfulSize, units: DisplayUnits): string {
  const percent = (share: number) => `${Math.round(share * 1000) / 10}`
  if (kind === 'voltage') return `± ${percent(tolerance)} %`
  if (unit === 'share') return `${percent(value ?? 0)} ± ${percent(tolerance)} %`
  if (value === null) return `± ${smallLength(tolerance, units)} each`
  return `${formatLength(value, units)} ± ${smallLength(tolerance, units)}`
}

const ruleWords: Record<string, string> = {
  'head-flux': 'heat at the head',
  'seat-target': 'seat in its target band',
  supported: 'hold by its member',
  'support-load': 'load on its member',
  'near-infrared': 'near infrared at the eye',
}

/** A check in plain words: "clearance above". */
export const checkWords = ({ rule }: Finding): string => ruleWords[rule] ?? rule.replaceAll('-', ' ')

/** "H2", "seat R3-4", nothing for a whole layout. */
export const subjectWords = ({ subject }: Finding): string =>
  subject.kind === 'layout' ? '' : subject.kind === 'seat' ? `seat ${subject.id}` : subject.id

/** "clearance above (H2, H3), mounting height (H1)". */
export function checksInWords(findings: readonly Finding[]): string {
  const byRule = new Map<string, Set<string>>()
  for (const finding of findings) {
    const words = checkWords(finding)
    byRule.set(words, (byRule.get(words) ?? new Set<string>()).add(subjectWords(finding)))
  }
  const listed = [...byRule].map(([words, subjects]) => {
    const named = [...subjects].filter(Boolean).sort((a, b) => a.localeCompare(b, 'en', { numeric: true }))
    return named.length > 0 ? `${words} (${named.join(', ')})` : words
  })
  return listed.join(', ')
}

/** One size that the customer is asked to measure. */
export interface MeasureLine {
  readonly key: string
  readonly label: string
  readonly now: string
  readonly why: string
}

/** Sizes on the list at most, and the least relative effect of one that neither turns nor settles anything. */
const mostLines = 8
const leastEffect = 0.01

/** In whose units, and by whose rules. */
interface Told {
  readonly units: DisplayUnits
  readonly rules: HouseRules
}

/** The sizes to measure next in plain words, the one that matters most first; those as exact as a laser's are left out. */
export function measureLines(
  effects: readonly SizeEffect[],
  nominal: Figures,
  settled: readonly Settling[],
  { units, rules }: Told,
): MeasureLine[] {
  const labels = new Map(effects.map(({ size }) => [size.key, size.label]))
  return rankEffects(effects, nominal, 'overall', rules)
    .filter(({ size }) => size.kind === 'dimension' && size.tolerance > rules.toleranceLaser)
    .flatMap((effect): MeasureLine[] => {
      const why = reasons(effect, nominal, settled, labels, { units, rules })
      if (why === null) return []
      const now = `now ${sizeText(effect.size, units)}, ${sourceWords(effect.size)}`
      return [{ key: effect.size.key, label: capital(effect.size.label), now, why }]
    })
    .slice(0, mostLines)
}

function reasons(
  effect: SizeEffect,
  nominal: Figures,
  settled: readonly Settling[],
  labels: ReadonlyMap<string, string>,
  { units, rules }: Told,
): string | null {
  const { key } = effect.size
  const alone = settled.filter((each) => each.alone.includes(key))
  const together = settled.filter((each) => each.together.includes(key))
  const others = new Set(together.flatMap((each) => each.together.filter((other) => other !== key)))
  const named = [...others].map((other) => labels.get(other) ?? other)
  const said = new Set([...alone, ...together].map(({ check }) => check))
  const turned = effect.turns.filter((check) => !said.has(check)).flatMap((check) => nominal.checks.get(check) ?? [])
  const exact = `± ${smallLength(rules.toleranceLaser, units)}`
  const parts = [
    alone.length > 0 && `Measured to ${exact} it would settle: ${checksInWords(alone.map(({ finding }) => finding))}.`,
    together.length > 0 && `Together with ${named.join(' and ')} it would settle: ${checksInWords(together.map(({ finding }) => finding))}.`, // prettier-ignore
    turned.length > 0 && `Within it these may come out otherwise: ${checksInWords(turned)}.`,
    relativeEffect(effect, nominal, rules) >= leastEffect && figuresMoved(effect, nominal, units),
  ].filter((part) => part !== false && part !== null)
  return parts.length > 0 ? parts.join(' ') : null
}

/** "Moves the coldest seat by up to 12 W/m² and the tightest margin by up to 60 mm." */
function figuresMoved(
  { coldest, head, margin }: SizeEffect,
  { coldest: seat, head: hottest }: Figures,
  units: DisplayUnits,
): string | null {
  // prettier-ignore
  const flux = (change: number) => formatQuantity(change, 'irradiance', units)
  const [seatBy, headBy, marginBy] = [coldest, head, margin].map(largestChange)
  const moved = [
    seatBy && seat && seatBy >= 0.5 ? `the coldest seat by up to ${flux(seatBy)}` : null,
    headBy && hottest && headBy >= 0.5 ? `the hottest head by up to ${flux(headBy)}` : null,
    marginBy && marginBy >= 0.0005 ? `the tightest margin by up to ${smallLength(marginBy, units)}` : null,
  ].filter((part) => part !== null)
  return moved.length > 0 ? `Moves ${moved.join(' and ')}.` : null
}

/** With a capital at its start. */
export const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1)

/** The list as text to send: a heading, then a numbered line for each size. */
export function measureText(lines: readonly MeasureLine[], title: string): string {
  const numbered = lines.map(({ label, now, why }, i) => `${i + 1}. ${label}: ${now}. ${why}`)
  return [title, '', ...numbered, ''].join('\n')
}
