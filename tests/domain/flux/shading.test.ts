import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { addDirected } from '#app/domain/flux/directed-map.ts'
import type { Emitter } from '#app/domain/flux/emitter.ts'
import { gridOf } from '#app/domain/flux/grid.ts'
import { irradianceAt, largestIrradianceAt, scalarIrradianceAt } from '#app/domain/flux/irradiance.ts'
import { irradianceMap } from '#app/domain/flux/map.ts'
import { seenOf } from '#app/domain/flux/shaded-cells.ts'
import { clearStretches, obstructionsOf, seenShare, type Obstruction } from '#app/domain/flux/shading.ts'
import { boxSolid, cylinderSolid, slabSolid, solidsOf } from '#app/domain/flux/solid.ts'
import { heaterFrame } from '#app/domain/layout/body.ts'
import type { Shape } from '#app/domain/site/site.ts'
import { cross, normalise, type Vec2, type Vec3 } from '#app/domain/vector.ts'
import { demoModels, demoSites } from '#drizzle/seed/demo-sites.ts'
import { cosine, line } from '#tests/support/emitters.ts'

const obstruction = (shape: Shape, transmittance = 0): Obstruction => ({
  id: 'thing',
  heaterId: null,
  transmittance,
  solids: solidsOf(shape),
})

describe('the hidden stretch of an element against rays of the test’s own', () => {
  /** Whether the straight way from a to b passes through a shape, by 4,000 steps. */
  const meets = (holds: (p: Vec3) => boolean, a: Vec3, b: Vec3) =>
    Array.from({ length: 4000 }, (_, i) => (i + 0.5) / 4000).some((t) =>
      holds([a[0] + t * (b[0] - a[0]), a[1] + t * (b[1] - a[1]), a[2] + t * (b[2] - a[2])]),
    )
  const real = (min: number, max: number) => fc.double({ min, max, noNaN: true })
  const inOutline = (outline: readonly Vec2[], [x, y]: Vec3) =>
    outline.reduce((odd, [x1, y1], i) => {
      const [x2, y2] = outline[(i + 1) % outline.length]!
      return y1 > y !== y2 > y && x < x1 + ((y - y1) / (y2 - y1)) * (x2 - x1) ? !odd : odd
    }, false)
  const arrow: [number, number][] = [
    [-0.5, -0.4],
    [0.6, 0],
    [-0.5, 0.4],
    [-0.1, 0],
  ]
  const frame = heaterFrame(33, 25)
  const cases = [
    {
      name: 'an upright cylinder',
      solids: [cylinderSolid([0.1, 0.2], 0.3, 0.7, 1.6)],
      holds: ([x, y, z]: Vec3) => Math.hypot(x - 0.1, y - 0.2) <= 0.3 && z >= 0.7 && z <= 1.6,
    },
    {
      name: 'a turned table top',
      solids: [slabSolid([0.2, 0], [1.2, 0.8], 30, 0.7, 0.74)],
      holds: ([x, y, z]: Vec3) => {
        const [c, s] = [Math.cos(Math.PI / 6), Math.sin(Math.PI / 6)]
        const [dx, dy] = [x - 0.2, y]
        return Math.abs(dx * c + dy * s) <= 0.6 && Math.abs(dy * c - dx * s) <= 0.4 && z >= 0.7 && z <= 0.74
      },
    },
    {
      name: 'a tilted body',
      solids: [boxSolid({ ...frame, centre: [0, 0, 1.2], half: { u: 0.5, v: 0.2, w: 0.15 } })],
      holds: (p: Vec3) => {
        const part = (axis: Vec3) => Math.abs(p[0] * axis[0] + p[1] * axis[1] + (p[2] - 1.2) * axis[2])
        return part(frame.u) <= 0.5 && part(frame.v) <= 0.2 && part(frame.w) <= 0.15
      },
    },
    {
      name: 'a prism with a notch',
      solids: solidsOf({ kind: 'prism', outline: arrow, z: [0.5, 1.5] }),
      holds: (p: Vec3) => p[2] >= 0.5 && p[2] <= 1.5 && inOutline(arrow, p),
    },
  ]

  it.each(cases)('$name', ({ solids, holds }) => {
    const thing: Obstruction = { id: 'thing', heaterId: null, transmittance: 0, solids }
    let crossings = 0
    fc.assert(
      fc.property(
        real(-2, 2),
        real(-2, 2),
        real(0, 0.45),
        real(-1, 1),
        real(-1, 1),
        real(0, 180),
        (px, py, pz, cx, cy, turn) => {
          const emitter = line(cosine(1, 1), { at: [cx, cy, 2.4], turnDeg: turn, length: 1.5 })
          const element = emitter.elements[0]!
          const stretches = clearStretches([thing], emitter, element, [px, py, pz])
          expect(stretches[0]!.from).toBeCloseTo(-0.75, 12)
          expect(stretches.at(-1)!.to).toBeCloseTo(0.75, 12)
          for (let s = -0.7; s <= 0.7; s += 0.1) {
            const nearEnd = stretches.some(({ from, to }) => Math.min(Math.abs(s - from), Math.abs(s - to)) < 2e-3)
            if (nearEnd) continue
            const { u } = emitter.frame
            const at: Vec3 = [cx + s * u[0], cy + s * u[1], 2.4 + s * u[2]]
            const { transmittance } = stretches.find(({ from, to }) => from <= s && s <= to)!
            const blocked = meets(holds, [px, py, pz], at)
            if (blocked) crossings++
            // A ray that only grazes a corner may fall between the steps of the test.
            if (blocked) expect(transmittance).toBe(0)
            else if (transmittance === 0) expect(thickness(thing, emitter, [px, py, pz], s)).toBeLessThan(2e-3)
          }
        },
      ),
      { numRuns: 60, seed: 8 },
    )
    expect(crossings).toBeGreaterThan(20)
  })

  /** Least shift of the place on the element after which the engine, too, says clear. */
  function thickness(thing: Obstruction, emitter: ReturnType<typeof line>, point: Vec3, s: number): number {
    const stretches = clearStretches([thing], emitter, emitter.elements[0]!, point)
    const clear = stretches.filter(({ transmittance }) => transmittance === 1)
    return Math.min(...clear.map(({ from, to }) => Math.min(Math.abs(s - from), Math.abs(s - to))), 10)
  }
})

