import { expect, it } from 'vitest'
import { pathOfRings } from '#app/drawing/heat/rings.ts'
import { chance } from '#tests/support/chance.ts'

it('writes every point to the millimetre as the number is written', () => {
  const random = chance(31)
  for (let i = 0; i < 2000; i++) {
    const [x, y] = [(random() - 0.5) * 300, (random() - 0.5) * 3]
    const rounded = (value: number) =>
      Number((Math.sign(value) * (Math.round(Math.abs(value) * 1000) / 1000)).toFixed(3)) + 0
    expect(pathOfRings([[[x, y], [x, y]]])).toBe(`M${rounded(x)} ${rounded(y)}Z`) // prettier-ignore
  }
  expect(pathOfRings([[[-0.0004, 2], [10.01, -0.5], [1, 1]]])).toBe('M0 2L10.01 -0.5Z') // prettier-ignore
})
