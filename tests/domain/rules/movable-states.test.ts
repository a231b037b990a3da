import { describe, expect, it } from 'vitest'
import { obstructionsOf } from '#app/domain/flux/shading.ts'
import { conditionsOfUse } from '#app/domain/rules/conditions-of-use.ts'
import { checkLayout } from '#app/domain/rules/check-layout.ts'
import type { Finding } from '#app/domain/rules/finding.ts'
import type { Obstacle, Site } from '#app/domain/site/site.ts'
import { solidsOf } from '#app/domain/site/solids.ts'
import { plainBrief, plainHeater, plainModel, plainSite, plainHouse } from '#tests/support/plain-site.ts'

// The plain heater's end is at x = 3.28; the manual asks 0.4 m to a combustible thing beyond it, 0.3 m beside it.
const endClear = 3.28 + 0.4

const beyondEnd = (x: number) => ({ kind: 'box' as const, x: [x, x + 0.1] as [number, number], y: [1, 3] as [number, number], z: [2.3, 2.5] as [number, number] }) // prettier-ignore

type States = NonNullable<Obstacle['states']>

const door = (states: States | undefined, more: Partial<Obstacle> = {}): Obstacle => ({
  id: 'leaf',
  name: 'door',
  kind: 'door',
  material: 'combustible',
  movable: true,
  shape: beyondEnd(endClear - 0.1),
  ...(states ? { states } : {}),
  transmittance: 0,
  note: null,
  ...more,
})

/** Every size of every state is known exactly. */
function sureOf(obstacle: Obstacle): Site['dimensions'] {
  const shapes = [['shape', obstacle.shape] as const, ...(obstacle.states ?? []).map((state, i) => [`states.${i}.shape`, state.shape] as const)] // prettier-ignore
  return shapes.flatMap(([path, shape]) =>
    shape
      ? ['x.0', 'x.1', 'y.0', 'y.1', 'z.0', 'z.1'].map((size) => ({
          id: `${path}.${size}`,
          label: size,
          value: 1,
          tolerance: 0,
          source: 'laser' as const,
          note: null,
          moves: [{ of: 'obstacle' as const, id: obstacle.id, coordinate: `${path}.${size}`, by: 1 }],
        }))
      : [],
  )
}

function checked(obstacle: Obstacle, exactly = true): Finding[] {
  const model = plainModel()
  const site = plainSite({ obstacles: [obstacle], dimensions: exactly ? sureOf(obstacle) : [] })
  const layout = { heaters: [plainHeater()] }
  return checkLayout({
    site,
    brief: plainBrief(),
    layout,
    models: new Map([[model.code, model]]),
    warmth: [],
    house: plainHouse(),
  })
}

const aboutDoor = (findings: Finding[]) =>
  findings
    .filter(({ title, outcome }) => title.includes('door') && outcome !== 'pass')
    .map(({ outcome, weight, condition }) => [outcome, weight, condition])

const open = (x: number) => ({ name: 'open', shape: beyondEnd(x) })
const shut = (x: number) => ({ name: 'shut', shape: beyondEnd(x) })

describe('states of a movable thing', () => {
  it('are a solid each, named, and none for the state in which it is away', () => {
    const site = plainSite({ obstacles: [door([open(4), shut(5), { name: 'taken off', shape: null }])] })
    const states = solidsOf(site).filter(({ of }) => of === 'obstacle')
    expect(states.map(({ state, parts }) => [state, parts[0]?.middle[0]])).toEqual([
      ['door: open', 4.05],
      ['door: shut', 5.05],
    ])
  })

  it('without a list is there or away, as before', () => {
    expect(aboutDoor(checked(door(undefined)))).toEqual([['fails', 'soft', 'door: open']])
  })

  it('of a fixed thing do not count', () => {
    expect(aboutDoor(checked(door([open(5)], { movable: false })))).toEqual([['fails', 'hard stop', null]])
  })

  it('that fail only in some are named conditions of use', () => {
    const findings = checked(door([open(endClear - 0.1), shut(endClear + 0.5)]))
    expect(aboutDoor(findings)).toEqual([['fails', 'soft', 'door: open']])
    expect(conditionsOfUse(findings)).toEqual(['H1 off while door: open'])
    expect(findings.find(({ condition }) => condition)?.remedy).toContain('key switch')
  })

  it('that all fail are a plain failure, and no condition of use', () => {
    const findings = checked(door([open(endClear - 0.2), shut(endClear - 0.1)]))
    expect(aboutDoor(findings)).toEqual([['fails', 'hard stop', null]])
    expect(findings.find(({ title }) => title.includes('door'))?.margin).toBeCloseTo(-0.2, 9)
    expect(conditionsOfUse(findings)).toEqual([])
  })

  it('fail plainly too when each fails by another rule', () => {
    const above = { name: 'lifted', shape: { kind: 'box' as const, x: [2, 4] as [number, number], y: [1, 3] as [number, number], z: [2.405 + 0.2, 2.8] as [number, number] } } // prettier-ignore
    expect(aboutDoor(checked(door([open(endClear - 0.1), above])))).toEqual([
      ['fails', 'hard stop', null],
      ['fails', 'hard stop', null],
    ])
  })

  it('that at best want measuring leave a plain "measure first", the failing one a condition', () => {
    const findings = checked(door([open(endClear - 0.1), shut(endClear + 0.01)]), false)
    expect(aboutDoor(findings)).toEqual([
      ['fails', 'soft', 'door: open'],
      ['measure first', 'hard stop', null],
    ])
  })

  it.each([
    [-1e-4, 'fails'],
    [0, undefined],
    [1e-4, undefined],
  ])('pass at the limit %s m: %s', (off, expected) => {
    const [first] = aboutDoor(checked(door([open(endClear + off), shut(endClear + 1)])))
    expect(first?.[0]).toBe(expected)
  })

  it('of no combustible material are soft', () => {
    const steel = door([open(3.29), shut(3.3)], { material: 'non-combustible' })
    expect(aboutDoor(checked(steel)).every(([outcome, weight]) => outcome === 'fails' && weight === 'soft')).toBe(true)
  })
})

describe('shade of a movable thing', () => {
  const site = plainSite({ obstacles: [door([open(4), { name: 'away', shape: null }])] })
  const shadeOf = (state?: Parameters<typeof obstructionsOf>[3]) =>
    obstructionsOf(site, { title: '', heaters: [] }, new Map(), state).map(({ solids }) => solids[0]?.low[0])

  it('is that of all it sweeps unless a state is stated', () => {
    expect(shadeOf()).toEqual([3.58])
    expect(shadeOf({ movable: 'away' })).toEqual([])
  })

  it('is that of the state stated, none when it is away in it', () => {
    expect(shadeOf({ movable: 'in place', states: new Map([['leaf', 'open']]) })).toEqual([4])
    expect(shadeOf({ movable: 'in place', states: new Map([['leaf', 'away']]) })).toEqual([])
    expect(shadeOf({ movable: 'in place', states: new Map([['leaf', 'ajar']]) })).toEqual([3.58])
  })
})
