import { and, asc, eq, isNull, sql, type AnyColumn } from 'drizzle-orm'
import { alias } from 'drizzle-orm/pg-core'
import { z } from 'zod'
import type { Action } from '#app/domain/access/roles.ts'
import { mountedHeaterSchema, type MountedHeater } from '#app/domain/layout/layout.ts'
import type { OpenJob } from '#app/server/data/jobs.server.ts'
import { isId, missing } from '#app/server/missing.server.ts'
import { asOrganisation, own, type Transaction } from '#app/server/organisation.server.ts'
import { requireMay, type Member } from '#app/server/session.server.ts'
import { variants } from '#drizzle/schema.ts'

/** A variant as lists show it; `updatedAt` is ISO 8601. */
export interface VariantSummary {
  readonly id: string
  readonly jobId: string
  readonly number: number
  readonly revision: number
  readonly title: string
  readonly updatedAt: string
}

/** A variant with its heaters. */
export interface Variant extends VariantSummary {
  readonly heaters: MountedHeater[]
}

/** A variant that the person who asks may see, and that person. */
export interface OpenVariant {
  readonly id: string
  readonly jobId: string
  readonly member: Member
}

/** Columns of a summary. */
const columns = {
  id: variants.id,
  jobId: variants.jobId,
  number: variants.number,
  revision: variants.revision,
  title: variants.title,
  updatedAt: variants.updatedAt,
}
/** Columns of a variant with its heaters. */
export const variantColumns = { ...columns, heaters: variants.heaters }
const heatersSchema = z.array(mountedHeaterSchema)
/** A deleted variant keeps its row so that it can be brought back. */
export const present = isNull(variants.deletedAt)

/** A row as the rest of the program knows it. */
export const variantOf = (
  row: Omit<Variant, 'updatedAt' | 'heaters'> & { updatedAt: Date; heaters: unknown },
): Variant => ({
  ...row,
  updatedAt: row.updatedAt.toISOString(),
  heaters: heatersSchema.parse(row.heaters),
})

const listed = alias(variants, 'listed')

/**
 * A column with every variant of a job by number as a JSON list, for a statement that asks for other things of the job
 * too: `jobId` is the job's column there.
 */
export function variantList(
  tx: Transaction,
  jobId: AnyColumn,
  keys: readonly ('id' | 'number' | 'title' | 'revision' | 'heaters')[],
) {
  const entries = sql.join(
    keys.map((key) => sql`${key}::text, ${listed[key]}`),
    sql`, `,
  )
  const list = tx
    .select({ list: sql`json_agg(json_build_object(${entries}) order by ${listed.number})` })
    .from(listed)
    .where(and(own(listed), eq(listed.jobId, jobId), isNull(listed.deletedAt)))
  return sql`coalesce(${list}, '[]')`
}

/** The variants of a job by number, without their heaters. */
export function listVariants(job: OpenJob): Promise<VariantSummary[]> {
  return asOrganisation(job.member.organisationId, async (tx) => {
    const rows = await tx
      .select(columns)
      .from(variants)
      .where(and(own(variants), eq(variants.jobId, job.id), present))
      .orderBy(asc(variants.number))
    return rows.map((row) => ({ ...row, updatedAt: row.updatedAt.toISOString() }))
  })
}

/**
 * The variant that a URL names, for a person who may do that to it. Throws 401, 403, or 404 when it is not a variant
 * of the person's organisation or was deleted; `deleted` lets deleted ones through.
 */
export async function requireVariant(
  request: Request,
  variantId: string | undefined,
  action: Action,
  deleted: 'refused' | 'let through' = 'refused',
): Promise<OpenVariant> {
  const member = await requireMay(request, action)
  if (!isId(variantId)) throw missing(request, 'variant')
  const [row] = await asOrganisation(member.organisationId, (tx) =>
    tx
      .select({ id: variants.id, jobId: variants.jobId })
      .from(variants)
      .where(
        and(
          own(variants),
          deleted === 'refused' ? and(eq(variants.id, variantId), present) : eq(variants.id, variantId),
        ),
      ),
  )
  if (!row) throw missing(request, 'variant')
  return { ...row, member }
}

/** A variant as it is now; null when it was deleted meanwhile. */
export async function findOpenVariant({ id, member }: OpenVariant): Promise<Variant | null> {
  const [row] = await asOrganisation(member.organisationId, (tx) =>
    tx
      .select(variantColumns)
      .from(variants)
      .where(and(own(variants), eq(variants.id, id), present)),
  )
  return row ? variantOf(row) : null
}
