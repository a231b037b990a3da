import { plainHouseRules } from '#app/domain/rules/house-rules.ts'
import { describe, expect, it } from 'vitest'
import { cautionLimits } from '#app/domain/comfort/cautions.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { MountedHeater } from '#app/domain/layout/layout.ts'
import { checkLayout } from '#app/domain/rules/check-layout.ts'
import type { Finding } from '#app/domain/rules/finding.ts'
import { dragForce, largestWindArea } from '#app/domain/rules/pole-wind.ts'
import { bearings } from '#app/domain/rules/bearings.ts'
import { bearingSchema, ruleSetSchema, type Article, type ChosenRuleSet } from '#app/domain/rules/rule-set.ts'
import type { Brief } from '#app/domain/brief/brief.ts'
import { bodyOf } from '#app/domain/layout/body.ts'
import type { Obstacle, Site } from '#app/domain/site/site.ts'
import { axesOfBox } from '#tests/support/brute-distance.ts'
import { plainBrief, plainHeater, plainModel, plainSite, plainHouse } from '#tests/support/plain-site.ts'

const epsilon = 1e-4

const article = (rule: Article['rule'], figure: number, number = '4.2'): Article => ({
  article: number,
  rule,
  figure,
  unit: bearings[rule].unit,
  note: 'Invented.',
  source: 'read',
})

const ruleSet = (...articles: Article[]): ChosenRuleSet => ({
  id: '6f1b7c0e-58d3-4b8e-9a58-0f6a3c1d2e4f',
  revision: 1,
  name: 'Test district',
  place: 'nowhere',
  edition: 'edition 1',
  articles,
})

interface Case {
  readonly site?: Partial<Site>
  readonly heater?: Partial<MountedHeater>
  readonly model?: Partial<HeaterModel>
  readonly brief?: Partial<Brief>
}

function found(rule: string, { site, heater, model, brief }: Case = {}): Finding[] {
  const made = plainModel(model)
  const layout = { heaters: [plainHeater(heater)] }
  const models = new Map([[made.code, made]])
  return checkLayout({
    site: plainSite(site),
    brief: plainBrief(brief),
    layout,
    models,
    warmth: [],
    house: plainHouse(),
  }).filter((finding) => finding.rule === rule)
}

/** A combustible block over the heater's back, its underside that far over it, every size sure. */
function over(kind: Obstacle['kind'], gap: number): Partial<Site> {
  const z = 2.3 + 0.105 + gap
  const shape = { kind: 'box' as const, x: [2.9, 3.1] as [number, number], y: [1.9, 2.1] as [number, number], z: [z, z + 0.1] as [number, number] } // prettier-ignore
  const facts = { material: 'combustible' as const, movable: false, transmittance: 0, note: null }
  return {
    obstacles: [{ id: 'o', name: 'thing', kind, shape, ...facts }],
    dimensions: ['x.0', 'x.1', 'y.0', 'y.1', 'z.0', 'z.1'].map((path) => ({
      id: path,
      label: path,
      value: 1,
      tolerance: 0,
      source: 'laser' as const,
      note: null,
      moves: [{ of: 'obstacle' as const, id: 'o', coordinate: `shape.${path}`, by: 1 }],
    })),
  }
}

describe('a rule set', () => {
  it('knows every rule it may bear on', () => {
    expect(Object.keys(bearings).sort()).toEqual([...bearingSchema.options].sort())
  })

  it('refuses a figure of another unit, of nothing and beyond all measure, each beside its field', () => {
    const errors = (wrong: Partial<Article>) => {
      const { name, place, edition, articles } = ruleSet({ ...article('head-caution', 600), ...wrong })
      return ruleSetSchema.safeParse({ name, place, edition, articles }).error?.issues.map(({ path }) => path.join('.'))
    }
    expect(errors({})).toBeUndefined()
    expect(errors({ unit: 'm' })).toEqual(['articles.0.unit'])
    expect(errors({ figure: 0 })).toEqual(['articles.0.figure'])
    expect(errors({ figure: 5001 })).toEqual(['articles.0.figure'])
    expect(errors({ article: ' ' })).toEqual(['articles.0.article'])
  })
})

