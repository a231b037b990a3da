import { describe, expect, it } from 'vitest'
import { gaussNodes, mostNodes, nodeCount } from '#app/domain/flux/nodes.ts'
import { demoModels } from '#drizzle/seed/demo-sites.ts'
import { exponentOfFullAngle } from '#app/domain/flux/beam.ts'
import { worstNodeError } from '#tests/support/node-error.ts'

describe('Gauss-Legendre nodes', () => {
  it.each([2, 3, 5, 8, 24])('%d of them integrate polynomials up to twice their number exactly', (count) => {
    for (let power = 0; power < 2 * count; power++) {
      const sum = gaussNodes(count).reduce((total, { place, weight }) => total + weight * place ** power, 0)
      expect(sum).toBeCloseTo(power % 2 === 0 ? 2 / (power + 1) : 0, 12)
    }
  })
})

describe('the number of nodes by height and exponent: 0.1 %', () => {
  const ratios = [0.3, 0.4, 0.55, 0.8, 1, 1.4, 2, 3, 5]
  it.each(ratios.flatMap((ratio) => [0, 1, 1.77, 3, 6].map((b) => [ratio, b] as const)))(
    'h/L = %d, b = %d',
    (ratio, b) => {
      const count = nodeCount(ratio, b)
      if (count < mostNodes) expect(worstNodeError(b, 1, ratio, count)).toBeLessThan(1e-3)
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
        expect(worstNodeError(b, model.elementLength, height, count)).toBeLessThan(1e-3)
      }
    }
  })

  it('falls with height', () => {
    expect(nodeCount(2, 1)).toBeLessThanOrEqual(3)
    expect(nodeCount(0.5, 1)).toBeGreaterThan(nodeCount(1, 1))
  })
})
