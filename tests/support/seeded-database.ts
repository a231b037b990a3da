import { createHash, randomUUID } from 'node:crypto'
import { readFileSync, readdirSync } from 'node:fs'
import path from 'node:path'
import { fileURLToPath } from 'node:url'
import type { Client } from 'pg'
import { type DatabaseUrls, ensureDatabase } from '#drizzle/database-roles.ts'
import { type LocalDatabase, startLocalDatabase, withAdmin } from '#drizzle/local-database.ts'
import { migrateDatabase } from '#drizzle/migrate.ts'
import { seedDemo } from '#drizzle/seed/seed.ts'

const root = path.resolve(path.dirname(fileURLToPath(import.meta.url)), '../..')

/** A database with the demonstration in it, for one test file. */
export interface SeededDatabase {
  readonly urls: DatabaseUrls
  /** The superuser's connection, for looking behind row-level security. */
  readonly adminUrl: string
  readonly drop: () => Promise<void>
}

/** Changes when anything does that makes the database what it is. */
function templateName(): string {
  const hash = createHash('sha256')
  for (const name of readdirSync(path.join(root, 'drizzle'), { recursive: true, encoding: 'utf8' }).toSorted()) {
    if (/\.(ts|sql|json)$/.test(name)) hash.update(name).update(readFileSync(path.join(root, 'drizzle', name)))
  }
  return `template_${hash.digest('hex').slice(0, 16)}`
}

const exists = async (admin: Client, name: string) =>
  (await admin.query('select 1 from pg_database where datname = $1', [name])).rowCount === 1

/** Made under another name first: a template that has its name is whole. */
async function ensureTemplate(admin: Client, cluster: LocalDatabase, template: string): Promise<void> {
  if (await exists(admin, template)) return
  const half = `${template}_half`
  await admin.query(`drop database if exists ${half} with (force)`)
  await ensureDatabase(admin, half)
  const urls = cluster.urls(half)
  await migrateDatabase(urls.owner)
  await seedDemo(urls)
  await admin.query(`select pg_terminate_backend(pid) from pg_stat_activity where datname = '${half}'`)
  await admin.query(`alter database ${half} rename to ${template}`)
}

/** A copy of a migrated and seeded template that no other test file sees. */
export async function seededDatabase(): Promise<SeededDatabase> {
  const cluster = await startLocalDatabase('test')
  const template = templateName()
  const name = `test_${randomUUID().replaceAll('-', '')}`
  await withAdmin(cluster.adminUrl(), async (admin) => {
    await admin.query("select pg_advisory_lock(hashtext('test databases'))")
    await ensureTemplate(admin, cluster, template)
    await admin.query(`create database ${name} template ${template} owner inglefield_owner`)
    await admin.query(`revoke all on database ${name} from public`)
    await admin.query(`grant connect on database ${name} to inglefield_owner, inglefield_auth, inglefield_app`)
  })
  return {
    urls: cluster.urls(name),
    adminUrl: cluster.adminUrl(name),
    drop: () =>
      withAdmin(cluster.adminUrl(), async (admin) => void (await admin.query(`drop database ${name} with (force)`))),
  }
}
