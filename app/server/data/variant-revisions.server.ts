import { and, desc, eq, sql } from 'drizzle-orm'
import type { Stage } from '#app/domain/job/stage.ts'
import { layoutSchema, type Layout } from '#app/domain/layout/layout.ts'
import { roundLength } from '#app/domain/units.ts'
import type { Answer, Refusal } from '#app/server/answers.server.ts'
import { touchJob } from '#app/server/data/jobs.server.ts'
import { present, variantColumns, variantOf, type OpenVariant, type Variant } from '#app/server/data/variants.server.ts'
import { asOrganisation, type Transaction, own } from '#app/server/organisation.server.ts'
import { gone, saveRevision, type Locked, type Revisioned, type Save } from '#app/server/saving.server.ts'
import type { Member } from '#app/server/session.server.ts'
import { variantRevisions, variants } from '#drizzle/schema.ts'

/** One of the revisions of a variant that are kept for good. */
export interface VariantRevision {
  readonly revision: number
  readonly savedAt: string
  readonly contentHash: string
  readonly byYou: boolean
  readonly title: string
  readonly heaterCount: number
}

/** Locks a variant until the transaction ends; null when it is gone. */
export async function lockVariant(tx: Transaction, id: string): Promise<(Locked & { shown: Variant }) | null> {
  const [row] = await tx
    .select({ ...variantColumns, updatedBy: variants.updatedBy })
    .from(variants)
    .where(and(own(variants), eq(variants.id, id), present))
    .for('update')
  if (!row) return null
  const { updatedBy, ...shown } = row
  return { revision: row.revision, shown: variantOf(shown), updatedBy, updatedAt: row.updatedAt }
}

/** How far a job has come that has such a layout. */
export const stageOf = ({ heaters }: Layout): Stage => (heaters.length > 0 ? 'variants' : 'enquiry')

const revisionedVariant = (
  { id, member }: OpenVariant,
  saved: 'variant saved' | 'variant restored',
): Revisioned<Layout> => ({
  resource: `variants/${id}`,
  saved,
  lock: (tx) => lockVariant(tx, id),
  write: async (tx, revision, layout, hash) => {
    const [row] = await tx
      .update(variants)
      .set({ ...layout, revision, updatedAt: new Date(), updatedBy: member.userId })
      .where(and(own(variants), eq(variants.id, id)))
      .returning(variantColumns)
    if (!row) throw new Error(`Variant ${id} went away while it was locked.`)
    await insertRevision(tx, member, id, revision, layout, hash)
    await touchJob(tx, row.jobId, stageOf(layout))
    return variantOf(row)
  },
})

/** Adds the row of a revision, which is never changed again. */
export const insertRevision = (
  tx: Transaction,
  { organisationId, userId }: Member,
  variantId: string,
  revision: number,
  layout: Layout,
  hash: string,
) =>
  tx
    .insert(variantRevisions)
    .values({ organisationId, variantId, revision, layout, contentHash: hash, authorId: userId })

/** A layout that can be kept: every heater's id once, lengths in whole tenths of a millimetre. */
export const savedLayoutSchema = layoutSchema.extend({
  heaters: layoutSchema.shape.heaters
    .superRefine((heaters, context) => {
      const seen = new Set<string>()
      heaters.forEach(({ id }, index) => {
        if (seen.has(id)) {
          context.addIssue({ code: 'custom', path: [index, 'id'], message: `The id ${id} is there twice.` })
        }
        seen.add(id)
      })
    })
    .transform((heaters) =>
      heaters.map((heater) => ({
        ...heater,
        x: roundLength(heater.x),
        y: roundLength(heater.y),
        lowestPoint: roundLength(heater.lowestPoint),
      })),
    ),
})

/** Saves a variant's title and heaters by the one rule for saving. */
export const saveVariant = (variant: OpenVariant, save: Save<Layout>): Promise<Answer | Refusal> =>
  saveRevision(variant.member, revisionedVariant(variant, 'variant saved'), save, () => Promise.resolve(save.body))

async function layoutAt(tx: Transaction, variantId: string, revision: number): Promise<Layout | Refusal> {
  const [row] = await tx
    .select({ layout: variantRevisions.layout })
    .from(variantRevisions)
    .where(
      and(own(variantRevisions), eq(variantRevisions.variantId, variantId), eq(variantRevisions.revision, revision)),
    )
  return row ? layoutSchema.parse(row.layout) : gone('revision')
}

/** Brings the layout of an older revision back as a new revision, by the one rule for saving. */
export const restoreRevision = (
  variant: OpenVariant,
  save: Save<unknown>,
  revision: number,
): Promise<Answer | Refusal> =>
  saveRevision(variant.member, revisionedVariant(variant, 'variant restored'), save, (tx) =>
    layoutAt(tx, variant.id, revision),
  )

/** The revisions of a variant, newest first. */
export function listRevisions({ id, member }: OpenVariant): Promise<VariantRevision[]> {
  return asOrganisation(member.organisationId, async (tx) => {
    const rows = await tx
      .select({
        revision: variantRevisions.revision,
        savedAt: variantRevisions.createdAt,
        contentHash: variantRevisions.contentHash,
        authorId: variantRevisions.authorId,
        title: sql<string>`${variantRevisions.layout} ->> 'title'`,
        heaterCount: sql<number>`jsonb_array_length(${variantRevisions.layout} -> 'heaters')`,
      })
      .from(variantRevisions)
      .where(and(own(variantRevisions), eq(variantRevisions.variantId, id)))
      .orderBy(desc(variantRevisions.revision))
    return rows.map(({ authorId, savedAt, ...row }) => ({
      ...row,
      savedAt: savedAt.toISOString(),
      byYou: authorId === member.userId,
    }))
  })
}
