import { describe, expect, it } from 'vitest'
import { turningPoints } from '#app/domain/doubt/turning-points.ts'
import { figuresAtErrors, scaleSizes, wrongFigures } from '#app/domain/doubt/wrong-sizes.ts'
import { seatWarmth } from '#app/domain/comfort/seat-warmth.ts'
import { brief } from '#tests/domain/comfort/terrace.ts'
import { above, coverAt, coverMoves, dimension, finish, oneHeater } from '#tests/domain/doubt/small-doubt.ts'

const roofCheck = 'clearance-above||heater|H1|'
const need = 2.5 + 0.3
const roof = (tolerance: number) => dimension('roof', coverAt, tolerance, coverMoves)
const turnsOf = (question: ReturnType<typeof oneHeater>) =>
  finish(turningPoints(figuresAtErrors(question, ['photo']))).made

describe('sizes that are wrong by one share', () => {
  it('move with their sources alone', () => {
    const told = dimension('told', 2, 0.1, [{ of: 'seat', id: 'S1', coordinate: 'x', by: 1 }], { source: 'told' })
    const { site } = oneHeater([roof(0.05), told])
    const photo = scaleSizes(site, ['photo'], -0.1)
    expect(photo.covers[0]!.corners[2]![2]).toBeCloseTo(0.9 * coverAt, 12)
    expect(photo.seats[0]!.x).toBe(0)
    expect(scaleSizes(site, ['photo', 'told', 'guessed'], 0.05).seats[0]!.x).toBeCloseTo(0.1, 12)
  })
  it('bring the figures and the checks of that error', () => {
    const at = figuresAtErrors(oneHeater([roof(0.02)]), ['photo'])
    const wrong = wrongFigures(at, -0.08)
    expect(wrong.tightest!.margin).toBeCloseTo(coverAt * 0.92 - need, 9)
    expect(wrong.tightestFinding!.rule).toBe('clearance-above')
    expect(wrong.turned).toMatchObject([{ check: roofCheck, from: 'pass', to: 'fails' }])
    expect(wrongFigures(at, 0).turned).toEqual([])
  })
})

describe('where checks turn', () => {
  it('is where the direct solution is: first where the margin falls under its tolerance', () => {
    for (const tolerance of [0.01, 0.05, 0.1]) {
      const turned = turnsOf(oneHeater([roof(tolerance)])).checks.find(({ check }) => check === roofCheck)!
      // H (1 + e) − need = τ; τ is that of the dimension alone.
      expect(turned.shorter).toBeCloseTo((need + tolerance) / coverAt - 1, 4)
      expect(turned).toMatchObject({ longer: null, from: 'pass', toShorter: 'measure first', toLonger: null })
    }
  })
  it('is where a failing margin would pass, on the other side', () => {
    const low = dimension('roof', 2.7, 0.02, coverMoves)
    const { site, ...rest } = oneHeater([low])
    const lowered = { ...rest, site: { ...site, covers: site.covers.map((cover) => ({ ...cover, corners: cover.corners.map(([x, y]): [number, number, number] => [x, y, 2.7]) })) } } // prettier-ignore
    const turned = turnsOf(lowered).checks.find(({ check }) => check === roofCheck)!
    expect(turned.longer).toBeCloseTo(need / 2.7 - 1, 4)
    expect(turned).toMatchObject({ from: 'fails', toLonger: 'measure first', shorter: null })
  })
  it('is where the coldest seat passes the end of its band', () => {
    const body = dimension('body', 0.6, 0.02, [{ of: 'seat', id: 'S1', coordinate: 'bodyHeight', by: 1 }])
    const plain = oneHeater([body])
    const E = seatWarmth(plain)[0]!.body!
    const target = { low: E * 0.95, high: E * 1.05, source: 'test' }
    const { coldestTarget } = turnsOf({ ...plain, brief: brief({ target }) })
    // E (h / (h − 0.6 e))² = 1.05 E, and 0.95 E the other way.
    expect(coldestTarget.longer).toBeCloseTo((above / 0.6) * (1 - Math.sqrt(1 / 1.05)), 4)
    expect(coldestTarget.shorter).toBeCloseTo((above / 0.6) * (1 - Math.sqrt(1 / 0.95)), 4)
  })
  it('is nowhere without sizes of the sources', () => {
    const laser = { ...roof(0.05), source: 'laser' as const }
    expect(turnsOf(oneHeater([laser]))).toEqual({ checks: [], coldestTarget: { shorter: null, longer: null } })
  })
  it('lists what turns soonest first and tells its progress', () => {
    const body = dimension('body', 0.6, 0.02, [{ of: 'seat', id: 'S1', coordinate: 'bodyHeight', by: 1 }])
    const { told, made } = finish(turningPoints(figuresAtErrors(oneHeater([roof(0.05), body]), ['photo'])))
    const nearest = made.checks.map(({ shorter, longer }) => Math.min(Math.abs(shorter ?? 9), Math.abs(longer ?? 9)))
    expect(nearest).toEqual([...nearest].sort((a, b) => a - b))
    expect(told).toHaveLength(60)
    expect(told.at(-1)).toEqual({ done: 59, total: 60 })
  })
})
