import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { Brief } from '#app/domain/brief/brief.ts'
import { layoutTotals, seatWarmth, windNames, type SeatWarmth } from '#app/domain/comfort/seat-warmth.ts'
import { emitterOf } from '#app/domain/flux/emitter.ts'
import { irradianceAt, irradianceByEmitter, scalarIrradianceAt } from '#app/domain/flux/irradiance.ts'
import { obstructionsOf } from '#app/domain/flux/shading.ts'
import type { MountedHeater } from '#app/domain/layout/layout.ts'
import { bodyOf, elementCentres } from '#app/domain/layout/body.ts'
import type { Seat } from '#app/domain/site/site.ts'
import { radians, subtract, type Vec3 } from '#app/domain/vector.ts'
import { brief, heater, model, modelsOf, seat, site } from '#tests/domain/comfort/terrace.ts'

const warm = (seats: Seat[], heaters: MountedHeater[], change: Partial<Parameters<typeof seatWarmth>[0]> = {}) =>
  seatWarmth({ site: site(seats), brief: brief(), layout: { heaters }, models: modelsOf(model()), ...change })

const one = (seats: Seat[], heaters: MountedHeater[], change: Partial<Parameters<typeof seatWarmth>[0]> = {}) => {
  const [first] = warm(seats, heaters, change)
  if (!first) throw new Error('no seat')
  return first
}

const twoHeaters = [heater('H1', { x: -0.6, y: 0.4, turnDeg: 30 }), heater('H2', { x: 1.2, y: -0.8, tiltDeg: 25 })]
const figures = (each: SeatWarmth) => ({ ...each, seat: null })

