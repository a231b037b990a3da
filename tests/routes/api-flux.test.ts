import fc from 'fast-check'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { z } from 'zod'
import { openApi, type ApiDesk, type Caller } from '#tests/support/api.ts'
import { directions, integratedIrradiance } from '#tests/support/line-source.ts'
import type { Vec3 } from '#app/domain/vector.ts'

const answerSchema = z.strictObject({
  irradiance: z.array(z.number()),
  byHeater: z.array(z.array(z.number())),
  warnings: z.array(z.string()),
})
const refusalSchema = z.strictObject({ error: z.string().min(1), path: z.string() })

let desk: ApiDesk
let member: Caller
beforeAll(async () => {
  desk = await openApi()
  member = desk.as('installer')
})
afterAll(async () => {
  const { stopFluxThreads } = await import('#app/server/flux.server.ts')
  await stopFluxThreads()
  await desk.close()
})

const group = (across: number, along: number, change: object = {}) => ({
  at: { x: 0, y: 0, z: 0 },
  turnDeg: 0,
  tiltDeg: 0,
  beam: { kind: 'cosine', across, along },
  elements: [{ offset: 0, length: 1, radiantPower: 1000 }],
  ...change,
})
const modelled = (model: string, change: object = {}) => ({
  model,
  supplyVoltage: 230,
  at: { x: 0, y: 0, z: 2.5 },
  turnDeg: 0,
  tiltDeg: 0,
  ...change,
})
const point = ([x, y, height]: Vec3, normal: Vec3 = [0, 0, 1]) => ({ x, y, z: height, normal })
async function ask(heaters: unknown, points: unknown) {
  const response = await member('POST', '/api/flux', { body: { heaters, points } })
  expect(response.status).toBe(200)
  return answerSchema.parse(await response.json())
}
async function refused(body: unknown) {
  const response = await member('POST', '/api/flux', { body })
  return { status: response.status, ...refusalSchema.parse(await response.json()) }
}

describe('closed forms (rows R15–R20 of the engine’s check list; derivation, independent quadrature agrees)', () => {
  const below: Vec3 = [0, 0, -2]
  const aside: Vec3 = [0.5, 1, -2]
  it.each([
    ['R15', 2, 1, below, [0, 0, 1], 97.3236],
    ['R16', 2, 1, aside, [0, 0, 1], 51.4363],
    ['R17', 2, 1, [0, 2, -2], [0, 0, 1], 17.5483],
    ['R18', 2, 1, aside, [0, -1, 0], 25.7181],
    ['R18', 2, 1, aside, [-1, 0, 0], 12.0833],
    ['R19', 1, 1, below, [0, 0, 1], 76.4378],
    ['R19', 3, 1, below, [0, 0, 1], 114.6567],
    ['R19', 6, 1, below, [0, 0, 1], 155.7178],
    ['R19', 3, 3, below, [0, 0, 1], 149.9021],
    ['R20', 1, 1, aside, [0, 0, 1], 45.1663],
    ['R20', 3, 1, aside, [0, 0, 1], 54.1996],
    ['R20', 6, 1, aside, [0, 0, 1], 52.6708],
    ['R20', 3, 3, aside, [0, 0, 1], 68.3467],
  ] as const)('%s: beam (%d, %d) at %j facing %j: %d W/m²', async (_, across, along, at, normal, expected) => {
    const { irradiance } = await ask([group(across, along)], [point(at, normal)])
    // Tolerance 1e-5 of the value, as the rows state.
    expect(Math.abs(irradiance[0]! / expected - 1)).toBeLessThan(1e-5)
  })

  it('R21: half the element behind the plane, 122.549 ± 1e-4', async () => {
    // Peak intensity 100 W/sr of beam (2, 1): Φ = 100 W(2) W(2), W(2) = ∫ cos² over ±90° = π/2.
    const radiantPower = 100 * (Math.PI / 2) ** 2
    const heater = group(2, 1, { elements: [{ offset: 0, length: 1, radiantPower }] })
    const { irradiance } = await ask([heater], [point([0, 0, -0.3], [1, 0, 0])])
    expect(Math.abs(irradiance[0]! / 122.549 - 1)).toBeLessThan(1e-4)
  })
})

