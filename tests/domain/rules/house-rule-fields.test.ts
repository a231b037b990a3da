import { describe, expect, it } from 'vitest'
import { houseRuleFields, houseRuleValues, readHouseRules } from '#app/domain/rules/house-rule-fields.ts'
import { plainHouseRules } from '#app/domain/rules/house-rules.ts'
import { houseRulesSchema } from '#app/domain/rules/house-rules-schema.ts'
import { fixedRuleRows, houseRuleRows } from '#app/domain/rules/rules-in-words.ts'

const typed = houseRuleValues(plainHouseRules)
const read = (changes: Record<string, string>) => readHouseRules({ ...typed, ...changes })
const errors = (changes: Record<string, string>) => {
  const answer = read(changes)
  return 'errors' in answer ? answer.errors : {}
}
const body = (changes: Record<string, string>) => {
  const answer = read(changes)
  return 'body' in answer ? answer.body : null
}

describe('the form of the house rules', () => {
  it('asks for every rule once and shows it as it is read', () => {
    expect(houseRuleFields.map(({ name }) => name).toSorted()).toEqual(Object.keys(houseRulesSchema.shape).toSorted())
    expect(read({})).toEqual({ body: plainHouseRules })
  })

  it('reads each figure in its own unit, with or without it', () => {
    const changes = {
      toleranceLaser: '1/8 in',
      tolerancePhotoShare: '2.5',
      toleranceGuessShare: '15 %',
      targetHigh: '400 W/m²',
      splayAngleDeg: '30°',
      supplyOverRated: '1,05',
      longStayMinutes: '45 min',
    }
    expect(body(changes)).toMatchObject({
      toleranceLaser: 0.0032,
      tolerancePhotoShare: 0.025,
      toleranceGuessShare: 0.15,
      targetHigh: 400,
      splayAngleDeg: 30,
      supplyOverRated: 1.05,
      longStayMinutes: 45,
    })
  })

  it('refuses what is outside its range, with the range, beside the field', () => {
    const outside = {
      toleranceTape: '0',
      tolerancePhotoShare: '30',
      headCautionShortStay: '1600',
      ingressOpenSky: '4.5',
      supplyOverRated: 'some',
    }
    expect(errors(outside)).toEqual({
      toleranceTape: 'Between 0.001 m and 0.10 m.',
      tolerancePhotoShare: 'Between 0.5 and 25 %.',
      headCautionShortStay: 'Between 100 W/m² and 1580 W/m².',
      ingressOpenSky: 'A whole number between 4 and 9.',
      supplyOverRated: 'Between 1 and 1.1 ×.',
    })
  })

  it('refuses what does not go together', () => {
    expect(errors({ targetLow: '400' })).toEqual({ targetHigh: 'The target ends above where it starts.' })
    expect(errors({ headCautionLongStay: '1100' })).toEqual({ headCautionShortStay: 'No less than for a long stay.' })
    expect(errors({ ingressUnderCover: '6' })).toEqual({ ingressOpenSky: 'No less than under a closed cover.' })
  })
})

describe('the rules in words', () => {
  it('tell each house rule once, and what no house changes apart from them', () => {
    const rows = houseRuleRows({ ...plainHouseRules, headCautionLongStay: 500 }).flatMap((group) => group.rows)
    expect(rows).toHaveLength(houseRuleFields.length)
    expect(rows.find(({ name }) => name === 'Head caution, long stay')).toMatchObject({
      figure: '500 W/m² (46.5 W/ft²)',
      source: 'house rule, set by this organisation',
    })
    expect(fixedRuleRows.map(({ name }) => name)).toContain('Stop')
    expect(rows.map(({ name }) => name)).not.toContain('Stop')
  })
})
