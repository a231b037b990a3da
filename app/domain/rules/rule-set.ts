import { z } from 'zod'
import { bearings, type BearingName } from '#app/domain/rules/bearings.ts'

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
] as const satisfies readonly BearingName[]
export const bearingSchema = z.enum(bearingNames)

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
