import { and, eq, max, sql } from 'drizzle-orm'
import { z } from 'zod'
import { layoutSchema, type Layout } from '#app/domain/layout/layout.ts'
import type { Answer, Refusal } from '#app/server/answers.server.ts'
import { recordEvent } from '#app/server/audit.server.ts'
import { touchJob, type OpenJob } from '#app/server/data/jobs.server.ts'
import { insertRevision, lockVariant, savedLayoutSchema, stageOf } from '#app/server/data/variant-revisions.server.ts'
import { present, variantColumns, variantOf, type OpenVariant, type Variant } from '#app/server/data/variants.server.ts'
import { asOrganisation, type Transaction, own } from '#app/server/organisation.server.ts'
import { answerOnce, gone, staleness, type Save } from '#app/server/saving.server.ts'
import type { Member } from '#app/server/session.server.ts'
import { contentHash } from '#drizzle/content-hash.ts'
import { jobs, variants } from '#drizzle/schema.ts'

/** The next variant of a job, at revision 1. The job's row must be locked: numbers are given once. */
export async function insertVariant(tx: Transaction, member: Member, jobId: string, layout: Layout): Promise<Variant> {
  const [last] = await tx
    .select({ number: max(variants.number) })
    .from(variants)
    .where(and(own(variants), eq(variants.jobId, jobId)))
  const { organisationId, userId: updatedBy } = member
  const number = (last?.number ?? 0) + 1
  const [row] = await tx
    .insert(variants)
    .values({ organisationId, jobId, number, revision: 1, ...layout, updatedBy })
    .returning(variantColumns)
  if (!row) throw new Error('The new variant was not returned.')
  await insertRevision(tx, member, row.id, 1, layout, contentHash(layout))
  return variantOf(row)
}

/** What a new variant starts from: nothing, a title, heaters, or a copy of another variant of the job. */
export const variantRequestSchema = z
  .strictObject({
    title: layoutSchema.shape.title.optional(),
    heaters: savedLayoutSchema.shape.heaters.optional(),
    copyOf: z.uuid().optional(),
  })
  .refine(({ heaters, copyOf }) => !(heaters && copyOf), { path: ['copyOf'], error: 'Either heaters or a copy.' })
export type VariantRequest = z.infer<typeof variantRequestSchema>

async function startingLayout(tx: Transaction, jobId: string, asked: VariantRequest): Promise<Layout | null> {
  if (!asked.copyOf) return { title: asked.title ?? 'Untitled layout', heaters: asked.heaters ?? [] }
  const [row] = await tx
    .select(variantColumns)
    .from(variants)
    .where(and(own(variants), eq(variants.id, asked.copyOf), eq(variants.jobId, jobId), present))
  if (!row) return null
  const { title, heaters } = variantOf(row)
  return { title: asked.title ?? `${title.slice(0, 112)} (copy)`, heaters }
}

/** Creates a variant of a job once per key, empty or as a copy; 404 when the variant to copy is not of this job. */
export function createVariant(job: OpenJob, save: Save<VariantRequest>): Promise<Answer | Refusal> {
  const { member, id: jobId } = job
  const asked = { member, resource: `jobs/${jobId}/variants`, key: save.key, bodyHash: save.bodyHash }
  return asOrganisation(member.organisationId, (tx) =>
    answerOnce(tx, asked, async () => {
      await tx
        .select({ id: jobs.id })
        .from(jobs)
        .where(and(own(jobs), eq(jobs.id, jobId)))
        .for('update')
      const layout = await startingLayout(tx, jobId, save.body)
      if (!layout) return { ...gone('variant'), path: 'copyOf' }
      const variant = await insertVariant(tx, member, jobId, layout)
      await touchJob(tx, jobId, stageOf(layout))
      const detail = { number: variant.number, copyOf: save.body.copyOf }
      await recordEvent(tx, member, { action: 'variant created', subject: `variants/${variant.id}`, detail })
      return { status: 201, body: variant, revision: 1 }
    }),
  )
}

/** Deletes a variant that still is at the expected revision. It can be brought back. */
export function deleteVariant({ id, member }: OpenVariant, expected: number | null): Promise<Answer | Refusal> {
  return asOrganisation(member.organisationId, async (tx) => {
    const kept = await lockVariant(tx, id)
    if (!kept) return gone('variant')
    const stale = await staleness(expected, kept)
    if (stale) return stale
    await tx
      .update(variants)
      .set({ deletedAt: sql`now()` })
      .where(and(own(variants), eq(variants.id, id)))
    await touchJob(tx, kept.shown.jobId)
    const detail = { revision: kept.revision }
    await recordEvent(tx, member, { action: 'variant deleted', subject: `variants/${id}`, detail })
    return { status: 200, body: { id, revision: kept.revision, deleted: true }, revision: kept.revision }
  })
}

/** What to bring back: an older revision's layout as a new revision, or a deleted variant as it was. */
export const restoreSchema = z.union([
  z.strictObject({ revision: z.int().min(1).max(1_000_000_000) }),
  z.strictObject({ deleted: z.literal(true) }),
])

async function bringBack(tx: Transaction, { id, member }: OpenVariant): Promise<Answer | Refusal> {
  const kept = await lockVariant(tx, id)
  if (kept) return { status: 200, body: kept.shown, revision: kept.revision }
  const [row] = await tx
    .update(variants)
    .set({ deletedAt: null })
    .where(and(own(variants), eq(variants.id, id)))
    .returning(variantColumns)
  if (!row) return gone('variant')
  await touchJob(tx, row.jobId)
  const variant = variantOf(row)
  const detail = { revision: variant.revision }
  await recordEvent(tx, member, { action: 'variant brought back', subject: `variants/${id}`, detail })
  return { status: 200, body: variant, revision: variant.revision }
}

/** Brings a deleted variant back as it was, once per key. */
export function undeleteVariant(variant: OpenVariant, save: Save<unknown>): Promise<Answer | Refusal> {
  const { member, id } = variant
  const asked = { member, resource: `variants/${id}`, key: save.key, bodyHash: save.bodyHash }
  return asOrganisation(member.organisationId, (tx) => answerOnce(tx, asked, () => bringBack(tx, variant)))
}
