import { describe, expect, it } from 'vitest'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import { checkLayout, isStopped } from '#app/domain/rules/check-layout.ts'
import type { Finding } from '#app/domain/rules/finding.ts'
import type { Brief } from '#app/domain/brief/brief.ts'
import { plainHanging } from '#app/domain/layout/plain-hanging.ts'
import type { MountedHeater } from '#app/domain/layout/layout.ts'
import type { Obstacle, Site } from '#app/domain/site/site.ts'
import { plainBrief, plainHeater, plainModel, plainSite, plainHouse } from '#tests/support/plain-site.ts'

const epsilon = 1e-4

interface Case {
  readonly site?: Partial<Site>
  readonly heater?: Partial<MountedHeater>
  readonly model?: Partial<HeaterModel>
  readonly brief?: Partial<Brief>
}

function found(rule: string, { site, heater, model, brief }: Case = {}, house = plainHouse()): Finding[] {
  const made = plainModel(model)
  const layout = { heaters: [plainHeater(heater)] }
  const models = new Map([[made.code, made]])
  const rests = { site: plainSite(site), brief: plainBrief(brief), layout, models, warmth: [] }
  const findings = checkLayout({ ...rests, house })
  return findings.filter((finding) => finding.rule === rule && finding.subject.kind === 'heater')
}

const outcome = (rule: string, given: Case = {}) => found(rule, given)[0]?.outcome
const height = (lowestPoint: number): Case => ({ heater: { lowestPoint } })

/** A thing of the site that is where it is said to be, to the millimetre: one dimension of no tolerance per size. */
function exactly(obstacle: Obstacle): Partial<Site> {
  const { shape } = obstacle
  const coordinates = shape.kind === 'box' ? ['x.0', 'x.1', 'y.0', 'y.1', 'z.0', 'z.1'] : ['centre.0', 'centre.1', 'radius', 'z.0', 'z.1'] // prettier-ignore
  return {
    obstacles: [obstacle],
    dimensions: coordinates.map((path) => sure('obstacle', obstacle.id, `shape.${path}`)),
  }
}

const sure = (of: 'obstacle' | 'cover' | 'member', id: string, coordinate: string, tolerance = 0) => ({
  id: `${id} ${coordinate}`,
  label: coordinate,
  value: 1,
  tolerance,
  source: 'laser' as const,
  note: null,
  moves: [{ of, id, coordinate, by: 1 }],
})

const box = (
  x: [number, number],
  y: [number, number],
  z: [number, number],
  more: Partial<Obstacle> = {},
): Obstacle => ({
  id: 'thing',
  name: 'thing',
  kind: 'other',
  material: 'combustible',
  movable: false,
  shape: { kind: 'box', x, y, z },
  transmittance: 0,
  note: null,
  ...more,
})

// The plain heater: body 0.560 × 0.165 × 0.105 m, back at lowest + 0.105, manual in metres: least height 1.9, at most
// 2.7 recommended; combustible above 0.35, side 0.3, end 0.4, front 1.1, below 1.9; non-combustible above 0.15.

describe('mounting-height', () => {
  it.each([
    [1.9 - epsilon, 'fails'],
    [1.9, 'pass'],
    [1.9 + epsilon, 'pass'],
  ])('at %s m, least 1.9 m: %s', (lowest, expected) => {
    const least = found('mounting-height', height(lowest)).find(({ limit }) => limit === 1.9)
    expect([least?.outcome, least?.weight]).toEqual([expected, 'hard stop'])
  })

  it.each([
    [2.7 - epsilon, 'pass'],
    [2.7, 'pass'],
    [2.7 + epsilon, 'fails'],
  ])('at %s m, recommended at most 2.7 m: %s, soft', (lowest, expected) => {
    const most = found('mounting-height', height(lowest)).find(({ limit }) => limit === 2.7)
    expect([most?.outcome, most?.weight]).toEqual([expected, 'soft'])
  })

  it('cannot be told without the manual’s height', () => {
    expect(outcome('mounting-height', { model: { mountingHeight: { min: null, recommendedMax: null } } })).toBe(
      'cannot tell',
    )
  })
})

