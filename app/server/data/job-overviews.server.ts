import { and, desc, eq, isNull, sql } from 'drizzle-orm'
import { z } from 'zod'
import { stages } from '#app/domain/job/stage.ts'
import { asOrganisation, own } from '#app/server/organisation.server.ts'
import type { Member } from '#app/server/session.server.ts'
import { briefs, jobs, sites, variants } from '#drizzle/schema.ts'

const overviewSchema = z.object({
  id: z.string(),
  name: z.string(),
  customer: z.string(),
  place: z.string(),
  stage: z.enum(stages),
  updatedAt: z.date().transform((at) => at.toISOString()),
  /** What kind of place it is, in a word or two. */
  kind: z.string().nullable(),
  seats: z.number().nullable(),
  /** Answers of the brief that are assumed. */
  assumed: z.number().nullable(),
  variants: z.array(z.object({ id: z.string(), number: z.number(), title: z.string(), revision: z.number() })),
})

/** A job as the list of jobs shows it: with its variants by number, without their heaters. */
export type JobOverview = z.output<typeof overviewSchema>

/** The organisation's jobs, the one changed last first, in one statement. */
export function listJobOverviews(member: Member): Promise<JobOverview[]> {
  return asOrganisation(member.organisationId, async (tx) => {
    const ofJob = tx
      .select({
        jobId: variants.jobId,
        list: sql`json_agg(json_build_object('id', ${variants.id}, 'number', ${variants.number}, 'title',
          ${variants.title}, 'revision', ${variants.revision}) order by ${variants.number})`.as('list'),
      })
      .from(variants)
      .where(and(own(variants), isNull(variants.deletedAt)))
      .groupBy(variants.jobId)
      .as('of_job')
    const rows = await tx
      .select({
        id: jobs.id,
        name: jobs.name,
        customer: jobs.customer,
        place: jobs.place,
        stage: jobs.stage,
        updatedAt: jobs.updatedAt,
        kind: sql`${sites.body} ->> 'kind'`,
        seats: sql`jsonb_array_length(${sites.body} -> 'seats')`,
        assumed: sql`jsonb_array_length(${briefs.body} -> 'assumed')`,
        variants: sql`coalesce(${ofJob.list}, '[]')`,
      })
      .from(jobs)
      .leftJoin(sites, and(own(sites), eq(sites.jobId, jobs.id)))
      .leftJoin(briefs, and(own(briefs), eq(briefs.jobId, jobs.id)))
      .leftJoin(ofJob, eq(ofJob.jobId, jobs.id))
      .where(own(jobs))
      .orderBy(desc(jobs.updatedAt), jobs.id)
    return overviewSchema.array().parse(rows)
  })
}
