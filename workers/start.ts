import '#workers/start-configuration.ts'
import { createHmac } from 'node:crypto'
import { createServer } from 'node:net'
import path from 'node:path'
import { setTimeout as wait } from 'node:timers/promises'
import { fileURLToPath } from 'node:url'
import { StartProblem } from '#drizzle/postgres-binaries.ts'
import { demoAddress, demoPassword, hasDemoAccounts, hasNoAccounts } from '#drizzle/seed/accounts.ts'
import { buildWhenChanged } from '#workers/start-build.ts'
import { type PreparedDatabase, prepareDatabase } from '#workers/start-database.ts'
import { type Companion, keepRunning } from '#workers/start-processes.ts'

process.chdir(path.resolve(path.dirname(fileURLToPath(import.meta.url)), '..'))
const development = process.argv.includes('--dev')
const host = process.env.HOST || '127.0.0.1'
const port = Number(process.env.PORT || 3000)
const origin = process.env.PUBLIC_ORIGIN || `http://${host}:${port}`

const started: { stop(): Promise<void> }[] = []
let stopping: Promise<void> | null = null

async function stopAll() {
  for (const thing of started.toReversed()) await thing.stop()
}

/** Stops everything that was started, once, and ends. */
function leave(code: number): void {
  stopping ??= stopAll().finally(() => process.exit(code))
}

function isLoopbackOnly(): boolean {
  const loopback = /^(127\.0\.0\.1|localhost|::1|\[::1\])$/
  return loopback.test(host) && URL.canParse(origin) && loopback.test(new URL(origin).hostname)
}

async function requireFreePort(): Promise<void> {
  if (!Number.isInteger(port) || port < 1 || port > 65_535) throw new StartProblem('PORT is a number from 1 to 65535.')
  await new Promise<void>((resolve, reject) => {
    const probe = createServer()
    probe.once('error', (problem) => {
      const taken = 'code' in problem && problem.code === 'EADDRINUSE'
      const why = taken ? `Port ${port} is taken.` : `${host}:${port} cannot be used (${problem.message}).`
      reject(new StartProblem(`${why} Stop what uses it, or choose another: PORT=${port + 1} npm start`))
    })
    probe.listen(port, host, () => probe.close(() => resolve()))
  })
}

/** The environment of the server and the job worker. */
function environmentFor({ urls, secret }: PreparedDatabase): NodeJS.ProcessEnv {
  const derived = secret && createHmac('sha256', secret).update('sessions').digest('hex')
  const sessions = process.env.SESSION_SECRET || derived
  if (!sessions) throw new StartProblem('Set SESSION_SECRET (32 characters or more): openssl rand -hex 32')
  return {
    ...process.env,
    NODE_ENV: development ? 'development' : 'production',
    HOST: host,
    PORT: String(port),
    PUBLIC_ORIGIN: origin,
    DATABASE_URL: urls.app,
    DATABASE_AUTH_URL: urls.auth,
    SESSION_SECRET: sessions,
  }
}

function startCompanions(database: PreparedDatabase): Companion[] {
  const env = environmentFor(database)
  const serve = development
    ? ['node_modules/@react-router/dev/bin.js', 'dev', '--host', host, '--port', String(port), '--strictPort']
    : ['node_modules/@react-router/serve/bin.js', 'build/server/index.js']
  const onGiveUp = () => {
    console.error('It keeps ending. Read the messages above, mend the cause and start again.')
    leave(1)
  }
  return [
    keepRunning({ name: 'server', args: serve, env, chatty: development, onGiveUp }),
    keepRunning({
      name: 'job worker',
      args: ['--import', 'tsx', 'workers/jobs.ts'],
      env: { ...env, DATABASE_OWNER_URL: database.urls.owner },
      chatty: true,
      onGiveUp,
    }),
  ]
}

async function waitUntilAlive(): Promise<void> {
  for (let tries = 0; tries < 300 && !stopping; tries++) {
    const answer = await fetch(`http://${host.includes(':') ? `[${host}]` : host}:${port}/healthz`).catch(() => null)
    if (answer?.ok) return
    await wait(100)
  }
  if (!stopping) throw new StartProblem('The server does not answer after 30 s. Read the messages above.')
}

async function greet(database: PreparedDatabase): Promise<void> {
  console.log(`\n  Inglefield  ${origin}\n`)
  if (await hasNoAccounts(database.urls.auth))
    console.log('  Nobody has an account yet. Make the first: npm run owner\n')
  if (!isLoopbackOnly())
    return console.log('  Demonstration accounts (…@inglefield.test) are refused at this address.\n')
  if (await hasDemoAccounts(database.urls.auth)) {
    const others = ['owner@', 'engineer@', 'sales@', 'installer@'].join(', ')
    console.log(`  Sign in as ${demoAddress('designer')} (also ${others}), password ${demoPassword}\n`)
  }
}

async function start(): Promise<void> {
  await requireFreePort()
  const database = await prepareDatabase({ demo: isLoopbackOnly() })
  started.push({ stop: () => database.release() })
  if (stopping) return
  if (!development) await buildWhenChanged()
  started.push(...startCompanions(database))
  await waitUntilAlive()
  await greet(database)
}

for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP'] as const) process.on(signal, () => leave(0))
try {
  await start()
} catch (problem) {
  console.error(problem instanceof StartProblem ? `\n${problem.message}\n` : problem)
  leave(1)
}
