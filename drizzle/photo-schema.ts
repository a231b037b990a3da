import { foreignKey, index, integer, jsonb, pgTable, primaryKey, text, timestamp, uuid } from 'drizzle-orm/pg-core'
import { jobs, organization, user } from '#drizzle/schema.ts'

const at = () => timestamp({ withTimezone: true })

/**
 * A photo of a job; its picture is a file kept under `fileKey`, `width` × `height` px. `marks` is a PhotoMarks. A
 * deleted photo can be brought back. Closed by row-level security like everything of an organisation.
 */
export const photos = pgTable(
  'photos',
  {
    organisationId: uuid()
      .notNull()
      .references(() => organization.id),
    id: uuid().notNull().defaultRandom(),
    jobId: uuid().notNull(),
    name: text().notNull(),
    width: integer().notNull(),
    height: integer().notNull(),
    fileKey: text().notNull(),
    revision: integer().notNull(),
    marks: jsonb().notNull(),
    deletedAt: at(),
    createdAt: at().notNull().defaultNow(),
    updatedAt: at().notNull().defaultNow(),
    updatedBy: uuid()
      .notNull()
      .references(() => user.id),
  },
  (table) => [
    primaryKey({ columns: [table.organisationId, table.id] }),
    index().on(table.organisationId, table.jobId),
    foreignKey({ columns: [table.organisationId, table.jobId], foreignColumns: [jobs.organisationId, jobs.id] }),
  ],
)
