import { describe, expect, it } from 'vitest'
import { holdMovement, type Movement } from '#app/domain/layout/holding.ts'
import { beamedSite, heaterAt, layoutOf } from '#tests/support/layouts.ts'

const say = (metres: number) => `${metres.toFixed(2)} m`
const held = (change: Partial<Movement>) =>
  holdMovement({
    site: beamedSite,
    layout: layoutOf(heaterAt('H1', 1, 2)),
    ids: ['H1'],
    leadId: 'H1',
    dx: 0,
    dy: 0,
    pull: 0.12,
    say,
    ...change,
  })

describe('holding to members', () => {
  it('holds at the pull and lets go beyond it', () => {
    expect(held({ dx: 1.881 })).toMatchObject({ dx: 2, reason: 'Held to Beam 1.' })
    expect(held({ dx: 1.879 })).toMatchObject({ dx: 1.88, reason: null })
  })
  it('leaves the movement along the member free, in whole centimetres', () => {
    const hold = held({ dx: 1.95, dy: 0.4567 })
    expect(hold.dx).toBeCloseTo(2, 10)
    expect(hold.dy).toBeCloseTo(0.46, 10)
  })
  it('does not hold beyond the ends of a member', () => {
    expect(held({ dx: 1.95, dy: 4.2 }).reason).toBeNull()
  })
  it('holds a recess box to the middle of a bay', () => {
    const layout = layoutOf(heaterAt('H1', 1, 2, { mount: 'recess box' }))
    expect(held({ layout, dx: 0.45 })).toMatchObject({
      dx: 0.5,
      reason: 'Middle of the bay between Beam 1 and Beam 0.',
    })
    expect(held({ layout, dx: 1.95 }).reason).toBeNull()
  })
  it('keeps a bracket at its distance from the wall', () => {
    const layout = layoutOf(heaterAt('H1', 1, 0.18, { mount: 'wall bracket' }))
    const hold = held({ layout, dx: 1, dy: 0.07 })
    expect(hold.reason).toBe('Held along House wall.')
    expect(hold.dy).toBeCloseTo(0, 10)
  })
})

describe('holding to equal spacing', () => {
  const free = { ...beamedSite, members: [] }
  it('holds midway between two neighbours of the row', () => {
    const layout = layoutOf(heaterAt('H1', 1, 2), heaterAt('H2', 5, 2), heaterAt('H3', 2, 2))
    const hold = held({ site: free, layout, ids: ['H3'], leadId: 'H3', dx: 0.95 })
    expect(hold.dx).toBeCloseTo(1, 10)
    expect(hold.reason).toContain('2.00 m to H1 and to H2')
  })
  it('continues the spacing of the row', () => {
    const layout = layoutOf(heaterAt('H1', 1, 2), heaterAt('H2', 3.5, 2), heaterAt('H3', 8, 2))
    const hold = held({ site: free, layout, ids: ['H3'], leadId: 'H3', dx: -2.05 })
    expect(hold.dx).toBeCloseTo(-2, 10)
    expect(hold.reason).toContain('2.50 m to H2, as H1 to H2')
  })
  it('holds in line with another heater where no spacing is near', () => {
    const layout = layoutOf(heaterAt('H1', 1, 2), heaterAt('H2', 5, 4))
    const hold = held({ site: free, layout, dx: 3.93, dy: 0 })
    expect(hold.dx).toBeCloseTo(4, 10)
    expect(hold.reason).toBe('In line with H2.')
  })
  it('goes together with a member: on it and in line', () => {
    const layout = layoutOf(heaterAt('H1', 1, 2), heaterAt('H2', 6, 4))
    const hold = held({ layout, dx: 1.95, dy: 1.94 })
    expect([hold.dx, hold.dy]).toEqual([expect.closeTo(2, 10), expect.closeTo(2, 10)])
    expect(hold.reason).toBe('Held to Beam 1. In line with H2.')
  })
  it('never holds to a heater that moves along', () => {
    const layout = layoutOf(heaterAt('H1', 1, 2), heaterAt('H2', 5, 2))
    expect(held({ site: free, layout, ids: ['H1', 'H2'], dx: 0.333, dy: 0.02 })).toMatchObject({ reason: null })
  })
})
