import { integer, jsonb, pgTable, timestamp, uuid } from 'drizzle-orm/pg-core'
import { organization, user } from '#drizzle/schema.ts'

/** How an organisation makes its hangers; `body` is a HangingData. Without a row the defaults hold. */
export const hangingData = pgTable('hanging_data', {
  organisationId: uuid()
    .primaryKey()
    .references(() => organization.id),
  revision: integer().notNull(),
  body: jsonb().notNull(),
  updatedAt: timestamp({ withTimezone: true }).notNull().defaultNow(),
  updatedBy: uuid()
    .notNull()
    .references(() => user.id),
})
