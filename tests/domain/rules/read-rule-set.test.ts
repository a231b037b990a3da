import { describe, expect, it } from 'vitest'
import { readRuleSet, typedRuleSet, type TypedArticle } from '#app/domain/rules/read-rule-set.ts'
import { demoRuleSet } from '#drizzle/seed/demo-rule-set.ts'

const typed = (change: Partial<TypedArticle> = {}) => ({
  name: 'District',
  place: 'here',
  edition: '2',
  articles: [{ article: '4.1', rule: 'clearance-above', figure: '18 in', note: '', source: 'read', ...change }],
})

describe('a typed rule set', () => {
  it('reads lengths in any unit, and figures as numbers', () => {
    expect(readRuleSet(typed())).toMatchObject({ ruleSet: { articles: [{ figure: 0.4572, unit: 'm' }] } })
    expect(readRuleSet(typed({ rule: 'head-caution', figure: '450,5' }))).toMatchObject({
      ruleSet: { articles: [{ figure: 450.5, unit: 'W/m²' }] },
    })
  })

  it.each([
    [{ figure: 'wide' }, 'articles.0.figure'],
    [{ figure: '' }, 'articles.0.figure'],
    [{ figure: '40 m' }, 'articles.0.figure'],
    [{ rule: 'head-caution', figure: 'hot' }, 'articles.0.figure'],
    [{ article: '  ' }, 'articles.0.article'],
    [{ rule: 'no-such-rule' }, 'articles.0.rule'],
    [{ source: 'heard' }, 'articles.0.source'],
    [{ note: 'x'.repeat(401) }, 'articles.0.note'],
  ])('refuses %o beside its field', (change, path) => {
    const read = readRuleSet(typed(change))
    expect('errors' in read && Object.keys(read.errors)).toEqual([path])
  })

  it('says the same after it was shown and read again', () => {
    const kept = demoRuleSet()
    expect(readRuleSet(typedRuleSet(kept))).toEqual({ ruleSet: kept })
  })
})
