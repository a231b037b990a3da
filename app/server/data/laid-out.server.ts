import { and, eq } from 'drizzle-orm'
import { data } from 'react-router'
import { z } from 'zod'
import { briefSchema, type Brief } from '#app/domain/brief/brief.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { House } from '#app/domain/rules/house.ts'
import { siteSchema, type Site } from '#app/domain/site/site.ts'
import { houseColumn, houseOf } from '#app/server/data/house.server.ts'
import { modelsByCode } from '#app/server/data/heaters.server.ts'
import type { OpenJob } from '#app/server/data/jobs.server.ts'
import { present, variantColumns, variantList, variantOf, type Variant } from '#app/server/data/variants.server.ts'
import { isId } from '#app/server/missing.server.ts'
import { asOrganisation, own } from '#app/server/organisation.server.ts'
import type { Member } from '#app/server/session.server.ts'
import { briefs, sites, variants } from '#drizzle/schema.ts'

const neighbourSchema = z.object({ id: z.string(), number: z.number(), title: z.string() })

/** A variant with everything its figures rest on, all of one moment. */
export interface LaidOut {
  readonly variant: Variant
  readonly site: Site
  readonly siteRevision: number
  readonly brief: Brief
  readonly briefRevision: number
  readonly models: ReadonlyMap<string, HeaterModel>
  readonly house: House
  /** Every variant of the job by number, this one too. */
  readonly ofJob: readonly z.infer<typeof neighbourSchema>[]
}

/** A variant of the organisation with its site, brief, catalogue and house; null when it was deleted. */
export function findLaidOut(of: { readonly id: string; readonly member: Member }): Promise<LaidOut | null> {
  return asOrganisation(of.member.organisationId, async (tx) => {
    const [row] = await tx
      .select({
        variant: variantColumns,
        site: { revision: sites.revision, body: sites.body },
        brief: { revision: briefs.revision, body: briefs.body },
        house: houseColumn(tx),
        ofJob: variantList(tx, variants.jobId, ['id', 'number', 'title']),
      })
      .from(variants)
      .innerJoin(sites, and(own(sites), eq(sites.jobId, variants.jobId)))
      .innerJoin(briefs, and(own(briefs), eq(briefs.jobId, variants.jobId)))
      .where(and(own(variants), eq(variants.id, of.id), present))
    if (!row) return null
    return {
      variant: variantOf(row.variant),
      site: siteSchema.parse(row.site.body),
      siteRevision: row.site.revision,
      brief: briefSchema.parse(row.brief.body),
      briefRevision: row.brief.revision,
      models: await modelsByCode(tx),
      house: houseOf(row.house),
      ofJob: neighbourSchema.array().parse(row.ofJob),
    }
  })
}

/** A variant of a job with everything its figures rest on. Throws 404 for one that is not the job's or was deleted. */
export async function requireLaidOut(job: OpenJob, variantId: string): Promise<LaidOut> {
  const laid = isId(variantId) ? await findLaidOut({ id: variantId, member: job.member }) : null
  if (laid?.variant.jobId !== job.id) throw data('No such variant', 404)
  return laid
}
