import { lt, sql } from 'drizzle-orm'
import type { Pool } from 'pg'
import { authDatabase } from '#app/server/db.server.ts'
import { session, signInAttempts, verification } from '#drizzle/accounts-schema.ts'

/**
 * Removes what nobody needs any more: first answers older than a week (as the owner role, whose policy allows just
 * that), ended sessions, used-up links and old counts of wrong passwords. Twice does no harm.
 */
export async function sweep(ownerPool: Pool): Promise<void> {
  const now = new Date()
  await ownerPool.query("delete from saved_answers where created_at < now() - interval '7 days'")
  await authDatabase.delete(session).where(lt(session.expiresAt, now))
  await authDatabase.delete(verification).where(lt(verification.expiresAt, now))
  await authDatabase
    .delete(signInAttempts)
    .where(sql`not exists (select 1 from unnest(${signInAttempts.checkedAt}) t where t > now() - interval '1 day')`)
}