describe('any turn, tilt, offset and real exponents', () => {
  it('agree with integration along the element within 1e-6 or 1e-9 W/m²', async () => {
    const number = (min: number, max: number) => fc.double({ min, max, noNaN: true })
    const cases = fc.sample(
      fc.record({
        turnDeg: number(-360, 360),
        tiltDeg: number(-90, 90),
        across: number(0, 50),
        along: number(0, 50),
        offset: number(-0.3, 0.3),
        length: number(0.05, 2),
        radiantPower: number(1, 5000),
        at: fc.tuple(number(-3, 3), number(-3, 3), number(2, 4)),
        // Away from the element's own edge of darkness.
        target: fc.tuple(number(-2, 2), number(-2, 2), number(0, 1.2)),
      }),
      { numRuns: 120, seed: 42 },
    )
    const normal: Vec3 = [0, 0, 1]
    const heaters = cases.map(({ at: [x, y, height], turnDeg, tiltDeg, across, along, offset, length, radiantPower }) =>
      group(across, along, {
        at: { x, y, z: height },
        turnDeg,
        tiltDeg,
        elements: [{ offset, length, radiantPower }],
      }),
    )
    const { byHeater, irradiance } = await ask(
      heaters,
      cases.map(({ target }) => point(target, normal)),
    )
    cases.forEach((one, i) => {
      const expected = integratedIrradiance(one, one.target, normal)
      expect(Math.abs(byHeater[i]![i]! - expected)).toBeLessThanOrEqual(Math.max(1e-9, 1e-6 * expected))
      expect(irradiance[i]).toBeCloseTo(
        byHeater[i]!.reduce((sum, part) => sum + part, 0),
        6,
      )
    })
    expect(byHeater.flat().filter((part) => part > 1).length).toBeGreaterThan(100)
  })

  it('normals count by direction only, and one side only', async () => {
    const { irradiance } = await ask(
      [group(2, 1)],
      [
        point([0.5, 1, -2], [0, 0, 1]),
        point([0.5, 1, -2], [0, 0, 1e300]),
        point([0.5, 1, -2], [0, 0, 5e-324]),
        point([0.5, 1, -2], [0, 0, -1]),
      ],
    )
    expect(irradiance[1]).toBe(irradiance[0])
    expect(irradiance[2]).toBe(irradiance[0])
    expect(irradiance[3]).toBe(0)
  })

  it('no heaters give nothing, no points an empty answer', async () => {
    expect(await ask([], [point([0, 0, 0])])).toEqual({ irradiance: [0], byHeater: [[]], warnings: [] })
    expect(await ask([group(1, 1)], [])).toEqual({ irradiance: [], byHeater: [], warnings: [] })
  })
})

describe('catalogue models', () => {
  /** Betony 3.0 by its data sheet: two elements of 0.593 m, 85 mm apart, 35 mm above the open face; η 0.9; 85° × 95°. */
  function betony(turnDeg: number, tiltDeg: number, power: number, at: Vec3, target: Vec3, normal: Vec3): number {
    const { v, w } = directions(turnDeg, tiltDeg)
    const rise = (0.215 / 2) * Math.abs(v[2]) + (0.115 / 2) * Math.abs(w[2])
    const depth = 0.115 / 2 - 0.035
    const middle: Vec3 = [at[0] + w[0] * depth, at[1] + w[1] * depth, at[2] + rise + w[2] * depth]
    const exponent = (fullDeg: number) => Math.log(0.5) / Math.log(Math.cos((fullDeg / 2) * (Math.PI / 180)))
    return [-0.0425, 0.0425].reduce(
      (sum, offset) =>
        sum +
        integratedIrradiance(
          {
            at: middle,
            turnDeg,
            tiltDeg,
            across: exponent(85),
            along: exponent(95),
            offset,
            length: 0.593,
            radiantPower: (power * 0.9) / 2,
          },
          target,
          normal,
        ),
      0,
    )
  }

  it.each([
    ['straight down', 0, 0, {}, 3000],
    ['turned and tilted', 65, -38, {}, 3000],
    ['at its first stage', 90, 20, { stage: 1 }, 1500],
    ['the 240 V version on 230 V', 0, 10, { ratedVoltage: 240 }, 3000 * (230 / 240) ** 1.54],
  ])('are placed and powered by their data sheet: %s', async (_, turnDeg, tiltDeg, change, power) => {
    const target: Vec3 = [0.6, -0.4, 0.6]
    const { irradiance, warnings } = await ask(
      [modelled('betony-3-0', { turnDeg, tiltDeg, ...change })],
      [point(target), point(target, [0.3, 0.5, 1])],
    )
    const expected = (
      [
        [0, 0, 1],
        [0.3, 0.5, 1],
      ] as const
    ).map((normal) => betony(turnDeg, tiltDeg, power, [0, 0, 2.5], target, normal))
    irradiance.forEach((value, i) => expect(Math.abs(value / expected[i]! - 1)).toBeLessThan(1e-6))
    expect(warnings).toHaveLength('ratedVoltage' in change ? 1 : 0)
  })

  it('a voltage that is not listed takes the nearest option and says so', async () => {
    // 4,800 W at 240 V on 208 V: 4,800 · (208 / 240)² = 3,605 W.
    const heaters = [
      modelled('sanicle-4-8', { supplyVoltage: 208, ratedVoltage: 240 }),
      modelled('sanicle-4-8', { supplyVoltage: 208 }),
      modelled('sanicle-4-8', { supplyVoltage: 230 }),
    ]
    const { byHeater, warnings } = await ask(heaters, [point([0, 0, 0.6])])
    expect(byHeater[0]![0]! / byHeater[0]![1]!).toBeCloseTo((208 / 240) ** 2, 9)
    expect(byHeater[0]![2]! / byHeater[0]![1]!).toBeCloseTo((230 / 240) ** 2, 9)
    expect(warnings).toHaveLength(2)
    expect(warnings[0]).toContain('heaters.0')
    expect(warnings[0]).toContain('3605 W')
    expect(warnings[1]).toContain('heaters.2')
  })
})

