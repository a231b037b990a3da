import type { Brief } from '#app/domain/brief/brief.ts'
import type { BriefField } from '#app/domain/brief/brief-field.ts'
import { eveningFields, guestFields } from '#app/domain/brief/brief-fields.ts'
import { supplyFields } from '#app/domain/brief/supply-fields.ts'
import { houseFigure } from '#app/domain/rules/house-rules.ts'
import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'
import type { JobRequest } from '#app/domain/job/job-request.ts'
import { parseLength } from '#app/domain/length-parser.ts'
import { type DisplayUnits } from '#app/domain/units.ts'

/** The answers of the enquiry form by field name; a field answered with "don't know" has a second name beside it. */
export type EnquiryAnswers = Readonly<Record<string, string>>

/** Name under which "don't know" is ticked for a field. */
export const unknownName = (field: string): string => `unknown-${field}`

/** Whether a field is answered with "don't know". */
export const isUnknown = (answers: EnquiryAnswers, field: string): boolean => Boolean(answers[unknownName(field)])

/** What is assumed where nobody knows. No published source; the target is the house's. */
export const assumedBrief = (rules: HouseRules): Omit<Brief, 'place'> => ({
  story: '',
  season: '',
  airTemperature: 8,
  windDesign: 1,
  windGust: 3,
  windNote: '',
  relativeHumidity: 75,
  surroundingsTemperature: null,
  clothing: 1.3,
  activity: 1.2,
  stayMinutes: 90,
  supply: {
    system: 'Single-phase 230 V',
    phases: 1,
    phaseVoltage: 230,
    lineVoltage: null,
    sparePerPhase: [],
    distance: null,
    note: '',
  },
  energy: null,
  target: { low: rules.targetLow, high: rules.targetHigh, source: houseFigure(rules, 'targetLow').source },
  assumed: ['relativeHumidity', 'windGust', 'surroundingsTemperature', 'activity', 'stayMinutes'],
})

const pick = (fields: readonly BriefField[], ...names: readonly string[]) =>
  names.flatMap((name) => fields.filter((field) => field.name === name))

/** The few questions that the computation cannot do without; each may be answered with "don't know". */
export const enquiryFields: readonly BriefField[] = [
  ...pick(eveningFields, 'airTemperature', 'windDesign'),
  ...pick(guestFields, 'clothing'),
  ...pick(supplyFields, 'supply', 'sparePerPhase'),
  ...pick(guestFields, 'targetLow', 'targetHigh'),
]

/** Fields that are called otherwise than the part of the enquiry they give. */
const askedAs: Readonly<Record<string, string>> = {
  'floor.length': 'along',
  'floor.depth': 'deep',
  'brief.supply.sparePerPhase': 'sparePerPhase',
  'brief.target.low': 'targetLow',
  'brief.target.high': 'targetHigh',
}

/** Name of the field that gives a part of the enquiry, by its dotted path; the job's name where none gives it. */
export function fieldAt(path: string): string {
  const renamed = Object.entries(askedAs).find(([part]) => path === part || path.startsWith(`${part}.`))
  const own = path.replace(/^brief\./, '').split('.')[0] ?? ''
  const asked = ['name', 'customer', 'place', ...enquiryFields.map(({ name }) => name)]
  return renamed?.[1] ?? (asked.includes(own) ? own : 'name')
}

/** The enquiry that the answers make, or what is wrong with them, by field name. */
export function readEnquiry(
  answers: EnquiryAnswers,
  rules: HouseRules,
): { readonly asked: JobRequest } | { readonly errors: Record<string, string> } {
  const errors: Record<string, string> = {}
  const answer = (name: string) => (answers[name] ?? '').trim()
  const units: DisplayUnits = answer('units') === 'imperial' ? 'imperial' : 'metric'
  const named = (name: string, what: string, most: number, least = 1) => {
    const text = answer(name)
    if (text.length < least) errors[name] = `Give ${what}.`
    if (text.length > most) errors[name] = `At most ${most} characters. Was ${text.length}.`
    return text
  }
  const length = (name: string, most: number) => {
    const read = parseLength(answer(name), units, { min: 0.5, max: most })
    if ('error' in read) errors[name] = read.error
    return 'error' in read ? 1 : read.metres
  }
  const name = named('name', 'the job a name', 120)
  const customer = named('customer', 'the customer', 120, 0)
  const place = named('place', 'the place', 120)
  const floor = isUnknown(answers, 'floor') ? null : { length: length('along', 100), depth: length('deep', 60) }
  const brief = withAnswers({ ...assumedBrief(rules), place }, answers, units, errors)
  if (brief.target.low >= brief.target.high) errors['targetHigh'] ??= 'The target ends above where it starts.'
  if (Object.keys(errors).length > 0) return { errors }
  return { asked: { name, customer, displayUnits: units, floor, brief } }
}

function withAnswers(
  start: Brief,
  answers: EnquiryAnswers,
  units: DisplayUnits,
  errors: Record<string, string>,
): Brief {
  let brief = start
  for (const field of enquiryFields) {
    if (isUnknown(answers, field.name)) {
      brief = { ...brief, assumed: [...brief.assumed, field.name] }
      continue
    }
    const written = field.write(brief, answers[field.name] ?? '', units)
    if ('error' in written) errors[field.name] = written.error
    else brief = written.brief
  }
  return brief
}
