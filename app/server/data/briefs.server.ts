import { and, eq, sql } from 'drizzle-orm'
import { briefSchema, type Brief } from '#app/domain/brief/brief.ts'
import { siteSchema } from '#app/domain/site/site.ts'
import type { ChosenRuleSet } from '#app/domain/rules/rule-set.ts'
import type { DisplayUnits } from '#app/domain/units.ts'
import type { Answer, Refusal } from '#app/server/answers.server.ts'
import { contentHash } from '#drizzle/content-hash.ts'
import { isKeptRuleSet, readRuleSets } from '#app/server/data/rule-sets.server.ts'
import { touchJob, type OpenJob } from '#app/server/data/jobs.server.ts'
import { asOrganisation, type Transaction, own } from '#app/server/organisation.server.ts'
import { saveRevision, type Locked, type Revisioned, type Save } from '#app/server/saving.server.ts'
import type { Member } from '#app/server/session.server.ts'
import { briefRevisions, briefs, jobs, sites } from '#drizzle/schema.ts'

/** A job's brief and the revision it has. */
export interface KeptBrief {
  readonly revision: number
  readonly brief: Brief
}

async function readBrief(tx: Transaction, jobId: string): Promise<KeptBrief | null> {
  const [row] = await tx
    .select({ revision: briefs.revision, body: briefs.body })
    .from(briefs)
    .where(and(own(briefs), eq(briefs.jobId, jobId)))
  return row ? { revision: row.revision, brief: briefSchema.parse(row.body) } : null
}

async function lockBrief(tx: Transaction, jobId: string): Promise<Locked | null> {
  const { revision, body, updatedBy, updatedAt } = briefs
  const [row] = await tx
    .select({ revision, body, updatedBy, updatedAt })
    .from(briefs)
    .where(and(own(briefs), eq(briefs.jobId, jobId)))
    .for('update')
  return row ? { ...row, shown: { revision: row.revision, brief: briefSchema.parse(row.body) } } : null
}

/** What the page of a brief shows. */
export interface BriefPageData extends KeptBrief {
  /** The units of the job's site. */
  readonly units: DisplayUnits
  /** The organisation's rule sets, of which the brief chooses one. */
  readonly ruleSets: readonly ChosenRuleSet[]
}

/** The brief of a job for its page. Throws when a job has none or no site: every job starts with both. */
export function findBriefPage({ id, member }: OpenJob): Promise<BriefPageData> {
  return asOrganisation(member.organisationId, async (tx) => {
    const [row] = await tx
      .select({ revision: briefs.revision, body: briefs.body, units: sql`${sites.body} ->> 'displayUnits'` })
      .from(briefs)
      .innerJoin(sites, and(own(sites), eq(sites.jobId, briefs.jobId)))
      .where(and(own(briefs), eq(briefs.jobId, id)))
    if (!row) throw new Error(`Job ${id} has no brief or no site.`)
    const units = siteSchema.shape.displayUnits.parse(row.units)
    return { revision: row.revision, brief: briefSchema.parse(row.body), units, ruleSets: await readRuleSets(tx) }
  })
}

/** The brief of a job as it is now. Throws when a job has none: every job starts with one. */
export async function findBrief(job: OpenJob): Promise<KeptBrief> {
  const kept = await asOrganisation(job.member.organisationId, (tx) => readBrief(tx, job.id))
  if (!kept) throw new Error(`Job ${job.id} has no brief.`)
  return kept
}

/** The first revision of a new job's brief. */
export async function insertBrief(tx: Transaction, member: Member, jobId: string, brief: Brief): Promise<void> {
  const row = { organisationId: member.organisationId, jobId, revision: 1, body: brief }
  await tx.insert(briefs).values({ ...row, updatedBy: member.userId })
  await tx.insert(briefRevisions).values({ ...row, contentHash: contentHash(brief), authorId: member.userId })
}

const briefOf = ({ id: jobId, member }: OpenJob): Revisioned<Brief> => ({
  resource: `jobs/${jobId}/brief`,
  saved: 'brief saved',
  lock: (tx) => lockBrief(tx, jobId),
  write: async (tx, revision, brief, hash) => {
    const { organisationId, userId } = member
    await tx
      .update(briefs)
      .set({ revision, body: brief, updatedAt: new Date(), updatedBy: userId })
      .where(and(own(briefs), eq(briefs.jobId, jobId)))
    await tx
      .insert(briefRevisions)
      .values({ organisationId, jobId, revision, body: brief, contentHash: hash, authorId: userId })
    await tx
      .update(jobs)
      .set({ place: brief.place })
      .where(and(own(jobs), eq(jobs.id, jobId)))
    await touchJob(tx, jobId)
    return { revision, brief }
  },
})

/** Saves a job's brief by the one rule for saving; the job's list shows the brief's place. */
export const saveBrief = (job: OpenJob, save: Save<Brief>): Promise<Answer | Refusal> =>
  saveRevision(job.member, briefOf(job), save, async (tx) => {
    const { ruleSet } = save.body
    if (!ruleSet || (await isKeptRuleSet(tx, ruleSet))) return save.body
    return { status: 400, error: 'No such revision of a rule set. Choose it again.', path: 'ruleSet' }
  })
