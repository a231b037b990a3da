import { z } from 'zod'

/** A figure of ours that an article of a rule set may give, with its unit and the greatest that makes sense. */
interface Bearing {
  readonly label: string
  readonly unit: 'm' | 'W/m²' | '×'
  readonly most: number
}

/** What articles bear on. Clearances are to combustible things; 'at least' for lengths, 'at most' for the others. */
export const bearings = {
  'clearance-above': { label: 'Clearance above', unit: 'm', most: 20 },
  'clearance-side': { label: 'Clearance at the side', unit: 'm', most: 20 },
  'clearance-end': { label: 'Clearance beyond the end', unit: 'm', most: 20 },
  'clearance-front-of-beam': { label: 'Clearance in front of the beam', unit: 'm', most: 20 },
  'clearance-below': { label: 'Clearance below', unit: 'm', most: 20 },
  'mounting-height': { label: 'Least mounting height', unit: 'm', most: 20 },
  'sprinkler-distance': { label: 'Distance from a sprinkler', unit: 'm', most: 20 },
  'lamp-distance': { label: 'Distance from a lamp', unit: 'm', most: 20 },
  'head-caution': { label: 'Caution at the head', unit: 'W/m²', most: 5000 },
  'supply-over-rated': { label: 'Supply above rated voltage, at most', unit: '×', most: 2 },
} as const satisfies Record<string, Bearing>

const bearingNames = [
  'clearance-above',
  'clearance-side',
  'clearance-end',
  'clearance-front-of-beam',
  'clearance-below',
  'mounting-height',
  'sprinkler-distance',
  'lamp-distance',
  'head-caution',
  'supply-over-rated',
] as const
export const bearingSchema = z.enum(bearingNames)
export type BearingName = z.infer<typeof bearingSchema>

/** One article: its number, what it bears on, its figure in SI, and whether its text was open when it was entered. */
const articleSchema = z
  .strictObject({
    article: z.string().trim().min(1, 'Give the article’s number.').max(60, 'At most 60 characters.'),
    rule: bearingSchema,
    figure: z.number().positive('A figure above 0.'),
    unit: z.enum(['m', 'W/m²', '×']),
    note: z.string().max(400, 'At most 400 characters.'),
    source: z.enum(['from memory', 'read']),
  })
  .refine(({ rule, unit }) => bearings[rule].unit === unit, { path: ['unit'], message: 'The unit of another rule.' })
  .refine(({ rule, figure }) => figure <= bearings[rule].most, { path: ['figure'], message: 'Greater than can be.' })
export type Article = z.infer<typeof articleSchema>

/** Most articles of one rule set. */
export const mostArticles = 60

/** The rules of a place in one edition, entered by an engineer. */
export const ruleSetSchema = z.strictObject({
  name: z.string().trim().min(1, 'Give it a name.').max(120, 'At most 120 characters.'),
  place: z.string().trim().min(1, 'Say where it holds.').max(120, 'At most 120 characters.'),
  edition: z.string().trim().min(1, 'Say which edition it is.').max(60, 'At most 60 characters.'),
  articles: z.array(articleSchema).max(mostArticles, `At most ${mostArticles} articles.`),
})
export type RuleSet = z.infer<typeof ruleSetSchema>

/** A rule set as a job chose it: one revision, as it was then. A later revision has to be chosen again. */
export const chosenRuleSetSchema = z.strictObject({
  id: z.uuid(),
  revision: z.int().positive(),
  ...ruleSetSchema.shape,
})
export type ChosenRuleSet = z.infer<typeof chosenRuleSetSchema>

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