describe('shaded irradiance', () => {
  const emitter = line(cosine(2, 1.4), { at: [0, 0, 2.4], length: 0.8 })
  const point: Vec3 = [0.2, 0.3, 0.6]
  const up: Vec3 = [0, 0, 1]
  const board: Shape = { kind: 'box', x: [0.05, 3], y: [-3, 3], z: [1.4, 1.45] }

  it('is that of the part of the element that is seen, left out by hand', () => {
    const shaded = irradianceAt(emitter, point, up, [obstruction(board)])
    const [stretch] = clearStretches([obstruction(board)], emitter, emitter.elements[0]!, point)
    const length = stretch!.to - stretch!.from
    const part = {
      centre: [(stretch!.from + stretch!.to) / 2, 0, 2.4] as const,
      length,
      radiantPower: (1000 * length) / 0.8,
    }
    expect(stretch!.transmittance).toBe(1)
    expect(shaded).toBeCloseTo(irradianceAt({ ...emitter, elements: [part] }, point, up), 9)
    expect(shaded).toBeLessThan(irradianceAt(emitter, point, up))
  })

  it('a cloth lets its share through; two cloths the product', () => {
    const whole = irradianceAt(emitter, point, up)
    const cloth = (z: number, transmittance: number) =>
      obstruction({ kind: 'box', x: [-3, 3], y: [-3, 3], z: [z, z + 0.01] }, transmittance)
    expect(irradianceAt(emitter, point, up, [cloth(1, 0.3)])).toBeCloseTo(0.3 * whole, 9)
    expect(irradianceAt(emitter, point, up, [cloth(1, 0.3), cloth(1.5, 0.5)])).toBeCloseTo(0.15 * whole, 9)
    expect(seenShare(emitter, point, [cloth(1, 0.3)])).toBeCloseTo(0.3, 12)
    expect(scalarIrradianceAt([emitter], point, [cloth(1, 0.3)])).toBeCloseTo(
      0.3 * scalarIrradianceAt([emitter], point),
      9,
    )
    expect(largestIrradianceAt([emitter], point, [cloth(1, 0.3)]).irradiance).toBeCloseTo(
      0.3 * largestIrradianceAt([emitter], point).irradiance,
      9,
    )
  })

  it('the pieces of one thing count once, its own body not at all', () => {
    const pieces = solidsOf({
      kind: 'prism',
      outline: [
        [-2, -2],
        [2, -2],
        [2, 2],
        [-2, 2],
      ],
      z: [1, 1.1],
    })
    const thing: Obstruction = { id: 'thing', heaterId: null, transmittance: 0.4, solids: pieces }
    expect(pieces.length).toBe(2)
    expect(irradianceAt(emitter, point, up, [thing])).toBeCloseTo(0.4 * irradianceAt(emitter, point, up), 9)
    expect(irradianceAt(emitter, point, up, [{ ...thing, heaterId: emitter.id }])).toBe(
      irradianceAt(emitter, point, up),
    )
  })
})

