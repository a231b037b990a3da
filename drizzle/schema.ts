import { sql } from 'drizzle-orm'
import { check, foreignKey, index, integer, jsonb, pgTable, primaryKey, text, unique, uuid } from 'drizzle-orm/pg-core'
import { stages } from '#app/domain/job/stage.ts'
import { user } from '#drizzle/accounts-schema.ts'
import { organisationId, ownId, personId } from '#drizzle/columns.ts'
import { at, now } from '#drizzle/moments.ts'

// Everything here belongs to an organisation and is closed by row-level security. Identity is (organisation, id).

export const jobs = pgTable(
  'jobs',
  {
    organisationId: organisationId(),
    id: ownId(),
    name: text().notNull(),
    customer: text().notNull(),
    place: text().notNull(),
    stage: text({ enum: stages }).notNull().default('enquiry'),
    createdAt: now(),
    updatedAt: now(),
  },
  (table) => [
    primaryKey({ columns: [table.organisationId, table.id] }),
    index().on(table.organisationId, table.updatedAt),
    check('jobs_stage', sql`${table.stage} in ('enquiry', 'site', 'variants', 'review', 'offer', 'installed')`),
  ],
)

/** The site of a job as it is now; `body` is a Site. Every revision, this one included, is in site_revisions. */
export const sites = pgTable(
  'sites',
  {
    organisationId: organisationId(),
    jobId: uuid().notNull(),
    revision: integer().notNull(),
    body: jsonb().notNull(),
    updatedAt: now(),
    updatedBy: personId(),
  },
  (table) => [
    primaryKey({ columns: [table.organisationId, table.jobId] }),
    foreignKey({ columns: [table.organisationId, table.jobId], foreignColumns: [jobs.organisationId, jobs.id] }),
  ],
)

/** Never changed or deleted: a trigger refuses both. */
export const siteRevisions = pgTable(
  'site_revisions',
  {
    organisationId: organisationId(),
    jobId: uuid().notNull(),
    revision: integer().notNull(),
    body: jsonb().notNull(),
    contentHash: text().notNull(),
    authorId: personId(),
    createdAt: now(),
  },
  (table) => [
    primaryKey({ columns: [table.organisationId, table.jobId, table.revision] }),
    foreignKey({ columns: [table.organisationId, table.jobId], foreignColumns: [jobs.organisationId, jobs.id] }),
  ],
)

/** The brief of a job as it is now; `body` is a Brief. Every revision, this one included, is in brief_revisions. */
export const briefs = pgTable(
  'briefs',
  {
    organisationId: organisationId(),
    jobId: uuid().notNull(),
    revision: integer().notNull(),
    body: jsonb().notNull(),
    updatedAt: now(),
    updatedBy: personId(),
  },
  (table) => [
    primaryKey({ columns: [table.organisationId, table.jobId] }),
    foreignKey({ columns: [table.organisationId, table.jobId], foreignColumns: [jobs.organisationId, jobs.id] }),
  ],
)

/** Never changed or deleted: a trigger refuses both. */
export const briefRevisions = pgTable(
  'brief_revisions',
  {
    organisationId: organisationId(),
    jobId: uuid().notNull(),
    revision: integer().notNull(),
    body: jsonb().notNull(),
    contentHash: text().notNull(),
    authorId: personId(),
    createdAt: now(),
  },
  (table) => [
    primaryKey({ columns: [table.organisationId, table.jobId, table.revision] }),
    foreignKey({ columns: [table.organisationId, table.jobId], foreignColumns: [jobs.organisationId, jobs.id] }),
  ],
)

/** A layout of a job as it is now; `heaters` is the list of MountedHeater. A deleted variant can be brought back. */
export const variants = pgTable(
  'variants',
  {
    organisationId: organisationId(),
    id: ownId(),
    jobId: uuid().notNull(),
    number: integer().notNull(),
    title: text().notNull(),
    revision: integer().notNull(),
    heaters: jsonb().notNull(),
    deletedAt: at(),
    createdAt: now(),
    updatedAt: now(),
    updatedBy: personId(),
  },
  (table) => [
    primaryKey({ columns: [table.organisationId, table.id] }),
    unique().on(table.organisationId, table.jobId, table.number),
    foreignKey({ columns: [table.organisationId, table.jobId], foreignColumns: [jobs.organisationId, jobs.id] }),
  ],
)

/** `layout` is a Layout: title and heaters. Never changed or deleted: a trigger refuses both. */
export const variantRevisions = pgTable(
  'variant_revisions',
  {
    organisationId: organisationId(),
    variantId: uuid().notNull(),
    revision: integer().notNull(),
    layout: jsonb().notNull(),
    contentHash: text().notNull(),
    authorId: personId(),
    createdAt: now(),
  },
  (table) => [
    primaryKey({ columns: [table.organisationId, table.variantId, table.revision] }),
    foreignKey({
      columns: [table.organisationId, table.variantId],
      foreignColumns: [variants.organisationId, variants.id],
    }),
  ],
)

/** The catalogue of an organisation; `body` is a HeaterModel. */
export const heaterModels = pgTable(
  'heater_models',
  {
    organisationId: organisationId(),
    code: text().notNull(),
    body: jsonb().notNull(),
    createdAt: now(),
    updatedAt: now(),
  },
  (table) => [primaryKey({ columns: [table.organisationId, table.code] })],
)

/**
 * The first answer to a request that carries an idempotency key. The row is inserted before the effect, in the same
 * transaction, so a second request with the key waits and then finds the answer; `status` is null only meanwhile.
 */
export const savedAnswers = pgTable(
  'saved_answers',
  {
    organisationId: organisationId(),
    personId: personId(),
    resource: text().notNull(),
    key: text().notNull(),
    bodyHash: text().notNull(),
    status: integer(),
    answer: jsonb(),
    etag: text(),
    createdAt: now(),
  },
  (table) => [
    primaryKey({ columns: [table.organisationId, table.personId, table.resource, table.key] }),
    index().on(table.createdAt),
  ],
)

/** What happened, for good: the application may only insert and read. `subject` names the thing, `detail` no secrets. */
export const auditEvents = pgTable(
  'audit_events',
  {
    organisationId: organisationId(),
    id: ownId(),
    at: now(),
    personId: uuid().references(() => user.id),
    action: text().notNull(),
    subject: text().notNull(),
    detail: jsonb(),
  },
  (table) => [primaryKey({ columns: [table.organisationId, table.id] }), index().on(table.organisationId, table.at)],
)

/** A customer's way to one variant of a job. Only the token's SHA-256 (hex) is kept. */
export const offerLinks = pgTable(
  'offer_links',
  {
    organisationId: organisationId(),
    id: ownId(),
    jobId: uuid().notNull(),
    variantId: uuid().notNull(),
    tokenHash: text().notNull().unique(),
    expiresAt: at().notNull(),
    revokedAt: at(),
    createdAt: now(),
    createdBy: personId(),
  },
  (table) => [
    primaryKey({ columns: [table.organisationId, table.id] }),
    foreignKey({ columns: [table.organisationId, table.jobId], foreignColumns: [jobs.organisationId, jobs.id] }),
    foreignKey({
      columns: [table.organisationId, table.variantId],
      foreignColumns: [variants.organisationId, variants.id],
    }),
  ],
)
