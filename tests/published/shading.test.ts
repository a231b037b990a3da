import { describe, expect, it } from 'vitest'
import { seenShare } from '#app/domain/flux/shading.ts'
import { solidsOf } from '#app/domain/flux/solid.ts'
import { cosine, line } from '#tests/support/emitters.ts'

describe('a ray and a post', () => {
  // R33: the slab test, by geometry, exact: the ray (0, 0, 2.6) → (4, 0, 1) is at 1.8 m over the post.
  it.each([
    ['2.5 m high: blocked', 2.5, 0, 0],
    ['1.7 m high: clear', 1.7, 0, 1],
    ['2.5 m high, the ray 0.3 m aside: clear', 2.5, 0.3, 1],
  ])('R33: %s', (_, top, y, seen) => {
    const source = line(cosine(1, 1), { at: [0, y, 2.6], length: 1e-4 })
    const solids = solidsOf({ kind: 'box', x: [1.9, 2.1], y: [-0.1, 0.1], z: [0, top] })
    expect(seenShare(source, [4, y, 1], [{ id: 'post', heaterId: null, transmittance: 0, solids }])).toBe(seen)
  })
})
