import { eq } from 'drizzle-orm'
import { authDatabase } from '#app/server/db.server.ts'
import { asOrganisation, type Transaction } from '#app/server/organisation.server.ts'
import type { Member } from '#app/server/session.server.ts'
import { member as memberships, user } from '#drizzle/accounts-schema.ts'
import { auditEvents } from '#drizzle/schema.ts'

/** What an organisation can look up later. */
export type AuditedAction =
  | 'signed in'
  | 'sign-in failed'
  | 'password changed'
  | 'job created'
  | 'site saved'
  | 'brief saved'
  | 'variant created'
  | 'variant saved'
  | 'variant restored'
  | 'variant deleted'
  | 'variant brought back'
  | 'photo added'
  | 'photo marks saved'
  | 'photo deleted'
  | 'photo brought back'
  | 'comparison exported'
  | 'rule set saved'
  | 'picture exported'
  | 'hanging data saved'
  | 'house rules saved'
  | 'beam saved'
  | 'beam taken back'

/** Something that happened: `subject` is the thing's path (`variants/<id>`), `detail` figures and never a secret. */
export interface AuditedEvent {
  readonly action: AuditedAction
  readonly subject: string
  readonly detail?: Readonly<Record<string, unknown>>
}

type Who = Pick<Member, 'organisationId'> & { readonly userId: string | null }

/** Writes an event for good, in the transaction of its effect: both are kept or neither. */
export async function recordEvent(
  tx: Transaction,
  { organisationId, userId }: Who,
  { action, subject, detail }: AuditedEvent,
): Promise<void> {
  await tx.insert(auditEvents).values({ organisationId, personId: userId, action, subject, detail })
}

/** Writes an event whose effect is the answer itself: it comes before the answer, which is not given without it. */
export function recordAnswer(member: Member, event: AuditedEvent): Promise<void> {
  return asOrganisation(member.organisationId, (tx) => recordEvent(tx, member, event))
}

/**
 * Writes what happened to an account, in every organisation that its person belongs to; an address that nobody has
 * leaves no event. Who failed to sign in is not known, so that event names nobody.
 */
export async function recordForAccount(
  email: string,
  action: 'signed in' | 'sign-in failed' | 'password changed',
): Promise<void> {
  const found = await authDatabase
    .select({ userId: user.id, organisationId: memberships.organizationId })
    .from(user)
    .innerJoin(memberships, eq(memberships.userId, user.id))
    .where(eq(user.email, email.trim().toLowerCase()))
  for (const { userId, organisationId } of found) {
    const who = { organisationId, userId: action === 'sign-in failed' ? null : userId }
    await asOrganisation(organisationId, (tx) => recordEvent(tx, who, { action, subject: `people/${userId}` }))
  }
}
