import { and, eq } from 'drizzle-orm'
import type { House } from '#app/domain/rules/house.ts'
import { siteFaults } from '#app/domain/site/site-faults.ts'
import { siteSchema, type Site } from '#app/domain/site/site.ts'
import { roundLength } from '#app/domain/units.ts'
import type { Answer, Refusal } from '#app/server/answers.server.ts'
import { contentHash } from '#drizzle/content-hash.ts'
import { houseColumn, houseOf } from '#app/server/data/house.server.ts'
import { touchJob, type OpenJob } from '#app/server/data/jobs.server.ts'
import { strangePhoto } from '#app/server/data/site-photos.server.ts'
import { asOrganisation, type Transaction, own } from '#app/server/organisation.server.ts'
import { saveRevision, type Locked, type Revisioned, type Save } from '#app/server/saving.server.ts'
import type { Member } from '#app/server/session.server.ts'
import { siteRevisions, sites } from '#drizzle/schema.ts'

/** Figures that are no lengths and stay exact: how far a size moves things, the scale of a picture to trace. */
const exact = new Set(['by', 'metresPerPixel'])

/** Every length to four digits: 0.1 mm. */
function rounded(value: unknown, key = ''): unknown {
  if (typeof value === 'number') return exact.has(key) ? value : roundLength(value)
  if (Array.isArray(value)) return value.map((inner) => rounded(inner))
  if (typeof value !== 'object' || value === null) return value
  return Object.fromEntries(Object.entries(value).map(([name, inner]) => [name, rounded(inner, name)]))
}

/** A site that can be kept: without faults, lengths in whole tenths of a millimetre. */
export const savedSiteSchema = siteSchema
  .superRefine((site, context) => {
    for (const { path, message } of siteFaults(site)) {
      context.addIssue({ code: 'custom', path: [...path], message })
    }
  })
  .transform((site) => rounded(site))
  .pipe(siteSchema)

/** A job's site, the revision it has, and what the house decided. */
export interface HousedSite {
  readonly revision: number
  readonly site: Site
  readonly house: House
}

/**
 * The site of a job with what the house decided, within a transaction that may read other things of the job too. Throws
 * when a job has no site: every job starts with one.
 */
export async function readHousedSite(tx: Transaction, jobId: string): Promise<HousedSite> {
  const [row] = await tx
    .select({ revision: sites.revision, body: sites.body, house: houseColumn(tx) })
    .from(sites)
    .where(and(own(sites), eq(sites.jobId, jobId)))
  if (!row) throw new Error(`Job ${jobId} has no site.`)
  return { revision: row.revision, site: siteSchema.parse(row.body), house: houseOf(row.house) }
}

async function lockSite(tx: Transaction, jobId: string): Promise<Locked | null> {
  const { revision, body, updatedBy, updatedAt } = sites
  const [row] = await tx
    .select({ revision, body, updatedBy, updatedAt })
    .from(sites)
    .where(and(own(sites), eq(sites.jobId, jobId)))
    .for('update')
  return row ? { ...row, shown: { revision: row.revision, site: siteSchema.parse(row.body) } } : null
}

/** The site of a job as it is now, with what the house decided. */
export const findHousedSite = (job: OpenJob): Promise<HousedSite> =>
  asOrganisation(job.member.organisationId, (tx) => readHousedSite(tx, job.id))

/** The first revision of a new job's site. */
export async function insertSite(tx: Transaction, member: Member, jobId: string, site: Site): Promise<void> {
  const row = { organisationId: member.organisationId, jobId, revision: 1, body: site }
  await tx.insert(sites).values({ ...row, updatedBy: member.userId })
  await tx.insert(siteRevisions).values({ ...row, contentHash: contentHash(site), authorId: member.userId })
}

const siteOf = ({ id: jobId, member }: OpenJob): Revisioned<Site> => ({
  resource: `jobs/${jobId}/site`,
  saved: 'site saved',
  lock: (tx) => lockSite(tx, jobId),
  write: async (tx, revision, site, hash) => {
    const { organisationId, userId } = member
    await tx
      .update(sites)
      .set({ revision, body: site, updatedAt: new Date(), updatedBy: userId })
      .where(and(own(sites), eq(sites.jobId, jobId)))
    await tx
      .insert(siteRevisions)
      .values({ organisationId, jobId, revision, body: site, contentHash: hash, authorId: userId })
    await touchJob(tx, jobId, 'site')
    return { revision, site }
  },
})

/** Saves a job's site by the one rule for saving; what refers to a photo that is none of the job's is refused (400). */
export const saveSite = (job: OpenJob, save: Save<Site>): Promise<Answer | Refusal> =>
  saveRevision(job.member, siteOf(job), save, async (tx) => (await strangePhoto(tx, job.id, save.body)) ?? save.body)
