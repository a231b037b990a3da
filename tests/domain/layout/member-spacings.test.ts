import { plainHouseRules } from '#app/domain/rules/house-rules.ts'
import { describe, expect, it } from 'vitest'
import { memberSpacings } from '#app/domain/layout/member-spacings.ts'
import type { Member } from '#app/domain/site/site.ts'
import { plainHeater, plainModel, plainSite } from '#tests/support/plain-site.ts'

const beam = plainSite().members[0]!
/** Members across y at a spacing, from y = 0 up. */
const membersAt = (...places: number[]): Member[] =>
  places.map((y, i) => ({ ...beam, id: `m${i}`, name: `m${i}`, from: [0, y], to: [6, y] }))
const model = plainModel()
const models = new Map([[model.code, model]])
const spacings = (members: Member[], spacing: number, count = 1, changes = {}) =>
  memberSpacings(
    plainSite({ members }),
    [plainHeater({ y: 0, memberId: null, ...changes })],
    models,
    {
      spacing,
      count,
      directionDeg: 90,
    },
    plainHouseRules,
  )

describe('the spacings that members allow', () => {
  // The rule of the trade: members 0.90 m apart offer 1.80 or 2.70 m where 2.10 m was wanted (common practice, no source).
  const apart = membersAt(0, 0.9, 1.8, 2.7, 3.6)

  it('are 1.80 and 2.70 m where 2.10 m was wanted of members 0.90 m apart', () => {
    expect(spacings(apart, 2.1)).toEqual({ below: 1.8, above: 2.7, fits: false })
  })

  it('are told of the wanted one too, at it and just beside it', () => {
    expect(spacings(apart, 1.8)).toEqual({ below: 0.9, above: 2.7, fits: true })
    // A chain may hang 20 mm aside of its member.
    expect(spacings(apart, 1.82)?.fits).toBe(true)
    expect(spacings(apart, 1.8201)?.fits).toBe(false)
  })

  it('leave room for every copy: two more at 1.80 m end at 3.60 m, at 2.70 m beyond the last member', () => {
    expect(spacings(apart, 2.1, 2)).toEqual({ below: 1.8, above: null, fits: false })
    expect(spacings(membersAt(0, 0.9, 2.0), 1.5, 2)).toEqual({ below: null, above: null, fits: false })
  })

  it('are none along a member, for walls, and where nothing is crossed', () => {
    const along = { spacing: 2, count: 1, directionDeg: 0 }
    expect(
      memberSpacings(plainSite({ members: membersAt(0) }), [plainHeater({ y: 0 })], models, along, plainHouseRules),
    ).toBeNull()
    expect(spacings(apart, 2.1, 1, { mount: 'wall bracket' })).toBeNull()
    expect(spacings(membersAt(0), 2.1)).toBeNull()
  })
})
