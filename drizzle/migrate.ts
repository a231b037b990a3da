import path from 'node:path'
import { fileURLToPath } from 'node:url'
import { drizzle } from 'drizzle-orm/node-postgres'
import { migrate } from 'drizzle-orm/node-postgres/migrator'
import { Client } from 'pg'
import { prepareQueue } from '#drizzle/queue.ts'

const folder = path.join(path.dirname(fileURLToPath(import.meta.url)), 'migrations')

/** Brings a database and its queue up to date as its owner. Two at once wait for each other. */
export async function migrateDatabase(ownerUrl: string): Promise<void> {
  const client = new Client({ connectionString: ownerUrl })
  client.on('error', () => undefined)
  await client.connect()
  try {
    await client.query("select pg_advisory_lock(hashtext('inglefield migrations'))")
    await migrate(drizzle(client, { casing: 'snake_case' }), {
      migrationsFolder: folder,
      migrationsSchema: 'migrations',
    })
    // Readiness asks for the newest migration with the application's own role.
    await client.query('grant usage on schema migrations to inglefield_app')
    await client.query('grant select on migrations.__drizzle_migrations to inglefield_app')
    await prepareQueue(ownerUrl)
  } finally {
    await client.end()
  }
}
