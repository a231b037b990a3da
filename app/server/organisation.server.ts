import { type AnyColumn, eq, sql, type SQL } from 'drizzle-orm'
import { appDatabase } from '#app/server/db.server.ts'
import { refuseDangerousRole } from '#app/server/database-role.server.ts'

/** A transaction in which one organisation's rows exist and no others. */
export type Transaction = Parameters<Parameters<typeof appDatabase.transaction>[0]>[0]

/**
 * The only way to organisation data: a transaction of the `app` role that says whose rows it may see. The setting is
 * local to the transaction, so a connection never carries it on to the next. Rolls back when the work throws.
 */
export async function asOrganisation<T>(organisationId: string, work: (tx: Transaction) => Promise<T>): Promise<T> {
  await refuseDangerousRole()
  return appDatabase.transaction(async (tx) => {
    await tx.execute(sql`select set_config('app.org', ${organisationId}, true)`)
    return work(tx)
  })
}

/**
 * The rows of the transaction's organisation. Every read and write names it, so the application alone already keeps
 * organisations apart; row-level security does it again.
 */
export function own(table: { organisationId: AnyColumn }): SQL {
  return eq(table.organisationId, sql`nullif(current_setting('app.org', true), '')::uuid`)
}
