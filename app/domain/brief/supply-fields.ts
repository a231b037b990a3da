import type { Brief } from '#app/domain/brief/brief.ts'
import { noUnit, readNumber, words, type BriefField } from '#app/domain/brief/brief-field.ts'
import { parseLength } from '#app/domain/length-parser.ts'
import { formatLength } from '#app/domain/units.ts'

const supplyOf = (brief: Brief, change: Partial<Brief['supply']>): Brief => ({
  ...brief,
  supply: { ...brief.supply, ...change },
})
/** Supply systems as boards are labelled; the voltages are phase to neutral and line to line. */
const supplySystems = [
  { value: '230', label: 'Single-phase 230 V', phases: 1, phaseVoltage: 230, lineVoltage: null },
  { value: '400', label: 'Three-phase 400/230 V', phases: 3, phaseVoltage: 230, lineVoltage: 400 },
  { value: '240', label: 'Single-phase 240/120 V', phases: 1, phaseVoltage: 120, lineVoltage: 240 },
  { value: '208', label: 'Three-phase 208/120 V', phases: 3, phaseVoltage: 120, lineVoltage: 208 },
  { value: '480', label: 'Three-phase 480/277 V', phases: 3, phaseVoltage: 277, lineVoltage: 480 },
] as const

const systemField: BriefField = {
  name: 'supply',
  label: 'Supply',
  unit: noUnit,
  options: supplySystems,
  show: ({ supply }) =>
    supplySystems.find(
      (known) =>
        known.phases === supply.phases &&
        known.phaseVoltage === supply.phaseVoltage &&
        known.lineVoltage === supply.lineVoltage,
    )?.value ?? '',
  write: (brief, text) => {
    const known = supplySystems.find(({ value }) => value === text)
    if (!known) return { error: 'Choose one of the systems.' }
    const { phases, phaseVoltage, lineVoltage, label } = known
    const spare = Array.from(
      { length: phases },
      (_, i) => brief.supply.sparePerPhase[i] ?? brief.supply.sparePerPhase[0],
    )
    return {
      brief: supplyOf(brief, {
        phases,
        phaseVoltage,
        lineVoltage,
        system: label,
        sparePerPhase: spare.filter((amps) => amps !== undefined),
      }),
    }
  },
}

const spareField: BriefField = {
  name: 'sparePerPhase',
  label: 'Spare on the board',
  hint: 'One figure, or one for each phase: 40, 32, 40',
  unit: () => 'A',
  show: ({ supply }) => supply.sparePerPhase.join(', '),
  write: (brief, text) => {
    const parts = text.trim() === '' ? [] : text.trim().split(/\s*[;/]\s*|,\s+|\s+/)
    const amps = parts.map((part) => readNumber(part, { min: 0, max: 5000 }))
    const { phases } = brief.supply
    if (amps.includes(null) || (amps.length > 1 && amps.length !== phases)) {
      return { error: phases === 1 ? 'One figure from 0 to 5000 A.' : 'One figure or three, from 0 to 5000 A each.' }
    }
    const known = amps.filter((each) => each !== null)
    const [first] = known
    const spread = known.length === 1 && first !== undefined ? Array.from({ length: phases }, () => first) : known
    return { brief: supplyOf(brief, { sparePerPhase: spread }) }
  },
}

const distanceField: BriefField = {
  name: 'distance',
  label: 'Board to the heaters',
  hint: 'Left open: not known',
  unit: noUnit,
  show: ({ supply }, units) => (supply.distance === null ? '' : formatLength(supply.distance, units, 'fine')),
  write: (brief, text, units) => {
    if (text.trim() === '') return { brief: supplyOf(brief, { distance: null }) }
    const read = parseLength(text, units, { min: 0, max: 500 })
    return 'error' in read ? read : { brief: supplyOf(brief, { distance: read.metres }) }
  },
}

/** The board the heaters hang on. */
export const supplyFields: readonly BriefField[] = [
  systemField,
  spareField,
  distanceField,
  words({ name: 'supplyNote', label: 'Note on the supply' }, 400, {
    get: (b) => b.supply.note,
    set: (b, note) => supplyOf(b, { note }),
  }),
]
