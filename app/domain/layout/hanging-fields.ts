import { hangingDataSchema, type HangingData } from '#app/domain/layout/hanging-data.ts'
import { parseLength } from '#app/domain/length-parser.ts'
import { formatLength, type DisplayUnits } from '#app/domain/units.ts'

/** One figure of the hanging data as a form asks for it. Lengths m. */
export interface HangingField {
  readonly name: keyof HangingData
  readonly label: string
  readonly meaning: string
  readonly min: number
  readonly max: number
}

const limitOf = (name: keyof HangingData, end: 'minValue' | 'maxValue'): number =>
  hangingDataSchema.shape[name][end] ?? 0

const field = (name: keyof HangingData, label: string, meaning: string): HangingField => ({
  name,
  label,
  meaning,
  min: limitOf(name, 'minValue'),
  max: limitOf(name, 'maxValue'),
})

/** Every figure of the hanging data, in the order in which it is asked for. */
export const hangingFields: readonly HangingField[] = [
  field('linkPitch', 'Link pitch', 'Length of one link, inside to inside.'),
  field('hardwareAllowance', 'Fittings', 'Clamp, screw links and turnbuckle at rest, of each hanger.'),
  field('shortens', 'Turnbuckle shortens by', 'From rest, at the most.'),
  field('lengthens', 'Turnbuckle lengthens by', 'From rest, at the most.'),
  field('rodStep', 'Rods cut in steps of', 'To the nearest.'),
  field('safetySlack', 'Safety line longer by', 'Than its hanger, so that it stays slack.'),
  field('orderStep', 'Chain ordered in lengths of', 'Rounded up per order.'),
]

/** The figures as fields show them. */
export const hangingValues = (data: HangingData, units: DisplayUnits): Record<string, string> =>
  Object.fromEntries(hangingFields.map(({ name }) => [name, formatLength(data[name], units, 'fine')]))

/** What was typed, read as lengths in any way of writing them; or what is wrong with each field. */
export function readHanging(
  values: Readonly<Record<string, string>>,
  units: DisplayUnits,
): { readonly body: HangingData } | { readonly errors: Record<string, string> } {
  const errors: Record<string, string> = {}
  const read: Record<string, number> = {}
  for (const { name, min, max } of hangingFields) {
    const reading = parseLength(values[name] ?? '', units, { min, max })
    if ('error' in reading) errors[name] = reading.error
    else read[name] = reading.metres
  }
  if (Object.keys(errors).length > 0) return { errors }
  return { body: hangingDataSchema.parse(read) }
}
