import { describe, expect, it } from 'vitest'
import { groupEmitter, type Emitter } from '#app/domain/flux/emitter.ts'
import { gridOf } from '#app/domain/flux/grid.ts'
import { irradianceAt } from '#app/domain/flux/irradiance.ts'
import { irradianceMap } from '#app/domain/flux/map.ts'
import type { Vec3 } from '#app/domain/vector.ts'
import { bruteIrradiance } from '#tests/support/adaptive-integrator.ts'
import { demoBeams, hungHeater } from '#tests/support/demo-beams.ts'
import { cosine } from '#tests/support/emitters.ts'

/**
 * Rules of the trade (common practice, no source) as a model sees them. The figures were computed apart from this
 * program, by code of its own, for one reference heater: 3,600 W, three elements 0.90 m long and 0.08 m apart,
 * cos³α cosβ, radiant efficiency 0.60, underside at 2.50 m, elements 0.05 m above it and square to the line that joins
 * the heaters, housing 0.24 m wide; plane at 1.0 m; seating 5.4 m along that line by 3.6 m.
 */
interface Size {
  readonly power?: number
  readonly elements?: number
  readonly length?: number
  readonly underside?: number
}

function heater(x: number, { power = 3600, elements = 3, length = 0.9, underside = 2.5 }: Size = {}) {
  const offsets = Array.from({ length: elements }, (_, i) => (i - (elements - 1) / 2) * 0.08)
  return groupEmitter({
    id: `at ${x}`,
    at: [x, 0, underside + 0.05],
    turnDeg: 90,
    tiltDeg: 0,
    beam: cosine(3, 1),
    elements: offsets.map((offset) => ({ offset, length, radiantPower: (0.6 * power) / elements })),
  })
}

const up: Vec3 = [0, 0, 1]
const below = (emitters: readonly Emitter[], x: number, y: number, z = 1) =>
  emitters.reduce((sum, each) => sum + irradianceAt(each, [x, y, z], up), 0)

/** Area, m², over which `holds` is true of the heaters' separate irradiances, by the engine's own map. */
function areaWhere(
  emitters: readonly Emitter[],
  width: number,
  depth: number,
  holds: (e: number[]) => boolean,
  cell = 0.02,
) {
  const floor = [
    [-width / 2, -depth / 2],
    [width / 2, -depth / 2],
    [width / 2, depth / 2],
    [-width / 2, depth / 2],
  ] as const
  const map = irradianceMap(null, gridOf(floor, 1, cell), emitters)
  let count = 0
  for (let at = 0; at < map.total.length; at++) if (holds(map.layers.map(({ values }) => values[at]!))) count++
  return count * cell * cell
}

const pair = (spacing: number, size: Size = {}) => [heater(-spacing / 2, size), heater(spacing / 2, size)]
const sum = (values: readonly number[]) => values.reduce((total, value) => total + value, 0)
const within = (value: number, expected: number, relative: number) =>
  expect(Math.abs(value / expected - 1), `${value} for ${expected}`).toBeLessThanOrEqual(relative)

describe('two heaters at a spacing', () => {
  // T1, T2, T4: ± 0.01, ± 0.05 m², 1 %.
  it.each([
    [1.2, 0.642, 3.27, 538.9],
    [2.1, 0.782, 0.8, 267.8],
    [2.4, 0.816, 0.26, 204.1],
  ])(
    'T1, T2, T4: %d m: share of the seating with 80 W/m² or more %d, overlap %d m², in the middle %d W/m²',
    (spacing, share, overlap, middle) => {
      const both = pair(spacing)
      const seating = areaWhere(both, 5.4, 3.6, (parts) => sum(parts) >= 80)
      expect(Math.abs(seating / (5.4 * 3.6) - share)).toBeLessThanOrEqual(0.01)
      expect(
        Math.abs(areaWhere(both, 8, 8, (parts) => parts.every((part) => part >= 80)) - overlap),
      ).toBeLessThanOrEqual(0.05)
      within(below(both, 0, 0), middle, 0.01)
    },
  )

  // 1 %.
  it('T7: 2.1 m: a middle seat gets 231.4 W/m², an edge seat about half, 118.9', () => {
    within(below(pair(2.1), 0.6, 0.9), 231.4, 0.01)
    within(below(pair(2.1), 1.95, 0.9), 118.9, 0.01)
  })
})

