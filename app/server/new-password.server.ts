import { APIError } from 'better-auth/api'
import { takeAttempt } from '#app/server/attempts.server.ts'
import { auth } from '#app/server/auth.server.ts'
import { isRefusedDemo } from '#app/server/demo-address.server.ts'
import { passwordLimits } from '#app/server/password-limits.server.ts'

/** Mails a link to a known address; does nothing for an unknown one, or when five were asked for lately. */
export async function askForNewPassword(email: string): Promise<void> {
  if (isRefusedDemo(email) || !(await takeAttempt('letter', email))) return
  await auth.api.requestPasswordReset({ body: { email } })
}

/** Sets a password by a link's token, once, and ends every session of the account; `ended`: the token is not good. */
export async function setNewPassword(token: string, password: string): Promise<'done' | 'ended' | 'short' | 'long'> {
  if (password.length < passwordLimits.least) return 'short'
  if (password.length > passwordLimits.most) return 'long'
  try {
    await auth.api.resetPassword({ body: { newPassword: password, token } })
    return 'done'
  } catch (problem) {
    if (problem instanceof APIError && problem.statusCode < 500) return 'ended'
    throw problem
  }
}
