import { foreignKey, integer, jsonb, pgTable, primaryKey, text } from 'drizzle-orm/pg-core'
import { organisationId, personId } from '#drizzle/columns.ts'
import { now } from '#drizzle/moments.ts'
import { heaterModels } from '#drizzle/schema.ts'

/**
 * The beam that an organisation measured of a model of its catalogue, as it is now: `body` is a BeamData table, and null
 * when the data sheet's beam holds again.
 */
export const heaterBeams = pgTable(
  'heater_beams',
  {
    organisationId: organisationId(),
    code: text().notNull(),
    revision: integer().notNull(),
    body: jsonb(),
    updatedAt: now(),
    updatedBy: personId(),
  },
  (table) => [
    primaryKey({ columns: [table.organisationId, table.code] }),
    foreignKey({
      columns: [table.organisationId, table.code],
      foreignColumns: [heaterModels.organisationId, heaterModels.code],
    }),
  ],
)

/** Never changed or deleted: a trigger refuses both. */
export const heaterBeamRevisions = pgTable(
  'heater_beam_revisions',
  {
    organisationId: organisationId(),
    code: text().notNull(),
    revision: integer().notNull(),
    body: jsonb(),
    contentHash: text().notNull(),
    authorId: personId(),
    createdAt: now(),
  },
  (table) => [
    primaryKey({ columns: [table.organisationId, table.code, table.revision] }),
    foreignKey({
      columns: [table.organisationId, table.code],
      foreignColumns: [heaterBeams.organisationId, heaterBeams.code],
    }),
  ],
)