describe('a seat’s figures', () => {
  it('are those of the flux engine: body and head on level planes, each heater apart', () => {
    const each = one([seat('S1')], twoHeaters)
    const emitters = twoHeaters.map((mounted) => emitterOf(mounted, model())!)
    const byHeater = irradianceByEmitter(emitters, [0, 0, 0.6], [0, 0, 1])
    expect(each.byHeater.map(({ heaterId }) => heaterId)).toEqual(['H1', 'H2'])
    each.byHeater.forEach(({ irradiance }, i) => expect(irradiance).toBeCloseTo(byHeater[i]!, 9))
    expect(each.body).toBeCloseTo(byHeater[0]! + byHeater[1]!, 9)
    const head = irradianceByEmitter(emitters, [0, 0, 1.1], [0, 0, 1])
    expect(each.headHorizontal).toBeCloseTo(head[0]! + head[1]!, 9)
    expect(each.headToBody).toBeCloseTo(each.headHorizontal! / each.body!, 12)
  })

  it('give the head by its largest direction: no direction gives more, nor more than arrives from all around', () => {
    const placed = [
      heater('H1', { x: -1.5, tiltDeg: 30, turnDeg: -90 }),
      heater('H2', { x: 1.5, turnDeg: 90, tiltDeg: 30 }),
    ]
    const each = one([seat('S1', { y: 0.2 })], placed)
    const emitters = placed.map((mounted) => emitterOf(mounted, model())!)
    const point: Vec3 = [0, 0.2, 1.1]
    const total = (normal: Vec3) => irradianceByEmitter(emitters, point, normal).reduce((a, b) => a + b, 0)
    expect(each.head).toBeCloseTo(total(each.headDirection!), 9)
    expect(each.head).toBeGreaterThan(each.headHorizontal!)
    expect(each.head).toBeLessThanOrEqual(scalarIrradianceAt(emitters, point))
    for (let i = 0; i < 4000; i++) {
      const z = 1 - (2 * (i + 0.5)) / 4000
      const turn = i * Math.PI * (3 - Math.sqrt(5))
      const flat = Math.sqrt(1 - z * z)
      expect(total([flat * Math.cos(turn), flat * Math.sin(turn), z])).toBeLessThanOrEqual(each.head! * (1 + 1e-9))
    }
  })

  it('take the effective field from the nodes of an element: a far heater by hand', () => {
    // 20 m away a 0.6 m element is nearly a point: α f_eff f_p E_n, altitude and azimuth as the geometry says
    const far = heater('H1', { x: 15, y: 0, lowestPoint: 13.9, tiltDeg: 45, turnDeg: 90 })
    const [centre] = elementCentres(bodyOf(far, model()), model())
    const towards = subtract(centre!, [0, 0, 0.6])
    const altitude = (Math.atan2(towards[2], Math.hypot(towards[0], towards[1])) * 180) / Math.PI
    expect(altitude).toBeGreaterThan(30)
    expect(altitude).toBeLessThan(45)
    // the front of the seated table between 30° (.305) and 45° (.303), and the back (.168, .152)
    const t = (altitude - 30) / 15
    const normal = irradianceAt(emitterOf(far, model())!, [0, 0, 0.6], towards)
    for (const [facingDeg, low, high] of [
      [0, 0.305, 0.303],
      [180, 0.168, 0.152],
    ] as const) {
      const field = 0.95 * 0.696 * (low + (high - low) * t) * normal
      // 0.5 %: the element spans ± 1° of azimuth about the table's ridge
      expect(one([seat('S1', { facingDeg })], [far]).field! / field).toBeCloseTo(1, 2)
    }
  })

  it('take short-wave heat at 0.7 and long-wave heat at 0.95', () => {
    const fieldOf = (wave: 'short-wave' | 'medium-wave' | 'long-wave') =>
      one([seat('S1')], twoHeaters, { models: modelsOf(model({ wave })) }).field!
    expect(fieldOf('short-wave') / fieldOf('long-wave')).toBeCloseTo(0.7 / 0.95, 12)
    expect(fieldOf('medium-wave')).toBe(fieldOf('long-wave'))
  })

  it('give the near infrared at the eye as the share of what falls on a vertical plane, null without a temperature', () => {
    const share = modelsOf(model({ elementTemperature: 1150 - 273.15 }))
    const each = one([seat('S1')], twoHeaters, { models: share })
    const planes = Array.from({ length: 720 }, (_, i) => {
      const normal = [Math.cos((i * Math.PI) / 360), Math.sin((i * Math.PI) / 360), 0] as const
      return twoHeaters.reduce((sum, at) => sum + irradianceAt(emitterOf(at, model())!, [0, 0, 1.1], normal), 0)
    })
    // 0.372 at 1150 K: Planck's law by independent code, ± 0.001
    expect(Math.abs(each.nearInfraredAtEye! / Math.max(...planes) - 0.372)).toBeLessThanOrEqual(0.001)
    const untold = one([seat('S1')], twoHeaters, { models: modelsOf(model({ elementTemperature: null })) })
    expect(untold.nearInfraredAtEye).toBeNull()
    const mixed = one([seat('S1')], [twoHeaters[0]!, { ...twoHeaters[1]!, model: 'lamp' }], {
      models: modelsOf(model({ elementTemperature: 700 }), model({ code: 'lamp', elementTemperature: 2200 })),
    })
    expect(mixed.nearInfraredAtEye).toBeGreaterThan(0)
    expect(mixed.nearInfraredAtEye).toBeLessThan(mixed.head!)
  })

  it('without a heater are null, and feels-like before is still there', () => {
    const each = one([seat('S1')], [])
    expect(each).toMatchObject({ body: null, head: null, headHorizontal: null, headToBody: null, field: null })
    expect(each).toMatchObject({ bodyLargest: null, nearInfraredAtEye: null, target: 'no heater', byHeater: [] })
    for (const wind of windNames) {
      expect(each.feelsLike[wind].before).toBeLessThanOrEqual(10)
      expect(each.feelsLike[wind].after).toBeNull()
      expect(each.sensation[wind].after).toBeNull()
    }
  })

  it('are without heaters of unknown model or without beam data, and say which', () => {
    const models = modelsOf(model(), model({ code: 'dark', beam: null }))
    const extra = [...twoHeaters, heater('H3', { model: 'dark' }), heater('H4', { model: 'unheard-of' })]
    const each = one([seat('S1')], extra, { models })
    expect(each.cannotTell).toEqual(['H3', 'H4'])
    expect(each.body).toBe(one([seat('S1')], twoHeaters).body)
    expect(one([seat('S1')], [extra[2]!], { models })).toMatchObject({ body: null, target: 'no heater' })
  })

  it('are measured against the target band, whose ends belong to it', () => {
    const body = one([seat('S1')], twoHeaters).body!
    const against = (low: number, high: number, change: Partial<Seat> = {}) =>
      one([seat('S1', change)], twoHeaters, { brief: brief({ target: { low, high, source: '' } }) }).target
    expect(against(body, body + 1)).toBe('in target')
    expect(against(body - 1, body)).toBe('in target')
    expect(against(body + 1e-6, body + 1)).toBe('below')
    expect(against(0, body - 1e-6)).toBe('above')
    expect(against(0, 1e6, { priority: 'not heated' })).toBe('not heated')
  })
})

