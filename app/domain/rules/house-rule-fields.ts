import { readNumber } from '#app/domain/brief/brief-field.ts'
import { houseFigure } from '#app/domain/rules/house-rules.ts'
import { houseRulesSchema, type HouseRules } from '#app/domain/rules/house-rules-schema.ts'
import { parseLength } from '#app/domain/length-parser.ts'
import { formatLength, formatQuantity, parseQuantity } from '#app/domain/units.ts'

type Name = keyof HouseRules
type Reading = { readonly value: number } | { readonly error: string }

/** How a kind of figure is written and read. */
interface Kind {
  /** Stands beside the field; empty where the figure has its unit with it or none. */
  readonly unit: string
  readonly show: (value: number) => string
  /** With its unit. */
  readonly say: (value: number) => string
  readonly read: (text: string, range: { readonly min: number; readonly max: number }) => Reading
}

/** A number of `unit` that is kept as `scale` times less. */
function number(unit: string, scale = 1, isWhole = false): Kind {
  const show = (value: number) => String(Math.round(value * scale * 1e4) / 1e4)
  const gap = unit === '' || unit === '°' ? unit : ` ${unit}`
  return {
    unit,
    show,
    say: (value) => (unit === '×' ? `× ${show(value)}` : `${show(value)}${gap}`),
    read: (text, { min, max }) => {
      const plain = text.trim().endsWith(unit) ? text.trim().slice(0, text.trim().length - unit.length) : text
      const value = readNumber(plain, { min: min * scale, max: max * scale })
      const fits = value !== null && (!isWhole || Number.isInteger(value))
      const range = `${show(min)} and ${show(max)}${gap}`
      if (!fits) return { error: isWhole ? `A whole number between ${range}.` : `Between ${range}.` }
      return { value: Math.round((value / scale) * 1e6) / 1e6 }
    },
  }
}

const length: Kind = {
  unit: '',
  show: (metres) => formatLength(metres, 'metric', 'fine'),
  say: (metres) => formatLength(metres, 'metric', 'fine'),
  read: (text, range) => {
    const read = parseLength(text, 'metric', range)
    return 'error' in read ? read : { value: read.metres }
  },
}

const flux: Kind = {
  ...number('W/m²'),
  say: (value) =>
    `${formatQuantity(value, 'irradiance', 'metric')} (${formatQuantity(value, 'irradiance', 'imperial')})`,
  read: (text, range) => parseQuantity(text, 'irradiance', 'metric', range),
}

const share = number('%', 100)

/** One figure of the house rules as a form asks for it and as a table tells it. */
interface HouseRuleField {
  readonly name: Name
  readonly label: string
  readonly meaning: string
  readonly kind: Kind
}

const field = (name: Name, label: string, kind: Kind, meaning: string): HouseRuleField => ({
  name,
  label,
  kind,
  meaning,
})

/** Every figure of the house rules, in groups and in the order in which they are asked for. */
export const houseRuleGroups = {
  'Tolerance of a size': [
    field('toleranceLaser', 'Measured with a laser, ±', length, 'Taken when the source is named, until somebody says better.'),
    field('toleranceTape', 'Measured with a tape, ±', length, 'Taken when the source is named, and for the reference sizes of photos.'),
    field('toleranceDrawing', 'From a drawing, ±', length, 'Taken when the source is named, until somebody says better.'),
    field('tolerancePhotoShare', 'From a photo, share of the size', share, 'The greater of this share and the next figure.'),
    field('tolerancePhotoLeast', 'From a photo, at least ±', length, 'The greater of this and the share; more where the marks are less exact.'),
    field('toleranceGuessShare', 'Told or guessed, share of the size', share, 'Stays visible as assumed until it is measured.'),
    field('toleranceUnstated', 'Of a size nobody named, ±', length, 'Counts for every coordinate that no named size decides. Placed heights have none.'),
  ],
  'Warmth and cautions': [
    field('targetLow', 'Target from', flux, 'Irradiance on the horizontal body plane. A new job starts with it; its brief may set its own.'),
    field('targetHigh', 'Target to', flux, 'Upper end of the same band.'),
    field('headCautionLongStay', 'Head caution, long stay', flux, 'Largest irradiance in any direction at the head, when a stay is long. No more than the stop line.'),
    field('headCautionShortStay', 'Head caution, short stay', flux, 'For a stay that is shorter. No more than the stop line.'),
    field('longStayMinutes', 'A long stay is at least', number('min'), 'By the brief’s length of stay.'),
    field('overlapThreshold', 'Spread and overlap', flux, 'Spread: where one heater alone gives it. Overlap: where two or more each alone do.'),
  ],
  Hanging: [
    field('chainSideways', 'Chain beside its member', length, 'How far sideways of the member an eye may be for a chain to hang plumb, where the manual is silent.'),
    field('splayReach', 'Splayed hanger, reach', length, 'How far in plan each member of a splayed pair may be from its eye.'),
    field('splayAngleDeg', 'Splayed hanger, angle from plumb', number('°'), 'The flattest that a splayed hanger may lie.'),
  ],
  'Supply and weather': [
    field('supplyOverRated', 'Supply above rated voltage', number('×'), 'An option whose rated voltage the supply passes by more than this may not be used.'),
    field('ingressOpenSky', 'Ingress protection, open sky', number('', 1, true), 'Least second numeral, and a location note that allows rain. The same under a roof that opens.'),
    field('ingressUnderCover', 'Ingress protection, closed cover', number('', 1, true), 'Least second numeral. A recess box hangs under a closed cover only.'),
    field('glowNearStep', 'Bright glow near a step', length, 'In plan, from a model of bright glow to where the level changes. Advice.'),
  ],
} as const satisfies Record<string, readonly HouseRuleField[]> // prettier-ignore

/** The same in one list. */
export const houseRuleFields: readonly HouseRuleField[] = Object.values(houseRuleGroups).flat()

/** The range that a figure is kept within, SI. */
const rangeOf = (name: Name) => {
  const { minValue, maxValue } = houseRulesSchema.shape[name]
  return { min: minValue ?? 0, max: maxValue ?? 0 }
}

/** The figures as fields show them. */
export const houseRuleValues = (rules: HouseRules): Record<string, string> =>
  Object.fromEntries(houseRuleFields.map(({ name, kind }) => [name, kind.show(rules[name])]))

/** What was typed; or what is wrong with each field, with its range. */
export function readHouseRules(
  values: Readonly<Record<string, string>>,
): { readonly body: HouseRules } | { readonly errors: Record<string, string> } {
  const errors: Record<string, string> = {}
  const read: Record<string, number> = {}
  for (const { name, kind } of houseRuleFields) {
    const reading = kind.read(values[name] ?? '', rangeOf(name))
    if ('error' in reading) errors[name] = reading.error
    else read[name] = reading.value
  }
  if (Object.keys(errors).length > 0) return { errors }
  const parsed = houseRulesSchema.safeParse(read)
  if (parsed.success) return { body: parsed.data }
  for (const { path, message } of parsed.error.issues) errors[path.join('.')] ??= message
  return { errors }
}

/** One rule as a person reads it. */
export const houseRuleRow = ({ name, label, meaning, kind }: HouseRuleField, rules: HouseRules) => {
  const { value, source } = houseFigure(rules, name)
  return { name: label, figure: kind.say(value), source, meaning }
}
