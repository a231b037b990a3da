import { describe, expect, it } from 'vitest'
import { irradianceAt } from '#app/domain/flux/irradiance.ts'
import { gaussNodes, mostNodes, nodeCount, nodesOf } from '#app/domain/flux/nodes.ts'
import type { Vec3 } from '#app/domain/vector.ts'
import { demoModels } from '#drizzle/seed/demo-sites.ts'
import { exponentOfFullAngle } from '#app/domain/flux/beam.ts'
import { cosine, line } from '#tests/support/emitters.ts'

/** Worst error of n nodes over the floor below, as a share of the closed form at the place. */
function worstError(b: number, length: number, height: number, count: number, reach = 3): number {
  const emitter = line(cosine(2, b), { length })
  const places = Array.from({ length: 61 }, (_, i) => (i / 60) * reach * height)
  return Math.max(
    ...places.map((x) => {
      const point: Vec3 = [x, 0, -height]
      const exact = irradianceAt(emitter, point, [0, 0, 1])
      const sum = nodesOf(emitter, emitter.elements[0]!, count).reduce((total, { at, share }) => {
        const lamp = { ...emitter, elements: [{ centre: at, length: 0, radiantPower: 1000 * share }] }
        return total + irradianceAt(lamp, point, [0, 0, 1])
      }, 0)
      return Math.abs(sum / exact - 1)
    }),
  )
}

describe('Gauss-Legendre nodes', () => {
  it.each([2, 3, 5, 8, 24])('%d of them integrate polynomials up to twice their number exactly', (count) => {
    for (let power = 0; power < 2 * count; power++) {
      const sum = gaussNodes(count).reduce((total, { place, weight }) => total + weight * place ** power, 0)
      expect(sum).toBeCloseTo(power % 2 === 0 ? 2 / (power + 1) : 0, 12)
    }
  })

  // Worst error for a diffuse tube, b = 1; figures of independent code, to a factor of 2.
  it.each([
    [1, 2, 1.3],
    [1, 3, 0.1],
    [1, 4, 0.0071],
    [1.8, 2, 9.3],
    [1.8, 3, 1.9],
    [1.8, 4, 0.34],
    [1.8, 6, 0.01],
  ])('an element of %d m, 1 m above: %d nodes err by %d %%', (length, count, percent) => {
    const own = 100 * worstError(1, length, 1, count)
    expect(own).toBeLessThan(2 * percent)
    expect(own).toBeGreaterThan(percent / 2)
  })
})

describe('the number of nodes by height and exponent: 0.1 %', () => {
  const ratios = [0.3, 0.4, 0.55, 0.8, 1, 1.4, 2, 3, 5]
  it.each(ratios.flatMap((ratio) => [0, 1, 1.77, 3, 6].map((b) => [ratio, b] as const)))(
    'h/L = %d, b = %d',
    (ratio, b) => {
      const count = nodeCount(ratio, b)
      if (count < mostNodes) expect(worstError(b, 1, ratio, count)).toBeLessThan(1e-3)
    },
  )

  it('serves every demo model at every height its manual allows with twelve at most', () => {
    for (const model of demoModels()) {
      if (model.beam?.kind !== 'angles') continue
      const b = exponentOfFullAngle(model.beam.alongFullAngleDeg)
      for (const height of [
        (model.mountingHeight.min ?? 2) - 1.1,
        model.mountingHeight.min ?? 2,
        model.mountingHeight.recommendedMax ?? 4,
      ]) {
        const count = nodeCount(height / model.elementLength, b)
        expect(count).toBeLessThanOrEqual(12)
        expect(worstError(b, model.elementLength, height, count)).toBeLessThan(1e-3)
      }
    }
  })

  it('falls with height', () => {
    expect(nodeCount(2, 1)).toBeLessThanOrEqual(3)
    expect(nodeCount(0.5, 1)).toBeGreaterThan(nodeCount(1, 1))
  })
})