describe('tilt-range', () => {
  const tilt = (tiltDeg: number): Case => ({ heater: { tiltDeg, mount: 'drop rods' } })
  it.each([
    [45 - epsilon, 'pass'],
    [45, 'pass'],
    [-45, 'pass'],
    [45 + epsilon, 'fails'],
    [-45 - epsilon, 'fails'],
  ])('at %s°, up to 45° to either side: %s', (tiltDeg, expected) => {
    expect(outcome('tilt-range', tilt(tiltDeg))).toBe(expected)
  })

  it('has a least tilt too', () => {
    const model = { tiltDeg: { min: 20, max: 45 } }
    expect(outcome('tilt-range', { ...tilt(20 - epsilon), model })).toBe('fails')
    expect(outcome('tilt-range', { ...tilt(-20), model })).toBe('pass')
    expect(outcome('tilt-range', { ...tilt(20 + epsilon), model })).toBe('pass')
  })

  it('cannot be told without the manual’s range', () => {
    expect(outcome('tilt-range', { model: { tiltDeg: null } })).toBe('cannot tell')
  })
})

describe('level-axis', () => {
  // A beam that drops to one end so that the shorter hanger lacks 25 mm of its fittings after take-up, as worked out in
  // the hanging tests: eyes 0.448 m apart, left 0.025 m, so 3.194° off level.
  const off = (Math.atan(0.025 / 0.448) * 180) / Math.PI
  const low = 2.3 + 0.105 + 0.03
  const slope = 0.25
  const beam = { ...plainSite().members[0]!, underside: { from: low - 2.776 * slope, to: low + 3.224 * slope } }
  const within = (elementAxisLevelWithinDeg: number | null): Case => ({ site: { members: [beam] }, model: { elementAxisLevelWithinDeg } }) // prettier-ignore
  it.each([
    [off - epsilon, 'fails'],
    [off + 1e-12, 'pass'],
    [off + epsilon, 'pass'],
  ])('within %s°: %s', (limit, expected) => {
    expect(outcome('level-axis', within(limit))).toBe(expected)
  })

  it('names the short bracket as the way out', () => {
    expect(found('level-axis', within(1))[0]?.remedy).toContain('short bracket')
  })

  it('cannot be told without the manual’s angle', () => {
    expect(outcome('level-axis', within(null))).toBe('cannot tell')
  })
})

describe('mount-offered', () => {
  it('is what the manual lists', () => {
    expect(outcome('mount-offered')).toBe('pass')
    expect(outcome('mount-offered', { heater: { mount: 'recess box' } })).toBe('fails')
    expect(outcome('mount-offered', { model: { mounts: [] } })).toBe('cannot tell')
  })
})

describe('voltage-offered', () => {
  const supply = (supplyVoltage: number): Case => ({ heater: { supplyVoltage, ratedVoltage: 230 } })
  it.each([
    [253 - epsilon, 'pass', 'hard stop'],
    [253, 'pass', 'hard stop'],
    [253 + epsilon, 'fails', 'hard stop'],
    [230, 'pass', 'hard stop'],
    [230 - epsilon, 'fails', 'soft'],
  ])('the 230 V option on %s V: %s, %s', (voltage, expected, weight) => {
    const [finding] = found('voltage-offered', supply(voltage))
    expect([finding?.outcome, finding?.weight]).toEqual([expected, weight])
  })

  it('states the power that is left below the rated voltage: 2000 · (208/230)^1.54', () => {
    const [finding] = found('voltage-offered', supply(208))
    expect(finding?.remedy).toContain(`${Math.round(2000 * (208 / 230) ** 1.54)} W instead of 2000 W`)
  })

  it('fails for an option that is not listed, and for three phases on one', () => {
    expect(outcome('voltage-offered', { heater: { ratedVoltage: 277 } })).toBe('fails')
    const threePhase = { supplyOptions: [{ voltage: 230, phases: 3 as const, ratedPower: 2000, ratedCurrent: 5 }] }
    expect(outcome('voltage-offered', { model: threePhase })).toBe('fails')
  })

  it('cannot be told without options', () => {
    expect(outcome('voltage-offered', { model: { supplyOptions: [] } })).toBe('cannot tell')
  })
})

