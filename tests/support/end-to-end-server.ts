import { randomBytes } from 'node:crypto'
import { buildWhenChanged } from '#workers/start-build.ts'
import { keepRunning } from '#workers/start-processes.ts'
import { endToEndOrigin } from '#tests/support/end-to-end-origin.ts'
import { seededDatabase } from '#tests/support/seeded-database.ts'

// The built application with its job worker, on a database of its own that is gone when it stops.
await buildWhenChanged()
const database = await seededDatabase()
const { hostname, port } = new URL(endToEndOrigin)
const env = {
  ...process.env,
  NODE_ENV: 'production',
  HOST: hostname,
  PORT: port,
  PUBLIC_ORIGIN: endToEndOrigin,
  DATABASE_URL: database.urls.app,
  DATABASE_AUTH_URL: database.urls.auth,
  DATABASE_OWNER_URL: database.urls.owner,
  SESSION_SECRET: randomBytes(32).toString('hex'),
  DATA_FOLDER: 'test-results/data',
}
const onGiveUp = () => process.exit(1)
const companions = [
  keepRunning({
    name: 'server',
    args: ['node_modules/@react-router/serve/bin.js', 'build/server/index.js'],
    env,
    chatty: false,
    onGiveUp,
  }),
  keepRunning({ name: 'job worker', args: ['--import', 'tsx', 'workers/jobs.ts'], env, chatty: false, onGiveUp }),
]
process.once('SIGTERM', () => {
  void Promise.all(companions.map((companion) => companion.stop()))
    .then(() => database.drop())
    .finally(() => process.exit(0))
})
