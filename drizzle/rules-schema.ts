import { foreignKey, integer, jsonb, pgTable, primaryKey, text, uuid } from 'drizzle-orm/pg-core'
import { organisationId, ownId, personId } from '#drizzle/columns.ts'
import { now } from '#drizzle/moments.ts'

/** The rules of a place in one edition as they are now; `articles` is a list of Article. */
export const ruleSets = pgTable(
  'rule_sets',
  {
    organisationId: organisationId(),
    id: ownId(),
    name: text().notNull(),
    place: text().notNull(),
    edition: text().notNull(),
    articles: jsonb().notNull(),
    revision: integer().notNull(),
    createdAt: now(),
    updatedAt: now(),
    updatedBy: personId(),
  },
  (table) => [primaryKey({ columns: [table.organisationId, table.id] })],
)

/** `body` is a RuleSet. Never changed or deleted: a trigger refuses both. */
export const ruleSetRevisions = pgTable(
  'rule_set_revisions',
  {
    organisationId: organisationId(),
    ruleSetId: uuid().notNull(),
    revision: integer().notNull(),
    body: jsonb().notNull(),
    contentHash: text().notNull(),
    authorId: personId(),
    createdAt: now(),
  },
  (table) => [
    primaryKey({ columns: [table.organisationId, table.ruleSetId, table.revision] }),
    foreignKey({
      columns: [table.organisationId, table.ruleSetId],
      foreignColumns: [ruleSets.organisationId, ruleSets.id],
    }),
  ],
)
