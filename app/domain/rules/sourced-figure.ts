import { bearings, type BearingName } from '#app/domain/rules/bearings.ts'
import type { Article, RuleSet } from '#app/domain/rules/rule-set.ts'

/** A figure with where it comes from. */
export interface SourcedFigure {
  readonly value: number
  readonly source: string
}

/** "Demo district, edition 1, article 4.2 (from memory)". */
const sourceOf = ({ name, edition }: RuleSet, { article, source }: Article): string =>
  `${name}, ${edition}, article ${article}${source === 'from memory' ? ' (from memory)' : ''}`

const isGreaterStricter = (rule: BearingName): boolean => bearings[rule].unit === 'm'

/** The figure that a chosen rule set gives for a rule, the strictest of several articles; null when it gives none. */
export function figureOfRuleSet(ruleSet: RuleSet | undefined, rule: BearingName): SourcedFigure | null {
  let strictest: Article | null = null
  for (const article of ruleSet?.articles ?? []) {
    if (article.rule !== rule) continue
    const isStricter = !strictest || article.figure > strictest.figure === isGreaterStricter(rule)
    if (isStricter) strictest = article
  }
  return ruleSet && strictest ? { value: strictest.figure, source: sourceOf(ruleSet, strictest) } : null
}

/** The greater of the manual's length and the rule set's: neither lets the other be passed over. Null when both are silent. */
export function stricterLength(manual: SourcedFigure | null, article: SourcedFigure | null): SourcedFigure | null {
  if (!manual || !article) return manual ?? article
  return article.value > manual.value ? article : manual
}