describe('ingress-protection', () => {
  const under = (ingressProtection: string | null, locationNote: string | null, site: Partial<Site>): Case => ({ model: { ingressProtection, locationNote }, site }) // prettier-ignore
  const closed = {}
  const opening = { covers: [{ ...plainSite().covers[0]!, opening: true }] }
  const sky = { covers: [] }
  it.each([
    ['IP43', 'under cover only', closed, 'fails'],
    ['IP44', 'under cover only', closed, 'pass'],
    ['IP45', 'under cover only', closed, 'pass'],
    ['IP64', 'open to rain', opening, 'fails'],
    ['IP65', 'open to rain', opening, 'pass'],
    ['IP66', 'open to rain', opening, 'pass'],
    ['IP65', 'under cover only', opening, 'fails'],
    ['IP65', 'open to rain', sky, 'pass'],
    ['IP44', 'under cover only', sky, 'fails'],
    ['IP65', null, sky, 'cannot tell'],
    [null, 'open to rain', sky, 'cannot tell'],
    [null, 'under cover only', closed, 'cannot tell'],
    ['IPX4', 'under cover only', closed, 'pass'],
    ['IP5X', 'under cover only', closed, 'cannot tell'],
    ['IP54 (face), IP20 (void)', 'flush under a dry covered soffit only', closed, 'pass'],
  ])('%s, %s: %#', (ip, note, site, expected) => {
    expect(outcome('ingress-protection', under(ip, note, site))).toBe(expected)
  })

  it('counts a heater that looks out from under the cover as in the rain', () => {
    const model = { ingressProtection: 'IP44', locationNote: 'under cover only' }
    expect(outcome('ingress-protection', { model, heater: { x: 0.28 } })).toBe('pass')
    expect(outcome('ingress-protection', { model, heater: { x: 0.27 } })).toBe('fails')
  })

  it('puts a recess box under closed covers only', () => {
    const heater = { mount: 'recess box' as const }
    expect(outcome('ingress-protection', { heater, site: opening })).toBe('fails')
    expect(outcome('ingress-protection', { heater, site: closed })).toBe('pass')
  })
})

describe('supported', () => {
  it.each([
    [0.25 - epsilon, 'pass'],
    [0.25, 'pass'],
    [0.25 + epsilon, 'fails'],
  ])('drop rods %s m off their beam, reach 0.25 m: %s', (aside, expected) => {
    expect(outcome('supported', { heater: { y: 2 + aside, mount: 'drop rods' } })).toBe(expected)
  })

  it('says how far the nearest member is, and cannot be told without a reach', () => {
    const [finding] = found('supported', { heater: { y: 3.32 } })
    expect(finding?.value).toBeCloseTo(1.32, 9)
    expect(finding?.remedy).toContain('beam')
    expect(outcome('supported', { heater: { mount: 'drop rods' }, model: { mountReach: {} } })).toBe('cannot tell')
    expect(outcome('supported', { model: { suspensionEyePitch: null } })).toBe('cannot tell')
  })
})

describe('support-load', () => {
  // 3.1 kg on two eyes: 3.1 · 9.80665 / 2 = 15.2003 N.
  const allowing = (allowedPointLoad: number | null): Case => ({ site: { members: [{ ...plainSite().members[0]!, allowedPointLoad }] } }) // prettier-ignore
  const load = (3.1 * 9.80665) / 2
  it.each([
    [load - epsilon, 'fails'],
    [load, 'pass'],
    [load + epsilon, 'pass'],
    [null, 'cannot tell'],
  ])('allowed %s N: %s', (allowed, expected) => {
    expect(outcome('support-load', allowing(allowed))).toBe(expected)
  })

  it('keeps a layout from being submitted while it is not known', () => {
    expect(isStopped(found('support-load', allowing(null))[0]!)).toBe(true)
  })
})

