import { describe, expect, it } from 'vitest'
import { beamFacts } from '#app/domain/heaters/beam-facts.ts'
import { beamInWords } from '#app/domain/heaters/beam-in-words.ts'
import type { BeamTableData } from '#app/domain/heaters/heater-model.ts'

const table = (alongDeg: number[], ...row: number[]): BeamTableData => ({
  kind: 'table',
  acrossDeg: [-90, 90],
  alongDeg,
  intensity: [row, row],
  source: 'test',
})

describe('what a beam comes to', () => {
  it('is said of half-intensity angles with the exponents that give them', () => {
    // cos 60° = ½, so 120° is the first power; cos² 45° = ½, so 90° is the second.
    const beam = { kind: 'angles', acrossFullAngleDeg: 120, alongFullAngleDeg: 90, source: 'test' } as const
    const { across, along, exponents, cutOff } = beamFacts(beam)
    expect([across, along, cutOff]).toEqual(['120°, from −60° to 60°', '90°, from −45° to 45°', 0])
    expect(exponents?.across).toBeCloseTo(1, 12)
    expect(exponents?.along).toBeCloseTo(2, 12)
    expect(beamInWords(beam)).toBe('120° × 90°')
  })

  it('is said of a table, lopsided where it is', () => {
    // 4 → 0 over 80° passes 2 half-way, 4 → 0 over 30° too.
    const beam = table([-80, 0, 30], 0, 4, 0)
    expect(beamFacts(beam)).toMatchObject({ along: '55°, from −40° to 15°', exponents: null, cutOff: 0 })
    expect(beamInWords(beam)).toBe('measured: table of 2 × 3')
  })

  it.each([
    ['one end', table([-60, 0, 60], 3, 4, 0), 0.75],
    ['the other end', table([-60, 0, 60], 0, 4, 1), 0.25],
    ['an axis that starts at 0', table([0, 60], 4, 2), 0.5],
    ['no end that reaches 90°', table([-90, 0, 90], 4, 4, 4), 0],
    ['no end beyond 90°', table([-120, 0, 120], 4, 4, 4), 0],
    ['a side', { ...table([-90, 90], 4, 4), acrossDeg: [-30, 30], intensity: [[1, 1], [4, 4]] }, 1], // prettier-ignore
    ['the other side', { ...table([-90, 90], 4, 4), acrossDeg: [-90, 0, 30], intensity: [[0, 0], [4, 4], [2, 2]] }, 0.5], // prettier-ignore
  ])('says how much is cut off at %s', (_, beam, share) => {
    expect(beamFacts(beam).cutOff).toBeCloseTo(share, 12)
  })

  it('has words for a model without a beam', () => {
    expect(beamInWords(null)).toBe('no beam data')
  })
})
