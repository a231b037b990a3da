import { createHash } from 'node:crypto'
import { sql } from 'drizzle-orm'
import { auth } from '#app/server/auth.server.ts'
import { authDatabase } from '#app/server/db.server.ts'
import { signInAttempts } from '#drizzle/schema.ts'

/** Wrong passwords per account in a quarter of an hour. */
export const mostChecks = 10

/** Known and unknown addresses are counted alike, and none is kept in clear. */
function accountKey(email: string): string {
  return createHash('sha256').update(email.trim().toLowerCase()).digest('hex')
}

/** Takes one of the account's checks before the password is looked at, in one statement so that none is lost. */
async function takeCheck(key: string, at: Date): Promise<boolean> {
  const recent = sql`array(select t from unnest(${signInAttempts.checkedAt}) t where t > ${at.toISOString()}::timestamptz - interval '15 minutes')`
  const taken = await authDatabase
    .insert(signInAttempts)
    .values({ accountKey: key, checkedAt: [at] })
    .onConflictDoUpdate({
      target: signInAttempts.accountKey,
      set: { checkedAt: sql`${recent} || ${at.toISOString()}::timestamptz` },
      setWhere: sql`cardinality(${recent}) < ${mostChecks}`,
    })
    .returning({ key: signInAttempts.accountKey })
  return taken.length > 0
}

/** A right password does not count. */
async function giveBack(key: string, at: Date): Promise<void> {
  await authDatabase
    .update(signInAttempts)
    .set({ checkedAt: sql`array_remove(${signInAttempts.checkedAt}, ${at.toISOString()}::timestamptz)` })
    .where(sql`${signInAttempts.accountKey} = ${key}`)
}

/** Why somebody could not sign in; the same for a known and an unknown address. */
export type SignInProblem = 'wrong' | 'too many'

/** Cookies of a new session, or why there is none. */
export async function signIn(
  email: string,
  password: string,
  headers: Headers,
): Promise<{ cookies: string[] } | { problem: SignInProblem }> {
  const key = accountKey(email)
  const at = new Date()
  if (!(await takeCheck(key, at))) return { problem: 'too many' }
  const userAgent = headers.get('User-Agent')?.slice(0, 300) ?? ''
  const answer = await auth.api.signInEmail({
    body: { email, password },
    headers: new Headers({ 'User-Agent': userAgent }),
    asResponse: true,
  })
  if (answer.status >= 500) throw new Error(`Sign-in answered ${answer.status}`)
  if (!answer.ok) return { problem: 'wrong' }
  await giveBack(key, at)
  return { cookies: answer.headers.getSetCookie() }
}

/** Ends the session of the request; the cookies to send take it off the browser. */
export async function signOut(request: Request): Promise<string[]> {
  const answer = await auth.api.signOut({ headers: request.headers, asResponse: true })
  return answer.headers.getSetCookie()
}
