import { describe, expect, it } from 'vitest'
import type { TypedArticle, TypedRuleSet } from '#app/domain/rules/read-rule-set.ts'
import { mergedRuleSet, ruleSetDifferences } from '#app/domain/rules/rule-set-differences.ts'

const article = (number: string, figure: string, change: Partial<TypedArticle> = {}): TypedArticle => ({
  article: number,
  rule: 'clearance-above',
  figure,
  note: '',
  source: 'read',
  ...change,
})
const set = (articles: readonly TypedArticle[], change: Partial<TypedRuleSet> = {}): TypedRuleSet => ({
  name: 'District',
  place: 'here',
  edition: '1',
  articles,
  ...change,
})
const base = set([article('1', '0.30 m'), article('2', '0.40 m'), article('3', '0.50 m')])

describe('two copies of a rule set', () => {
  const mine = set([article('1', '0.35 m'), article('3', '0.50 m'), article('4', '600', { rule: 'head-caution' })], { edition: '2' }) // prettier-ignore
  const theirs = set([article('1', '0.38 m'), article('2', '0.40 m'), article('3', '0.55 m', { note: 'as amended' })], { edition: '3', place: 'there' }) // prettier-ignore
  const rows = ruleSetDifferences(mine, theirs, base)

  it('are told thing by thing, and what only they changed is theirs', () => {
    expect(rows.map(({ label, mine: own, theirs: other, theirsAlone }) => [label, own, other, theirsAlone])).toEqual([
      ['Edition', '2', '3', false],
      ['Place where it holds', 'here', 'there', true],
      ['1, clearance above', '0.35 m, read', '0.38 m, read', false],
      ['3, clearance above', '0.50 m, read', '0.55 m, read, as amended', true],
      ['4, caution at the head', '600 W/m², read', 'none', false],
      ['2, clearance above', 'it removed', '0.40 m, read', false],
    ])
  })

  it('go together as they are chosen, and nothing is lost that is not', () => {
    expect(mergedRuleSet(mine, theirs, new Set())).toEqual(mine)
    const all = mergedRuleSet(mine, theirs, new Set(rows.map(({ key }) => key)))
    expect(all.articles.toSorted((a, b) => a.article.localeCompare(b.article))).toEqual(theirs.articles)
    expect([all.edition, all.place]).toEqual(['3', 'there'])
    const alone = mergedRuleSet(mine, theirs, new Set(rows.flatMap(({ key, theirsAlone }) => (theirsAlone ? [key] : [])))) // prettier-ignore
    expect([alone.edition, alone.place]).toEqual(['2', 'there'])
    expect(alone.articles.map(({ article: number, figure }) => `${number} ${figure}`)).toEqual(['1 0.35 m', '3 0.55 m', '4 600']) // prettier-ignore
  })

  it('keep two articles of one number apart', () => {
    const twice = set([article('1', '0.30 m'), article('1', '0.60 m')])
    const other = set([article('1', '0.30 m'), article('1', '0.70 m')])
    const [row, ...more] = ruleSetDifferences(twice, other, null)
    expect([row?.mine, row?.theirs, more]).toEqual(['0.60 m, read', '0.70 m, read', []])
    expect(mergedRuleSet(twice, other, new Set([row!.key])).articles.map(({ figure }) => figure)).toEqual(['0.30 m', '0.70 m']) // prettier-ignore
  })

  it('that are the same differ in nothing', () => expect(ruleSetDifferences(base, base, base)).toEqual([]))
})
