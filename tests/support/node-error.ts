import { irradianceAt } from '#app/domain/flux/irradiance.ts'
import { nodesOf } from '#app/domain/flux/nodes.ts'
import type { Vec3 } from '#app/domain/vector.ts'
import { cosine, line } from '#tests/support/emitters.ts'

/** Worst error of n nodes over the floor below, as a share of the closed form at the place. */
export function worstNodeError(b: number, length: number, height: number, count: number): number {
  const emitter = line(cosine(2, b), { length })
  const places = Array.from({ length: 61 }, (_, i) => (i / 60) * 3 * height)
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
