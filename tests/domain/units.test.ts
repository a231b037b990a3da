import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { parseLength } from '#app/domain/length-parser.ts'
import {
  formatLength,
  formatQuantity,
  fromSi,
  parseQuantity,
  roundLength,
  toSi,
  unitSymbol,
  type DisplayUnits,
  type Quantity,
} from '#app/domain/units.ts'

/** International inch, exact by the agreement of 1959. */
const inch = 0.0254
const both: DisplayUnits[] = ['metric', 'imperial']

const metresOf = (text: string, units: DisplayUnits) => {
  const read = parseLength(text, units)
  if ('error' in read) throw new Error(`${text}: ${read.error}`)
  return read.metres
}

describe('a typed length', () => {
  it.each([
    [`11' 5"`, 137 * inch],
    ['11 ft 5 in', 137 * inch],
    ['11 feet, 5 inches', 137 * inch],
    [`11'5`, 137 * inch],
    ['11′ 5½″', 137.5 * inch],
    ['11’ 5”', 137 * inch],
    [`11' - 5"`, 137 * inch],
    [`8'-6 1/2"`, 102.5 * inch],
    [`8'-6½"`, 102.5 * inch],
    [`8' 6-1/2"`, 102.5 * inch],
    ['137in', 137 * inch],
    [`137"`, 137 * inch],
    ["137''", 137 * inch],
    ['3/4 in', 0.75 * inch],
    ['11 ft 5 in + 2 in', 139 * inch],
    ['3.25 m', 3.25],
    ['3,25 m', 3.25],
    ['3.25 metres', 3.25],
    ['325cm', 3.25],
    ['3250 mm', 3.25],
    ['3250', 3.25],
    ['3,250 mm', 3.25],
    ['3 250 mm', 3.25],
    ['3.250,5 mm', 3.2505],
    ['2.6m + 30cm', 2.9],
    ['2 m 60 cm', 2.6],
    ['2 m + 1 ft', 2.3048],
    ['-0.3 m', -0.3],
    ['−0.3 m', -0.3],
    [' 3.25  m ', 3.25],
  ])('%s is read the same in either system', (text, metres) => {
    for (const units of both) expect(metresOf(text, units)).toBe(roundLength(metres))
  })

  it.each<[string, DisplayUnits, number]>([
    ['3.25', 'metric', 3.25],
    ['3,25', 'metric', 3.25],
    ['13', 'metric', 13],
    ['99.9', 'metric', 99.9],
    ['100', 'metric', 0.1],
    ['1 250', 'metric', 1.25],
    ['8', 'imperial', 96 * inch],
    ['23', 'imperial', 276 * inch],
    ['24', 'imperial', 24 * inch],
    ['137', 'imperial', 137 * inch],
    ['2500', 'imperial', 2.5],
  ])('a bare %s in %s is %d m', (text, units, metres) => {
    expect(metresOf(text, units)).toBe(roundLength(metres))
  })

  it('says how it was read, in the typed units and in the person’s', () => {
    expect(parseLength("11.5'", 'imperial')).toEqual({
      metres: 3.5052,
      reading: '11 ft 6 in',
      suggestion: '11 ft 5 in',
    })
    expect(parseLength('3250', 'metric')).toMatchObject({ reading: '3.25 m', suggestion: null })
    expect(parseLength('11\' 5"', 'metric')).toMatchObject({ reading: '11 ft 5 in = 3.4798 m' })
    expect(parseLength('3.25 m', 'imperial')).toMatchObject({ reading: '3.25 m = 10 ft 7 15/16 in' })
  })

  it.each<[string, DisplayUnits, string | null]>([
    ['11.5 ft', 'imperial', '11 ft 5 in'],
    ['11,5 ft', 'metric', '11 ft 5 in'],
    ['11.10 ft', 'imperial', '11 ft 10 in'],
    ['-11.5 ft', 'imperial', '-11 ft 5 in'],
    ['11.75 ft', 'imperial', null],
    ['11 ft', 'imperial', null],
    ['11.25 m', 'metric', null],
    ['30', 'metric', '30 cm'],
    ['30', 'imperial', '30 ft'],
    ['3.250 mm', 'metric', '3250 mm'],
  ])('%s in %s suggests %s', (text, units, suggestion) => {
    const read = parseLength(text, units)
    expect(read).toMatchObject({ suggestion })
    if (suggestion) expect(parseLength(suggestion, units)).toHaveProperty('metres')
  })

  it.each([
    '',
    '   ',
    'abc',
    'NaN',
    '1e5',
    '8 - 6',
    '3.2.5 m',
    '1/0 in',
    '2.6 + 3',
    '4 m 5',
    "5' 3 m",
    '11.5\' 3"',
    '3 km',
    '3 min',
    '5 in 3 ft',
    '+',
    '3 m +',
    '1.2.3',
    "'",
  ])('“%s” is refused with what is accepted', (text) => {
    for (const units of both) {
      const read = parseLength(text, units)
      expect(read).toHaveProperty('error')
      expect('error' in read && read.error).toMatch(/3\.25 m.*\.$/)
    }
  })

  it('refuses a length outside the range, in the person’s unit, with ends that are accepted', () => {
    const range = { min: 1.9, max: 4 }
    expect(parseLength('1.8999 m', 'metric', range)).toEqual({ error: 'Between 1.90 m and 4.00 m.' })
    expect(parseLength('1.9 m', 'metric', range)).toHaveProperty('metres', 1.9)
    const read = parseLength('20 ft', 'imperial', range)
    expect(read).toEqual({ error: 'Between 6 ft 2 13/16 in and 13 ft 1 15/32 in.' })
    for (const end of ['6 ft 2 13/16 in', '13 ft 1 15/32 in']) {
      expect(parseLength(end, 'imperial', range)).toHaveProperty('metres')
    }
    expect(parseLength('1001 m', 'metric')).toHaveProperty('error')
  })

  it('never throws and never gives anything but a finite tenth of a millimetre', () => {
    const piece = fc.constantFrom(...`0123456789.,'"/+- ½¾′″mcftin`)
    fc.assert(
      fc.property(fc.array(piece, { maxLength: 14 }), fc.constantFrom(...both), (pieces, units) => {
        const read = parseLength(pieces.join(''), units)
        if ('error' in read) expect(read.error).toMatch(/\.$/)
        else expect(Math.abs(read.metres * 1e4 - Math.round(read.metres * 1e4))).toBeLessThan(1e-6)
      }),
      { numRuns: 5000, seed: 7 },
    )
  })
})

