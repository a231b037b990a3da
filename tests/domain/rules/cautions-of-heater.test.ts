import { describe, expect, it } from 'vitest'
import { cautionsOfHeater } from '#app/domain/rules/cautions-of-heater.ts'
import { checkLayout } from '#app/domain/rules/check-layout.ts'
import type { Finding } from '#app/domain/rules/finding.ts'
import { plainBrief, plainHeater, plainHouse, plainModel, plainSite } from '#tests/support/plain-site.ts'

const finding = (change: Partial<Finding>): Finding => ({
  rule: 'clearance-above',
  outcome: 'fails',
  weight: 'hard stop',
  subject: { kind: 'heater', id: 'H1' },
  title: 'Too near above: reed',
  margin: -0.1,
  tolerance: 0,
  value: 0.2,
  limit: 0.3,
  unit: 'm',
  source: 'a manual',
  condition: null,
  remedy: 'Lower it.',
  nearest: null,
  ...change,
})
const dim = plainModel({ visibleGlow: 'soft orange' })

describe('the cautions of one heater', () => {
  it('are what was found about it and does not pass, each with what to do', () => {
    const findings = [
      finding({}),
      finding({ subject: { kind: 'heater', id: 'H2' }, title: 'Of another' }),
      finding({ rule: 'clearance-front-of-beam', outcome: 'measure first', title: 'Tight in the beam: screen', remedy: null }),
      finding({ rule: 'clearance-front-of-beam', title: 'Too near in the beam: umbrella', condition: 'umbrella: open', remedy: 'Isolate it.' }),
      finding({ rule: 'voltage-offered', outcome: 'cannot tell', title: 'The manual lists no supply voltage', remedy: null }),
      finding({ rule: 'support-load', outcome: 'cannot tell', title: 'Load on beam is not known', remedy: 'Confirm it.' }),
      finding({ rule: 'mounting-height', outcome: 'pass', title: 'High enough' }),
      finding({ rule: 'seat-target', title: 'No danger' }),
      finding({ rule: 'head-flux', subject: { kind: 'seat', id: 'H1' }, title: 'Of a seat' }),
      finding({ rule: 'supported', title: 'No member above it' }),
    ] // prettier-ignore
    expect(cautionsOfHeater('H1', dim, findings)).toEqual([
      { kind: 'fire', outcome: 'fails', sentence: 'Too near above: reed. Lower it.' },
      { kind: 'fire', outcome: 'measure first', sentence: 'Tight in the beam: screen. Measure first.' },
      { kind: 'fire', outcome: 'fails', sentence: 'Too near in the beam: umbrella, while open. Isolate it.' },
      { kind: 'shock', outcome: 'cannot tell', sentence: 'The manual lists no supply voltage.' },
      { kind: 'structure', outcome: 'cannot tell', sentence: 'Load on beam is not known. It must not carry the heater until its maker or the structure’s engineer confirms the load.' },
    ]) // prettier-ignore
  })

  it('tell of a bright element, whatever was found', () => {
    const [glow, ...more] = cautionsOfHeater('H1', plainModel({ visibleGlow: 'white-amber, very bright' }), [])
    expect([glow?.kind, glow?.outcome, more]).toEqual(['eyes', null, []])
    expect(cautionsOfHeater('H1', dim, [])).toEqual([])
    expect(cautionsOfHeater('H1', undefined, [])).toEqual([])
  })

  it('are told by the rules as they are: a load that is over', () => {
    const [beam] = plainSite().members
    const site = plainSite({ members: [{ ...beam!, allowedPointLoad: 5 }] })
    const models = new Map([[dim.code, dim]])
    const findings = checkLayout({ site, brief: plainBrief(), layout: { heaters: [plainHeater()] }, models, warmth: [], house: plainHouse() }) // prettier-ignore
    // Half of the heater's weight hangs at each of two eyes: far more than 5 N.
    expect(cautionsOfHeater('H1', dim, findings)).toContainEqual({
      kind: 'structure',
      outcome: 'fails',
      sentence: 'Load over what beam allows. It must not carry the heater until its maker or the structure’s engineer confirms the load.', // prettier-ignore
    })
  })
})
