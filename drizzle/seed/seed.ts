import { randomUUID } from 'node:crypto'
import { count, eq, sql } from 'drizzle-orm'
import { drizzle, type NodePgDatabase } from 'drizzle-orm/node-postgres'
import { Client } from 'pg'
import type { Stage } from '#app/domain/job/stage.ts'
import { contentHash } from '#drizzle/content-hash.ts'
import { photos } from '#drizzle/photo-schema.ts'
import { organization, user } from '#drizzle/accounts-schema.ts'
import {
  briefRevisions,
  briefs,
  heaterModels,
  jobs,
  siteRevisions,
  sites,
  variantRevisions,
  variants,
} from '#drizzle/schema.ts'
import { ruleSetRevisions, ruleSets } from '#drizzle/rules-schema.ts'
import { demoRuleSet } from '#drizzle/seed/demo-rule-set.ts'
import { demoAddress, hasNoAccounts, seedAccounts } from '#drizzle/seed/accounts.ts'
import { demoMarks, demoPhotoKey, demoPhotoSize, withDemoPhoto } from '#drizzle/seed/demo-photo.ts'
import { hangingData } from '#drizzle/house-schema.ts'
import { demoHanging } from '#drizzle/seed/demo-models.ts'
import { demoModels, demoSites, type DemoSite } from '#drizzle/seed/demo-sites.ts'

type Database = NodePgDatabase<Record<string, never>>
type Transaction = Parameters<Parameters<Database['transaction']>[0]>[0]
/** The organisation that something is written for, and the person who is said to have written it. */
interface Author {
  readonly organisationId: string
  readonly authorId: string
}

const demoStages: Record<DemoSite['key'], Stage> = { A: 'variants', B: 'variants', C: 'variants' }

async function withConnection<T>(url: string, work: (database: Database) => Promise<T>): Promise<T> {
  const client = new Client({ connectionString: url })
  await client.connect()
  try {
    return await work(drizzle(client, { casing: 'snake_case' }))
  } finally {
    await client.end()
  }
}

/** The demonstration's two organisations with a person of each; null when they are not there. */
function findAuthors(authUrl: string): Promise<{ own: Author; other: Author } | null> {
  const authorOf = async (database: Database, slug: string, email: string): Promise<Author | null> => {
    const [found] = await database
      .select({ organisationId: organization.id, authorId: user.id })
      .from(organization)
      .innerJoin(user, eq(user.email, email))
      .where(eq(organization.slug, slug))
    return found ?? null
  }
  return withConnection(authUrl, async (database) => {
    const own = await authorOf(database, 'osierfold', demoAddress('designer'))
    const other = await authorOf(database, 'quillet', 'owner@quillet.test')
    return own && other && { own, other }
  })
}

/** Adds the invented catalogue and its hanging data to an organisation. */
async function seedCatalogue(tx: Transaction, { organisationId, authorId }: Author): Promise<void> {
  await tx.insert(heaterModels).values(demoModels().map((body) => ({ organisationId, code: body.code, body })))
  await tx.insert(hangingData).values({ organisationId, revision: 1, body: demoHanging(), updatedBy: authorId })
}

/** Adds the demonstration's photo, whose picture is drawn when it is asked for. */
async function seedPhoto(tx: Transaction, author: Author, jobId: string, id: string): Promise<void> {
  const { organisationId, authorId: updatedBy } = author
  const drawn = { ...demoPhotoSize, fileKey: demoPhotoKey, marks: demoMarks() }
  await tx
    .insert(photos)
    .values({ organisationId, id, jobId, name: 'Veranda from the garden', revision: 1, updatedBy, ...drawn })
}