describe('a length in words', () => {
  it.each<[number, string, string]>([
    [3.25, '3.25 m', '10 ft 8 in'],
    [2.479, '2.479 m', '8 ft 1 5/8 in'],
    [0.14, '0.14 m', '5 1/2 in'],
    [13.2, '13.20 m', '43 ft 3 5/8 in'],
    [0.3048, '0.305 m', '1 ft 0 in'],
    [-0.3048, '−0.305 m', '−1 ft 0 in'],
    [0, '0.00 m', '0 in'],
    [-0.0001, '0.00 m', '0 in'],
    [Number.NaN, '–', '–'],
    [Infinity, '–', '–'],
  ])('%d m', (metres, metric, imperial) => {
    expect(formatLength(metres, 'metric')).toBe(metric)
    expect(formatLength(metres, 'imperial')).toBe(imperial)
  })

  const worst = { metric: { rounded: 0.5e-3, fine: 0.05e-3 }, imperial: { rounded: inch / 16, fine: inch / 64 } }
  it.each(both)('10,000 lengths come back from their words in %s within half a step', (units) => {
    for (const precision of ['rounded', 'fine'] as const) {
      fc.assert(
        fc.property(fc.integer({ min: -9_999_000, max: 9_999_000 }), (tenths) => {
          const metres = tenths / 1e4
          const back = metresOf(formatLength(metres, units, precision), units)
          // half a step of the display plus half a step (0.05 mm) of what is stored
          expect(Math.abs(back - metres)).toBeLessThanOrEqual(worst[units][precision] + 0.05e-3 + 1e-9)
        }),
        { numRuns: 10_000, seed: 11 },
      )
    }
  })

  it('10,000 stored lengths keep their words: what is shown reads as what is shown', () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 9_999_000 }), fc.constantFrom(...both), (tenths, units) => {
        const shown = formatLength(tenths / 1e4, units, 'fine')
        expect(formatLength(metresOf(shown, units), units, 'fine')).toBe(shown)
        if (units === 'metric') expect(metresOf(shown, units)).toBe(roundLength(tenths / 1e4))
      }),
      { numRuns: 10_000, seed: 13 },
    )
  })

  it('a fine figure in feet and inches errs by less than 1/32 in', () => {
    fc.assert(
      fc.property(fc.double({ min: 0, max: 330, noNaN: true }), (metres) => {
        const [, feet = '0', whole = '0', over = '0', under = '1'] =
          /^(?:(\d+) ft )?(?:(\d+) ?)?(?:(?<= |^)(\d+)\/(\d+))? ?in$/.exec(formatLength(metres, 'imperial', 'fine')) ??
          []
        const shown = (Number(feet) * 12 + Number(whole) + Number(over) / Number(under)) * inch
        expect(Math.abs(shown - metres)).toBeLessThan(inch / 32)
      }),
      { numRuns: 10_000, seed: 17 },
    )
  })
})

