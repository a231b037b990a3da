import { z } from 'zod'
import { appDatabase } from '#app/server/db.server.ts'
import { roleDanger, roleDangerQuery } from '#drizzle/database-roles.ts'

const answerSchema = z.object({ dangerous: z.boolean() })
let checked: Promise<void> | null = null

async function checkRole(): Promise<void> {
  const answer = await appDatabase.$client.query(roleDangerQuery)
  if (answerSchema.parse(answer.rows[0]).dangerous) throw new Error(roleDanger)
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
