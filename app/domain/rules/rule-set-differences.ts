import { bearings } from '#app/domain/rules/bearings.ts'
import type { TypedArticle, TypedRuleSet } from '#app/domain/rules/read-rule-set.ts'
import { bearingSchema } from '#app/domain/rules/rule-set.ts'
import { sameData } from '#app/domain/same-data.ts'

/** Something that two people left different in a rule set: what each says of it in words. */
export interface RuleSetDifference {
  readonly key: string
  readonly label: string
  readonly mine: string
  readonly theirs: string
  /** Changed there and not here. */
  readonly theirsAlone: boolean
}

const heads = { name: 'Name', edition: 'Edition', place: 'Place where it holds' } as const
const headNames = ['name', 'edition', 'place'] as const

/** Articles by their number and what they bear on; of several alike by their order too. */
function byKey(articles: readonly TypedArticle[]): ReadonlyMap<string, TypedArticle> {
  const keyed = new Map<string, TypedArticle>()
  for (const article of articles) {
    const name = `article ${article.article} ${article.rule}`
    let key = name
    for (let i = 2; keyed.has(key); i++) key = `${name} ${i}`
    keyed.set(key, article)
  }
  return keyed
}

function articleWords({ rule, figure, note, source }: TypedArticle): string {
  const read = bearingSchema.safeParse(rule)
  const unit = read.success ? bearings[read.data].unit : 'm'
  return [unit === 'm' ? figure : `${figure} ${unit}`, source, ...(note ? [note] : [])].join(', ')
}

function labelOf({ article, rule }: TypedArticle): string {
  const read = bearingSchema.safeParse(rule)
  return `${article}, ${read.success ? bearings[read.data].label.toLowerCase() : rule}`
}

/** Everything that differs between two copies of a rule set, each as its form shows it; `base` is what both came from. */
export function ruleSetDifferences(
  mine: TypedRuleSet,
  theirs: TypedRuleSet,
  base: TypedRuleSet | null,
): RuleSetDifference[] {
  const [own, other, was] = [byKey(mine.articles), byKey(theirs.articles), byKey(base?.articles ?? [])]
  const articles = [...new Set([...own.keys(), ...other.keys()])].flatMap((key): RuleSetDifference[] => {
    const [one, two, before] = [own.get(key), other.get(key), was.get(key)]
    const named = one ?? two
    if (!named || sameData(one, two)) return []
    const told = (article: TypedArticle | undefined) =>
      article ? articleWords(article) : before ? 'it removed' : 'none'
    const theirsAlone = base !== null && sameData(one, before)
    return [{ key, label: labelOf(named), mine: told(one), theirs: told(two), theirsAlone }]
  })
  const named = headNames
    .filter((name) => mine[name] !== theirs[name])
    .map((name): RuleSetDifference => {
      const theirsAlone = base !== null && mine[name] === base[name]
      return { key: name, label: heads[name], mine: mine[name], theirs: theirs[name], theirsAlone }
    })
  return [...named, ...articles]
}

/** Both copies as one: theirs for the named differences, mine for all others. */
export function mergedRuleSet(mine: TypedRuleSet, theirs: TypedRuleSet, taken: ReadonlySet<string>): TypedRuleSet {
  const head = (name: (typeof headNames)[number]) => (taken.has(name) ? theirs : mine)[name]
  const [own, other] = [byKey(mine.articles), byKey(theirs.articles)]
  const keys = [...new Set([...own.keys(), ...other.keys()])]
  const articles = keys.flatMap((key) => (taken.has(key) ? other : own).get(key) ?? [])
  return { name: head('name'), edition: head('edition'), place: head('place'), articles }
}
