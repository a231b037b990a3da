import { describe, expect, it } from 'vitest'
import { requireAnswerable } from '#app/domain/flux/answerable.ts'
import type { Beam } from '#app/domain/flux/beam.ts'
import { cosine, line } from '#tests/support/emitters.ts'

const heater = line(cosine(2, 1), { at: [1, 1, 2] })
const element = heater.elements[0]!
const table = {
  kind: 'table' as const,
  across: [-Math.PI / 2, 0, Math.PI / 2],
  along: [-1, 1],
  intensity: [
    [0, 0],
    [2, 1],
    [0, 0],
  ],
}
const refusal = (beam: Beam) => () => requireAnswerable([heater, { ...heater, id: 'X', beam }])

describe('what a map refuses', () => {
  it('nothing that has meaning: no heater, 200 of them, exponents 0 and 50, a table to ±90°, no power', () => {
    requireAnswerable([])
    requireAnswerable(Array.from({ length: 200 }, () => heater))
    refusal(cosine(0, 50))()
    refusal(table)()
    requireAnswerable([
      { ...heater, elements: [] },
      { ...heater, elements: [{ ...element, radiantPower: 0, length: 0 }] },
    ])
  })

  it('more than 200 heaters', () =>
    expect(() => requireAnswerable(Array.from({ length: 201 }, () => heater))).toThrow(
      new RangeError('a map has at most 200 heaters'),
    ))

  it.each([
    ['power', { radiantPower: NaN }, 'not finite'],
    ['length', { length: Infinity }, 'not finite'],
    ['place', { centre: [0, NaN, 2] as const }, 'not finite'],
    ['negative power', { radiantPower: -1 }, '0 or more'],
    ['negative length', { length: -0.1 }, '0 or more'],
  ])('an element’s %s', (_, change, limit) => {
    const broken = { ...heater, id: 'X', elements: [element, { ...element, ...change }] }
    expect(() => requireAnswerable([heater, broken])).toThrow(RangeError)
    expect(() => requireAnswerable([heater, broken])).toThrow(limit)
    expect(() => requireAnswerable([heater, broken])).toThrow('heater X')
  })

  it('a frame that is not finite', () =>
    expect(() => requireAnswerable([{ ...heater, frame: { ...heater.frame, w: [0, 0, NaN] } }])).toThrow('not finite'))

  it.each([
    [NaN, 1],
    [1, NaN],
    [-0.1, 1],
    [1, -2],
    [50.1, 1],
    [1, Infinity],
  ])('beam exponents %d and %d', (across, along) => {
    expect(refusal(cosine(across, along))).toThrow(RangeError)
    expect(refusal(cosine(across, along))).toThrow('the beam exponents of heater X must be from 0 to 50')
  })

  it.each([
    ['NaN', [0, NaN]],
    ['a negative figure', [2, -1]],
    ['an infinite figure', [Infinity, 1]],
    ['no light at all', [0, 0]],
    ['a short row', [2]],
  ])('a beam table with %s', (_, row) => {
    const beam = { ...table, intensity: [[0, 0], row, [0, 0]] }
    expect(refusal(beam)).toThrow(RangeError)
    expect(refusal(beam)).toThrow('an intensity of 0 or more at each angle')
  })

  it('a beam table with a row too few', () =>
    expect(refusal({ ...table, intensity: table.intensity.slice(1) })).toThrow('at each angle'))

  it.each([
    ['one angle', [0]],
    ['falling angles', [1, -1]],
    ['the same angle twice', [1, 1]],
    ['an angle that is not a number', [NaN, 1]],
    ['an angle beyond 90°', [-1, 1.6]],
  ])('a beam table with %s', (_, along) => {
    expect(refusal({ ...table, along })).toThrow(RangeError)
    expect(refusal({ ...table, along })).toThrow('from −90° to 90°')
  })
})