describe('refusals name the field', () => {
  const good = { heaters: [group(1, 1)], points: [point([0, 0, -1])] }
  const heaterWith = (change: object) => ({ ...good, heaters: [good.heaters[0], group(1, 1, change)] })
  const modelWith = (change: object) => ({ ...good, heaters: [modelled('betony-3-0', change)] })
  it.each([
    [400, 'heaters', { points: [] }],
    [400, 'points', { heaters: [] }],
    [400, 'extra', { ...good, extra: 1 }],
    [400, 'heaters.0', { ...good, heaters: [3] }],
    [400, 'heaters.1.beam.along', heaterWith({ beam: { kind: 'cosine', across: 1 } })],
    [400, 'heaters.1.beam.along', heaterWith({ beam: { kind: 'cosine', across: 1, along: 50.001 } })],
    [400, 'heaters.1.beam.across', heaterWith({ beam: { kind: 'cosine', across: -0.001, along: 1 } })],
    [400, 'heaters.1.beam.kind', heaterWith({ beam: { kind: 'table', across: 1, along: 1 } })],
    [400, 'heaters.1.beam.table', heaterWith({ beam: { kind: 'cosine', across: 1, along: 1, table: [] } })],
    [400, 'heaters.1.at.z', heaterWith({ at: { x: 0, y: 0 } })],
    [400, 'heaters.1.turnDeg', heaterWith({ turnDeg: null })],
    [400, 'heaters.1.mount', heaterWith({ mount: 'chain' })],
    [400, 'heaters.1.elements', heaterWith({ elements: [] })],
    [400, 'heaters.1.elements.0.length', heaterWith({ elements: [{ offset: 0, length: 0, radiantPower: 1 }] })],
    [400, 'heaters.1.elements.0.radiantPower', heaterWith({ elements: [{ offset: 0, length: 1, radiantPower: -1 }] })],
    [400, 'heaters.0.supplyVoltage', modelWith({ supplyVoltage: 0 })],
    [400, 'heaters.0.beam', modelWith({ beam: { kind: 'cosine', across: 1, along: 1 } })],
    [400, 'heaters.0.stage', modelWith({ stage: 1.5 })],
    [400, 'points.0.normal', { ...good, points: [point([0, 0, 0], [0, 0, 0])] }],
    [400, 'points.0.normal', { ...good, points: [{ x: 0, y: 0, z: 0 }] }],
    [400, 'points.0.w', { ...good, points: [{ ...point([0, 0, 0]), w: 1 }] }],
    [413, 'heaters', { ...good, heaters: Array.from({ length: 201 }, () => group(1, 1)) }],
    [413, 'points', { ...good, points: Array.from({ length: 5001 }, () => point([0, 0, 0])) }],
    [
      413,
      'heaters.1.elements',
      heaterWith({ elements: Array.from({ length: 13 }, () => ({ offset: 0, length: 1, radiantPower: 1 })) }),
    ],
    [422, 'heaters.0.model', modelWith({ model: 'unknown-9' })],
    [422, 'heaters.0.model', modelWith({ model: 'dulse-3-0' })],
    [422, 'heaters.0.model', modelWith({ model: 'betony-2-0-r1' })],
    [422, 'heaters.0.ratedVoltage', modelWith({ ratedVoltage: 277 })],
    [422, 'heaters.0.stage', modelWith({ stage: 3 })],
    [422, 'points.1', { ...good, points: [point([0, 0, -1]), point([0.5, 0, 0])] }],
  ])('%d at %s', async (status, path, body) => {
    expect(await refused(body)).toMatchObject({ status, path })
  })

  it('numbers that are not finite', async () => {
    const text = JSON.stringify({ ...good }).replace('"z":-1', '"z":1e309')
    const response = await member('POST', '/api/flux', { text })
    expect({ status: response.status, ...(await response.json()) }).toMatchObject({ status: 400, path: 'points.0.z' })
  })

  it('needs somebody signed in, and a POST', async () => {
    expect((await desk.as('nobody')('POST', '/api/flux', { body: good })).status).toBe(401)
    expect((await member('PUT', '/api/flux', { body: good })).status).toBe(405)
  })
})

it('leaves the event loop free while 200 heaters shine on 4,000 points', async () => {
  const heaters = Array.from({ length: 200 }, (_, i) => group(1.7, 1.3, { at: { x: i / 10, y: 0, z: 3 } }))
  const points = Array.from({ length: 4000 }, (_, i) => point([i / 200, 1, 0.6]))
  let longest = 0
  let last = performance.now()
  const watch = setInterval(() => {
    longest = Math.max(longest, performance.now() - last)
    last = performance.now()
  }, 5)
  const started = performance.now()
  const { byHeater } = await ask(heaters, points)
  const whole = performance.now() - started
  clearInterval(watch)
  expect(byHeater).toHaveLength(4000)
  // Parsing and writing JSON stays here; the 800,000 evaluations do not.
  expect(longest).toBeLessThan(whole / 2)
})
