import { sameData } from '#app/domain/same-data.ts'
import { formatLength, type DisplayUnits } from '#app/domain/units.ts'

/** Facts that a person calls otherwise than the site does; nothing: the value says what it is. */
const factNames: Readonly<Record<string, string>> = {
  material: '',
  kind: '',
  priority: '',
  posture: '',
  group: '',
  shape: '',
  value: '',
  source: '',
  swing: 'blades reach down',
  voidDepth: 'void above',
  allowedPointLoad: 'allowed load',
  loadStatus: 'load',
  movable: 'moves',
  transmittance: 'lets through',
  turnDeg: 'turned',
  facingDeg: 'looks',
  bodyHeight: 'body plane',
  headHeight: 'head plane',
  opening: 'opens',
  tolerance: '±',
  z: 'heights',
}

/** Facts that are numbers but no lengths, with their unit. */
const otherUnits: Readonly<Record<string, (value: number) => string>> = {
  turnDeg: (value) => `${value}°`,
  facingDeg: (value) => `${value}°`,
  allowedPointLoad: (value) => `${value} N`,
  transmittance: (value) => `${Math.round(value * 1000) / 10} %`,
  edge: (value) => `${value + 1}`,
  metresPerPixel: (value) => `${value}`,
}

/** What it says that a fact is not there. */
const absences: Readonly<Record<string, string>> = {
  top: 'past the cover',
  voidDepth: 'not known',
  allowedPointLoad: 'not known',
}

/** More facts than these are counted. */
const mostFacts = 5

type Facts = Readonly<Record<string, unknown>>

const isFacts = (value: unknown): value is Facts => typeof value === 'object' && value !== null && !Array.isArray(value)

const nameOf = (fact: string): string => factNames[fact] ?? fact
const said = (name: string, words: string): string => (name === '' ? words : `${name} ${words}`)

/**
 * The facts of a thing that another copy of it has otherwise, in words: "corner 3 7.30 m, 3.20 m, combustible". Facts
 * that are the same are left out; empty when all are.
 */
export function differingFacts(own: object, other: object, units: DisplayUnits): string {
  const facts = factsOf('', own, other, units)
  const rest = facts.length - mostFacts
  return [...facts.slice(0, mostFacts), ...(rest > 0 ? [`${rest} more`] : [])].join(', ')
}

function factsOf(fact: string, own: unknown, other: unknown, units: DisplayUnits): string[] {
  if (sameData(own, other)) return []
  if (fact === 'moves' && Array.isArray(own)) return [placesWords(own, other)]
  if (fact === 'photo') return [own === undefined ? 'without its photo' : 'from a photo']
  if (isFacts(own) && isFacts(other)) {
    const differing = Object.keys(own).flatMap((key) => factsOf(key, own[key], other[key], units))
    const missing = Object.keys(other).filter((key) => own[key] === undefined)
    return differing.length > 0 ? differing : missing.map((key) => `without ${nameOf(key)}`)
  }
  if (Array.isArray(own) && own.every((part) => typeof part === 'object')) return partsOf(fact, own, other, units)
  return [said(nameOf(fact), valueWords(fact, own, units))]
}

function placesWords(own: readonly unknown[], other: unknown): string {
  const differs = Array.isArray(other) && other.length === own.length ? 'other ' : ''
  return `decides ${own.length} ${differs}${own.length === 1 ? 'place' : 'places'}`
}

/** What differs of a list: its own parts one by one where both have as many, else how many there are. */
function partsOf(fact: string, own: readonly unknown[], other: unknown, units: DisplayUnits): string[] {
  const one = fact === 'states' ? 'state' : 'corner'
  if (!Array.isArray(other) || other.length !== own.length)
    return [`${own.length} ${own.length === 1 ? one : `${one}s`}`]
  return own.flatMap((part, i) => {
    if (sameData(part, other[i])) return []
    const name = isFacts(part) && typeof part['name'] === 'string' ? part['name'] : `${one} ${i + 1}`
    return [`${name} ${isFacts(part) ? factsOf('', part, other[i], units).join(' ') : valueWords('', part, units)}`]
  })
}

function valueWords(fact: string, value: unknown, units: DisplayUnits): string {
  if (value === null || value === undefined || value === '') return absences[fact] ?? 'none'
  if (typeof value === 'boolean') return value ? 'yes' : 'no'
  if (typeof value === 'number') return otherUnits[fact]?.(value) ?? formatLength(value, units)
  if (Array.isArray(value)) {
    const between = ['x', 'y', 'z'].includes(fact) ? ' to ' : ', '
    return value.map((each) => valueWords(fact, each, units)).join(between)
  }
  if (!isFacts(value)) return `${String(value)}`
  return Object.entries(value)
    .map(([key, each]) => said(nameOf(key), valueWords(key, each, units)))
    .join(', ')
}