describe('clearance-above to a cover', () => {
  const burning = (tolerance: number): Partial<Site> => ({
    covers: [{ ...plainSite().covers[0]!, material: 'combustible' as const }],
    dimensions: [0, 1, 2, 3].map((i) => sure('cover', 'roof', `corners.${i}.2`, 0)).slice(0, 0).concat([
      { ...sure('cover', 'roof', 'corners.0.2', tolerance), moves: [0, 1, 2, 3].map((i) => ({ of: 'cover' as const, id: 'roof', coordinate: `corners.${i}.2`, by: 1 })) },
    ]), // prettier-ignore
  })
  // 3.000 − 0.105 − 0.350 = 2.545 m is the highest that passes.
  it.each([
    [2.545 - epsilon, 0, 'pass'],
    [2.545, 0, 'pass'],
    [2.545 + epsilon, 0, 'fails'],
    [2.535 - epsilon, 0.01, 'pass'],
    [2.535, 0.01, 'pass'],
    [2.535 + epsilon, 0.01, 'measure first'],
    [2.545, 0.01, 'measure first'],
    [2.545 + epsilon, 0.01, 'fails'],
  ])('at %s m under timber known to ± %s m: %s', (lowestPoint, tolerance, expected) => {
    const [finding] = found('clearance-above', { site: burning(tolerance), heater: { lowestPoint } })
    expect([finding?.outcome, finding?.weight]).toEqual([expected, 'hard stop'])
  })

  it('takes an unknown material for combustible', () => {
    const unknown = { covers: [{ ...plainSite().covers[0]!, material: 'unknown' as const }] }
    expect(found('clearance-above', { site: unknown })[0]?.limit).toBe(0.35)
    expect(found('clearance-above')[0]?.limit).toBe(0.15)
  })

  it('cannot be told without clearances, or where the heights make no plane', () => {
    expect(outcome('clearance-above', { model: { clearanceToNoncombustible: null } })).toBe('cannot tell')
    expect(outcome('clearance-above', { model: { clearanceToCombustible: null }, site: burning(0) })).toBe(
      'cannot tell',
    )
    const line = { covers: [{ ...plainSite().covers[0]!, corners: [[0, 0, 3], [6, 4, 3], [3, 2, 3]] as [number, number, number][] }] } // prettier-ignore
    expect(outcome('clearance-above', { site: line })).toBe('cannot tell')
  })

  it('judges moving blades in both states', () => {
    const swinging = { covers: [{ ...plainSite().covers[0]!, swing: 0.1 }] }
    const findings = found('clearance-above', { site: swinging, heater: { lowestPoint: 3 - 0.105 - 0.2 } })
    expect(findings.map(({ outcome: is, weight, condition }) => [is, weight, condition])).toEqual([
      ['fails', 'soft', 'roof: swung below the underside'],
      ['pass', 'soft', null],
    ])
  })
})

