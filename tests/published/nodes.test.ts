import { describe, expect, it } from 'vitest'
import { worstNodeError } from '#tests/support/node-error.ts'

describe('Gauss-Legendre nodes in place of an element', () => {
  // R27, R28: worst error over the floor 1 m below a diffuse tube, b = 1, against its closed form; figures of independent
  // code, to a factor of 2 either way.
  it.each([
    ['R27', 1, 2, 1.3],
    ['R27', 1, 3, 0.1],
    ['R27', 1, 4, 0.0071],
    ['R27', 1, 6, 0.00003],
    ['R28', 1.8, 2, 9.3],
    ['R28', 1.8, 3, 1.9],
    ['R28', 1.8, 4, 0.34],
    ['R28', 1.8, 6, 0.01],
  ])('%s: an element of %d m, 1 m above: %d nodes err by %d percent', (_, length, count, percent) => {
    const own = 100 * worstNodeError(1, length, 1, count)
    expect(own).toBeLessThan(2 * percent)
    expect(own).toBeGreaterThan(percent / 2)
  })
})