describe('other quantities', () => {
  // definitions: NIST Special Publication 811, appendix B
  it.each<[Quantity, number, number]>([
    ['temperature', 0, 32],
    ['temperature', 100, 212],
    ['temperature', -40, -40],
    ['temperature difference', 10, 18],
    ['irradiance', 1000, 92.90304],
    ['area', 0.09290304, 1],
    ['speed', 0.44704, 1],
    ['mass', 0.45359237, 1],
    ['force', 4.4482216152605, 1],
    ['slope', Math.atan(1 / 12), 1],
  ])('%s %d is %d in the foot-pound system', (quantity, si, imperial) => {
    expect(fromSi(si, quantity, 'imperial')).toBeCloseTo(imperial, 9)
    expect(toSi(imperial, quantity, 'imperial')).toBeCloseTo(si, 9)
  })

  it('writes figures with their unit', () => {
    expect(formatQuantity(8, 'temperature', 'metric')).toBe('8.0 °C')
    expect(formatQuantity(-2, 'temperature', 'metric', 0)).toBe('−2 °C')
    expect(formatQuantity(-0.04, 'temperature', 'metric')).toBe('0.0 °C')
    expect(formatQuantity(8, 'temperature', 'imperial')).toBe('46.4 °F')
    expect(formatQuantity(305, 'irradiance', 'metric')).toBe('305 W/m²')
    expect(formatQuantity(305, 'irradiance', 'imperial')).toBe('28.3 W/ft²')
    expect(formatQuantity(5.58, 'area', 'metric')).toBe('5.6 m²')
    expect(formatQuantity(92.90304, 'area', 'imperial')).toBe('1000 ft²')
    expect(formatQuantity(Math.PI / 36, 'slope', 'metric')).toBe('5.0°')
    expect(formatQuantity(Math.atan(0.1), 'slope', 'imperial')).toBe('1.20 in/ft')
    expect(formatQuantity(Number.NaN, 'mass', 'metric')).toBe('–')
    expect(unitSymbol('irradiance', 'imperial')).toBe('W/ft²')
  })

  it('reads a number in the person’s unit or in the one that is named', () => {
    const range = { min: -30, max: 35 }
    expect(parseQuantity('8', 'temperature', 'metric', range)).toEqual({ value: 8 })
    expect(parseQuantity('-2,5 °C', 'temperature', 'imperial', range)).toEqual({ value: -2.5 })
    expect(parseQuantity('50', 'temperature', 'imperial', range)).toEqual({ value: 10 })
    expect(parseQuantity('50 F', 'temperature', 'metric', range)).toEqual({ value: 10 })
    expect(parseQuantity('50', 'temperature', 'metric', range)).toEqual({ error: 'Between −30.0 °C and 35.0 °C.' })
    expect(parseQuantity('warm', 'temperature', 'imperial', range)).toEqual({
      error: 'Give a number in °F, between −22.0 °F and 95.0 °F.',
    })
    expect(parseQuantity('', 'speed', 'metric', { min: 0, max: 15 })).toHaveProperty('error')
  })

  it('10,000 figures survive the way there and back', () => {
    const names: Quantity[] = ['temperature', 'temperature difference', 'irradiance', 'speed', 'mass', 'force', 'slope']
    fc.assert(
      fc.property(
        fc.constantFrom(...names),
        fc.constantFrom(...both),
        fc.double({ min: -1.5, max: 1.5, noNaN: true }),
        (quantity, units, si) => {
          expect(toSi(fromSi(si, quantity, units), quantity, units)).toBeCloseTo(si, 9)
        },
      ),
      { numRuns: 10_000, seed: 19 },
    )
  })
})