describe('clearances to a thing', () => {
  const back = 2.3 + 0.105
  it.each([
    ['clearance-above', (d: number) => box([2, 4], [1, 3], [back + d, back + d + 0.1]), 0.35],
    ['clearance-side-end', (d: number) => box([2, 4], [2.0825 + d, 4], [2.3, 2.5]), 0.3],
    ['clearance-side-end', (d: number) => box([3.28 + d, 5], [1, 3], [2.3, 2.5]), 0.4],
    ['clearance-front-of-beam', (d: number) => box([2.9, 3.1], [1.9, 2.1], [0, 2.3 - d]), 1.1],
    ['clearance-below', (d: number) => box([2.9, 3.1], [1.9, 2.1], [0, 2.3 - d]), 1.9],
  ] as const)('%s at the limit', (rule, at, limit) => {
    const judged = (d: number) => {
      const findings = found(rule, { site: exactly(at(d)) })
      return (
        findings.find(({ title }) => title.includes('thing'))?.outcome ??
        findings.find(({ outcome: is }) => is === 'pass')?.outcome
      )
    }
    expect(judged(limit - epsilon)).toBe('fails')
    expect(judged(limit)).toBe('pass')
    expect(judged(limit + epsilon)).toBe('pass')
  })

  it.each(['clearance-side-end', 'clearance-front-of-beam', 'clearance-below'])(
    '%s cannot be told without the manual’s clearances',
    (rule) => {
      const near = exactly(box([3.5, 4], [1, 3], [2.3, 2.5]))
      expect(outcome(rule, { site: near, model: { clearanceToCombustible: null } })).toBe('cannot tell')
    },
  )

  it('wants measuring when a thing of no dimension is within 25 mm of its limit', () => {
    const near = { obstacles: [box([3.28 + 0.4 + 0.02, 5], [1, 3], [2.3, 2.5])] }
    const [finding] = found('clearance-side-end', { site: near })
    expect([finding?.outcome, finding?.tolerance]).toEqual(['measure first', 0.025])
    const farther = { obstacles: [box([3.28 + 0.4 + 0.026, 5], [1, 3], [2.3, 2.5])] }
    expect(outcome('clearance-side-end', { site: farther })).toBe('pass')
  })

  it('makes a condition of use of a movable thing', () => {
    const door = box([3.4, 5], [1, 3], [2.3, 2.5], { movable: true, kind: 'door', name: 'door leaf' })
    const findings = found('clearance-side-end', { site: exactly(door) })
    expect(findings.map(({ outcome: is, weight, condition }) => [is, weight, condition])).toEqual([
      ['fails', 'soft', 'door leaf: open'],
      ['pass', 'hard stop', null],
    ])
  })

  it('judges furniture and tables by the front of the beam alone', () => {
    const stool = exactly(box([2.9, 3.1], [1.9, 2.1], [0, 1.3], { kind: 'furniture' }))
    expect(outcome('clearance-front-of-beam', { site: stool })).toBe('fails')
    expect(found('clearance-below', { site: stool }).every(({ outcome: is }) => is === 'pass')).toBe(true)
    const table = {
      id: 'T',
      centre: [3, 2] as [number, number],
      size: [1, 1] as [number, number],
      turnDeg: 0,
      height: 1.3,
    }
    const site = { tables: [{ ...table, material: 'unknown' as const }] }
    expect(outcome('clearance-front-of-beam', { site })).toBe('fails')
    expect(outcome('clearance-front-of-beam', { site: { tables: [{ ...table, material: 'non-combustible' }] } })).toBe(
      'pass',
    )
  })

  it('leaves out what holds the heater, and a member behind its cover', () => {
    expect(
      found('clearance-above', { heater: { lowestPoint: 2.7 } }).every(({ title }) => !title.includes('beam')),
    ).toBe(true)
    const timber = { ...plainSite().members[0]!, id: 'rafter', name: 'rafter', from: [0, 2.1] as [number, number], to: [6, 2.1] as [number, number], material: 'combustible' as const } // prettier-ignore
    const under = (material: 'combustible' | 'non-combustible') => ({ covers: [{ ...plainSite().covers[0]!, material }], members: [...plainSite().members, timber] }) // prettier-ignore
    const near = (material: 'combustible' | 'non-combustible') => found('clearance-above', { site: under(material), heater: { lowestPoint: 2.7 } }).filter(({ title }) => title.includes('rafter')) // prettier-ignore
    expect(near('combustible')).toEqual([])
    expect(near('non-combustible')[0]?.outcome).toBe('fails')
  })

  it('needs beam data for the front of the beam', () => {
    expect(outcome('clearance-front-of-beam', { model: { beam: null } })).toBe('cannot tell')
  })

  it('keeps the floor as far below as the manual says', () => {
    const floor = (lowestPoint: number) => outcome('clearance-below', height(lowestPoint))
    expect([floor(1.9 - epsilon), floor(1.9), floor(1.9 + epsilon)]).toEqual(['fails', 'pass', 'pass'])
  })
})

