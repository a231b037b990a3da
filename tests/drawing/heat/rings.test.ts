import { expect, it } from 'vitest'
import { pathOfRings } from '#app/drawing/heat/rings.ts'
import { chance } from '#tests/support/chance.ts'

it('writes every point to the millimetre as the number is written', () => {
  const random = chance(31)
  for (let i = 0; i < 2000; i++) {
    const [x, y] = [(random() - 0.5) * 300, (random() - 0.5) * 3]
    const rounded = (value: number) =>
      Number((Math.sign(value) * (Math.round(Math.abs(value) * 1000) / 1000)).toFixed(3)) + 0
    const path = `M${rounded(x)} ${rounded(y)}L${rounded(x + 1)} ${rounded(y)}Z`
    expect(pathOfRings([[[x, y], [x + 1, y], [x, y]]])).toBe(path) // prettier-ignore
  }
  expect(pathOfRings([[[-0.0004, 2], [10.01, -0.5], [1, 1]]])).toBe('M0 2L10.01 -0.5Z') // prettier-ignore
})

it('draws a small ring round: curves from the middle of one side to the middle of the next', () => {
  const square = (side: number) => [[[0, 0], [side, 0], [side, side], [0, side], [0, 0]]] as const // prettier-ignore
  expect(pathOfRings(square(0.4))).toBe('M0 0.2Q0 0 0.2 0Q0.4 0 0.4 0.2Q0.4 0.4 0.2 0.4Q0 0.4 0 0.2Z')
  expect(pathOfRings(square(1))).toBe('M0 0L1 0L1 1L0 1Z')
})