describe('height', () => {
  // 1 %.
  it.each([
    [0.75, 305],
    [1.0, 405],
    [1.2, 524],
    [1.75, 1321],
  ])('T10: at %d m beneath one heater: %d W/m²', (z, expected) => {
    within(below([heater(0)], 0, 0, z), expected, 0.01)
  })

  // Peaks and areas 1 %, the overlap 5 %.
  it('T6, T11: 0.20 m lower: the peak rises by 30 %, the outskirts and the overlap shrink, the spread at 150 W/m² grows', () => {
    const [high, low] = [heater(0), heater(0, { underside: 2.3 })]
    within(below([high], 0, 0), 404.7, 0.01)
    within(below([low], 0, 0), 524.2, 0.01)
    const spread = (one: Emitter, least: number) => areaWhere([one], 8, 8, ([part]) => part! >= least)
    within(spread(high, 80), 7.45, 0.01)
    within(spread(low, 80), 7.03, 0.01)
    within(spread(high, 150), 4.06, 0.01)
    within(spread(low, 150), 4.15, 0.01)
    const overlap = areaWhere(pair(2.1, { underside: 2.3 }), 8, 8, (parts) => parts.every((part) => part >= 80))
    within(overlap, 0.6, 0.05)
  })
})

describe('size', () => {
  // 1 %.
  it.each([
    [3600, 3, 0.9, 7.45],
    [2400, 2, 0.75, 5.14],
    [1200, 1, 0.6, 1.99],
  ])('T8: %d W spreads 80 W/m² over its own area: smaller heaters over less', (power, elements, length, area) => {
    within(
      areaWhere([heater(0, { power, elements, length })], 8, 8, ([part]) => part! >= 80),
      area,
      0.01,
    )
  })
})

describe('an upright edge that faces the long side', () => {
  // 2 %.
  it.each([
    [0.1, 1373],
    [0.3, 558],
    [0.457, 330],
    [0.6, 223],
    [1.0, 98],
  ])('T9: %d m from the housing receives at most %d W/m²', (distance, expected) => {
    const x = 0.12 + distance
    const heights = Array.from({ length: 2500 }, (_, i) => i * 0.001)
    const peak = Math.max(...heights.map((z) => irradianceAt(heater(0), [x, 0, z], [-1, 0, 0])))
    within(peak, expected, 0.02)
  })
})

