import type { TypedRuleSet } from '#app/domain/rules/read-rule-set.ts'

/** The fields of a form as they are posted for a rule set; articles are counted by the field `count`. */
export function fieldsOfRuleSet({ articles, ...heads }: TypedRuleSet): Record<string, string> {
  const parts = articles.flatMap((article, i) =>
    Object.entries(article).map(([name, value]) => [`articles.${i}.${name}`, String(value)] as const),
  )
  return { ...heads, count: String(articles.length), ...Object.fromEntries(parts) }
}
