import { asc, eq, inArray } from 'drizzle-orm'
import { z } from 'zod'
import { can, roles, type Role } from '#app/domain/access/roles.ts'
import { authDatabase } from '#app/server/db.server.ts'
import type { Member } from '#app/server/session.server.ts'
import { member as memberships, user } from '#drizzle/accounts-schema.ts'

/** Somebody of the organisation; the address only for those who manage people. */
export interface Person {
  readonly id: string
  readonly name: string
  readonly role: Role
  readonly email: string | null
}

/** The names of accounts by their ids; those that are gone are missing. */
export async function findNames(userIds: readonly string[]): Promise<ReadonlyMap<string, string>> {
  const ids = [...new Set(userIds)]
  const rows = await authDatabase.select({ id: user.id, name: user.name }).from(user).where(inArray(user.id, ids))
  return new Map(rows.map(({ id, name }) => [id, name]))
}

/** The name of an account; null when it is gone. */
export const findName = async (userId: string): Promise<string | null> =>
  (await findNames([userId])).get(userId) ?? null

/** The people of the member's organisation by name. */
export async function listPeople(member: Member): Promise<Person[]> {
  const rows = await authDatabase
    .select({ id: user.id, name: user.name, email: user.email, role: memberships.role })
    .from(memberships)
    .innerJoin(user, eq(user.id, memberships.userId))
    .where(eq(memberships.organizationId, member.organisationId))
    .orderBy(asc(user.name))
  const showsAddress = can(member.role, 'manage-people')
  return rows.map(({ email, role, ...row }) => ({
    ...row,
    role: z.enum(roles).parse(role),
    email: showsAddress ? email : null,
  }))
}
