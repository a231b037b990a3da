import { uuid } from 'drizzle-orm/pg-core'
import { organization, user } from '#drizzle/accounts-schema.ts'

/** A thing's own part of its identity, which is (organisation, id). */
export const ownId = () => uuid().notNull().defaultRandom()

/** The organisation that a row belongs to. */
export const organisationId = () =>
  uuid()
    .notNull()
    .references(() => organization.id)

/** Somebody who did something. */
export const personId = () =>
  uuid()
    .notNull()
    .references(() => user.id)