describe('feels like', () => {
  it('compares before and after at the same wind, for calm, design and gust', () => {
    const each = one([seat('S1')], twoHeaters)
    expect(windNames.map((wind) => each.feelsLike[wind].wind)).toEqual([0.2, 1, 3])
    const { calm, design, gust } = each.feelsLike
    expect(design.before).toBeCloseTo(5.86, 2) // the published case: 10 °C, 1 m/s, 1.3 clo
    for (const pair of [calm, design, gust]) expect(pair.after).toBeGreaterThan(pair.before)
    expect(calm.before).toBeGreaterThan(design.before)
    expect(design.before).toBeGreaterThan(gust.before)
    expect(calm.after! - calm.before).toBeGreaterThan(design.after! - design.before)
    expect(each.feelsLike.design.before).toBe(one([seat('S1')], []).feelsLike.design.before)
  })

  it('takes the surroundings as warm as the air under a cover, as the brief says under open sky', () => {
    const cover = {
      id: 'C1',
      name: 'roof',
      corners: [
        [-5, -5, 3],
        [5, -5, 3],
        [5, 0, 3],
        [-5, 0, 3],
      ] as [number, number, number][],
      material: 'non-combustible' as const,
      opening: false,
      swing: 0,
      voidDepth: null,
      note: null,
    }
    const seats = [seat('under', { y: -1 }), seat('open', { y: 1 })]
    const at = (surroundingsTemperature: number | null) =>
      seatWarmth({
        site: site(seats, { covers: [cover] }),
        brief: brief({ surroundingsTemperature }),
        layout: { heaters: twoHeaters },
        models: modelsOf(model()),
      })
    const [under, open] = at(-5)
    expect(under!.surroundings).toEqual({ temperature: 10, underCover: true, assumed: false })
    expect(open!.surroundings).toEqual({ temperature: -5, underCover: false, assumed: false })
    expect(open!.feelsLike.calm.before).toBeLessThan(under!.feelsLike.calm.before)
    const [, assumed] = at(null)
    expect(assumed!.surroundings).toEqual({ temperature: 10, underCover: false, assumed: true })
    expect(assumed!.feelsLike.calm.before).toBe(under!.feelsLike.calm.before)
  })

  it('says a word at every wind and a vote only inside the range of ISO 7730', () => {
    const warmEvening = brief({ airTemperature: 17, windDesign: 0.5 })
    const each = one([seat('S1')], twoHeaters, { brief: warmEvening })
    expect(each.sensation.calm.after!.vote).not.toBeNull()
    expect(each.sensation.gust.after!.vote).toBeNull()
    for (const wind of windNames) expect(each.sensation[wind].before.word).toMatch(/[a-z]/)
  })
})

