import { plainHouse } from '#tests/support/plain-site.ts'
import { describe, expect, it } from 'vitest'
import { seatWarmth } from '#app/domain/comfort/seat-warmth.ts'
import { checkLayout, isStopped } from '#app/domain/rules/check-layout.ts'
import type { Finding } from '#app/domain/rules/finding.ts'
import { demoModels, demoSites } from '#drizzle/seed/demo-sites.ts'

// Expected findings are those that the demonstration's author wrote beside each variant, in whole millimetres and watts;
// a length therefore agrees when it is within half a millimetre. Figures worked out here say how.

const models = new Map(demoModels().map((model) => [model.code, model]))
const half = 0.0005

function findingsOf(key: 'A' | 'B' | 'C', number: number): Finding[] {
  const demo = demoSites().find((site) => site.key === key)!
  const layout = demo.variants.find((variant) => variant.number === number)!.layout
  const { site, brief } = demo
  return checkLayout({
    ...{ site, brief, layout, models, house: plainHouse() },
    warmth: seatWarmth({ site, brief, layout, models }),
  })
}

const about = (findings: Finding[], rule: string, id?: string) =>
  findings.filter((finding) => finding.rule === rule && (id === undefined || finding.subject.id === id))

const open = (findings: Finding[]) => findings.filter(({ outcome }) => outcome !== 'pass')

const ids = (findings: Finding[]) => [...new Set(findings.map(({ subject }) => subject.id))]

const heaters = (count: number) => Array.from({ length: count }, (_, i) => `H${i + 1}`)

const expectValue = (finding: Finding | undefined, metres: number) =>
  expect(Math.abs((finding?.value ?? NaN) - metres)).toBeLessThanOrEqual(half)

describe.each([
  ['A', 1],
  ['A', 2],
  ['A', 3],
  ['B', 1],
  ['B', 2],
  ['B', 3],
  ['C', 1],
  ['C', 2],
  ['C', 3],
] as const)('variant %s%i', (key, number) => {
  const findings = findingsOf(key, number)

  it('lists circuits as not checked, once', () => {
    expect(about(findings, 'circuits').map(({ title, outcome }) => [title, outcome])).toEqual([
      ['Circuits are not checked yet: no rule set chosen', 'cannot tell'],
    ])
  })

  it('puts failing first, then cannot tell, measure first, pass, hard stops first in each', () => {
    const outcomes = ['fails', 'cannot tell', 'measure first', 'pass']
    const weights = ['hard stop', 'soft', 'advice']
    const ranks = findings.map(({ outcome, weight }) => outcomes.indexOf(outcome) * 10 + weights.indexOf(weight))
    expect(ranks).toEqual([...ranks].sort((a, b) => a - b))
  })

  it('keeps margin, value and limit together, and each outcome to its inequality', () => {
    for (const { margin, tolerance, outcome } of findings) {
      if (margin === null || tolerance === null) continue
      if (outcome === 'pass') expect(margin).toBeGreaterThanOrEqual(tolerance)
      if (outcome === 'measure first') expect(margin >= 0 && margin < tolerance).toBe(true)
    }
  })
})

describe('site A, variant 1: one row, bay centres', () => {
  const findings = findingsOf('A', 1)

  it('has no member above any heater, the nearest 1.32 m away', () => {
    const supported = about(findings, 'supported')
    expect(ids(open(supported))).toEqual(heaters(5))
    for (const finding of supported) {
      expect(finding.outcome).toBe('fails')
      expectValue(finding, 1.32)
    }
  })

  it('is 178 mm from the sloping roof where the manual asks 250', () => {
    const above = about(findings, 'clearance-above')
    expect(ids(above)).toEqual(heaters(5))
    for (const finding of above) {
      expect(finding.outcome).toBe('fails')
      expect(finding.limit).toBe(0.25)
      expectValue(finding, 0.178)
    }
  })

  it('has the festoon cable 60 mm below each open face, inside 1600 mm in front of the beam', () => {
    const front = open(about(findings, 'clearance-front-of-beam'))
    expect(ids(front)).toEqual(heaters(5))
    for (const finding of front) {
      expect([finding.outcome, finding.weight, finding.limit]).toEqual(['fails', 'hard stop', 1.6])
      expectValue(finding, 0.06)
    }
  })

  it('leaves outer seats of the end tables below the target', () => {
    const cold = about(findings, 'seat-target').filter(({ title }) => title === 'Seat below the target band')
    expect(ids(cold)).toEqual(expect.arrayContaining(['R1-4', 'R5-4', 'W1-3', 'W5-3']))
  })

  it('has ten heads over 600 W/m² in their worst direction, 718 at the most', () => {
    const heads = about(findings, 'head-flux').filter(({ outcome }) => outcome === 'fails')
    expect(heads).toHaveLength(10)
    expect(Math.round(Math.max(...heads.map(({ value }) => value ?? 0)))).toBe(718)
    expect(heads.every(({ limit, weight }) => limit === 600 && weight === 'soft')).toBe(true)
  })

  it('suits the opening roof and the voltage, height and tilt', () => {
    for (const rule of ['ingress-protection', 'voltage-offered', 'mounting-height', 'tilt-range', 'mount-offered'])
      expect(open(about(findings, rule))).toEqual([])
  })
})

