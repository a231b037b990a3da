import { integer, jsonb, pgTable, uuid } from 'drizzle-orm/pg-core'
import { organization } from '#drizzle/accounts-schema.ts'
import { personId } from '#drizzle/columns.ts'
import { now } from '#drizzle/moments.ts'

/** What an organisation decided once for all of its jobs. Without a row the defaults hold. */
const decided = () => ({
  organisationId: uuid()
    .primaryKey()
    .references(() => organization.id),
  revision: integer().notNull(),
  body: jsonb().notNull(),
  updatedAt: now(),
  updatedBy: personId(),
})

/** How an organisation makes its hangers; `body` is a HangingData. */
export const hangingData = pgTable('hanging_data', decided())

/** The figures that no manual and no published source gives; `body` is a HouseRules. */
export const houseRules = pgTable('house_rules', decided())
