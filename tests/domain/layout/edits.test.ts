import { describe, expect, it } from 'vitest'
import {
  alignHeaters,
  duplicateHeaters,
  moveHeaters,
  nextHeaterId,
  placeHeater,
  raiseHeaters,
  removeHeaters,
  roundTurn,
  setHeater,
  tiltHeaters,
  turnHeaters,
} from '#app/domain/layout/edits.ts'
import { layoutSchema } from '#app/domain/layout/layout.ts'
import { repeatAtSpacing, spaceEqually } from '#app/domain/layout/repeat.ts'
import { heaterAt, layoutOf } from '#tests/support/layouts.ts'

const three = layoutOf(heaterAt('H1', 1, 1), heaterAt('H2', 4, 1.2), heaterAt('H3', 2, 3))
const placeOf = (layout: typeof three, id: string) => {
  const heater = layout.heaters.find((h) => h.id === id)
  return heater ? [heater.x, heater.y] : null
}

describe('an edit', () => {
  it('moves the heaters named and leaves the others the same objects', () => {
    const moved = moveHeaters(three, ['H1', 'H3'], 0.5, -0.25)
    expect(placeOf(moved, 'H1')).toEqual([1.5, 0.75])
    expect(placeOf(moved, 'H3')).toEqual([2.5, 2.75])
    expect(moved.heaters[1]).toBe(three.heaters[1])
    expect(placeOf(three, 'H1')).toEqual([1, 1])
  })
  it('keeps lengths to 0.1 mm', () => {
    expect(placeOf(moveHeaters(three, ['H1'], 1 / 3, 0.00004), 'H1')).toEqual([1.3333, 1])
  })
  it('turns about the heater itself and stays within half a turn', () => {
    const turned = turnHeaters(three, ['H1'], 270)
    expect(turned.heaters[0]).toMatchObject({ x: 1, y: 1, turnDeg: -90 })
    expect([roundTurn(180), roundTurn(-180), roundTurn(540), roundTurn(359.999)]).toEqual([180, 180, 180, 0])
  })
  it('tilts and raises', () => {
    expect(tiltHeaters(three, ['H2'], -22).heaters[1]?.tiltDeg).toBe(-22)
    expect(tiltHeaters(three, ['H2'], 200).heaters[1]?.tiltDeg).toBe(90)
    expect(raiseHeaters(three, ['H2'], 0.15).heaters[1]?.lowestPoint).toBe(2.5)
    expect(raiseHeaters(three, ['H2'], -9).heaters[1]?.lowestPoint).toBe(0)
  })
  it('sets values, and drops an optional choice with null', () => {
    const set = setHeater(three, 'H1', { ratedVoltage: 400, stage: 1, mount: 'drop rods' })
    expect(set.heaters[0]).toMatchObject({ ratedVoltage: 400, stage: 1, mount: 'drop rods' })
    const dropped = setHeater(set, 'H1', { ratedVoltage: null, stage: null })
    expect(Object.keys(dropped.heaters[0] ?? {})).not.toContain('ratedVoltage')
    expect(Object.keys(dropped.heaters[0] ?? {})).not.toContain('stage')
    expect(layoutSchema.safeParse(dropped).success).toBe(true)
  })
  it('names new heaters after the largest name, gaps left open', () => {
    expect(nextHeaterId(layoutOf())).toBe('H1')
    expect(nextHeaterId(layoutOf(heaterAt('H7', 0, 0), heaterAt('north', 0, 0)))).toBe('H8')
    expect(placeHeater(three, heaterAt('H1', 3, 3)).ids).toEqual(['H4'])
  })
  it('copies beside the original with new names', () => {
    const copied = duplicateHeaters(three, ['H1', 'H2'], 0.5, 0)
    expect(copied.ids).toEqual(['H4', 'H5'])
    expect(placeOf(copied.layout, 'H5')).toEqual([4.5, 1.2])
    expect(copied.layout.heaters).toHaveLength(5)
  })
  it('aligns on the mean or on a given line', () => {
    expect(placeOf(alignHeaters(three, ['H1', 'H2'], 'y'), 'H1')).toEqual([1, 1.1])
    expect(placeOf(alignHeaters(three, ['H1', 'H2'], 'y', 2), 'H2')).toEqual([4, 2])
    expect(alignHeaters(three, [], 'x')).toBe(three)
  })
  it('removes', () => {
    expect(removeHeaters(three, ['H2', 'H9']).heaters.map((h) => h.id)).toEqual(['H1', 'H3'])
  })
})

describe('repeating at a spacing', () => {
  it('adds heaters centre to centre in the direction asked, without a support yet', () => {
    const repeated = repeatAtSpacing(three, ['H1'], { spacing: 2.64, count: 2, directionDeg: 90 })
    if ('error' in repeated) throw new Error(repeated.error)
    expect(repeated.ids.map((id) => placeOf(repeated.layout, id))).toEqual([
      [1, 3.64],
      [1, 6.28],
    ])
    expect(repeated.layout.heaters.at(-1)?.memberId).toBeNull()
  })
  it('refuses what does not fit, with the number that does', () => {
    expect(repeatAtSpacing(three, ['H1'], { spacing: 1, count: 198, directionDeg: 0 })).toEqual({
      error: 'At most 197 more: a job holds 200 heaters.',
    })
    expect(repeatAtSpacing(three, ['H1'], { spacing: 0, count: 1, directionDeg: 0 })).toHaveProperty('error')
    expect(repeatAtSpacing(three, ['H1'], { spacing: 1, count: 0.5, directionDeg: 0 })).toHaveProperty('error')
  })
  it('spaces equally between the outermost, across the row untouched', () => {
    const spaced = spaceEqually(three, ['H1', 'H2', 'H3'])
    expect(placeOf(spaced, 'H3')).toEqual([2.5, 3])
    expect(placeOf(spaced, 'H1')).toEqual([1, 1])
    expect(spaceEqually(three, ['H1', 'H2'])).toBe(three)
  })
})