describe('shade on a map', () => {
  const floor: Vec2[] = [
    [0, 0],
    [6, 0],
    [6, 4],
    [0, 4],
  ]
  const heaters = [
    { ...line(cosine(2, 1.4), { at: [1.5, 2, 2.4], length: 0.6, tiltDeg: 10 }), id: 'a' },
    { ...line(cosine(1.7, 1.2), { at: [4.2, 2.2, 2.3], length: 0.8, turnDeg: 62, tiltDeg: -25 }), id: 'b' },
  ]
  const things: Obstruction[] = [
    obstruction({ kind: 'box', x: [2.4, 2.6], y: [1, 1.2], z: [0, 2.2] }),
    obstruction({ kind: 'cylinder', centre: [3.5, 2.8], radius: 0.08, z: [0, 2.6] }),
    { ...obstruction({ kind: 'cylinder', centre: [4.8, 1.2], radius: 0.9, z: [1.7, 2] }, 0.3), id: 'umbrella' },
    {
      ...obstruction(
        {
          kind: 'prism',
          outline: [
            [0.5, 0.5],
            [1.4, 0.6],
            [0.9, 1.5],
          ],
          z: [0, 1],
        },
        0.5,
      ),
      id: 'prism',
    },
    {
      id: 'body',
      heaterId: 'b',
      transmittance: 0,
      solids: [boxSolid({ ...heaterFrame(62, -25), centre: [4.2, 2.2, 2.4], half: { u: 0.5, v: 0.1, w: 0.08 } })],
    },
    { id: 'table', heaterId: null, transmittance: 0, solids: [slabSolid([1.6, 2.2], [0.8, 0.8], 20, 0.7, 0.74)] },
  ]

  it('is that of the closed form, in half-shadows to half a sixth of the element', () => {
    const grid = gridOf(floor, 0.6, 0.05)
    const { total } = irradianceMap(null, grid, heaters, things)
    const open = irradianceMap(null, grid, heaters).total
    let [same, near, changed] = [0, 0, 0]
    total.forEach((value, at) => {
      const point: Vec3 = [((at % grid.columns) + 0.5) * 0.05, (Math.floor(at / grid.columns) + 0.5) * 0.05, 0.6]
      const exact = heaters.reduce((sum, each) => sum + irradianceAt(each, point, [0, 0, 1], things), 0)
      if (exact < open[at]! * 0.999) changed++
      if (Math.abs(value - exact) < 0.02 * open[at]! + 0.05) same++
      if (Math.abs(value - exact) < open[at]! / 12 + 0.05) near++
      expect(value).toBeGreaterThanOrEqual(-1e-9)
      expect(value).toBeLessThanOrEqual(open[at]! + 1e-3)
    })
    expect(changed / total.length).toBeGreaterThan(0.1)
    expect(same / total.length).toBeGreaterThan(0.9)
    // The rest: cells that the edge of a thing close to the plane cuts through.
    expect(near / total.length).toBeGreaterThan(0.985)
    const mean = total.reduce((sum, value) => sum + value, 0) / total.length
    const exactMean =
      Array.from(total, (_, at) => {
        const point: Vec3 = [((at % grid.columns) + 0.5) * 0.05, (Math.floor(at / grid.columns) + 0.5) * 0.05, 0.6]
        return heaters.reduce((sum, each) => sum + irradianceAt(each, point, [0, 0, 1], things), 0)
      }).reduce((sum, value) => sum + value, 0) / total.length
    expect(Math.abs(mean / exactMean - 1)).toBeLessThan(0.005)
  })

  it('of what comes from all sides, too: a body whose area is the same from everywhere takes the scalar irradiance', () => {
    const grid = gridOf(floor, 0.6, 0.1)
    const evenly = new Float64Array(513).fill(1)
    const fieldOf = (obstructions: readonly Obstruction[]) => {
      const values = new Float64Array(grid.columns * grid.rows)
      for (const heater of heaters) {
        const spans = seenOf(grid, heater, obstructions)
        heater.elements.forEach((element, i) => addDirected(values, grid, heater, element, evenly, spans[i]!))
      }
      return values
    }
    const [shaded, open] = [fieldOf(things), fieldOf([])]
    let [same, near, changed] = [0, 0, 0]
    shaded.forEach((value, at) => {
      const point: Vec3 = [((at % grid.columns) + 0.5) * 0.1, (Math.floor(at / grid.columns) + 0.5) * 0.1, 0.6]
      const exact = scalarIrradianceAt(heaters, point, things)
      expect(Math.abs(open[at]! / scalarIrradianceAt(heaters, point) - 1)).toBeLessThan(0.002)
      if (exact < open[at]! * 0.99) changed++
      if (Math.abs(value - exact) < 0.02 * open[at]! + 0.05) same++
      if (Math.abs(value - exact) < open[at]! / 12 + 0.05) near++
    })
    expect(changed / shaded.length).toBeGreaterThan(0.1)
    expect(same / shaded.length).toBeGreaterThan(0.9)
    expect(near / shaded.length).toBeGreaterThan(0.98)
  })

  it('so even on wide cells, behind a thing close under the element', () => {
    const heater = { ...line(cosine(1, 1), { at: [2, 2, 2.4], length: 1.2 }), id: 'a' }
    const board: Shape = { kind: 'box', x: [2, 9], y: [-9, 9], z: [1.95, 2] }
    const grid = gridOf(floor, 0.6, 0.3)
    const { total } = irradianceMap(null, grid, [heater], [obstruction(board)])
    const open = irradianceMap(null, grid, [heater]).total
    let halved = 0
    total.forEach((value, at) => {
      const x = grid.x0 + ((at % grid.columns) + 0.5) * grid.cell
      const y = grid.y0 + (Math.floor(at / grid.columns) + 0.5) * grid.cell
      const exact = irradianceAt(heater, [x, y, 0.6], [0, 0, 1], [obstruction(board)])
      if (exact > 0.1 * open[at]! && exact < 0.9 * open[at]!) halved++
      expect(Math.abs(value - exact)).toBeLessThan(open[at]! / 9 + 0.05)
    })
    expect(halved).toBeGreaterThan(20)
  })

  const flatTable = {
    kind: 'table',
    across: [-1.5, 0, 1.5],
    along: [-1.5, 0, 1.5],
    intensity: [
      [0.2, 0.3, 0.2],
      [0.6, 1, 0.6],
      [0.2, 0.3, 0.2],
    ],
  } as const
  it.each([
    ['turned 0°', cosine(1.7, 1.2), { turnDeg: 0, tiltDeg: 20 }],
    ['turned 90°', cosine(1.7, 1.2), { turnDeg: 90, tiltDeg: 20 }],
    ['turned 180°', cosine(1.7, 1.2), { turnDeg: 180, tiltDeg: 20 }],
    ['turned 270°', cosine(1.7, 1.2), { turnDeg: 270, tiltDeg: 20 }],
    ['turned 33°', cosine(1.7, 1.2), { turnDeg: 33, tiltDeg: 20 }],
    ['of a tabulated beam', flatTable, { turnDeg: 33 }],
  ] as const)('an element half hidden lengthwise, %s', (_, beam, how) => {
    const heater = { ...line(beam, { at: [2, 2, 2.4], length: 1.2, ...how }), id: 'a' }
    expectHalfShadows(heater, 0)
    expectHalfShadows(heater, 0.4)
  })

  it('an element half hidden lengthwise, out of level', () => {
    const { frame, ...level } = line(cosine(1.7, 1.2), { at: [2, 2, 2.4], length: 1.2 })
    const u = normalise([1, 0.3, 0.15])
    const v = normalise(cross([0, 0, -1], u))
    expectHalfShadows({ ...level, id: 'a', frame: { ...frame, u, v, w: cross(u, v) } }, 0.4)
  })

  /**
   * Under a board that ends below the element's middle and across it, cells agree with the closed form to half a piece
   * of six, and many of them see only a part of the element.
   */
  function expectHalfShadows(heater: Emitter, transmittance: number): void {
    const [ux, uy] = heater.frame.u
    const turnDeg = (Math.atan2(uy, ux) * 180) / Math.PI
    const solids = [slabSolid([2 - 4.5 * ux, 2 - 4.5 * uy], [9, 18], turnDeg, 1.95, 2)]
    const board = { id: 'board', heaterId: null, transmittance, solids }
    const grid = gridOf(floor, 0.6, 0.1)
    const { total } = irradianceMap(null, grid, [heater], [board])
    const open = irradianceMap(null, grid, [heater]).total
    let halved = 0
    total.forEach((value, at) => {
      const x = grid.x0 + ((at % grid.columns) + 0.5) * grid.cell
      const y = grid.y0 + (Math.floor(at / grid.columns) + 0.5) * grid.cell
      const exact = irradianceAt(heater, [x, y, 0.6], [0, 0, 1], [board])
      if (exact > (transmittance + 0.1) * open[at]! && exact < 0.9 * open[at]!) halved++
      expect(Math.abs(value - exact)).toBeLessThan(open[at]! / 6 + 0.05)
    })
    expect(halved).toBeGreaterThan(20)
  }

  /** A heater of so many like elements side by side at (2.5, 2), `apart` from one another and each `higher` by so much. */
  function sideBySide(count: number, apart: number, { length = 0.62, higher = 0 } = {}): Emitter {
    const one = line(cosine(1.7, 1.2), { at: [2.5, 2, 2.4], length, power: 3000 })
    const elements = Array.from({ length: count }, (_, i) => {
      const off = i - (count - 1) / 2
      return { length, radiantPower: 3000 / count, centre: [2.5, 2 + off * apart, 2.4 + off * higher] as Vec3 }
    })
    return { ...one, id: 'a', elements }
  }

  /** Of the cells over 20 W/m²: how many are shaded, and how many differ by more than a twelfth and 1 % of the open value. */
  function compareShade(heater: Emitter, thing: Obstruction) {
    const grid = gridOf(floor, 0.6, 0.05)
    const { total } = irradianceMap(null, grid, [heater], [thing])
    const open = irradianceMap(null, grid, [heater]).total
    const sums = { cells: 0, shaded: 0, off: 0, worst: 0 }
    /** What is taken away, and where its centre is, m. */
    const taken = { map: [0, 0, 0], exact: [0, 0, 0] }
    total.forEach((value, at) => {
      if (open[at]! < 20) return
      const [column, row] = [at % grid.columns, Math.floor(at / grid.columns)]
      const point: Vec3 = [(column + 0.5) * 0.05, (row + 0.5) * 0.05, 0.6]
      const exact = irradianceAt(heater, point, [0, 0, 1], [thing])
      const error = Math.abs(value - exact) / open[at]!
      sums.cells++
      if (exact < 0.95 * open[at]!) sums.shaded++
      if (error > 1 / 12 + 0.01) sums.off++
      sums.worst = Math.max(sums.worst, error)
      for (const [into, left] of [
        [taken.map, open[at]! - value],
        [taken.exact, open[at]! - exact],
      ] as const) {
        into[0]! += left
        into[1]! += left * point[0]
        into[2]! += left * point[1]
      }
    })
    const centreOf = ([sum, x, y]: number[]) => [x! / sum!, y! / sum!] as const
    return { ...sums, map: centreOf(taken.map), exact: centreOf(taken.exact) }
  }

  const whole = (solid: Obstruction['solids'][number], transmittance = 0): Obstruction => ({
    id: 'thing',
    heaterId: null,
    transmittance,
    solids: [solid],
  })
  const boardSolid = slabSolid([-2, 2], [9, 18], 0, 1.95, 2)

  it.each([
    [1, 0.06],
    [2, 0.06],
    [3, 0.06],
    [4, 0.06],
    [2, 0.3],
    [3, 0.2],
  ])('of %d elements %f m apart, to half a sixth of them all', (count, apart) => {
    const heater = sideBySide(count, apart)
    for (const [thing, offMost, worstMost] of [
      [whole(boardSolid), 0.02, 0.11],
      [whole(cylinderSolid([3.8, 2.4], 1.2, 1.9, 2.1), 0.2), 0.03, 0.2],
      // Narrower than a piece: both its edges fall somewhere within one.
      [whole(cylinderSolid([3, 2.2], 0.2, 1.5, 1.8)), 0.03, 0.3],
      [whole(cylinderSolid([3.2, 2.2], 0.05, 0, 2.6)), 0.03, 0.2],
    ] as const) {
      const { cells, shaded, off, worst } = compareShade(heater, thing)
      expect(shaded / cells).toBeGreaterThan(0.05)
      expect(off / cells).toBeLessThan(offMost)
      expect(worst).toBeLessThan(worstMost)
    }
  })

  const apart = { length: 0.1 }
  const beside = [[3.2, 2.5], [1, 0.6], 25] as const
  it.each([
    [
      'still lengthwise, moving from element to element',
      sideBySide(2, 0.5, apart),
      slabSolid(...beside, 1.2, 1.25),
      [0.03, 0.01],
    ],
    [
      'still: from the middle of the elements',
      sideBySide(2, 0.5, apart),
      slabSolid(...beside, 0.7, 0.74),
      [0.03, 0.01],
    ],
    // Close to the element a piece's shadow moves by metres: the bounds are as wide.
    ['close under the elements', sideBySide(2, 0.06), slabSolid([2.5, 2], [0.3, 0.3], 25, 2.28, 2.33), [0.25, 0.06]],
    [
      'of a thing between two elements’ heights',
      sideBySide(2, 0.2, { higher: 0.14 }),
      slabSolid(...beside, 2.3, 2.39),
      [0.03, 0.08],
    ],
  ] as const)('a shadow lies where it has to: %s', (_, heater, solid, [offMost, centreMost]) => {
    const { cells, shaded, off, map, exact } = compareShade(heater, whole(solid))
    expect(shaded / cells).toBeGreaterThan(0.03)
    expect(off / cells).toBeLessThan(offMost)
    expect(Math.hypot(map[0] - exact[0], map[1] - exact[1])).toBeLessThan(centreMost)
  })

  it('the pieces of one thing count once, its own body not at all', () => {
    const grid = gridOf(floor, 0.6, 0.1)
    const heater = sideBySide(2, 0.06)
    const outline: Vec2[] = [
      [1, 0.5],
      [4, 0.5],
      [4, 3.5],
      [1, 3.5],
    ]
    const cloth = obstruction({ kind: 'prism', outline: outline as [number, number][], z: [2, 2.1] }, 0.4)
    expect(cloth.solids.length).toBe(2)
    const totalOf = (things: Obstruction[]) => irradianceMap(null, grid, [heater], things).total
    const [open, under] = [totalOf([]), totalOf([cloth])]
    let covered = 0
    under.forEach((value, at) => {
      expect(value).toBeGreaterThan(0.4 * open[at]! - 0.01)
      if (value < 0.41 * open[at]!) covered++
    })
    expect(covered / under.length).toBeGreaterThan(0.5)
    const body = whole(slabSolid([2.5, 2], [0.7, 0.3], 0, 2.3, 2.38))
    expect(totalOf([{ ...body, heaterId: 'a' }])).toEqual(open)
    expect(Math.max(...totalOf([{ ...body, heaterId: 'b' }]))).toBeLessThan(0.8 * Math.max(...open))
  })

  it('a thing that ends in the plane throws none', () => {
    const grid = gridOf(floor, 0.41, 0.1)
    const heater = sideBySide(1, 0)
    // 0.37 m + 0.04 m is a little more than 0.41 m in binary figures.
    const table = whole(slabSolid([2.5, 2], [1, 1], 0, 0.37, 0.37 + 0.04))
    expect(table.solids[0]!.high[2]).toBeGreaterThan(0.41)
    expect(irradianceMap(null, grid, [heater], [table]).total).toEqual(irradianceMap(null, grid, [heater]).total)
  })

  it('on a large site, too, where heaters are reckoned only so far', () => {
    const far: Vec2[] = [
      [-50, -30],
      [50, -30],
      [50, 30],
      [-50, 30],
    ]
    const many = Array.from({ length: 12 }, (_, i) => ({
      ...line(cosine(1.7, 1.2), { at: [-44 + 8 * i, (i % 3) - 1, 2.4], turnDeg: 29 * i, length: 1.2, power: 2000 }),
      id: `h${i}`,
    }))
    const posts = many.flatMap(({ id, elements: [element] }) => {
      const [x, y] = element!.centre
      return [2, 4, 6].map((off) => ({
        ...obstruction({ kind: 'cylinder', centre: [x + off / 3, y + off], radius: 0.3, z: [0, 2.2] }),
        id: `${id} ${off}`,
      }))
    })
    const grid = gridOf(far, 0.6, 0.1)
    const { total, errorBound } = irradianceMap(null, grid, many, posts)
    const open = irradianceMap(null, grid, many).total
    expect(errorBound).toBeGreaterThan(0)
    let [right, shaded] = [0, 0]
    for (let at = 0; at < total.length; at += 31) {
      const x = grid.x0 + ((at % grid.columns) + 0.5) * grid.cell
      const y = grid.y0 + (Math.floor(at / grid.columns) + 0.5) * grid.cell
      expect(total[at]).toBeLessThanOrEqual(open[at]! + 1e-3)
      if (open[at]! - total[at]! < 2) continue
      shaded++
      const exact = many.reduce((sum, each) => sum + irradianceAt(each, [x, y, 0.6], [0, 0, 1], posts), 0)
      if (Math.abs(total[at]! - exact) < errorBound + open[at]! / 12) right++
    }
    expect(shaded).toBeGreaterThan(60)
    expect(right / shaded).toBeGreaterThan(0.98)
  })

  it('a shadow for tabulated beams, the same share everywhere', () => {
    const flat = {
      kind: 'table',
      across: [-1.5, 1.5],
      along: [-1.5, 1.5],
      intensity: [
        [1, 1],
        [1, 1],
      ],
    } as const
    const heater = { ...line(flat, { at: [1.5, 2, 2.4], length: 0.6 }), id: 'a' }
    const roof = obstruction({ kind: 'box', x: [-9, 9], y: [-9, 9], z: [1.5, 1.6] }, 0.25)
    const grid = gridOf(floor, 0.6, 0.2)
    const [open, shaded] = [
      irradianceMap(null, grid, [heater]).total,
      irradianceMap(null, grid, [heater], [roof]).total,
    ]
    shaded.forEach((value, at) => expect(value).toBeCloseTo(0.25 * open[at]!, 2))
  })

  it('is computed again when a thing moves', () => {
    const grid = gridOf(floor, 0.6, 0.1)
    const first = irradianceMap(null, grid, heaters, things)
    expect(irradianceMap(first, grid, heaters, structuredClone(things)).computed).toBe(0)
    expect(irradianceMap(first, grid, heaters, things.slice(1)).computed).toBe(2)
  })
})

describe('what shades on a site', () => {
  const { site, variants } = demoSites().find(({ key }) => key === 'B')!
  const models = new Map(demoModels().map((model) => [model.code, model]))

  it('is every obstacle, table, pole and heater body; movable things only when in place', () => {
    const { layout } = variants[0]!
    const all = obstructionsOf(site, layout, models)
    expect(all).toHaveLength(site.obstacles.length + site.tables.length + site.poles.length + layout.heaters.length)
    const fixed = obstructionsOf(site, layout, models, { movable: 'away' })
    expect(all.length - fixed.length).toBe(site.obstacles.filter(({ movable }) => movable).length)
    expect(all.length).toBeGreaterThan(fixed.length)
  })
})
