import { and, desc, eq, inArray, isNull, sql } from 'drizzle-orm'
import type { Action } from '#app/domain/access/roles.ts'
import { stagesBefore, type Stage } from '#app/domain/job/stage.ts'
import { isId, missing } from '#app/server/missing.server.ts'
import { asOrganisation, type Transaction, own } from '#app/server/organisation.server.ts'
import { requireMay, type Member } from '#app/server/session.server.ts'
import { jobs, variants } from '#drizzle/schema.ts'

/** A job as lists and titles show it; `updatedAt` is ISO 8601. */
interface Job {
  readonly id: string
  readonly name: string
  readonly customer: string
  readonly place: string
  readonly stage: Stage
  readonly updatedAt: string
}

/** A job with the variant that was saved last, null while it has none. */
export interface JobSummary extends Job {
  readonly newest: {
    readonly id: string
    readonly number: number
    readonly title: string
    readonly revision: number
  } | null
}

/** A job that the person who asks may see, and that person. */
export interface OpenJob extends Job {
  readonly member: Member
}

const jobColumns = {
  id: jobs.id,
  name: jobs.name,
  customer: jobs.customer,
  place: jobs.place,
  stage: jobs.stage,
  updatedAt: jobs.updatedAt,
}

/** The organisation's jobs, the one changed last first. */
export function listJobs(member: Member): Promise<JobSummary[]> {
  return asOrganisation(member.organisationId, async (tx) => {
    const newest = tx
      .selectDistinctOn([variants.jobId], {
        jobId: variants.jobId,
        id: variants.id,
        number: variants.number,
        title: variants.title,
        revision: variants.revision,
      })
      .from(variants)
      .where(and(own(variants), isNull(variants.deletedAt)))
      .orderBy(variants.jobId, desc(variants.updatedAt))
      .as('newest')
    const rows = await tx
      .select({
        ...jobColumns,
        newest: { id: newest.id, number: newest.number, title: newest.title, revision: newest.revision },
      })
      .from(jobs)
      .leftJoin(newest, eq(newest.jobId, jobs.id))
      .where(own(jobs))
      .orderBy(desc(jobs.updatedAt), jobs.id)
    return rows.map((row) => ({ ...row, updatedAt: row.updatedAt.toISOString() }))
  })
}

/**
 * The job that a URL names, for a person who may do that to it. Throws 401 (pages: to sign-in), 403, or 404 when it is
 * not a job of the person's organisation, whether it is another's or nobody's.
 */
export async function requireJob(request: Request, jobId: string | undefined, action: Action): Promise<OpenJob> {
  const member = await requireMay(request, action)
  if (!isId(jobId)) throw missing(request, 'job')
  const [row] = await asOrganisation(member.organisationId, (tx) =>
    tx
      .select(jobColumns)
      .from(jobs)
      .where(and(own(jobs), eq(jobs.id, jobId))),
  )
  if (!row) throw missing(request, 'job')
  return { ...row, updatedAt: row.updatedAt.toISOString(), member }
}

/** Says that something of the job changed now, and that it has come to a stage at least; it never goes back. */
export async function touchJob(tx: Transaction, jobId: string, reached: Stage = 'enquiry'): Promise<void> {
  const earlier = inArray(jobs.stage, stagesBefore(reached))
  await tx
    .update(jobs)
    .set({ updatedAt: sql`now()`, stage: sql`case when ${earlier} then ${reached} else ${jobs.stage} end` })
    .where(and(own(jobs), eq(jobs.id, jobId)))
}
