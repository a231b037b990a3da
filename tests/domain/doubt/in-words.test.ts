import { plainHouseRules } from '#app/domain/rules/house-rules.ts'
import { describe, expect, it } from 'vitest'
import { measureLines, measureText, sizeText } from '#app/domain/doubt/in-words.ts'
import { settlings } from '#app/domain/doubt/settling.ts'
import { sizeEffects } from '#app/domain/doubt/size-effects.ts'
import { coverMoves, dimension, finish, oneHeater } from '#tests/domain/doubt/small-doubt.ts'

const linesOf = (...dimensions: ReturnType<typeof dimension>[]) => {
  const { made } = finish(sizeEffects(oneHeater(dimensions), false))
  return measureLines(
    made.effects,
    made.nominal,
    settlings(made.nominal.checks, made.effects, plainHouseRules.toleranceLaser),
    { units: 'metric', rules: plainHouseRules },
  )
}
const roof = dimension('roof', 3, 0.25, coverMoves, { label: 'height of the roof at the house wall' })

describe('the list of what to measure', () => {
  it('says what a size is now, where it comes from and what it would settle', () => {
    const [line] = linesOf(roof)
    expect(line).toMatchObject({
      label: 'Height of the roof at the house wall',
      now: 'now 3.00 m ± 250 mm, scaled from a photo',
    })
    expect(line!.why).toContain('Measured to ± 5 mm it would settle: clearance above (H1).')
    expect(line!.why).toContain('the tightest margin by up to 250 mm')
  })
  it('leaves out what changes nothing and what is measured already', () => {
    const idle = dimension('idle', 2, 0.3, [])
    const exact = dimension('exact', 3, 0.004, coverMoves)
    expect(linesOf(idle, exact)).toEqual([])
  })
  it('is text to send with a number before each size', () => {
    expect(measureText(linesOf(roof), 'Please measure')).toMatch(
      /^Please measure\n\n1\. Height of the roof at the house wall: now 3\.00 m ± 250 mm, scaled from a photo\. Measured/,
    )
  })
})

describe('a size in words', () => {
  const size = finish(sizeEffects(oneHeater([roof]), true)).made.effects.map((effect) => effect.size)
  it.each([
    ['voltage', 'metric', '± 5 %'],
    ['efficiency plain-2-0', 'metric', '50 ± 2.5 %'],
    ['unstated seat S1', 'metric', '± 25 mm each'],
    ['dimension roof', 'imperial', '9 ft 10 1/8 in ± 9 7/8 in'],
  ] as const)('%s in %s units', (key, units, text) => {
    expect(
      sizeText(
        size.find((each) => each.key === key)!,
        units,
      ),
    ).toBe(text)
  })
})