/** Adds the invented rule set, at revision 1. */
async function seedRuleSet(tx: Transaction, { organisationId, authorId }: Author): Promise<void> {
  const body = demoRuleSet()
  const [made] = await tx
    .insert(ruleSets)
    .values({ organisationId, ...body, revision: 1, updatedBy: authorId })
    .returning({ id: ruleSets.id })
  if (!made) throw new Error('The rule set was not made.')
  const saved = { organisationId, ruleSetId: made.id, revision: 1, body }
  await tx.insert(ruleSetRevisions).values({ ...saved, contentHash: contentHash(body), authorId })
}

/** Adds a job with its site, brief and numbered variants, all at revision 1; gives the job's id. */
async function seedJob(tx: Transaction, author: Author, demo: DemoSite): Promise<string> {
  const { organisationId, authorId } = author
  const { name, customer } = demo.job
  const [job] = await tx
    .insert(jobs)
    .values({
      organisationId,
      name,
      customer,
      place: demo.brief.place,
      stage: demoStages[demo.key],
      updatedAt: sql`clock_timestamp()`,
    })
    .returning({ id: jobs.id })
  if (!job) throw new Error('The job was not made.')
  const first = { organisationId, jobId: job.id, revision: 1 }
  const photoId = demo.key === 'C' ? randomUUID() : null
  const site = { ...first, body: photoId ? withDemoPhoto(demo.site, photoId) : demo.site }
  if (photoId) await seedPhoto(tx, author, job.id, photoId)
  await tx.insert(sites).values({ ...site, updatedBy: authorId })
  await tx.insert(siteRevisions).values({ ...site, contentHash: contentHash(site.body), authorId })
  const brief = { ...first, body: demo.brief }
  await tx.insert(briefs).values({ ...brief, updatedBy: authorId })
  await tx.insert(briefRevisions).values({ ...brief, contentHash: contentHash(brief.body), authorId })
  for (const { number, layout } of demo.variants) {
    const [variant] = await tx
      .insert(variants)
      .values({ ...first, number, ...layout, updatedBy: authorId })
      .returning({ id: variants.id })
    if (!variant) throw new Error('The variant was not made.')
    const saved = { organisationId, variantId: variant.id, revision: 1, layout }
    await tx.insert(variantRevisions).values({ ...saved, contentHash: contentHash(layout), authorId })
  }
  return job.id
}

/** Fills one organisation, all or nothing, when it has neither jobs nor a catalogue. Tells whether it did. */
async function fillOrganisation(appUrl: string, author: Author, demos: readonly DemoSite[]): Promise<boolean> {
  return withConnection(appUrl, (database) =>
    database.transaction(async (tx) => {
      await tx.execute(sql`select set_config('app.org', ${author.organisationId}, true)`)
      const [kept] = await tx.select({ jobs: count() }).from(jobs)
      const [known] = await tx.select({ models: count() }).from(heaterModels)
      if (kept?.jobs !== 0 || known?.models !== 0) return false
      await seedCatalogue(tx, author)
      if (demos.length > 0) await seedRuleSet(tx, author)
      for (const demo of demos) await seedJob(tx, author, demo)
      return true
    }),
  )
}

/** Gives an organisation without jobs and catalogue the invented catalogue. */
export const addCatalogue = (appUrl: string, author: Author): Promise<boolean> => fillOrganisation(appUrl, author, [])

/**
 * Puts the demonstration into an empty database: accounts, catalogue, three jobs, and a second organisation with one
 * job of its own. A database with other accounts is left alone; a half-made demonstration is completed. Tells whether
 * anything was added.
 */
export async function seedDemo(urls: { readonly auth: string; readonly app: string }): Promise<boolean> {
  if (await hasNoAccounts(urls.auth)) await seedAccounts(urls.auth)
  const authors = await findAuthors(urls.auth)
  if (!authors) return false
  const demos = demoSites().toReversed()
  const filled = await fillOrganisation(urls.app, authors.own, demos)
  const others = demos.filter(({ key }) => key === 'C').map((demo) => ({ ...demo, job: otherJob }))
  return (await fillOrganisation(urls.app, authors.other, others)) || filled
}

const otherJob = { name: 'Quillet House, garden room', customer: 'Quillet House' }