describe('invariances', () => {
  const turned = (angleDeg: number, x: number, y: number) => {
    const [c, s] = [Math.cos(radians(angleDeg)), Math.sin(radians(angleDeg))]
    return { x: c * x - s * y, y: s * x + c * y }
  }

  it('turning the whole terrace changes no figure', () => {
    const seated = seat('S1', { x: 0.7, y: -0.3, facingDeg: 40 })
    const before = one([seated], twoHeaters)
    const after = one(
      [{ ...seated, ...turned(73, seated.x, seated.y), facingDeg: 113 }],
      twoHeaters.map((each) => ({ ...each, ...turned(73, each.x, each.y), turnDeg: each.turnDeg + 73 })),
    )
    for (const figure of ['body', 'head', 'headHorizontal', 'bodyLargest', 'field'] as const) {
      expect(after[figure]).toBeCloseTo(before[figure]!, 8)
    }
  })

  it('the mirror image changes no figure', () => {
    const seated = seat('S1', { x: 0.7, y: -0.3, facingDeg: 40 })
    const before = one([seated], twoHeaters)
    const after = one(
      [{ ...seated, y: 0.3, facingDeg: -40 }],
      twoHeaters.map((each) => ({ ...each, y: -each.y, turnDeg: -each.turnDeg, tiltDeg: -each.tiltDeg })),
    )
    for (const figure of ['body', 'head', 'headHorizontal', 'bodyLargest', 'field'] as const) {
      expect(after[figure]).toBeCloseTo(before[figure]!, 8)
    }
  })

  it('every figure is finite and no irradiance negative, wherever heaters and seats are', () => {
    const place = fc.record({
      x: fc.double({ min: -5, max: 5, noNaN: true }),
      y: fc.double({ min: -5, max: 5, noNaN: true }),
      lowestPoint: fc.double({ min: 0, max: 5, noNaN: true }),
      turnDeg: fc.double({ min: -360, max: 360, noNaN: true }),
      tiltDeg: fc.double({ min: -90, max: 90, noNaN: true }),
    })
    fc.assert(
      fc.property(
        fc.array(place, { maxLength: 5 }),
        fc.double({ min: -360, max: 360, noNaN: true }),
        (places, facingDeg) => {
          const each = one(
            [seat('S1', { facingDeg })],
            places.map((at, i) => heater(`H${i}`, at)),
          )
          const { body, head, headHorizontal, bodyLargest, field, nearInfraredAtEye } = each
          for (const figure of [body, head, headHorizontal, bodyLargest, field, nearInfraredAtEye]) {
            if (places.length === 0) expect(figure).toBeNull()
            else expect(figure).toBeGreaterThanOrEqual(0)
          }
          expect(head ?? 0).toBeGreaterThanOrEqual((headHorizontal ?? 0) - 1e-9)
          expect(bodyLargest ?? 0).toBeGreaterThanOrEqual((body ?? 0) - 1e-9)
          for (const wind of windNames) expect(Number.isFinite(each.feelsLike[wind].after ?? 0)).toBe(true)
        },
      ),
      { numRuns: 300, seed: 3 },
    )
  })
})

describe('odd input', () => {
  const axis = elementCentres(bodyOf(heater('H1'), model()), model())[0]!
  /** Every number of a seat's warmth and of the totals, wherever it stands. */
  const numbersIn = (value: unknown): number[] => {
    if (typeof value === 'number') return [value]
    return typeof value === 'object' && value !== null ? Object.values(value).flatMap(numbersIn) : []
  }
  const atAxis = (dx: number, dz: number) => seat('S1', { x: axis[0] + dx, y: axis[1], headHeight: axis[2] + dz, bodyHeight: axis[2] + dz }) // prettier-ignore
  it.each<[string, Seat, MountedHeater[], Partial<Brief>]>([
    ['head and body on the element', atAxis(0, 0), [heater('H1')], {}],
    ['on the end of the element', atAxis(0.3, 0), [heater('H1')], {}],
    ['a hundredth of a millimetre under the element', atAxis(0, -1e-5), [heater('H1')], {}],
    ['inside the housing', atAxis(0.1, -0.02), [heater('H1')], {}],
    ['in line with the element', atAxis(0.8, 0), [heater('H1')], {}],
    ['level with the open face', atAxis(0, -0.05), [heater('H1')], {}],
    ['a heater below the head and above the body', seat('S1'), [heater('H1', { lowestPoint: 0.8 })], {}],
    ['a heater below the body', seat('S1'), [heater('H1', { lowestPoint: 0.1 })], {}],
    ['a heater on the floor that looks up', seat('S1'), [heater('H1', { lowestPoint: 0, tiltDeg: 90, y: -1 })], {}],
    ['no wind at all', seat('S1'), [heater('H1')], { windDesign: 0, windGust: 0 }],
    ['the hardest wind, no clothes', seat('S1'), [heater('H1')], { windDesign: 15, windGust: 20, clothing: 0 }],
    ['a beam that hardly reaches the body', seat('S1', { x: 4.9, y: 4.9 }), [heater('H1', { model: 'narrow', x: -5, y: -5, lowestPoint: 0.7 })], {}], // prettier-ignore
    ['the farthest corner', seat('S1', { x: 1000, y: 1000 }), [heater('H1', { x: -1000, y: -1000 })], {}],
    ['heaters in one place', seat('S1'), [heater('H1'), heater('H2'), heater('H3')], {}],
    ['a trickle of voltage', seat('S1'), [heater('H1', { supplyVoltage: 1e-9 })], {}],
  ])('gives finite figures: %s', (_, at, placed, change) => {
    const narrow = model({ code: 'narrow', beam: { kind: 'angles', acrossFullAngleDeg: 20, alongFullAngleDeg: 20, source: '' } }) // prettier-ignore
    const input = {
      site: site([at]),
      brief: brief(change),
      layout: { heaters: placed },
      models: modelsOf(model(), narrow),
    }
    const warmth = seatWarmth(input)
    const numbers = numbersIn([warmth, layoutTotals(warmth, input.layout, input.models, input.brief)])
    expect(numbers.length).toBeGreaterThan(30)
    for (const number of numbers) expect(Number.isFinite(number), String(number)).toBe(true)
    expect(warmth[0]!.nearInfraredAtEye).toBeGreaterThanOrEqual(0)
  })

  it('compares the head with the body only where the body gets heat', () => {
    // 20° of beam, the body 72° off its axis: cos^45 leaves 1e-20 or so
    const at = seat('S1', { y: 1.5, bodyHeight: 1.5, headHeight: 0.6 })
    const sliver = heater('H1', { lowestPoint: 1.95, model: 'narrow' })
    const narrow = model({ code: 'narrow', beam: { kind: 'angles', acrossFullAngleDeg: 20, alongFullAngleDeg: 20, source: '' } }) // prettier-ignore
    const each = one([at], [sliver], { models: modelsOf(narrow) })
    expect(each.body).toBeGreaterThan(0)
    expect(each.body).toBeLessThan(1e-6)
    expect(each.headToBody).toBeNull()
  })
})