describe('findings by a rule set', () => {
  // The plain heater's manual asks 0.35 m above to a combustible thing, and a least height of 1.9 m.
  it.each([
    [0.5 - epsilon, 'fails'],
    [0.5, 'pass'],
    [0.5 + epsilon, 'pass'],
  ])('a thing %s m above, 0.5 m by article: %s', (gap, expected) => {
    const brief = { ruleSet: ruleSet(article('clearance-above', 0.5)) }
    const finding = found('clearance-above', { site: over('other', gap), brief }).find(({ title }) => title.includes('thing')) // prettier-ignore
    expect([finding?.outcome, finding?.limit]).toEqual([expected, 0.5])
    expect(finding?.source).toBe('Test district, edition 1, article 4.2')
  })

  it('keep the manual’s figure and source where it asks more', () => {
    const brief = { ruleSet: ruleSet(article('clearance-above', 0.2)) }
    const [finding] = found('clearance-above', { site: over('other', 0.3), brief })
    expect([finding?.outcome, finding?.limit, finding?.source]).toEqual([
      'fails',
      0.35,
      'Manual of Betony 2.0 short-wave',
    ])
  })

  it('take the strictest of several articles, and say when a text was not open', () => {
    const remembered = { ...article('mounting-height', 2.35, '9'), source: 'from memory' as const }
    const brief = { ruleSet: ruleSet(article('mounting-height', 2.2), remembered) }
    const least = found('mounting-height', { brief }).find(({ weight }) => weight === 'hard stop')
    expect([least?.outcome, least?.limit, least?.source]).toEqual([
      'fails',
      2.35,
      'Test district, edition 1, article 9 (from memory)',
    ])
  })

  it('tell where the manual is silent, and cannot without either', () => {
    const model = { mountingHeight: { min: null, recommendedMax: null } }
    const brief = { ruleSet: ruleSet(article('mounting-height', 2.2)) }
    expect(found('mounting-height', { model, brief })[0]?.outcome).toBe('pass')
    const [silent] = found('mounting-height', { model })
    expect(silent?.outcome).toBe('cannot tell')
    expect(silent?.remedy).toContain('Common practice, no source')
  })

  it('set the caution at the head and the greatest supply', () => {
    const brief = plainBrief({ ruleSet: ruleSet(article('head-caution', 450), article('supply-over-rated', 1.05)) })
    expect(cautionLimits(brief, plainHouseRules).head).toMatchObject({
      value: 450,
      source: 'Test district, edition 1, article 4.2',
    })
    const supply = (supplyVoltage: number) => found('voltage-offered', { brief, heater: { supplyVoltage, ratedVoltage: 230 } })[0] // prettier-ignore
    expect([supply(241.4)?.outcome, supply(241.5)?.outcome, supply(241.6)?.outcome]).toEqual(['pass', 'pass', 'fails'])
  })

  it('say whether one is chosen', () => {
    expect(found('circuits')[0]?.title).toContain('no rule set chosen')
    const [finding] = found('circuits', { brief: { ruleSet: ruleSet() } })
    expect([finding?.title, finding?.source]).toEqual(['Circuits are not checked yet', 'Test district, edition 1'])
  })
})

describe.each([
  ['sprinkler-distance', 'sprinkler'],
  ['lamp-distance', 'lamp'],
] as const)('%s', (rule, kind) => {
  it.each([
    [0.9 - epsilon, 'fails'],
    [0.9, 'pass'],
    [0.9 + epsilon, 'pass'],
  ])('%s m away, 0.9 m by article: %s', (gap, expected) => {
    const [finding] = found(rule, { site: over(kind, gap), brief: { ruleSet: ruleSet(article(rule, 0.9)) } })
    expect([finding?.outcome, finding?.weight]).toEqual([expected, 'soft'])
    expect(finding?.value).toBeCloseTo(gap, 9)
  })

  it('cannot be told without a figure, and is not asked without the thing', () => {
    expect(found(rule, { site: over(kind, 3) })[0]?.outcome).toBe('cannot tell')
    expect(found(rule, { site: over('other', 3) })).toEqual([])
  })
})

