import { plainHouseRules } from '#app/domain/rules/house-rules.ts'
import { describe, expect, it } from 'vitest'
import { briefSchema } from '#app/domain/brief/brief.ts'
import { assumptionOf, briefFields } from '#app/domain/brief/brief-fields.ts'
import { assumedBrief, enquiryFields, fieldAt, readEnquiry, unknownName } from '#app/domain/brief/enquiry.ts'
import { jobRequestSchema } from '#app/domain/job/job-request.ts'
import { demoSites } from '#drizzle/seed/demo-sites.ts'

const answers = {
  units: 'metric',
  name: 'Sedge Mill courtyard',
  customer: '',
  place: 'Sedge Mill',
  along: '8.4 m',
  deep: '17\' 9"',
  airTemperature: '6',
  windDesign: '1,2',
  clothing: '1.3',
  supply: '400',
  sparePerPhase: '32',
  targetLow: '150',
  targetHigh: '350',
}

function asked(changes: Record<string, string>) {
  const read = readEnquiry({ ...answers, ...changes }, plainHouseRules)
  if ('errors' in read) throw new Error(JSON.stringify(read.errors))
  return read.asked
}

function errorsOf(changes: Record<string, string>) {
  const read = readEnquiry({ ...answers, ...changes }, plainHouseRules)
  return 'errors' in read ? read.errors : {}
}

describe('an enquiry', () => {
  it('becomes a job that the rest of the product accepts', () => {
    const request = asked({})
    expect(jobRequestSchema.parse(request)).toEqual(request)
    expect(request.floor).toEqual({ length: 8.4, depth: 5.4102 }) // 17 ft 9 in = 213 in × 25.4 mm
    expect(request.brief).toMatchObject({ airTemperature: 6, windDesign: 1.2, clothing: 1.3 })
    expect(request.brief.supply).toMatchObject({ phases: 3, phaseVoltage: 230, lineVoltage: 400 })
    expect(request.brief.supply.sparePerPhase).toEqual([32, 32, 32])
  })

  it('reads figures in the units that were chosen and keeps them in SI', () => {
    const { brief, displayUnits } = asked({
      units: 'imperial',
      airTemperature: '45',
      windDesign: '2',
      targetLow: '14',
      targetHigh: '32',
    })
    expect(displayUnits).toBe('imperial')
    expect(brief.airTemperature).toBeCloseTo((45 - 32) / 1.8, 6)
    expect(brief.windDesign).toBeCloseTo(2 * 0.44704, 6)
    expect(brief.target.low).toBeCloseTo(14 / 0.3048 ** 2, 6)
  })

  it.each(enquiryFields.map(({ name }) => name))(
    'takes "don’t know" for %s: a stated default, marked as assumed',
    (name) => {
      const { brief } = asked({ [name]: 'nonsense', [unknownName(name)]: 'on' })
      expect(brief.assumed).toContain(name)
      const field = enquiryFields.find((each) => each.name === name)
      expect(field?.show(brief, 'metric')).toBe(field?.show({ ...assumedBrief(plainHouseRules), place: '' }, 'metric'))
    },
  )

  it('leaves the floor open when nobody knows it', () => {
    expect(asked({ along: '', deep: '', [unknownName('floor')]: 'on' }).floor).toBeNull()
  })

  it.each([
    ['name', '', 'Give the job a name.'],
    ['place', ' ', 'Give the place.'],
    ['along', 'about eight', 'is not read as a length'],
    ['along', '300 m', 'Between 0.50 m and 100.00 m.'],
    ['airTemperature', '80', 'Between −30.0 °C and 35.0 °C.'],
    ['windDesign', 'calm', 'm/s'],
    ['sparePerPhase', '40, 32', 'One figure or three'],
    ['supply', '110', 'Choose one of the systems.'],
    ['targetHigh', '100', 'The target ends above where it starts.'],
  ])('says what is wrong with %s “%s” and what is accepted', (name, typed, words) => {
    expect(errorsOf({ [name]: typed })[name]).toContain(words)
  })

  it('names every wrong answer at once', () => {
    expect(Object.keys(errorsOf({ name: '', place: '', along: '' })).sort()).toEqual(['along', 'name', 'place'])
  })
})

describe('what is refused where the job is kept', () => {
  const good = asked({})
  const { brief } = good
  it.each([
    ['name', { ...good, name: '' }],
    ['customer', { ...good, customer: 'x'.repeat(121) }],
    ['place', { ...good, brief: { ...brief, place: '' } }],
    ['along', { ...good, floor: { length: 101, depth: 4 } }],
    ['deep', { ...good, floor: { length: 6, depth: 61 } }],
    ['airTemperature', { ...good, brief: { ...brief, airTemperature: 36 } }],
    ['windDesign', { ...good, brief: { ...brief, windDesign: -1 } }],
    ['clothing', { ...good, brief: { ...brief, clothing: 5 } }],
    ['supply', { ...good, brief: { ...brief, supply: { ...brief.supply, phaseVoltage: 1 } } }],
    ['sparePerPhase', { ...good, brief: { ...brief, supply: { ...brief.supply, sparePerPhase: [32, -1, 32] } } }],
    ['targetLow', { ...good, brief: { ...brief, target: { ...brief.target, low: -1 } } }],
    ['targetHigh', { ...good, brief: { ...brief, target: { ...brief.target, high: 0 } } }],
    // Not asked for on the form.
    ['name', { ...good, brief: { ...brief, windGust: 21 } }],
  ])('is told beside the field %s', (field, request) => {
    const { error } = jobRequestSchema.safeParse(request)
    expect(error?.issues.map(({ path }) => fieldAt(path.join('.')))).toEqual([field])
  })
})

describe('the questions of the brief', () => {
  const briefs = demoSites().map(({ key, brief, site }) => [key, brief, site.displayUnits] as const)
  it.each(briefs)('show every answer of site %s so that typing it again changes next to nothing', (_, brief, units) => {
    for (const field of briefFields) {
      const written = field.write(brief, field.show(brief, units), units)
      if ('error' in written) throw new Error(`${field.name}: ${written.error}`)
      expect(briefSchema.safeParse(written.brief).success).toBe(true)
      expect(field.show(written.brief, units)).toBe(field.show(brief, units))
    }
  })

  it('write an assumption with its figure', () => {
    const [demo] = demoSites()
    if (!demo) throw new Error('no demo')
    expect(assumptionOf(demo.brief, 'windGust', 'metric')).toBe('Gusts: 3 m/s')
    expect(assumptionOf(demo.brief, 'surroundingsTemperature', 'metric')).toBe(
      'Sky and surroundings: as the air, 8.0 °C',
    )
  })
})