describe('what is kept from one call to the next', () => {
  it('never shows: a moved heater, a moved seat and another model give what a fresh call gives', () => {
    const seats = [seat('S1'), seat('S2', { x: 1 })]
    const models = modelsOf(model())
    const fresh = (heaters: MountedHeater[], list: Seat[], map = models) =>
      warm(structuredClone(list), structuredClone(heaters), { models: new Map(structuredClone([...map])) }).map(figures)
    warm(seats, twoHeaters, { models })
    const moved = [{ ...twoHeaters[0]!, x: 0.3 }, twoHeaters[1]!]
    expect(warm(seats, moved, { models }).map(figures)).toEqual(fresh(moved, seats))
    const turned = [{ ...seats[0]!, facingDeg: 90 }, seats[1]!]
    expect(warm(turned, moved, { models }).map(figures)).toEqual(fresh(moved, turned))
    const stronger = modelsOf(model({ radiantEfficiency: 0.6 }))
    expect(warm(turned, moved, { models: stronger }).map(figures)).toEqual(fresh(moved, turned, stronger))
    expect(warm(turned, moved, { models }).map(figures)).toEqual(fresh(moved, turned))
  })
})

describe('shade', () => {
  const screen = (transmittance: number) => ({
    id: 'O1',
    name: 'screen',
    kind: 'screen' as const,
    material: 'non-combustible' as const,
    movable: false,
    shape: {
      kind: 'box' as const,
      x: [-3, 3] as [number, number],
      y: [-3, 3] as [number, number],
      z: [2, 2.1] as [number, number],
    },
    transmittance,
    note: null,
  })
  const shadedBy = (transmittance: number) => {
    const terrace = site([seat('S1')], { obstacles: [screen(transmittance)] })
    const obstructions = obstructionsOf(terrace, { title: 'x', heaters: twoHeaters }, modelsOf(model()))
    return one([seat('S1')], twoHeaters, { site: terrace, obstructions })
  }

  it('is left out unless asked for', () => {
    const terrace = site([seat('S1')], { obstacles: [screen(0)] })
    expect(one([seat('S1')], twoHeaters, { site: terrace }).body).toBe(one([seat('S1')], twoHeaters).body)
  })

  it('dims every figure by the transmittance of what stands between', () => {
    const clear = one([seat('S1')], twoHeaters)
    for (const share of [0, 0.3, 1]) {
      const shaded = shadedBy(share)
      for (const figure of ['body', 'head', 'headHorizontal', 'bodyLargest', 'field', 'nearInfraredAtEye'] as const) {
        expect(shaded[figure]).toBeCloseTo(share * clear[figure]!, 6)
      }
    }
  })
})

