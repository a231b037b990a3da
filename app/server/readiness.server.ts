import { sql } from 'drizzle-orm'
import { z } from 'zod'
import { appDatabase } from '#app/server/db.server.ts'
import { refuseDangerousRole } from '#app/server/database-role.server.ts'
import { newestMigration } from '#drizzle/newest-migration.ts'

const rowSchema = z.object({ newest: z.coerce.number() })

/** Why the application cannot serve yet, in a sentence; null when it can. */
export async function whatIsMissing(): Promise<string | null> {
  try {
    await refuseDangerousRole()
    const answer = await appDatabase.execute(sql`select max(created_at) as newest from migrations.__drizzle_migrations`)
    const { newest } = rowSchema.parse(answer.rows[0])
    return newest >= newestMigration ? null : 'The database lacks migrations of this version.'
  } catch (problem) {
    console.error(problem)
    return 'The database cannot be used.'
  }
}
