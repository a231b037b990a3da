import { describe, expect, it } from 'vitest'
import { coverHeightAt, coverPlane, coverSlope, coverWarp } from '#app/domain/site/cover.ts'
import type { Cover } from '#app/domain/site/site.ts'
import { degrees } from '#app/domain/vector.ts'

const cover = (...corners: [number, number, number][]): Cover => ({
  id: 'roof',
  name: 'roof',
  corners,
  material: 'non-combustible',
  opening: false,
  swing: 0,
  voidDepth: null,
  note: null,
})

describe('a cover from its corners', () => {
  const roof = cover([0, 0, 3.3], [13.2, 0, 3.3], [13.2, 5.4, 2.75], [0, 5.4, 2.75])

  it('has the height of its corners at its corners, and half way between them', () => {
    for (const [x, y, z] of roof.corners) expect(coverHeightAt(roof, x, y)).toBeCloseTo(z, 12)
    expect(coverHeightAt(roof, 6.6, 2.7)).toBeCloseTo((3.3 + 2.75) / 2, 12)
  })

  it('slopes by atan(fall / run), downhill to the river, in inches per foot by twelve times the fall', () => {
    const slope = coverSlope(roof)!
    expect(degrees(slope.angle)).toBeCloseTo(degrees(Math.atan(0.55 / 5.4)), 12)
    expect(slope.fall * 12).toBeCloseTo((0.55 / 5.4) * 12, 12)
    expect(slope.downhill).toEqual([expect.closeTo(0, 12), expect.closeTo(1, 12)])
  })

  it('has no height beside itself, and no slope direction when level', () => {
    expect(coverHeightAt(roof, 13.3, 2)).toBeNull()
    expect(coverSlope(cover([0, 0, 2], [1, 0, 2], [1, 1, 2]))?.downhill).toEqual([0, 0])
  })

  it('is defined by three corners; a fourth is reported by how far it lies above their plane', () => {
    expect(coverWarp(cover([0, 0, 2], [4, 0, 2], [4, 3, 2.6], [0, 3, 2.65]))).toBeCloseTo(0.05, 12)
    expect(coverWarp(cover([0, 0, 2], [4, 0, 2], [4, 3, 2.6]))).toBe(0)
  })

  it('makes no plane of three heights in one line', () => {
    const line = cover([0, 0, 2], [1, 1, 2.1], [2, 2, 2.2])
    expect(coverPlane(line)).toBeNull()
    expect(coverHeightAt(line, 1, 1)).toBeNull()
    expect(coverWarp(line)).toBeNull()
  })

  it('has its normal upward whichever way the corners run', () => {
    const turned = cover([0, 5.4, 2.75], [13.2, 5.4, 2.75], [13.2, 0, 3.3], [0, 0, 3.3])
    expect(coverPlane(turned)!.normal[2]).toBeGreaterThan(0)
    expect(coverPlane(roof)!.normal[2]).toBeGreaterThan(0)
  })
})
