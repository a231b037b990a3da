import { foot, formatLength, inch, roundLength, type DisplayUnits } from '#app/domain/units.ts'

/** A length as it was read: SI, the reading in words, and what may have been meant instead (can be parsed again). */
export interface LengthReading {
  readonly metres: number
  readonly reading: string
  readonly suggestion: string | null
}

/** Lengths beyond this are refused: ten times the longest site. */
const longest = 1000

const lengthUnits = [
  { size: 0.001, name: 'mm', spelled: /^(?:mm|millimet(?:er|re)s?)(?![a-z])\.?/i },
  { size: 0.01, name: 'cm', spelled: /^(?:cm|centimet(?:er|re)s?)(?![a-z])\.?/i },
  { size: 1, name: 'm', spelled: /^(?:m|met(?:er|re)s?)(?![a-z])\.?/i },
  { size: foot, name: 'ft', spelled: /^(?:'|(?:ft|foot|feet)(?![a-z])\.?)/i },
  { size: inch, name: 'in', spelled: /^(?:"|(?:in|inch|inches)(?![a-z])\.?)/i },
] as const
type LengthUnit = (typeof lengthUnits)[number]

interface Term {
  readonly value: number
  readonly unit: LengthUnit | null
  /** Digits as typed after the decimal mark; empty without one. */
  readonly decimals: string
  readonly whole: number
}

/** Primes, quotes, fractions, signs and spaces in the one spelling that the parser reads. */
function plainText(text: string): string {
  return text
    .replace(/(\d)(?=[¼-¾⅐-⅞])/g, '$1 ')
    .replace(/[″“”„]|''|′′|’’|´´/g, '"')
    .replace(/[′‘’´`]/g, "'")
    .normalize('NFKC')
    .replace(/⁄/g, '/')
    .replace(/[−–—‐‑]/g, '-')
    .replace(/\s+/g, ' ')
    .replace(/(^|[^\d.,])(\d{1,3}) (\d{3})(?= ?(?:mm\b|$))/i, '$1$2$3')
    .trim()
}

/**
 * The last of two different marks is the decimal one; a mark that repeats parts thousands, and so does a comma before
 * exactly three digits of millimetres. Null when the groups are not of three digits.
 */
function readNumber(raw: string, unit: LengthUnit | null): { value: number; decimals: string } | null {
  const marks = [...raw.matchAll(/[.,]/g)].map((mark) => mark[0])
  const last = marks.at(-1)
  const mixed = marks.length > 1 && marks.indexOf(last ?? '') === marks.length - 1
  const thousands = marks.length > 1 ? !mixed : unit?.name === 'mm' && /^\d{1,3},\d{3}$/.test(raw)
  const [head = '', tail = ''] = thousands || last === undefined ? [raw] : splitAtLast(raw, last)
  if (/[.,]/.test(head) && !/^\d{1,3}([.,])\d{3}(?:\1\d{3})*$/.test(head)) return null
  return { value: Number(`${head.replace(/[.,]/g, '') || '0'}.${tail || '0'}`), decimals: tail }
}

function splitAtLast(text: string, mark: string): [string, string] {
  const at = text.lastIndexOf(mark)
  return [text.slice(0, at), text.slice(at + 1)]
}

/** Reads one number with its unit from the start of the text; null when there is none. */
function readTerm(text: string): { term: Term; rest: string } | null {
  const number = /^(?:(\d+) ?\/ ?(\d+)|(\d[\d.,]*|[.,]\d+)(?:[ -]+(\d+) ?\/ ?(\d+))?) ?/.exec(text)
  if (!number) return null
  const afterNumber = text.slice(number[0].length)
  const unit = lengthUnits.find((candidate) => candidate.spelled.test(afterNumber)) ?? null
  const rest = unit ? afterNumber.replace(unit.spelled, '') : afterNumber
  const main = number[3] === undefined ? { value: 0, decimals: '' } : readNumber(number[3], unit)
  const fraction = Number(number[1] ?? number[4] ?? 0) / Number(number[2] ?? number[5] ?? 1)
  if (!main || !Number.isFinite(fraction)) return null
  const term = { value: main.value + fraction, unit, decimals: main.decimals, whole: Math.floor(main.value) }
  return { term, rest: rest.trimStart() }
}

/** Every term of the text; feet may be joined to inches by a dash or nothing, metres to centimetres by nothing. */
function readTerms(text: string): Term[] | null {
  const terms: Term[] = []
  let rest = text
  while (rest !== '') {
    const before = terms.at(-1)
    if (before) {
      const feet = before.unit?.name === 'ft'
      const plus = /^\+ ?/.test(rest)
      rest = rest.replace(feet ? /^[+,-] ?/ : /^\+ ?/, '')
      if (!plus && before.decimals !== '') return null
      if (!plus && !feet && before.unit?.name !== 'm') return null
    }
    const found = readTerm(rest)
    if (!found) return null
    const { term } = found
    const smaller = term.unit === null || (before?.unit?.size ?? Infinity) > term.unit.size
    if (before && !smaller && !text.includes('+')) return null
    const inches = before?.unit?.name === 'ft' && term.unit === null
    if (before && term.unit === null && !inches) return null
    terms.push(inches ? { ...term, unit: lengthUnits[4] } : term)
    rest = found.rest
  }
  return terms
}

/**
 * Unit of a bare number. Metric: millimetres from 100 up, metres below. Imperial: feet below 24, inches below 1,000,
 * millimetres from there (no site is 83 ft in inches). House rule; the reading shown beside the field says which.
 */
function unitOfBareNumber(value: number, display: DisplayUnits): LengthUnit {
  const [mm, , m, ft, inches] = lengthUnits
  if (display === 'metric') return value >= 100 ? mm : m
  if (value >= 1000) return mm
  return value >= 24 ? inches : ft
}

/** What may have been meant: 11.5 ft for 11 ft 5 in, 30 for 30 cm or 30 ft, 3.250 mm for 3250 mm. */
function suggestionFor(term: Term, unit: LengthUnit): string | null {
  const { decimals, whole, value } = term
  const inchesMeant = Number(decimals)
  if (unit.name === 'ft' && /^\d{1,2}$/.test(decimals) && inchesMeant >= 1 && inchesMeant <= 11) {
    return Math.abs((value - whole) * 12 - inchesMeant) < 0.05 ? null : `${whole} ft ${inchesMeant} in`
  }
  if (unit.name === 'mm' && term.unit && decimals.length === 3) return `${whole}${decimals} mm`
  if (term.unit !== null || decimals !== '' || value < 20 || value >= 100) return null
  if (unit.name === 'm') return `${value} cm`
  return unit.name === 'in' ? `${value} ft` : null
}

const examples = {
  metric: `3.25 m, 3250, 2.6 m + 30 cm or 11' 5"`,
  imperial: `11' 5", 8'-6 1/2", 137 in or 3.25 m`,
} as const

/**
 * Reads a typed length: `11' 5"`, `11 ft 5 in`, `8'-6 1/2"`, `137in`, `3.25 m`, `3250`, `2.6m + 30cm`, ′ ″ ½, comma
 * decimals. Rounded to 0.1 mm. With a range, a value outside it is refused in the person's unit.
 */
export function parseLength(
  text: string,
  displayUnits: DisplayUnits,
  range: { readonly min: number; readonly max: number } = { min: -longest, max: longest },
): LengthReading | { readonly error: string } {
  const plain = plainText(text)
  if (plain === '') return { error: `Give a length, such as ${examples[displayUnits]}.` }
  const negative = plain.startsWith('-')
  const terms = readTerms(plain.replace(/^[+-] ?/, ''))
  const first = terms?.[0]
  if (!terms || !first)
    return { error: `“${text.trim()}” is not read as a length. Accepted: ${examples[displayUnits]}.` }
  const unitOf = (term: Term) => term.unit ?? unitOfBareNumber(term.value, displayUnits)
  const sum = terms.reduce((total, term) => total + term.value * unitOf(term).size, 0)
  const metres = roundLength(negative ? -sum : sum)
  if (!(metres >= range.min && metres <= range.max)) return { error: rangeText(range, displayUnits) }
  const suggestion = terms.length === 1 ? suggestionFor(first, unitOf(first)) : null
  return {
    metres,
    reading: readingOf(metres, unitOf(first), displayUnits),
    suggestion: suggestion && negative ? `-${suggestion}` : suggestion,
  }
}

/** The accepted range, rounded inwards so that both of its ends are accepted when typed as shown. */
function rangeText(range: { readonly min: number; readonly max: number }, displayUnits: DisplayUnits): string {
  const step = displayUnits === 'metric' ? 1e-4 : inch / 32
  const least = Math.ceil(range.min / step - 1e-6) * step
  const most = Math.floor(range.max / step + 1e-6) * step
  return `Between ${formatLength(least, displayUnits, 'fine')} and ${formatLength(most, displayUnits, 'fine')}.`
}

/** In the units that were typed and, where those are not the person's, in theirs too. */
function readingOf(metres: number, unit: LengthUnit, displayUnits: DisplayUnits): string {
  const typed = unit.name === 'ft' || unit.name === 'in' ? 'imperial' : 'metric'
  const own = formatLength(metres, typed, 'fine')
  return typed === displayUnits ? own : `${own} = ${formatLength(metres, displayUnits, 'fine')}`
}
