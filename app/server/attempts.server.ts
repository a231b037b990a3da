import { createHash } from 'node:crypto'
import { eq, sql } from 'drizzle-orm'
import { authDatabase } from '#app/server/db.server.ts'
import { signInAttempts } from '#drizzle/accounts-schema.ts'

/** How often an account may be tried in a quarter of an hour: wrong passwords, and letters asked for. */
const mostAttempts = { password: 10, letter: 5 }
type Kind = keyof typeof mostAttempts

/** Known and unknown addresses are counted alike, and none is kept in clear. */
function keyOf(kind: Kind, email: string): string {
  return createHash('sha256').update(`${kind} ${email.trim().toLowerCase()}`).digest('hex')
}

/** An attempt that was counted; giving it back makes it uncounted. */
export interface Attempt {
  giveBack(): Promise<void>
}

/**
 * Counts an attempt before it is made, in one statement, so that many at once are not too many; null when the account
 * had its share in the last quarter of an hour. An attempt that is refused is not counted.
 */
export async function takeAttempt(kind: Kind, email: string): Promise<Attempt | null> {
  const accountKey = keyOf(kind, email)
  const at = sql`${new Date().toISOString()}::timestamptz`
  const recent = sql`array(select t from unnest(${signInAttempts.checkedAt}) t where t > ${at} - interval '15 minutes')`
  const taken = await authDatabase
    .insert(signInAttempts)
    .values({ accountKey, checkedAt: sql`array[${at}]` })
    .onConflictDoUpdate({
      target: signInAttempts.accountKey,
      set: { checkedAt: sql`${recent} || ${at}` },
      setWhere: sql`cardinality(${recent}) < ${mostAttempts[kind]}`,
    })
    .returning({ key: signInAttempts.accountKey })
  if (taken.length === 0) return null
  return {
    giveBack: async () => {
      await authDatabase
        .update(signInAttempts)
        .set({ checkedAt: sql`array_remove(${signInAttempts.checkedAt}, ${at})` })
        .where(eq(signInAttempts.accountKey, accountKey))
    },
  }
}

/** Forgets wrong passwords of an account whose person has proved otherwise who they are. */
export async function forgetAttempts(email: string): Promise<void> {
  await authDatabase.delete(signInAttempts).where(eq(signInAttempts.accountKey, keyOf('password', email)))
}