/** The rules without their figures, for every model of the invented catalogue at the greatest height recommended. */
describe.each(demoBeams)('$code at its height', ({ model }) => {
  const height = model.mountingHeight.recommendedMax ?? 2.5
  const hung = (x = 0, lowestPoint = height, stage?: number) =>
    hungHeater(model, { x, lowestPoint, turnDeg: 90, ...(stage && { stage }) })
  const radiated = model.supplyOptions[0]!.ratedPower * model.radiantEfficiency
  const pairOf = (spacing: number) => [hung(-spacing / 2), hung(spacing / 2)]
  const peak = below([hung()], 0, 0)
  const spread = (emitters: readonly Emitter[], least: number) =>
    areaWhere(emitters, 12, 12, (parts) => sum(parts) >= least, 0.05)

  it('gives more the nearer the plane, as the integral does', () => {
    const planes = [0.75, 1, 1.2, 1.75].map((z) => {
      const own = below([hung()], 0, 0, z)
      within(own, bruteIrradiance(hung(), [0, 0, z], up), 1e-6)
      return own
    })
    expect(planes).toEqual([...planes].sort((a, b) => a - b))
  })

  // Between 1/h of an endless line and 1/h² of a point.
  it('0.20 m lower: the peak rises by more than a line’s and less than a point’s', () => {
    const above = hung().elements[0]!.centre[2] - 1
    const rise = below([hung(0, height - 0.2)], 0, 0) / peak
    expect(rise).toBeGreaterThan(above / (above - 0.2))
    expect(rise).toBeLessThan((above / (above - 0.2)) ** 2)
  })

  it('two give twice of one in the middle, less the wider they hang; an edge seat gets less than a middle one', () => {
    const middles = [1.2, 2.1, 2.4].map((spacing) => below(pairOf(spacing), 0, 0))
    within(middles[1]!, 2 * below([hung()], 1.05, 0), 1e-9)
    expect(middles).toEqual([...middles].sort((a, b) => b - a))
    expect(below(pairOf(2.1), 1.95, 0.9)).toBeLessThan(below(pairOf(2.1), 0.6, 0.9))
  })

  it('two hung wider overlap less, and never over more than one of them spreads', () => {
    const least = peak / 4
    const overlaps = [0.4, 0.8, 1.2].map((spacing) =>
      areaWhere(pairOf(spacing), 12, 12, (parts) => parts.every((part) => part >= least), 0.05),
    )
    expect(overlaps[0]).toBeGreaterThan(overlaps[1]!)
    expect(overlaps[1]).toBeGreaterThan(overlaps[2]!)
    expect(overlaps[0]).toBeLessThan(spread([hung()], least))
  })

  it('spreads no more than its radiant power can pay for, and less at a higher figure', () => {
    const areas = [10, 20, 40, 80].map((least) => ({ least, area: spread([hung()], least) }))
    for (const { least, area } of areas) expect(least * area).toBeLessThan(radiated)
    for (const [i, { area }] of areas.slice(1).entries()) expect(area).toBeLessThan(areas[i]!.area)
  })

  it.each(model.stages.slice(0, -1).map((watts, i) => [watts, i + 1] as const))(
    'at the stage of %d W gives as much less everywhere as it draws, and spreads less',
    (watts, stage) => {
      const low = hung(0, height, stage)
      within(below([low], 0.4, 0.3), (below([hung()], 0.4, 0.3) * watts) / model.stages.at(-1)!, 1e-9)
      expect(spread([low], peak / 4)).toBeLessThan(spread([hung()], peak / 4))
    },
  )

  // Similarity: all lengths k times, power k² times, the same figures over k² times the area.
  it('made twice as large with four times the power, spreads over four times the area about the plane', () => {
    const one = hung()
    const large: Emitter = {
      ...one,
      elements: one.elements.map(({ centre: [x, y, z], length, radiantPower }) => ({
        centre: [2 * x, 2 * y, 1 + 2 * (z - 1)],
        length: 2 * length,
        radiantPower: 4 * radiantPower,
      })),
    }
    const [small, big] = [[one], [large]].map((each, i) =>
      areaWhere(each, 8 * (i + 1), 8 * (i + 1), ([part]) => part! >= peak / 3, 0.05 * (i + 1)),
    )
    within(big!, 4 * small!, 0.005)
  })

  it('heats an upright edge that faces it the more the nearer it stands, as the integral does', () => {
    const peaks = [0.1, 0.3, 0.457, 0.6, 1].map((distance) => {
      const x = model.body.width / 2 + distance
      const heights = Array.from({ length: 40 }, (_, i) => (i / 40) * height)
      return Math.max(
        ...heights.map((z) => {
          const own = irradianceAt(hung(), [x, 0, z], [-1, 0, 0])
          within(own, bruteIrradiance(hung(), [x, 0, z], [-1, 0, 0]), 1e-6)
          return own
        }),
      )
    })
    expect(peaks).toEqual([...peaks].sort((a, b) => b - a))
  })
})