describe('recess box', () => {
  const joist = (id: string, y: number) => ({ ...plainSite().members[0]!, id, name: id, from: [0, y] as [number, number], to: [6, y] as [number, number], width: 0.045, material: 'combustible' as const }) // prettier-ignore
  const exact = (id: string) => ['from.0', 'from.1', 'to.0', 'to.1', 'width'].map((path) => sure('member', id, path))
  const ceiling = (voidDepth: number | null, tolerance = 0): Partial<Site> => ({
    covers: [{ ...plainSite().covers[0]!, voidDepth }],
    members: [joist('left', 2.3), joist('right', 1.7)],
    dimensions: [...exact('left'), ...exact('right'), sure('cover', 'roof', 'voidDepth', tolerance)],
  })
  const recessed = (site: Partial<Site>, y = 2, model: Partial<HeaterModel> = {}): Case => ({
    site,
    heater: { mount: 'recess box', lowestPoint: 3, y },
    model: { mounts: ['recess box'], mountsThatHoldTilt: ['recess box'], voidDepth: 0.19, ...model },
  })

  it.each([
    [0.19 - epsilon, 0, 'fails'],
    [0.19, 0, 'pass'],
    [0.19 + epsilon, 0, 'pass'],
    [0.205, 0.025, 'measure first'],
    [null, 0, 'cannot tell'],
  ])('in a void of %s ± %s m that must be 0.19 m: %s', (depth, tolerance, expected) => {
    expect(outcome('recess-void', recessed(ceiling(depth, tolerance)))).toBe(expected)
  })

  it('cannot be told when the manual states no void depth', () => {
    expect(outcome('recess-void', recessed(ceiling(0.2), 2, { voidDepth: null }))).toBe('cannot tell')
  })

  it('keeps its side clearance from both joists', () => {
    // Joists' faces at 2.2775 and 1.7225; body 0.165 m wide; 0.06 m clear leaves ± 0.135 m to move.
    const sides = { clearanceToCombustible: { above: 0.06, side: 0.06, end: 0.06, frontOfBeam: 1.2, below: 2.25 } }
    const at = (y: number) => outcome('recess-bay', recessed(ceiling(0.2), y, sides))
    expect([at(2.135 + epsilon), at(2.135), at(2.135 - epsilon)]).toEqual(['fails', 'pass', 'pass'])
    expect([at(1.865 - epsilon), at(1.865), at(1.865 + epsilon)]).toEqual(['fails', 'pass', 'pass'])
    expect(found('recess-bay', recessed(ceiling(0.2), 2.3, sides))[0]?.title).toContain('across left')
  })

  it('cannot be told without joists or side clearance', () => {
    expect(outcome('recess-bay', recessed({ ...ceiling(0.2), members: [] }))).toBe('cannot tell')
    expect(outcome('recess-bay', recessed(ceiling(0.2), 2, { clearanceToCombustible: null }))).toBe('cannot tell')
  })

  it('sits in its ceiling: neither above nor in front of the beam', () => {
    const timber = {
      ...ceiling(0.2),
      covers: [{ ...plainSite().covers[0]!, material: 'combustible' as const, voidDepth: 0.2 }],
    }
    for (const rule of ['clearance-above', 'clearance-front-of-beam', 'clearance-side-end'])
      expect(found(rule, recessed(timber)).every(({ outcome: is }) => is === 'pass')).toBe(true)
  })
})

describe('models', () => {
  it('may be placed while current', () => {
    expect(outcome('withdrawn-model')).toBe('pass')
    const [finding] = found('withdrawn-model', { model: { status: 'withdrawn' } })
    expect([finding?.outcome, finding?.weight]).toEqual(['fails', 'hard stop'])
    expect(outcome('withdrawn-model', { heater: { model: 'gone' } })).toBe('cannot tell')
  })

  it('need beam data', () => {
    expect(outcome('beam-data')).toBe('pass')
    const [finding] = found('beam-data', { model: { beam: null } })
    expect([finding?.outcome, finding?.weight]).toEqual(['cannot tell', 'hard stop'])
  })
})

