import { setTimeout as wait } from 'node:timers/promises'
import { takeAttempt } from '#app/server/attempts.server.ts'
import { recordForAccount } from '#app/server/audit.server.ts'
import { auth } from '#app/server/auth.server.ts'
import { isRefusedDemo } from '#app/server/demo-address.server.ts'

/** Why somebody could not sign in; the same for a known and an unknown address. */
export type SignInProblem = 'wrong' | 'too many'

/** An answer takes this long at least, ms: writing the event of a known address must not tell it from an unknown one. */
const leastTime = 50

async function wrong(email: string): Promise<{ problem: SignInProblem }> {
  await Promise.all([recordForAccount(email, 'sign-in failed'), wait(leastTime)])
  return { problem: 'wrong' }
}

/** Cookies of a new session, or why there is none. The password is looked at only while attempts are left. */
export async function signIn(
  email: string,
  password: string,
  headers: Headers,
): Promise<{ cookies: string[] } | { problem: SignInProblem }> {
  const attempt = await takeAttempt('password', email)
  if (!attempt) return { problem: 'too many' }
  if (isRefusedDemo(email)) return wrong(email)
  const userAgent = headers.get('User-Agent')?.slice(0, 300) ?? ''
  const answer = await auth.api.signInEmail({
    body: { email, password },
    headers: new Headers({ 'User-Agent': userAgent }),
    asResponse: true,
  })
  if (answer.status >= 500) throw new Error(`Sign-in answered ${answer.status}`)
  if (!answer.ok) return wrong(email)
  await attempt.giveBack()
  // Nobody has the cookie yet: a session whose event cannot be written is never used.
  await recordForAccount(email, 'signed in')
  return { cookies: answer.headers.getSetCookie() }
}

/** Ends the session of the request; the cookies to send take it off the browser. */
export async function signOut(request: Request): Promise<string[]> {
  const answer = await auth.api.signOut({ headers: request.headers, asResponse: true })
  return answer.headers.getSetCookie()
}
