import { sql } from 'drizzle-orm'
import { z } from 'zod'
import { appDatabase } from '#app/server/db.server.ts'

const roleSchema = z.object({ rolsuper: z.boolean(), rolbypassrls: z.boolean(), owns: z.boolean() })
let checked: Promise<void> | null = null

async function checkRole(): Promise<void> {
  const answer = await appDatabase.execute(sql`
    select r.rolsuper, r.rolbypassrls,
      exists (select 1 from pg_class c where c.relowner = r.oid and c.relkind = 'r') as owns
    from pg_roles r where r.rolname = current_user`)
  const role = roleSchema.parse(answer.rows[0])
  if (role.rolsuper || role.rolbypassrls || role.owns) {
    throw new Error(
      'DATABASE_URL names a role that is a superuser, bypasses row-level security or owns tables. Refused.',
    )
  }
}

/**
 * Refuses to serve with a database role that row-level security does not bind. Asked once per process; a database
 * that was away is asked again.
 */
export function refuseDangerousRole(): Promise<void> {
  checked ??= checkRole().catch((problem: unknown) => {
    checked = null
    throw problem
  })
  return checked
}