describe('what a layout comes to', () => {
  const seats = [
    seat('P1', { x: 0 }),
    seat('P2', { x: 1 }),
    seat('P3', { x: 2.5 }),
    seat('S1', { x: -2, priority: 'secondary' }),
    seat('N1', { x: -1, priority: 'not heated' }),
    seat('away', { x: 7 }),
  ]
  const layout = { heaters: [heater('H1'), heater('H2', { x: 1, stage: 1 })] }
  const models = modelsOf(model())

  it('counts what is to be heated on the floor, and takes statistics over the primary seats', () => {
    const warmth = seatWarmth({ site: site(seats), brief: brief(), layout, models })
    const totals = layoutTotals(warmth, layout, models, brief())
    const body = (id: string) => warmth.find((each) => each.seat.id === id)!.body!
    const primary = [body('P1'), body('P2'), body('P3')]
    expect(totals.seatsCounted).toBe(4)
    expect(totals.seatsInTarget).toBe([...primary, body('S1')].filter((e) => e >= 150 && e <= 350).length)
    expect(totals.coldest).toEqual({ seatId: 'P3', irradiance: Math.min(...primary) })
    expect(totals.hottest!.irradiance).toBe(Math.max(...primary))
    const mean = (primary[0]! + primary[1]! + primary[2]!) / 3
    expect(totals.mean).toBeCloseTo(mean, 10)
    expect(totals.evenness).toBeCloseTo(Math.min(...primary) / mean, 10)
    expect(totals.headMaximum!.irradiance).toBe(Math.max(...warmth.slice(0, 5).map(({ head }) => head!)))
  })

  it('adds up power, energy and cost: 3 kW, 4 h at three quarters, 0.30 a kWh', () => {
    const totals = layoutTotals(
      seatWarmth({ site: site(seats), brief: brief(), layout, models }),
      layout,
      models,
      brief(),
    )
    expect(totals.power).toBeCloseTo(3000, 9)
    expect(totals.energyPerEvening).toBeCloseTo(9, 9)
    expect(totals.costPerEvening!.amount).toBeCloseTo(2.7, 9)
    expect(totals.costPerEvening!.currency).toBe('EUR')
    const untold = layoutTotals([], layout, models, brief({ energy: null }))
    expect(untold).toMatchObject({ energyPerEvening: null, costPerEvening: null })
  })

  it('gives no evenness below two primary seats, without heaters or without heat', () => {
    const totalsOf = (list: Seat[], heaters: MountedHeater[]) =>
      layoutTotals(warm(list, heaters), { heaters }, models, brief())
    expect(totalsOf([seats[0]!], layout.heaters).evenness).toBeNull()
    expect(totalsOf([seats[0]!], layout.heaters).coldest).not.toBeNull()
    expect(totalsOf(seats, [])).toMatchObject({
      evenness: null,
      coldest: null,
      hottest: null,
      mean: null,
      headMaximum: null,
      power: 0,
      seatsInTarget: 0,
      seatsCounted: 4,
    })
    const dark = [heater('H1', { lowestPoint: 0, tiltDeg: 0 })]
    expect(totalsOf(seats, dark).evenness).toBeNull()
    expect(totalsOf([], layout.heaters)).toMatchObject({ evenness: null, coldest: null, seatsCounted: 0, power: 3000 })
  })

  it('names the same seat where two differ by what two machines differ in', () => {
    const [first] = warm([seat('R3-4')], layout.heaters)
    const pair = (one: number, other: number) => [
      { ...first!, seat: seat('W3-3'), body: 150 + other },
      { ...first!, seat: seat('R3-4'), body: 150 + one },
    ]
    for (const [one, other] of [
      [0, 1e-12],
      [1e-12, 0],
      [0, 0],
    ]) {
      const totals = layoutTotals(pair(one!, other!), layout, models, brief())
      expect([totals.coldest!.seatId, totals.hottest!.seatId]).toEqual(['R3-4', 'W3-3'])
    }
    expect(layoutTotals(pair(0.01, 0), layout, models, brief()).coldest!.seatId).toBe('W3-3')
  })

  it('names heaters that cannot be told even on a terrace without seats', () => {
    const dark = { heaters: [heater('H1', { model: 'unheard-of' })] }
    expect(layoutTotals(warm([], dark.heaters), dark, models, brief()).cannotTell).toEqual(['H1'])
  })
})
