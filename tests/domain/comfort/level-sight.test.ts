import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { nearInfraredShare } from '#app/domain/comfort/band-share.ts'
import { largestLevelDirection } from '#app/domain/comfort/level-sight.ts'
import { heatAtSeat } from '#app/domain/comfort/seat-heat.ts'
import { sourcesOf } from '#app/domain/comfort/sources.ts'
import { emitterOf } from '#app/domain/flux/emitter.ts'
import { irradianceAt } from '#app/domain/flux/irradiance.ts'
import { obstructionsOf, type Obstruction } from '#app/domain/flux/shading.ts'
import type { MountedHeater } from '#app/domain/layout/layout.ts'
import type { Seat } from '#app/domain/site/site.ts'
import type { Vec3 } from '#app/domain/vector.ts'
import { demoModels, demoSites } from '#drizzle/seed/demo-sites.ts'
import { heater, model, modelsOf, seat, site } from '#tests/domain/comfort/terrace.ts'
import { bruteIrradiance } from '#tests/support/adaptive-integrator.ts'

const level = (azimuth: number): Vec3 => [Math.cos(azimuth), Math.sin(azimuth), 0]

/** The largest of vertical planes at `count` azimuths round the compass. */
function sampled(irradianceOn: (normal: Vec3) => number, count: number): number {
  return Math.max(...Array.from({ length: count }, (_, i) => irradianceOn(level((i * 2 * Math.PI) / count))))
}

/** Near infrared of a layout at a seat's eye by its definition: the share of each heater on a plane, all added. */
function byDefinition(
  placed: readonly MountedHeater[],
  at: Seat,
  models: ReturnType<typeof modelsOf>,
  irradiance: typeof bruteIrradiance = irradianceAt,
) {
  const point: Vec3 = [at.x, at.y, at.headHeight]
  const shares = placed.flatMap((each) => {
    const own = models.get(each.model)
    const emitter = own && emitterOf(each, own)
    return own && emitter ? [{ emitter, share: nearInfraredShare(own.elementTemperature ?? Number.NaN) }] : []
  })
  return (normal: Vec3) => shares.reduce((sum, each) => sum + each.share * irradiance(each.emitter, point, normal), 0)
}

function found(
  placed: MountedHeater[],
  at: Seat,
  models: ReturnType<typeof modelsOf>,
  obstructions: Obstruction[] = [],
) {
  const { nearInfrared } = heatAtSeat(at, sourcesOf({ heaters: placed }, models).sources, obstructions)
  if (!nearInfrared) throw new Error('no temperature')
  return { direction: nearInfrared.direction, value: nearInfrared.parts.reduce((sum, part) => sum + part, 0) }
}

const lampAndTube = modelsOf(
  model({ elementCount: 2, elementTemperature: 700 }),
  model({ code: 'lamp', elementTemperature: 2200, elementLength: 0.3 }),
)
const real = (min: number, max: number) => fc.double({ min, max, noNaN: true })
const places = fc.array(
  fc.record({
    model: fc.constantFrom('plain-2-0', 'lamp'),
    x: real(-3, 3),
    y: real(-3, 3),
    lowestPoint: real(0.6, 3),
    turnDeg: real(-180, 180),
    tiltDeg: real(-90, 90),
  }),
  { minLength: 1, maxLength: 8 },
)

