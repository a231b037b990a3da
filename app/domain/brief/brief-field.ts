import type { Brief } from '#app/domain/brief/brief.ts'
import { fromSi, parseQuantity, unitSymbol, type DisplayUnits, type Quantity } from '#app/domain/units.ts'

/** A brief with an answer written into it, or why the answer was not taken, with the accepted range. */
type Written = { readonly brief: Brief } | { readonly error: string }

/** One question of the brief, asked on paper or on a page. Its name is the one that `assumed` keeps. */
export interface BriefField {
  readonly name: string
  readonly label: string
  readonly hint?: string
  readonly unit: (units: DisplayUnits) => string
  /** The kept answer as the person would type it; empty when there is none. */
  readonly show: (brief: Brief, units: DisplayUnits) => string
  /** Writes a typed answer into the brief. */
  readonly write: (brief: Brief, text: string, units: DisplayUnits) => Written
  /** Present for one of a few answers. */
  readonly options?: readonly { readonly value: string; readonly label: string }[]
  readonly long?: boolean
}

interface Named {
  readonly name: string
  readonly label: string
  readonly hint?: string
}

type Part<T> = { readonly get: (brief: Brief) => T; readonly set: (brief: Brief, value: T) => Brief }
type Range = { readonly min: number; readonly max: number }

/** For answers that are words. */
export const noUnit = () => ''
const plainNumber = (value: number): string => String(Math.round(value * 1e4) / 1e4)

/** A figure in the person's units. */
export function figure(named: Named, quantity: Quantity, range: Range, { get, set }: Part<number>): BriefField {
  return {
    ...named,
    unit: (units) => unitSymbol(quantity, units),
    show: (brief, units) => plainNumber(Math.round(fromSi(get(brief), quantity, units) * 100) / 100),
    write: (brief, text, units) => {
      const read = parseQuantity(text, quantity, units, range)
      return 'error' in read ? read : { brief: set(brief, read.value) }
    },
  }
}

/** A figure whose unit is the same for everybody. */
export function count(named: Named, unit: string, range: Range, { get, set }: Part<number>): BriefField {
  return {
    ...named,
    unit: () => unit,
    show: (brief) => plainNumber(get(brief)),
    write: (brief, text) => {
      const value = readNumber(text, range)
      const between = `Between ${range.min} and ${range.max}${unit ? ` ${unit}` : ''}.`
      return value === null ? { error: between } : { brief: set(brief, value) }
    },
  }
}

/** A plain number with a point or a comma; null outside the range. */
export function readNumber(text: string, range: Range): number | null {
  const plain = text.trim().replace(',', '.').replace('−', '-')
  const value = /^[+-]?(\d+\.?\d*|\.\d+)$/.test(plain) ? Number(plain) : NaN
  return value >= range.min && value <= range.max ? value : null
}

/** An answer in the person's own words. */
export function words(named: Named, most: number, { get, set }: Part<string>, least = 0): BriefField {
  return {
    ...named,
    unit: noUnit,
    long: most > 200,
    show: get,
    write: (brief, text) => {
      const value = text.trim()
      if (value.length < least) return { error: 'Give a few words.' }
      return value.length > most
        ? { error: `At most ${most} characters. Was ${value.length}.` }
        : { brief: set(brief, value) }
    },
  }
}

/** A figure that may be left open; the empty answer means what the hint says. */
export function orNothing(
  field: BriefField,
  get: (brief: Brief) => number | null,
  clear: (brief: Brief) => Brief,
): BriefField {
  return {
    ...field,
    show: (brief, units) => (get(brief) === null ? '' : field.show(brief, units)),
    write: (brief, text, units) => (text.trim() === '' ? { brief: clear(brief) } : field.write(brief, text, units)),
  }
}