describe('site A, variant 2: two rows under the inner beams', () => {
  const findings = findingsOf('A', 2)

  it('hangs every heater from its beam', () => {
    expect(about(findings, 'supported').map(({ outcome }) => outcome)).toEqual(Array(8).fill('pass'))
  })

  it('is 292 mm from the roof in the river row, and with blades swung 85 mm has 7 mm left: measure first', () => {
    for (const id of ['H2', 'H4', 'H6', 'H8']) {
      const [swung, shut] = about(findings, 'clearance-above', id)
      expectValue(shut, 0.2925)
      expect([shut?.outcome, shut?.limit]).toEqual(['pass', 0.2])
      expect(swung?.outcome).toBe('measure first')
      expect(Math.floor((swung?.margin ?? 0) * 1000)).toBe(7)
      expect(swung?.condition).toContain('swung below the underside')
    }
  })

  it('has room above in the wall row whatever the blades do', () => {
    for (const id of ['H1', 'H3', 'H5', 'H7']) expect(open(about(findings, 'clearance-above', id))).toEqual([])
  })

  it('does not know the load that the beams allow', () => {
    const load = about(findings, 'support-load')
    expect(load.map(({ outcome }) => outcome)).toEqual(Array(8).fill('cannot tell'))
    // 4.9 kg on two eyes: 4.9 · 9.80665 / 2 = 24.03 N each.
    expect(load[0]?.value).toBeCloseTo(24.03, 2)
    expect(isStopped(load[0]!)).toBe(true)
  })
})

describe('site A, variant 3: all six beams, ends tilted in', () => {
  const findings = findingsOf('A', 3)

  it('holds the tilted end heaters by drop rods within their reach of 250 mm', () => {
    for (const id of ['H1', 'H2', 'H11', 'H12']) {
      const [finding] = about(findings, 'supported', id)
      expect([finding?.outcome, finding?.limit]).toEqual(['pass', 0.25])
      expectValue(finding, 0.18)
    }
  })

  it('would not hold them by a chain pair, which hangs plumb', () => {
    const { site, brief, variants } = demoSites().find(({ key }) => key === 'A')!
    const { layout } = variants.find(({ number }) => number === 3)!
    const chained = { ...layout, heaters: layout.heaters.map((heater) => ({ ...heater, mount: 'chain' as const })) }
    const found = checkLayout({ site, brief, layout: chained, models, warmth: [], house: plainHouse() })
    expect(ids(open(about(found, 'supported')))).toEqual(['H1', 'H2', 'H11', 'H12'])
  })

  it('has every seat in the target band and no failing hard stop', () => {
    expect(about(findings, 'seat-target').filter(({ outcome }) => outcome === 'fails')).toEqual([])
    expect(findings.filter(({ outcome, weight }) => outcome === 'fails' && weight === 'hard stop')).toEqual([])
  })
})

describe('site B, variant 1: strong heaters on the bar wall', () => {
  const findings = findingsOf('B', 1)

  it('runs the 240 V option on 208 V: 3605 W instead of 4800 W, 75 %', () => {
    const voltage = about(findings, 'voltage-offered')
    expect(ids(voltage)).toEqual(heaters(8))
    for (const { outcome, weight, remedy } of voltage) {
      expect([outcome, weight]).toEqual(['fails', 'soft'])
      expect(remedy).toContain('3605 W instead of 4800 W (75 %)')
    }
  })

  it('is not for open sky', () => {
    const ingress = about(findings, 'ingress-protection')
    expect(ids(open(ingress))).toEqual(heaters(8))
    expect(ingress.every(({ outcome, weight }) => outcome === 'fails' && weight === 'hard stop')).toBe(true)
  })

  it('keeps every clearance: nothing above, and the wall is its own support', () => {
    for (const rule of ['clearance-above', 'clearance-side-end', 'clearance-front-of-beam', 'clearance-below'])
      expect(open(about(findings, rule))).toEqual([])
    expect(open(about(findings, 'supported'))).toEqual([])
  })

  it('leaves every lounge seat below the target', () => {
    const cold = ids(about(findings, 'seat-target').filter(({ title }) => title === 'Seat below the target band'))
    expect(cold.filter((id) => id.startsWith('L'))).toHaveLength(24)
  })
})

