import { env } from '#app/server/env.server.ts'
import { type KeptMail, listKeptMail } from '#app/server/outside/mail.server.ts'

/** The letters that the fake post kept; null where they must not be read: they hold links to new passwords. */
export async function listOutbox(): Promise<KeptMail[] | null> {
  return env.NODE_ENV === 'development' && !env.SMTP_URL ? listKeptMail() : null
}
