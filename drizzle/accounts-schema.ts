import { sql } from 'drizzle-orm'
import { boolean, index, pgTable, text, unique, uuid } from 'drizzle-orm/pg-core'
import { at, now } from '#drizzle/moments.ts'

// Accounts and membership: read before an organisation is known, so only the `auth` database role reaches them.

export const user = pgTable('user', {
  id: uuid().primaryKey().defaultRandom(),
  name: text().notNull(),
  email: text().notNull().unique(),
  emailVerified: boolean().notNull().default(false),
  image: text(),
  createdAt: now(),
  updatedAt: now(),
})

export const session = pgTable(
  'session',
  {
    id: uuid().primaryKey().defaultRandom(),
    expiresAt: at().notNull(),
    token: text().notNull().unique(),
    createdAt: now(),
    updatedAt: now(),
    ipAddress: text(),
    userAgent: text(),
    userId: uuid()
      .notNull()
      .references(() => user.id, { onDelete: 'cascade' }),
    activeOrganizationId: uuid(),
  },
  (table) => [index().on(table.userId)],
)

export const account = pgTable(
  'account',
  {
    id: uuid().primaryKey().defaultRandom(),
    accountId: text().notNull(),
    providerId: text().notNull(),
    userId: uuid()
      .notNull()
      .references(() => user.id, { onDelete: 'cascade' }),
    accessToken: text(),
    refreshToken: text(),
    idToken: text(),
    accessTokenExpiresAt: at(),
    refreshTokenExpiresAt: at(),
    scope: text(),
    password: text(),
    createdAt: now(),
    updatedAt: now(),
  },
  (table) => [index().on(table.userId), unique().on(table.providerId, table.accountId)],
)

export const verification = pgTable(
  'verification',
  {
    id: uuid().primaryKey().defaultRandom(),
    identifier: text().notNull(),
    value: text().notNull(),
    expiresAt: at().notNull(),
    createdAt: now(),
    updatedAt: now(),
  },
  (table) => [index().on(table.identifier)],
)

export const organization = pgTable('organization', {
  id: uuid().primaryKey().defaultRandom(),
  name: text().notNull(),
  slug: text().notNull().unique(),
  logo: text(),
  metadata: text(),
  createdAt: now(),
})

export const member = pgTable(
  'member',
  {
    id: uuid().primaryKey().defaultRandom(),
    organizationId: uuid()
      .notNull()
      .references(() => organization.id, { onDelete: 'cascade' }),
    userId: uuid()
      .notNull()
      .references(() => user.id, { onDelete: 'cascade' }),
    role: text().notNull(),
    createdAt: now(),
  },
  (table) => [unique().on(table.organizationId, table.userId), index().on(table.userId)],
)

export const invitation = pgTable(
  'invitation',
  {
    id: uuid().primaryKey().defaultRandom(),
    organizationId: uuid()
      .notNull()
      .references(() => organization.id, { onDelete: 'cascade' }),
    email: text().notNull(),
    role: text(),
    status: text().notNull().default('pending'),
    expiresAt: at().notNull(),
    createdAt: now(),
    inviterId: uuid()
      .notNull()
      .references(() => user.id, { onDelete: 'cascade' }),
  },
  (table) => [index().on(table.organizationId), index().on(table.email)],
)

/** Times of the wrong passwords of the last minutes, one row per account, known or not: `accountKey` is a hash. */
export const signInAttempts = pgTable('sign_in_attempts', {
  accountKey: text().primaryKey(),
  checkedAt: at()
    .array()
    .notNull()
    .default(sql`'{}'`),
})
