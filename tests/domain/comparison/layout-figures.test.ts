import { describe, expect, it } from 'vitest'
import { areaAtLeast, differenceOf } from '#app/domain/comparison/area.ts'
import { formatMoney, listPriceOf } from '#app/domain/comparison/list-price.ts'
import { spacingsOf } from '#app/domain/comparison/spacings.ts'
import type { MountedHeater } from '#app/domain/layout/layout.ts'
import { demoModels } from '#drizzle/seed/demo-models.ts'

const heater = (id: string, x: number, y: number, model = 'betony-2-0'): MountedHeater => ({
  id,
  model,
  supplyVoltage: 230,
  x,
  y,
  lowestPoint: 2.35,
  turnDeg: 0,
  tiltDeg: 0,
  mount: 'chain',
  memberId: null,
})

describe('spacings', () => {
  it('are the gaps between neighbours of a row, each once', () => {
    const heaters = [0, 2, 4, 7].flatMap((x) => [heater(`a${x}`, x, 1), heater(`b${x}`, x, 3.5)])
    expect(spacingsOf({ heaters })).toEqual({ x: [2, 3], y: [2.5] })
  })
  it('do not join heaters of two rows', () => {
    expect(spacingsOf({ heaters: [heater('a', 0, 0), heater('b', 2, 0.5)] })).toEqual({ x: [], y: [] })
  })
  it('leave out heaters that hang at one place', () => {
    expect(spacingsOf({ heaters: [heater('a', 0, 1), heater('b', 0.1, 1.1), heater('c', 2, 1)] }).x).toEqual([1.9])
  })
  it('are none for one heater or none at all', () => {
    expect(spacingsOf({ heaters: [] })).toEqual({ x: [], y: [] })
    expect(spacingsOf({ heaters: [heater('a', 1, 1)] })).toEqual({ x: [], y: [] })
  })
})

describe('an area', () => {
  it('counts cells of the floor at or above the value, times the area of a cell', () => {
    const cells = { cell: 0.5, inside: Uint8Array.from([1, 1, 1, 0]) }
    expect(areaAtLeast(Float32Array.from([2, 1.999, NaN, 5]), cells, 2)).toBe(0.25)
  })
  it('of a half plane comes to the closed form within one row of cells', () => {
    const n = 200
    const cell = 10 / n
    const values = Float32Array.from({ length: n * n }, (_, i) => ((i % n) + 0.5) * cell)
    const inside = new Uint8Array(n * n).fill(1)
    expect(Math.abs(areaAtLeast(values, { cell, inside }, 3.3) - 67)).toBeLessThanOrEqual(10 * cell)
  })
})

describe('a difference', () => {
  it('is cell by cell and turns its sign with the order', () => {
    const [a, b] = [Float32Array.from([300, 100]), Float32Array.from([120, 150])]
    expect([...differenceOf(a, b)]).toEqual([180, -50])
    expect([...differenceOf(b, a)]).toEqual([-180, 50])
  })
  it('refuses maps of two grids', () => {
    expect(() => differenceOf(new Float32Array(2), new Float32Array(3))).toThrow('one grid')
  })
})

describe('a list price', () => {
  const models = new Map(demoModels().map((model) => [model.code, model]))
  it('is the sum over the heaters', () => {
    const one = models.get('betony-2-0')?.listPrice.EUR ?? NaN
    const price = listPriceOf({ heaters: [heater('a', 0, 0), heater('b', 1, 0)] }, models, 'EUR')
    expect(price.amount).toBeCloseTo(2 * one, 2)
    expect(price.unpriced).toEqual([])
  })
  it('names a model without a price instead of counting it as nothing', () => {
    expect(listPriceOf({ heaters: [heater('a', 0, 0, 'unheard-of')] }, models, 'EUR').unpriced).toEqual(['unheard-of'])
  })
  it('is written with its currency first and thousands apart', () => {
    expect(formatMoney(6015.4, 'EUR')).toBe('€\u00a06\u00a0015.40')
    expect(formatMoney(1234567, 'USD')).toBe('$\u00a01\u00a0234\u00a0567')
    expect(formatMoney(23.49, 'EUR')).toBe('€\u00a023.49')
  })
})
