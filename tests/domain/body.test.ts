import { expect, it } from 'vitest'
import { heaterFrame } from '#app/domain/layout/body.ts'

it('aims straight down at tilt 0, with positive offsets to the right of the element axis', () => {
  const { u, v, w } = heaterFrame(90, 0)
  expect(w).toEqual([0, 0, -1].map((c) => expect.closeTo(c, 12)))
  expect(u).toEqual([0, 1, 0].map((c) => expect.closeTo(c, 12)))
  expect(v).toEqual([1, 0, 0].map((c) => expect.closeTo(c, 12)))
})

it('tilts the beam to the left of the element axis', () => {
  const { w } = heaterFrame(0, 30)
  expect(w).toEqual([0, 0.5, -Math.sqrt(3) / 2].map((c) => expect.closeTo(c, 12)))
})