describe('glow near a step', () => {
  const step = (away: number) => ({ levels: [{ id: 'l', name: 'deck', outline: [[0, 2 - away], [6, 2 - away], [6, -9], [0, -9]] as [number, number][], height: -0.2 }] }) // prettier-ignore
  it.each([
    [2 - epsilon, 'fails'],
    [2, 'pass'],
    [2 + epsilon, 'pass'],
  ])('%s m away, house rule 2 m: %s, advice', (away, expected) => {
    const [finding] = found('glow-near-step', { site: step(away) })
    expect([finding?.outcome, finding?.weight]).toEqual([expected, 'advice'])
  })

  it('is not asked of what hardly glows, nor without steps', () => {
    expect(found('glow-near-step', { site: step(1), model: { visibleGlow: 'dull red' } })).toEqual([])
    expect(found('glow-near-step')).toEqual([])
  })
})

describe('wind on a heater at a pole', () => {
  it('is ½ρv²·C_d·A: 3 m/s on 0.1 m² at C_d 2 and 1.25 kg/m³ is 1.125 N (closed form)', () => {
    expect(dragForce(3, 2, 0.1)).toBeCloseTo(1.125, 12)
  })

  it('takes the largest shadow of the tilted body over all level directions, as 3,600 directions say', () => {
    const model = plainModel()
    for (const [turnDeg, tiltDeg] of [
      [0, 0],
      [30, 25],
      [110, -40],
    ] as const) {
      const body = bodyOf(plainHeater({ turnDeg, tiltDeg }), model)
      const { length, width, depth } = model.body
      const areas = [width * depth, length * depth, length * width]
      const axes = axesOfBox({ centre: [0, 0, 0], turn: turnDeg, tilt: tiltDeg, half: [1, 1, 1] })
      let most = 0
      for (let i = 0; i < 3600; i++) {
        const d = [Math.cos((i * Math.PI) / 1800), Math.sin((i * Math.PI) / 1800)]
        most = Math.max(most, areas.reduce((sum, area, k) => sum + area * Math.abs(axes[k]![0] * d[0]! + axes[k]![1] * d[1]!), 0)) // prettier-ignore
      }
      expect(largestWindArea(body)).toBeCloseTo(most, 5)
    }
  })

  it('is information: the moment of heater and pole at its foot, never a pass', () => {
    const pole = { id: 'p', name: 'pole', at: [3, 2.2] as [number, number], top: 2.5, diameter: 0.08, material: 'non-combustible' as const, loadStatus: 'not known' } // prettier-ignore
    const model = { mounts: ['pole clamp' as const], mountsThatHoldTilt: ['pole clamp' as const], mountReach: { 'pole clamp': 0.5 } } // prettier-ignore
    const [finding] = found('pole-wind', {
      site: { poles: [pole] },
      heater: { mount: 'pole clamp', memberId: 'p' },
      model,
      brief: { windGust: 10 },
    })
    // q = ½ · 1.25 · 100 = 62.5 Pa. Level body 0.56 × 0.165 × 0.105 m: its largest level shadow is the diagonal
    // √((0.56 · 0.105)² + (0.165 · 0.105)²); pole 0.08 × 2.5 m at C_d 1.2; middle of the body at 2.3 + 0.0525 m.
    const onBody = 62.5 * 2 * Math.hypot(0.56 * 0.105, 0.165 * 0.105)
    const moment = onBody * 2.3525 + 62.5 * 1.2 * 0.2 * 1.25
    expect([finding?.outcome, finding?.weight, finding?.unit]).toEqual(['cannot tell', 'advice', 'N·m'])
    expect(finding?.value).toBeCloseTo(moment, 9)
    expect(found('pole-wind')).toEqual([])
  })
})
