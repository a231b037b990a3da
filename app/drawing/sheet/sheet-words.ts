import type { Brief } from '#app/domain/brief/brief.ts'
import {
  hasOthersThanPrimary,
  type LayoutTotals,
  type SeatWarmth,
  type WindName,
} from '#app/domain/comfort/seat-warmth.ts'
import { warmthWords } from '#app/drawing/plan/seat.tsx'
import { fromSi, type DisplayUnits } from '#app/domain/units.ts'

const counted = (warmth: readonly SeatWarmth[]): SeatWarmth[] =>
  warmth.filter(({ seat, onFloor }) => onFloor && seat.priority !== 'not heated')

/** How many seats feel how, out of the wind: "8 cool, 32 slightly cool". */
function seatsInWords(warmth: readonly SeatWarmth[]): string {
  const words = counted(warmth).flatMap(({ sensation }) => sensation.calm.after?.word ?? [])
  if (words.length === 0) return '–'
  return warmthWords
    .map((word) => ({ word, count: words.filter((one) => one === word).length }))
    .filter(({ count }) => count > 0)
    .map(({ word, count }) => `${count} ${word}`)
    .join(', ')
}

/** A temperature as a whole figure in the reader's unit, without the unit. */
const degreesText = (celsius: number, units: DisplayUnits): string =>
  String(Math.round(fromSi(celsius, 'temperature', units))).replace('-', '−')

/** The unit of temperatures on a sheet. */
const temperatureUnit = (units: DisplayUnits): string => (units === 'imperial' ? '°F' : '°C')

/** A temperature with its unit. */
const temperatureText = (celsius: number, units: DisplayUnits): string =>
  `${degreesText(celsius, units)} ${temperatureUnit(units)}`

/** What the seats feel like at one wind, heaters off and on: "7 → 12 to 14 °C". */
function feelsLikeText(warmth: readonly SeatWarmth[], wind: WindName, units: DisplayUnits): string {
  const pairs = counted(warmth).map(({ feelsLike }) => feelsLike[wind])
  const after = pairs.flatMap((pair) => pair.after ?? [])
  if (after.length === 0) return '–'
  const range = (values: readonly number[]): string => {
    const [low, high] = [degreesText(Math.min(...values), units), degreesText(Math.max(...values), units)]
    return low === high ? low : `${low} to ${high}`
  }
  return `${range(pairs.map(({ before }) => before))} → ${range(after)} ${temperatureUnit(units)}`
}

/** How a guest is dressed, from the clothing's insulation in clo (common practice, no source). */
function dressedText(clo: number): string {
  if (clo >= 1.2) return 'in a coat'
  return clo >= 0.9 ? 'in a jacket' : 'in light clothes'
}

/** An amount with its currency's sign, thousands set apart: "€ 6 065.04". */
export function moneyText(amount: number, currency: 'EUR' | 'USD'): string {
  const [whole = '0', cents = '00'] = amount.toFixed(2).split('.')
  return `${currency === 'EUR' ? '€' : '$'} ${whole.replace(/\B(?=(\d{3})+$)/g, ' ')}.${cents}`
}

/** One figure below a plan: its name and one or two lines. */
export interface SheetFigure {
  readonly name: string
  readonly lines: readonly string[]
}

/** The figures below a variant's plan; a price only where one is given. */
export function sheetFigures(
  warmth: readonly SeatWarmth[],
  totals: LayoutTotals,
  brief: Brief,
  units: DisplayUnits,
  priceWithTax: { readonly amount: number; readonly currency: 'EUR' | 'USD' } | null,
): SheetFigure[] {
  const { coldest, hottest, costPerEvening } = totals
  const flux = coldest && hottest ? `${Math.round(coldest.irradiance)} to ${Math.round(hottest.irradiance)} W/m²` : '–'
  const inTarget = totals.heaters === 0 ? '–' : `${totals.seatsInTarget} of ${totals.seatsCounted} in target`
  const feels = [
    `${feelsLikeText(warmth, 'calm', units)} calm`,
    `${feelsLikeText(warmth, 'design', units)} in the wind`,
  ]
  return [
    { name: 'Seats, out of the wind', lines: [seatsInWords(warmth), inTarget] },
    { name: `Feels like, ${dressedText(brief.clothing)}, off → on`, lines: feels },
    { name: hasOthersThanPrimary(warmth) ? 'Primary seats' : 'Seats', lines: [flux] },
    { name: 'Power', lines: [`${(totals.power / 1000).toFixed(1)} kW`] },
    ...(costPerEvening
      ? [{ name: 'An evening', lines: [moneyText(costPerEvening.amount, costPerEvening.currency)] }]
      : []),
    ...(priceWithTax
      ? [{ name: 'Price with tax', lines: [moneyText(priceWithTax.amount, priceWithTax.currency)] }]
      : []),
  ]
}

const numbers = ['no', 'one', 'two', 'three', 'four']

/** Two or more things in a sentence: "2, 3 and 4". */
export const listText = (things: readonly string[]): string =>
  things.length < 2 ? things.join('') : `${things.slice(0, -1).join(', ')} and ${things.at(-1)}`

/** What the sheet shows, below its title. */
export const sheetSubtitle = (brief: Brief, units: DisplayUnits, count: number): string =>
  `Warmth at the seats on an evening at ${temperatureText(brief.airTemperature, units)}, ${numbers[count] ?? count} ways of placing the heaters`