describe('site B, variant 2: wall and parapet poles', () => {
  const findings = findingsOf('B', 2)

  it('has no pole within reach of heaters 5 to 8, and walls for the others', () => {
    expect(ids(open(about(findings, 'supported')))).toEqual(['H5', 'H6', 'H7', 'H8'])
  })

  it('has a canopy rim 0.81 m in front of the beam while the umbrella is open', () => {
    const front = open(about(findings, 'clearance-front-of-beam'))
    expect(ids(front)).toEqual(['H5', 'H6', 'H7', 'H8'])
    for (const finding of front) {
      expect([finding.outcome, finding.weight, finding.limit]).toEqual(['fails', 'soft', 1.2])
      expect(finding.value).toBeCloseTo(0.81, 2)
      expect(finding.condition).toMatch(/umbrella.*: open$/)
    }
  })
})

describe('site B, variant 3: pairs on poles, canopies stored', () => {
  const findings = findingsOf('B', 3)
  const canopies = [...about(findings, 'clearance-side-end'), ...about(findings, 'clearance-above')].filter(
    ({ outcome, title }) => outcome === 'fails' && title.includes('umbrella'),
  )
  const nearest = (id: string) =>
    Math.min(...canopies.filter(({ subject }) => subject.id === id).map(({ value }) => value ?? Infinity))

  it('has the open canopies 43 mm from heaters 1 to 4 and touching 5 and 6', () => {
    // H2: its body reaches 111.6 mm sideways (102.5 cos 38° + 50 sin 38°), to x = 4985.6; the rim of umbrella 2 is at
    // 6706 − 1676 = 5030: 44.4 mm, a millimetre more than the author's figure for all four.
    for (const id of ['H1', 'H3', 'H4']) expect(Math.abs(nearest(id) - 0.0434)).toBeLessThan(half)
    expect(Math.abs(nearest('H2') - 0.0444)).toBeLessThan(half)
    expect([nearest('H5'), nearest('H6')]).toEqual([0, 0])
  })

  it('makes that a condition of use, not a hard stop: stored they pass', () => {
    expect(ids(canopies).sort()).toEqual(heaters(6))
    for (const { weight, condition, remedy } of canopies) {
      expect(weight).toBe('soft')
      expect(condition).toMatch(/umbrella.*: open$/)
      expect(remedy).toContain('key switch')
    }
    const rules = ['clearance-above', 'clearance-side-end', 'clearance-front-of-beam', 'clearance-below', 'supported']
    for (const finding of open(findings.filter(({ rule }) => rules.includes(rule))))
      expect(finding.condition).not.toBeNull()
  })

  it('leaves most stools below the target', () => {
    const cold = ids(about(findings, 'seat-target').filter(({ title }) => title === 'Seat below the target band'))
    expect(cold.filter((id) => id.startsWith('S')).length).toBeGreaterThan(5)
  })
})

describe('site C, variant 1: one big heater', () => {
  const findings = findingsOf('C', 1)

  it('hangs at 2380 mm where the manual asks 2700', () => {
    const [finding] = about(findings, 'mounting-height')
    expect([finding?.outcome, finding?.weight, finding?.value, finding?.limit]).toEqual([
      'fails',
      'hard stop',
      2.38,
      2.7,
    ])
  })

  it('is 140 mm from the timber ceiling where the manual asks 600', () => {
    const [finding] = about(findings, 'clearance-above')
    expect([finding?.outcome, finding?.weight, finding?.limit]).toEqual(['fails', 'hard stop', 0.6])
    expectValue(finding, 0.14)
  })

  it('has the paper pendant in the beam 0.43 m below', () => {
    for (const rule of ['clearance-front-of-beam', 'clearance-below']) {
      const pendant = about(findings, rule).find(({ title }) => title.includes('pendant'))
      expect(pendant?.outcome).toBe('fails')
      expectValue(pendant, 0.43)
    }
  })

  it('has four heads at 606 W/m², just over 600', () => {
    const heads = about(findings, 'head-flux').filter(({ outcome }) => outcome === 'fails')
    expect(heads.map(({ value }) => Math.round(value ?? 0))).toEqual([606, 606, 606, 606])
  })
})

