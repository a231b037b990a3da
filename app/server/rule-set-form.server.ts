import type { TypedArticle, TypedRuleSet } from '#app/domain/rules/read-rule-set.ts'
import { mostArticles } from '#app/domain/rules/rule-set.ts'

/** Longest text of a field that is looked at; what is longer is refused by the field's own limit. */
const longest = 2000

/** A posted rule set as it was typed. Articles are counted by the field `count`; more than may be kept are cut off by one. */
export function typedFromFields(fields: Readonly<Record<string, string>>): TypedRuleSet {
  const text = (name: string) => (fields[name] ?? '').replaceAll('\0', '').slice(0, longest)
  const counted = Number(text('count'))
  const count = Number.isInteger(counted) && counted > 0 ? Math.min(counted, mostArticles + 1) : 0
  const articles = Array.from({ length: count }, (_, i): TypedArticle => {
    const part = (name: string) => text(`articles.${i}.${name}`)
    return {
      article: part('article'),
      rule: part('rule'),
      figure: part('figure'),
      note: part('note'),
      source: part('source'),
    }
  })
  return { name: text('name'), place: text('place'), edition: text('edition'), articles }
}
