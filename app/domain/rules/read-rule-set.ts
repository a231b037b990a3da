import { bearings } from '#app/domain/rules/bearings.ts'
import { bearingSchema, ruleSetSchema, type Article, type RuleSet } from '#app/domain/rules/rule-set.ts'
import { parseLength } from '#app/domain/length-parser.ts'
import { formatLength } from '#app/domain/units.ts'

/** An article as it is typed: every part a text. */
export interface TypedArticle {
  readonly article: string
  readonly rule: string
  readonly figure: string
  readonly note: string
  readonly source: string
}

/** A rule set as it is typed. */
export interface TypedRuleSet {
  readonly name: string
  readonly place: string
  readonly edition: string
  readonly articles: readonly TypedArticle[]
}

/** A rule set as a form shows it. */
export const typedRuleSet = ({ name, place, edition, articles }: RuleSet): TypedRuleSet => ({
  name,
  place,
  edition,
  articles: articles.map(({ article, rule, figure, unit, note, source }) => ({
    article,
    rule,
    figure: unit === 'm' ? formatLength(figure, 'metric', 'fine') : String(figure),
    note,
    source,
  })),
})

/** The rule set that was typed, or what is wrong with each field by its dotted path. */
export function readRuleSet(
  typed: TypedRuleSet,
): { readonly ruleSet: RuleSet } | { readonly errors: Readonly<Record<string, string>> } {
  const errors: Record<string, string> = {}
  const articles = typed.articles.map((each, i) => {
    const rule = bearingSchema.safeParse(each.rule)
    const unit: Article['unit'] = rule.success ? bearings[rule.data].unit : 'm'
    const figure = unit === 'm' ? readLength(each.figure) : readNumber(each.figure)
    if (typeof figure === 'string') errors[`articles.${i}.figure`] = figure
    return { ...each, unit, figure: typeof figure === 'string' ? 1 : figure }
  })
  const read = ruleSetSchema.safeParse({ ...typed, articles })
  for (const { path, message } of read.error?.issues ?? []) errors[path.join('.')] ??= message
  return read.success && Object.keys(errors).length === 0 ? { ruleSet: read.data } : { errors }
}

function readLength(text: string): number | string {
  const read = parseLength(text, 'metric', { min: 0, max: 20 })
  return 'error' in read ? read.error : read.metres
}

function readNumber(text: string): number | string {
  const value = Number(text.trim().replace(',', '.'))
  return text.trim() === '' || !Number.isFinite(value) ? 'Give a number.' : value
}
