import {
  countByModel,
  countUnsupported,
  tightestMargin,
  type ComparedVariant,
} from '#app/domain/comparison/compared-variant.ts'
import { hasOthersThanPrimary } from '#app/domain/comfort/seat-warmth.ts'
import { formatMoney } from '#app/domain/comparison/list-price.ts'
import { spacingsOf } from '#app/domain/comparison/spacings.ts'
import type { Outcome } from '#app/domain/rules/finding.ts'
import { countOutcome, groupFindings, openOutcomes } from '#app/domain/rules/finding-groups.ts'
import { formatLength, formatQuantity, type DisplayUnits } from '#app/domain/units.ts'

/** What a comparison needs beside the variants. Target and threshold in W/m². */
export interface ComparisonTerms {
  readonly units: DisplayUnits
  readonly target: { readonly low: number; readonly high: number }
  readonly overlapThreshold: number
}

/** One variant's figure in one row, with the outcome it stands for. */
interface ComparisonCell {
  readonly text: string
  readonly outcome: Outcome | null
  /** The better of the row; several may share it, and where all are equal none has it. */
  readonly better: boolean
}

/** One thing that is compared across the variants. */
export interface ComparisonRow {
  readonly name: string
  readonly cells: readonly ComparisonCell[]
  /** Whether every variant says the same. */
  readonly same: boolean
}

interface Value {
  readonly text: string
  /** Less is better; null where the row has no better or the figure is missing. */
  readonly cost: number | null
  readonly outcome?: Outcome
}

type Row = readonly [name: string, valueOf: (variant: ComparedVariant, terms: ComparisonTerms) => Value]

const missing: Value = { text: '–', cost: null }
const said = (text: string): Value => ({ text, cost: null })
/** The one scale of the maps is in W/m², whatever units lengths are in. */
const irradiance = (value: number): string => formatQuantity(value, 'irradiance', 'metric')

function heaters(variant: ComparedVariant): Value {
  const counts = countByModel(variant)
  return counts.length === 0 ? missing : said(counts.map(({ name, count }) => `${count} × ${name}`).join(', '))
}

/** "2.35 m", or "2.35 to 2.45 m" where they differ. */
function span(values: readonly number[], show: (value: number) => string): string {
  const [least, most] = [show(Math.min(...values)), show(Math.max(...values))]
  return least === most ? least : `${least} to ${most}`
}

function lowestPoint({ layout }: ComparedVariant, { units }: ComparisonTerms): Value {
  if (layout.heaters.length === 0) return missing
  return said(
    span(
      layout.heaters.map((heater) => heater.lowestPoint),
      (m) => formatLength(m, units),
    ),
  )
}

function spacing({ layout }: ComparedVariant, { units }: ComparisonTerms): Value {
  const { x, y } = spacingsOf(layout)
  const parts = [
    x.length > 0 ? `${span(x, (m) => formatLength(m, units))} along` : '',
    y.length > 0 ? `${span(y, (m) => formatLength(m, units))} across` : '',
  ].filter(Boolean)
  return parts.length === 0 ? missing : said(parts.join(', '))
}

function tilt({ layout }: ComparedVariant): Value {
  const tilted = layout.heaters.filter((heater) => heater.tiltDeg !== 0)
  if (layout.heaters.length === 0) return missing
  if (tilted.length === 0) return said('none, straight down')
  const angles = span(
    tilted.map((heater) => Math.abs(heater.tiltDeg)),
    (degrees) => `${degrees}°`,
  )
  return said(tilted.length === layout.heaters.length ? `all, ${angles}` : `${tilted.length} of them, ${angles}`)
}

function inTarget({ totals }: ComparedVariant): Value {
  if (totals.heaters === 0) return missing
  return { text: `${totals.seatsInTarget} of ${totals.seatsCounted}`, cost: -totals.seatsInTarget }
}

function coldest({ totals }: ComparedVariant, terms: ComparisonTerms): Value {
  if (!totals.coldest) return missing
  const { irradiance: value, seatId } = totals.coldest
  const outcome = value < terms.target.low ? { outcome: 'fails' as const } : {}
  return { text: `${irradiance(value)}, ${seatId}`, cost: -Math.min(value, terms.target.high), ...outcome }
}

function hottest({ totals }: ComparedVariant, terms: ComparisonTerms): Value {
  if (!totals.hottest) return missing
  const { irradiance: value, seatId } = totals.hottest
  const outcome = value > terms.target.high ? { outcome: 'fails' as const } : {}
  return { text: `${irradiance(value)}, ${seatId}`, cost: Math.max(value, terms.target.high), ...outcome }
}

