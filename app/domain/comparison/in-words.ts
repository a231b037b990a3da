import { countByModel, type ComparedVariant } from '#app/domain/comparison/compared-variant.ts'
import { spacingsOf } from '#app/domain/comparison/spacings.ts'
import type { ComparisonTerms } from '#app/domain/comparison/what-differs.ts'
import { countOutcome, groupFindings } from '#app/domain/rules/finding-groups.ts'
import { formatLength, formatQuantity } from '#app/domain/units.ts'

/** What differs between two variants in short sentences; `other` is told by how it departs from `from`. */
export function differencesInWords(from: ComparedVariant, other: ComparedVariant, terms: ComparisonTerms): string[] {
  return [
    heaters(from, other),
    height(from, other, terms),
    spacing(from, other, terms),
    tilts(from, other),
    seats(from, other),
    overlap(from, other, terms),
    power(from, other),
    failing(from, other),
  ].filter((sentence) => sentence !== null)
}

const asList = (variant: ComparedVariant): string =>
  countByModel(variant)
    .map(({ name, count }) => `${count} × ${name}`)
    .join(' and ') || 'no heater'

function heaters(from: ComparedVariant, other: ComparedVariant): string | null {
  const [before, after] = [asList(from), asList(other)]
  return before === after ? null : `${capital(after)} instead of ${before}.`
}

const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1)

function height(from: ComparedVariant, other: ComparedVariant, { units }: ComparisonTerms): string | null {
  const [before, after] = [lowestOf(from), lowestOf(other)]
  if (before === null || after === null || Math.abs(after - before) < 0.0005) return null
  const word = after < before ? 'lower' : 'higher'
  const [by, at] = [formatLength(Math.abs(after - before), units), formatLength(after, units)]
  return `Lowest point ${by} ${word}, at ${at}.`
}

function lowestOf({ layout }: ComparedVariant): number | null {
  return layout.heaters.length === 0 ? null : Math.min(...layout.heaters.map((heater) => heater.lowestPoint))
}

function spacing(from: ComparedVariant, other: ComparedVariant, { units }: ComparisonTerms): string | null {
  const [before, after] = [spacingsOf(from.layout), spacingsOf(other.layout)]
  const told = (values: readonly number[]) => values.map((m) => formatLength(m, units)).join(' and ')
  const parts = (['x', 'y'] as const).flatMap((axis) => {
    const [a, b] = [told(before[axis]), told(after[axis])]
    const way = axis === 'x' ? 'along' : 'across'
    return a === b || b === '' ? [] : [`${b} ${way}${a === '' ? '' : ` instead of ${a}`}`]
  })
  return parts.length === 0 ? null : `Spaced ${parts.join(', ')}.`
}

function tilts(from: ComparedVariant, other: ComparedVariant): string | null {
  const steepest = ({ layout }: ComparedVariant) => Math.max(0, ...layout.heaters.map((h) => Math.abs(h.tiltDeg)))
  const count = ({ layout }: ComparedVariant) => layout.heaters.filter((h) => h.tiltDeg !== 0).length
  if (steepest(from) === steepest(other) && count(from) === count(other)) return null
  if (other.layout.heaters.length === 0) return null
  return count(other) === 0 ? 'None is tilted.' : `${count(other)} tilted, up to ${steepest(other)}°.`
}

function seats({ totals: before }: ComparedVariant, { totals: after }: ComparedVariant): string | null {
  const more = after.seatsInTarget - before.seatsInTarget
  if (more === 0) return null
  return `${Math.abs(more)} ${more > 0 ? 'more' : 'fewer'} ${Math.abs(more) === 1 ? 'seat' : 'seats'} in target.`
}

function overlap(from: ComparedVariant, other: ComparedVariant, terms: ComparisonTerms): string | null {
  if (from.overlap === null || other.overlap === null) return null
  const more = other.overlap - from.overlap
  if (Math.abs(more) < 0.05) return null
  return `Overlap ${formatQuantity(Math.abs(more), 'area', terms.units)} ${more > 0 ? 'larger' : 'smaller'}.`
}

function power({ totals: before }: ComparedVariant, { totals: after }: ComparedVariant): string | null {
  const more = (after.power - before.power) / 1000
  return Math.abs(more) < 0.05 ? null : `${Math.abs(more).toFixed(1)} kW ${more > 0 ? 'more' : 'less'}.`
}

function failing(from: ComparedVariant, other: ComparedVariant): string | null {
  const failures = ({ findings }: ComparedVariant) => countOutcome(groupFindings(findings), 'fails')
  const [before, after] = [failures(from), failures(other)]
  if (before === after) return null
  const instead = before === 0 ? 'none' : String(before)
  if (after === 0) return `No check fails instead of ${instead}.`
  return `${after} ${after === 1 ? 'check fails' : 'checks fail'} instead of ${instead}.`
}
