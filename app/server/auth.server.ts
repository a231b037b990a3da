import { betterAuth } from 'better-auth'
import { drizzleAdapter } from 'better-auth/adapters/drizzle'
import { organization } from 'better-auth/plugins'
import { createAccessControl } from 'better-auth/plugins/access'
import { defaultStatements, ownerAc } from 'better-auth/plugins/organization/access'
import { forgetAttempts } from '#app/server/attempts.server.ts'
import { recordForAccount } from '#app/server/audit.server.ts'
import { authDatabase } from '#app/server/db.server.ts'
import { env } from '#app/server/env.server.ts'
import { queueMail } from '#app/server/jobs/queue.server.ts'
import { passwordLimits } from '#app/server/password-limits.server.ts'
import * as schema from '#drizzle/accounts-schema.ts'

/** Seconds for which a link to a new password is good. */
const resetSeconds = 30 * 60
const access = createAccessControl(defaultStatements)
/** What a role may do beyond an owner's right to the organisation itself is decided in domain/access. */
const nobody = () => access.newRole({ organization: [], member: [], invitation: [] })

function passwordLetter(to: string, token: string) {
  return {
    key: `new-password-${crypto.randomUUID()}`,
    to,
    subject: 'A new password for Inglefield',
    text: `Somebody asked for a new password for this address.\n\nChoose one here within 30 minutes:\n${env.PUBLIC_ORIGIN}/reset-password/${token}\n\nIf it was not you, nothing changes and nothing is to be done.\n`,
  }
}

/**
 * Accounts, sessions and membership. None of its own URLs is mounted: pages call it, so its sign-up, its member list
 * and its limits by client address cannot be reached.
 */
export const auth = betterAuth({
  appName: 'Inglefield',
  baseURL: env.PUBLIC_ORIGIN,
  secret: env.SESSION_SECRET,
  telemetry: { enabled: false },
  logger: { level: 'error' },
  database: drizzleAdapter(authDatabase, { provider: 'pg', schema, transaction: true }),
  rateLimit: { enabled: false },
  advanced: {
    cookiePrefix: 'inglefield',
    useSecureCookies: env.PUBLIC_ORIGIN.startsWith('https:'),
    database: { generateId: 'uuid' },
  },
  session: { expiresIn: 7 * 24 * 3600, disableSessionRefresh: true, cookieCache: { enabled: false } },
  verification: { storeIdentifier: 'hashed' },
  emailAndPassword: {
    enabled: true,
    disableSignUp: true,
    minPasswordLength: passwordLimits.least,
    maxPasswordLength: passwordLimits.most,
    revokeSessionsOnPasswordReset: true,
    resetPasswordTokenExpiresIn: resetSeconds,
    onPasswordReset: async ({ user }) => {
      await forgetAttempts(user.email)
      await recordForAccount(user.email, 'password changed')
    },
    sendResetPassword: ({ user, token }) => queueMail(passwordLetter(user.email, token)),
  },
  plugins: [
    organization({
      ac: access,
      roles: { owner: ownerAc, designer: nobody(), engineer: nobody(), sales: nobody(), installer: nobody() },
      creatorRole: 'owner',
      allowUserToCreateOrganization: false,
      requireEmailVerificationOnInvitation: true,
    }),
  ],
})
