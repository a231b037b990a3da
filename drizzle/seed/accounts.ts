import { hashPassword } from 'better-auth/crypto'
import { count, eq } from 'drizzle-orm'
import { type NodePgDatabase, drizzle } from 'drizzle-orm/node-postgres'
import { Client } from 'pg'
import type { roles } from '#app/domain/access/roles.ts'
import { type Role } from '#app/domain/access/roles.ts'
import { account, member, organization, user } from '#drizzle/accounts-schema.ts'

/** The password of every demonstration account; known to everybody, so served on loopback only. */
export const demoPassword = 'warm-terrace-demo'

/** E-mail addresses of the demonstration organisation, one for each role. */
export const demoAddress = (role: Role) => `${role}@inglefield.test`

/** Ids of the demonstration organisation and its people, and of a second organisation that must never see it. */
export interface DemoAccounts {
  organisationId: string
  people: Record<Role, string>
  otherOrganisationId: string
  otherPersonId: string
}

const names: Record<Role, string> = {
  owner: 'Maren Osier',
  designer: 'Tilda Fenwick',
  engineer: 'Joss Harrow',
  sales: 'Ines Calder',
  installer: 'Bram Locke',
}

async function addOrganisation(database: NodePgDatabase, name: string, slug: string): Promise<string> {
  const [row] = await database.insert(organization).values({ name, slug }).returning({ id: organization.id })
  if (!row) throw new Error('The organisation was not made.')
  return row.id
}

/** Somebody who gets an account. */
interface NewPerson {
  readonly name: string
  readonly email: string
  readonly password: string
}

async function addPerson(database: NodePgDatabase, organisationId: string, role: Role, person: NewPerson) {
  const { name, email } = person
  const [row] = await database.insert(user).values({ name, email, emailVerified: true }).returning({ id: user.id })
  if (!row) throw new Error('The account was not made.')
  const password = await hashPassword(person.password)
  await database.insert(account).values({ accountId: row.id, providerId: 'credential', userId: row.id, password })
  await database.insert(member).values({ organizationId: organisationId, userId: row.id, role })
  return row.id
}

async function withAuthRole<T>(authUrl: string, work: (database: NodePgDatabase) => Promise<T>): Promise<T> {
  const client = new Client({ connectionString: authUrl })
  await client.connect()
  try {
    return await work(drizzle(client, { casing: 'snake_case' }))
  } finally {
    await client.end()
  }
}

/** Whether nobody has an account yet. */
export function hasNoAccounts(authUrl: string): Promise<boolean> {
  return withAuthRole(authUrl, async (database) => {
    const [row] = await database.select({ people: count() }).from(user)
    return row?.people === 0
  })
}

/** Whether the demonstration's owner exists. */
export function hasDemoAccounts(authUrl: string): Promise<boolean> {
  return withAuthRole(authUrl, async (database) => {
    const found = await database
      .select({ id: user.id })
      .from(user)
      .where(eq(user.email, demoAddress('owner')))
    return found.length > 0
  })
}

/** Makes both organisations and their people, all or nothing. */
export function seedAccounts(authUrl: string): Promise<DemoAccounts> {
  return withAuthRole(authUrl, (database) =>
    database.transaction(async (tx) => {
      const organisationId = await addOrganisation(tx, 'Osierfold Terrace Heating', 'osierfold')
      const add = (role: Role) =>
        addPerson(tx, organisationId, role, { name: names[role], email: demoAddress(role), password: demoPassword })
      const people = {
        owner: await add('owner'),
        designer: await add('designer'),
        engineer: await add('engineer'),
        sales: await add('sales'),
        installer: await add('installer'),
      } satisfies Record<(typeof roles)[number], string>
      const otherOrganisationId = await addOrganisation(tx, 'Quillet Verandas', 'quillet')
      const other = { name: 'Odo Quillet', email: 'owner@quillet.test', password: demoPassword }
      const otherPersonId = await addPerson(tx, otherOrganisationId, 'owner', other)
      return { organisationId, people, otherOrganisationId, otherPersonId }
    }),
  )
}

/** Words as an organisation's unique short name. */
const slugOf = (name: string) => name.toLowerCase().replace(/[^\p{L}\p{N}]+/gu, '-')

/**
 * Makes an organisation and the account of its owner, all or nothing; null when an organisation is called so, or the
 * address (in small letters) has an account, already.
 */
export function addOwner(
  authUrl: string,
  organisation: string,
  owner: NewPerson,
): Promise<{ readonly organisationId: string; readonly authorId: string } | null> {
  const slug = slugOf(organisation)
  return withAuthRole(authUrl, (database) =>
    database.transaction(async (tx) => {
      const named = await tx.select({ id: organization.id }).from(organization).where(eq(organization.slug, slug))
      const known = await tx.select({ id: user.id }).from(user).where(eq(user.email, owner.email))
      if (named.length > 0 || known.length > 0) return null
      const organisationId = await addOrganisation(tx, organisation, slug)
      return { organisationId, authorId: await addPerson(tx, organisationId, 'owner', owner) }
    }),
  )
}
