import { foreignKey, index, integer, jsonb, pgTable, primaryKey, text, uuid } from 'drizzle-orm/pg-core'
import { organisationId, ownId, personId } from '#drizzle/columns.ts'
import { at, now } from '#drizzle/moments.ts'
import { jobs } from '#drizzle/schema.ts'

/**
 * A photo of a job; its picture is a file kept under `fileKey`, `width` × `height` px. `marks` is a PhotoMarks. A
 * deleted photo can be brought back. Closed by row-level security like everything of an organisation.
 */
export const photos = pgTable(
  'photos',
  {
    organisationId: organisationId(),
    id: ownId(),
    jobId: uuid().notNull(),
    name: text().notNull(),
    width: integer().notNull(),
    height: integer().notNull(),
    fileKey: text().notNull(),
    revision: integer().notNull(),
    marks: jsonb().notNull(),
    deletedAt: at(),
    createdAt: now(),
    updatedAt: now(),
    updatedBy: personId(),
  },
  (table) => [
    primaryKey({ columns: [table.organisationId, table.id] }),
    index().on(table.organisationId, table.jobId),
    foreignKey({ columns: [table.organisationId, table.jobId], foreignColumns: [jobs.organisationId, jobs.id] }),
  ],
)