describe('site C, variant 2: two wall heaters', () => {
  const findings = findingsOf('C', 2)

  it('passes the timber ceiling by 16 mm with a tolerance of 8 mm', () => {
    for (const finding of about(findings, 'clearance-above')) {
      expect([finding.outcome, finding.limit]).toEqual(['pass', 0.35])
      expectValue(finding, 0.366)
      expect(Math.abs((finding.margin ?? 0) - 0.016)).toBeLessThanOrEqual(half)
      expect(finding.tolerance).toBeCloseTo(0.008, 6)
    }
  })

  it('fails by the door leaf while it is open: 120 mm beyond the end, and in the beam', () => {
    const door = open(findings).filter(({ condition }) => condition?.includes('door leaf'))
    const end = door.find(({ rule }) => rule === 'clearance-side-end')
    const front = door.find(({ rule }) => rule === 'clearance-front-of-beam')
    expect([end?.subject.id, end?.outcome, end?.weight, end?.limit]).toEqual(['H2', 'fails', 'soft', 0.4])
    expectValue(end, 0.12)
    expect([front?.subject.id, front?.outcome, front?.weight, front?.limit]).toEqual(['H2', 'fails', 'soft', 1.1])
  })

  it('passes every clearance while the door is shut', () => {
    const others = open(findings).filter(({ rule, condition }) => rule.startsWith('clearance') && condition === null)
    expect(others).toEqual([])
  })
})

describe('site C, variant 3: two recessed heaters', () => {
  const findings = findingsOf('C', 3)

  it('cannot accept a void of 205 ± 25 mm for 190 mm until it is measured', () => {
    for (const finding of about(findings, 'recess-void')) {
      expect([finding.outcome, finding.weight]).toEqual(['measure first', 'hard stop'])
      expect(finding.margin).toBeCloseTo(0.015, 6)
      expect(finding.tolerance).toBeCloseTo(0.025, 6)
    }
    expect(ids(about(findings, 'recess-void'))).toEqual(['H1', 'H2'])
  })

  it('has the paper pendant 829 and 780 mm from the faces, inside 1200 mm', () => {
    const pendants = about(findings, 'clearance-front-of-beam').filter(({ title }) => title.includes('pendant'))
    expect(ids(pendants)).toEqual(['H1', 'H2'])
    expectValue(pendants[0], 0.8294)
    expectValue(pendants[1], 0.7804)
    expect(pendants.every(({ outcome }) => outcome === 'fails')).toBe(true)
  })

  it('lies across joist 3 with H1 and in the middle of a bay with H2', () => {
    const [across, middle] = [about(findings, 'recess-bay', 'H1')[0], about(findings, 'recess-bay', 'H2')[0]]
    expect([across?.outcome, across?.title]).toEqual(['fails', 'Recess box lies across joist 3'])
    expect(middle?.outcome).toBe('pass')
    // Joists 600 mm apart and 45 mm wide, box 260 mm wide: (600 − 45 − 260) / 2 = 147.5 mm each side.
    expectValue(middle, 0.1475)
  })

  it('has the open door leaf in the beam of H2', () => {
    const door = about(findings, 'clearance-front-of-beam', 'H2').find(({ condition }) =>
      condition?.includes('door leaf'),
    )
    expect([door?.outcome, door?.weight, door?.limit]).toEqual(['fails', 'soft', 1.2])
    // From the body's corner (3.43, 1.04, 2.65) to the leaf's corner (3.90, 0.82, 2.04), which the nearer element
    // (x = 3.355, ends at y = 1.152, z = 2.69) sees at α = 40° of 42.5° and β = 21° of 50°: √(0.47² + 0.22² + 0.61²).
    // The author's 0.92 m is taken from another point than the body.
    expectValue(door, Math.hypot(0.47, 0.22, 0.61))
  })

  it('leaves the daybed out of the target', () => {
    expect(ids(about(findings, 'seat-target'))).not.toEqual(expect.arrayContaining(['D1']))
  })
})