describe('near infrared at the eye of a guest who looks level', () => {
  // Between two of 720 azimuths the plane's figure can rise above both by 1/cos(0.25°) − 1 = 9.5e-6 at the most.
  const between = 1 / Math.cos(Math.PI / 720)

  it('is the largest of vertical planes at all azimuths, for random lamps and tubes all round', () => {
    fc.assert(
      fc.property(places, (given) => {
        const placed = given.map((each, i) => heater(`H${i}`, each))
        const { value, direction } = found(placed, seat('S1'), lampAndTube)
        const on = byDefinition(placed, seat('S1'), lampAndTube)
        const brute = sampled(on, 720)
        expect(direction[2]).toBe(0)
        expect(Math.abs(value - on(direction))).toBeLessThanOrEqual(1e-9 * (1 + value))
        expect(value).toBeGreaterThanOrEqual(brute * (1 - 2e-6))
        expect(value).toBeLessThanOrEqual(brute * between * (1 + 1e-9))
      }),
      { numRuns: 150, seed: 11 },
    )
  })

  it('is that of an independent integration over the elements, azimuth by azimuth', () => {
    const [placed] = fc.sample(places, { numRuns: 1, seed: 3 }).map((given) => given.map((each, i) => heater(`H${i}`, each))) // prettier-ignore
    const on = byDefinition(placed!, seat('S1'), lampAndTube, bruteIrradiance)
    const brute = sampled(on, 180)
    const { value } = found(placed!, seat('S1'), lampAndTube)
    expect(brute).toBeGreaterThan(1)
    expect(value).toBeGreaterThanOrEqual(brute * (1 - 1e-6))
    expect(value).toBeLessThanOrEqual((brute / Math.cos(Math.PI / 180)) * (1 + 1e-6))
  })

  it('at every demo seat and variant', () => {
    const models = new Map(demoModels().map((each) => [each.code, each]))
    for (const { site: place, variants } of demoSites()) {
      for (const { layout } of variants) {
        for (const at of place.seats.filter((_, i) => i % 6 === 0)) {
          const { value } = found(layout.heaters, at, models)
          const brute = sampled(byDefinition(layout.heaters, at, models), 360)
          expect(value).toBeGreaterThanOrEqual(brute * (1 - 2e-6))
          expect(value).toBeLessThanOrEqual((brute / Math.cos(Math.PI / 360)) * (1 + 1e-9))
        }
      }
    }
  })

  it('of one heater level with the eye is all of it, of one high above hardly any', () => {
    const share = nearInfraredShare(900)
    const single = modelsOf(model())
    const facing = heater('H1', { y: -2, turnDeg: 0, tiltDeg: 90, lowestPoint: 1.0 })
    const at = seat('S1')
    const { head } = heatAtSeat(at, sourcesOf({ heaters: [facing] }, single).sources)
    const whole = head.parts.reduce((sum, part) => sum + part, 0)
    expect(found([facing], at, single).value / (share * whole)).toBeGreaterThan(0.999)
    expect(found([facing], at, single).direction[1]).toBeCloseTo(-1, 6)
    const above = heater('H1', { lowestPoint: 4 })
    const overhead = heatAtSeat(at, sourcesOf({ heaters: [above] }, single).sources).head.parts[0]!
    expect(found([above], at, single).value / (share * overhead)).toBeLessThan(0.1)
  })

  it('does not shift when the whole terrace is turned', () => {
    const placed = [
      heater('H1', { x: 1, y: 0.5, tiltDeg: 30 }),
      heater('H2', { x: -1.5, y: 1, turnDeg: 60, model: 'lamp' }),
    ]
    const { value } = found(placed, seat('S1'), lampAndTube)
    for (const turn of [33, 90, 211]) {
      const [cosine, sine] = [Math.cos((turn * Math.PI) / 180), Math.sin((turn * Math.PI) / 180)]
      const turned = placed.map((each) => ({
        ...each,
        x: each.x * cosine - each.y * sine,
        y: each.x * sine + each.y * cosine,
        turnDeg: each.turnDeg + turn,
      }))
      expect(found(turned, seat('S1'), lampAndTube).value / value).toBeCloseTo(1, 6)
    }
  })

  it('with shade is the largest of shaded planes', () => {
    const post = {
      id: 'O1',
      name: 'post',
      kind: 'screen' as const,
      material: 'non-combustible' as const,
      movable: false,
      shape: { kind: 'box' as const, x: [0.45, 0.6] as [number, number], y: [-0.5, 0.3] as [number, number], z: [0, 2.2] as [number, number] }, // prettier-ignore
      transmittance: 0.2,
      note: null,
    }
    const placed = [heater('H1', { x: 1.5, turnDeg: 90, tiltDeg: 60 }), heater('H2', { x: -2, y: 1.5, model: 'lamp' })]
    const obstructions = obstructionsOf(
      site([seat('S1')], { obstacles: [post] }),
      { title: '', heaters: [] },
      lampAndTube,
    )
    const shaded: typeof bruteIrradiance = (emitter, point, normal) =>
      irradianceAt(emitter, point, normal, obstructions)
    const brute = sampled(byDefinition(placed, seat('S1'), lampAndTube, shaded), 720)
    const { value } = found(placed, seat('S1'), lampAndTube, obstructions)
    expect(value).toBeLessThan(0.95 * found(placed, seat('S1'), lampAndTube).value)
    expect(value).toBeGreaterThanOrEqual(brute * (1 - 2e-6))
    expect(value).toBeLessThanOrEqual(brute * between * (1 + 1e-9))
  })

  it('needs few planes, and no more than a hundred where all azimuths are alike', () => {
    let planes = 0
    const counted = (on: (normal: Vec3) => number) => (normal: Vec3) => {
      planes++
      return on(normal)
    }
    const placed = [heater('H1', { x: 1, tiltDeg: 30 }), heater('H2', { x: -1.5, y: 1, turnDeg: 60 })]
    largestLevelDirection(counted(byDefinition(placed, seat('S1'), lampAndTube)))
    expect(planes).toBeLessThan(40)
    planes = 0
    const ripple = ([x, y]: Vec3) => 100 + 0.01 * Math.cos(12 * (Math.atan2(y, x) - 0.2))
    const [x, y] = largestLevelDirection(counted(ripple))
    expect(planes).toBe(100)
    expect(ripple([x, y, 0])).toBeGreaterThan(100 * (1 - 1e-3))
  })

  it('without radiation is nothing, looking along x', () => {
    expect(largestLevelDirection(() => 0)).toEqual([1, 0, 0])
    expect(found([heater('H1', { lowestPoint: 0.2 })], seat('S1'), modelsOf(model()))).toEqual({ direction: [1, 0, 0], value: 0 }) // prettier-ignore
  })
})
