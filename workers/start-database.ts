import path from 'node:path'
import { setTimeout as wait } from 'node:timers/promises'
import { Client } from 'pg'
import { type DatabaseUrls, roleDanger, roleDangerQuery } from '#drizzle/database-roles.ts'
import { startLocalDatabase, stopLocalDatabase, withAdmin } from '#drizzle/local-database.ts'
import { migrateDatabase } from '#drizzle/migrate.ts'
import { StartProblem } from '#drizzle/postgres-binaries.ts'
import { seedDemo } from '#drizzle/seed/seed.ts'
import { withStartLock } from '#drizzle/start-lock.ts'

const databaseName = 'inglefield'
const markName = 'inglefield start'

/** The database that the application is to use, and what ends our part in it. */
export interface PreparedDatabase {
  urls: DatabaseUrls
  /** Derived from the cluster's secret; null when the database is not ours. */
  secret: string | null
  release(): Promise<void>
}

const given = { owner: 'DATABASE_OWNER_URL', auth: 'DATABASE_AUTH_URL', app: 'DATABASE_URL' } as const

/** A database named by the environment: all three roles or none. */
function givenUrls(): DatabaseUrls | null {
  const [owner, auth, app] = [process.env[given.owner], process.env[given.auth], process.env[given.app]]
  if (!owner && !auth && !app) return null
  if (!owner || !auth || !app) {
    throw new StartProblem(`Set all three of ${Object.values(given).join(', ')}, or none for the local database.`)
  }
  return { owner, auth, app }
}

/**
 * A connection that stays open while we run: it marks the database as used, and its end is the first sign that the
 * server died.
 */
async function holdOpen(adminUrl: string, onLost: () => void): Promise<() => Promise<void>> {
  const mark = new Client({ connectionString: adminUrl, application_name: markName, keepAlive: true })
  let released = false
  const lost = () => {
    if (released) return
    released = true
    onLost()
  }
  mark.on('error', lost)
  mark.on('end', lost)
  await mark.connect()
  return async () => {
    released = true
    await mark.end().catch(() => undefined)
  }
}

/** Whether another start of this checkout still uses the database. */
async function isUsedByOthers(adminUrl: string): Promise<boolean> {
  return withAdmin(adminUrl, async (admin) => {
    const others = await admin.query('select 1 from pg_stat_activity where application_name = $1', [markName])
    return (others.rowCount ?? 0) > 0
  }).catch(() => false)
}

async function localDatabase(): Promise<PreparedDatabase> {
  const database = await startLocalDatabase('data')
  await database.ensureDatabase(databaseName)
  let stopping = false
  let letGo: () => Promise<void> = () => Promise.resolve()
  const hold = async () => {
    letGo = await holdOpen(database.adminUrl(), () => void revive())
  }
  const revive = async () => {
    console.error('The database stopped. Starting it again …')
    for (let tries = 1; !stopping; tries++) {
      try {
        await startLocalDatabase('data')
        await hold()
        console.error('The database is back.')
        return
      } catch (problem) {
        if (tries % 20 === 0) console.error(problem instanceof Error ? problem.message : problem)
        await wait(250)
      }
    }
  }
  await hold()
  return {
    urls: database.urls(databaseName),
    secret: database.secret,
    release: async () => {
      stopping = true
      await letGo()
      if (!(await isUsedByOthers(database.adminUrl()))) await stopLocalDatabase('data')
    },
  }
}

async function refuseDangerousRole(appUrl: string): Promise<void> {
  const found = await withAdmin(appUrl, (application) => application.query(roleDangerQuery))
  if (found.rows[0]?.dangerous !== false) throw new StartProblem(roleDanger)
}

/**
 * Makes sure that the database is there and up to date. The demonstration goes into an empty database, and only where
 * nobody else can reach it.
 */
export async function prepareDatabase(options: { demo: boolean }): Promise<PreparedDatabase> {
  const urls = givenUrls()
  const database = urls ? { urls, secret: null, release: () => Promise.resolve() } : await localDatabase()
  try {
    await refuseDangerousRole(database.urls.app)
    await withStartLock(path.join(process.env.DATA_FOLDER || '.data', 'prepare.lock'), async () => {
      await migrateDatabase(database.urls.owner)
      if (options.demo && (await seedDemo(database.urls))) console.log('The demonstration was added.')
    })
  } catch (problem) {
    await database.release()
    throw problem
  }
  return database
}
