import { asc, eq } from 'drizzle-orm'
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

/** The name of an account; null when it is gone. */
export async function findName(userId: string): Promise<string | null> {
  const [row] = await authDatabase.select({ name: user.name }).from(user).where(eq(user.id, userId))
  return row?.name ?? null
}

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