function evenness({ totals }: ComparedVariant): Value {
  return totals.evenness === null ? missing : { text: totals.evenness.toFixed(2), cost: -totals.evenness }
}

function headMaximum({ totals }: ComparedVariant): Value {
  if (!totals.headMaximum) return missing
  const { irradiance: value, seatId } = totals.headMaximum
  return { text: `${irradiance(value)}, ${seatId}`, cost: value }
}

function overlap({ overlap: area }: ComparedVariant, { units }: ComparisonTerms): Value {
  if (area === null) return missing
  return said(formatQuantity(area, 'area', units))
}

function feelsLike({ warmth }: ComparedVariant, { units }: ComparisonTerms): Value {
  const after = warmth.flatMap(({ seat, feelsLike: felt }) =>
    seat.priority === 'not heated' || felt.design.after === null ? [] : [felt.design.after],
  )
  if (after.length === 0) return missing
  return said(span(after, (celsius) => formatQuantity(celsius, 'temperature', units)))
}

const power = ({ totals }: ComparedVariant): Value =>
  totals.heaters === 0 ? missing : { text: `${(totals.power / 1000).toFixed(1)} kW`, cost: totals.power }

function unsupported({ findings, totals }: ComparedVariant): Value {
  if (totals.heaters === 0) return missing
  const count = countUnsupported(findings)
  return {
    text: count === 0 ? 'none' : String(count),
    cost: count,
    ...(count > 0 ? { outcome: 'fails' as const } : {}),
  }
}

function outcomes({ findings, totals }: ComparedVariant): Value {
  if (totals.heaters === 0) return missing
  const groups = groupFindings(findings)
  return { text: openOutcomes(groups) || 'all pass', cost: countOutcome(groups, 'fails') }
}

function tightest({ findings }: ComparedVariant, { units }: ComparisonTerms): Value {
  const found = tightestMargin(findings)
  if (!found) return missing
  const { finding, margin } = found
  return {
    text: `${marginWords(margin, units)}, ${finding.subject.id}: ${finding.title}`,
    cost: -margin,
    outcome: finding.outcome,
  }
}

/** A margin as it is measured on the spot: millimetres, or inches. */
function marginWords(margin: number, units: DisplayUnits): string {
  const text = units === 'metric' ? `${Math.round(1000 * margin)} mm` : formatLength(margin, units)
  return text.replace('-', '−')
}

function price({ price: list }: ComparedVariant): Value {
  if (list.unpriced.length > 0) return { text: `no list price for ${list.unpriced.join(', ')}`, cost: null }
  return list.amount === 0 ? missing : { text: formatMoney(list.amount, list.currency), cost: list.amount }
}

function evening({ totals }: ComparedVariant): Value {
  if (!totals.costPerEvening || totals.heaters === 0) return missing
  const { amount, currency } = totals.costPerEvening
  return { text: formatMoney(amount, currency, true), cost: amount }
}

const rows = (terms: ComparisonTerms, seat: 'seat' | 'primary seat'): readonly Row[] => [
  ['Heaters', heaters],
  ['Lowest point', lowestPoint],
  ['Spacing', spacing],
  ['Tilted', tilt],
  ['Seats in target', inTarget],
  [`Coldest ${seat}`, coldest],
  [`Hottest ${seat}`, hottest],
  ['Evenness, min ÷ mean', evenness],
  ['Hottest head', headMaximum],
  ['Feels like, design wind', feelsLike],
  [`Overlap, each alone ≥ ${irradiance(terms.overlapThreshold)}`, overlap],
  ['Findings', outcomes],
  ['Unsupported', unsupported],
  ['Tightest margin', tightest],
  ['Power', power],
  ['Heaters, list price before tax', price],
  ['Cost per evening', evening],
]

/** Every figure of the variants side by side. Better means: of the figures as they are written, not of hidden digits. */
export function comparisonRows(variants: readonly ComparedVariant[], terms: ComparisonTerms): readonly ComparisonRow[] {
  const seat = variants.some(({ warmth }) => hasOthersThanPrimary(warmth)) ? 'primary seat' : 'seat'
  return rows(terms, seat).map(([name, valueOf]) => {
    const values = variants.map((variant) => valueOf(variant, terms))
    const same = values.every(({ text }) => text === values[0]?.text)
    const costs = values.flatMap(({ cost }) => (cost === null ? [] : [cost]))
    const least = Math.min(...costs)
    const ranked = !same && costs.length > 1 && costs.some((cost) => cost !== least)
    return {
      name,
      same,
      cells: values.map(({ text, cost, outcome }) => ({
        text,
        outcome: outcome ?? null,
        better: ranked && cost === least,
      })),
    }
  })
}
