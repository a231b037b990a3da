import { drizzle } from 'drizzle-orm/node-postgres'
import { Pool } from 'pg'
import { env } from '#app/server/env.server.ts'

/**
 * A pool that outlives its backends: without the second handler a killed backend of a borrowed connection would end
 * the process. A statement that takes longer than 10 s is cut off.
 */
export function poolOf(connectionString: string, name: string, max = 10): Pool {
  const pool = new Pool({
    connectionString,
    max,
    application_name: name,
    connectionTimeoutMillis: 2500,
    statement_timeout: 10_000,
    idle_in_transaction_session_timeout: 60_000,
  })
  const report = (problem: Error) => console.error(`Database connection (${name}) lost: ${problem.message}`)
  pool.on('error', report)
  pool.on('connect', (client) => client.on('error', report))
  return pool
}

const appPool = poolOf(env.DATABASE_URL, 'inglefield app')
const authPool = poolOf(env.DATABASE_AUTH_URL, 'inglefield auth')

/** Organisation data; asked through asOrganisation only. */
export const appDatabase = drizzle(appPool, { casing: 'snake_case' })

/** Accounts, sessions, membership and the sign-in limiter; this role sees no organisation's rows. */
export const authDatabase = drizzle(authPool, { casing: 'snake_case' })

/** Closes every connection, for the end of a process or of a test file. */
export async function closeDatabase(): Promise<void> {
  await Promise.all([appPool.end(), authPool.end()])
}