describe('hanger-length', () => {
  const surely = { site: { dimensions: [0, 1, 2].map((i) => sure('cover', 'roof', `corners.${i}.2`)) } }
  // Body 105 mm under 3.000 m; fittings of 95 mm that a turnbuckle makes 40 mm shorter: 55 mm at the least.
  it.each([
    [2.84 + epsilon, 'fails'],
    [2.84, 'pass'],
    [2.84 - epsilon, 'pass'],
  ])('lowest point at %s m: %s', (lowestPoint, expected) => {
    expect(outcome('hanger-length', { ...surely, heater: { lowestPoint } })).toBe(expected)
  })

  it('is to be measured first within the tolerance of the cover', () => {
    const rough = { site: { dimensions: [{ ...sure('cover', 'roof', 'corners.0.2', 0.03), moves: [0, 1, 2].map((i) => ({ of: 'cover' as const, id: 'roof', coordinate: `corners.${i}.2`, by: 1 })) }] } } // prettier-ignore
    expect(outcome('hanger-length', { ...rough, heater: { lowestPoint: 2.84 - 0.0299 } })).toBe('measure first')
  })

  it('names the short bracket, and asks for another hanger beyond the turnbuckle', () => {
    const [short] = found('hanger-length', { heater: { lowestPoint: 2.86 } })
    expect([short?.outcome, short?.title]).toEqual(['fails', 'Too short for chain: use a short bracket'])
    // 3.000 − 2.860 − 0.105.
    expect(short?.remedy).toContain('0.035 m')
    const wide = { ...plainHanging, linkPitch: 0.2, shortens: 0.02, lengthens: 0.02 }
    // Net 0.500: two links of 0.200 leave 0.100, three lack as much.
    const [beyond] = found('hanger-length', {}, { ...plainHouse(), hanging: wide })
    expect([beyond?.outcome, beyond?.title]).toEqual(['fails', "More than the turnbuckle's range: another hanger"])
    expect(beyond?.margin).toBeCloseTo(-0.08, 9)
  })

  it('is not asked of brackets, nor where nothing is above', () => {
    expect(found('hanger-length', { heater: { mount: 'wall bracket' } })).toEqual([])
    expect(found('hanger-length', { heater: { y: 3 } })).toEqual([])
  })
})

describe('support-load by statics', () => {
  const beam = plainSite().members[0]!
  const weight = 3.1 * 9.80665

  it('says when a point would not hold the whole heater should the other let go', () => {
    const allowing = (allowedPointLoad: number): Case => ({ site: { members: [{ ...beam, allowedPointLoad }] } })
    expect(outcome('support-load-alone', allowing(weight - epsilon))).toBe('fails')
    expect(found('support-load-alone', allowing(weight))).toEqual([])
    expect(found('support-load-alone', allowing(weight / 2 - epsilon))).toEqual([])
  })

  it('takes the tension of each splayed hanger', () => {
    // 0.3 m aside to 2.0 and 0.3 m to 2.6, 0.4 m up: φ = 36.87°, W/4 / cos φ each.
    const members = [2, 2.6].map((y, i) => ({ ...beam, id: `b${i}`, name: `b${i}`, from: [0, y] as [number, number], to: [6, y] as [number, number], underside: { from: 2.805, to: 2.805 }, allowedPointLoad: 60 })) // prettier-ignore
    const [load] = found('support-load', { site: { members }, heater: { y: 2.3, splayed: true, memberId: null } })
    expect(load?.value).toBeCloseTo(weight / 4 / 0.8, 9)
    expect(load?.title).toBe('Load allowed on b0 and b1')
  })

  it('is not known on a rail that was only proposed, nor on walls and poles', () => {
    const rail = { ...beam, kind: 'rail', allowedPointLoad: null, loadStatus: 'span and load to be confirmed' }
    const [load] = found('support-load', { site: { members: [rail] } })
    expect([load?.outcome, load?.remedy]).toEqual(['cannot tell', 'The maker of the structure must confirm it.'])
    expect(load?.source).toContain('span and load to be confirmed')
    const wall = { id: 'wall', name: 'wall', from: [0, 0] as [number, number], to: [6, 0] as [number, number], top: 3, material: 'non-combustible' as const, loadStatus: 'sound' } // prettier-ignore
    expect(outcome('support-load', { site: { walls: [wall] }, heater: { mount: 'wall bracket', y: 0.2, memberId: 'wall' } })).toBe('cannot tell') // prettier-ignore
  })
})
