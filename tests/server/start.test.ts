import { type ChildProcess, spawn } from 'node:child_process'
import { chmodSync, mkdirSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import { createServer } from 'node:net'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { setTimeout as wait } from 'node:timers/promises'
import { afterAll, afterEach, describe, expect, it } from 'vitest'
import { startLocalDatabase } from '#drizzle/local-database.ts'

/** A folder that the database server's own account can walk. */
function newFolder(): string {
  const made = mkdtempSync(path.join(tmpdir(), 'inglefield-start-'))
  chmodSync(made, 0o755)
  return made
}

const folder = newFolder()
const running = new Set<Start>()

async function freePort(): Promise<number> {
  return new Promise((resolve) => {
    const probe = createServer().listen(0, '127.0.0.1', () => {
      const address = probe.address()
      probe.close(() => resolve(typeof address === 'object' && address ? address.port : 0))
    })
  })
}

interface Start {
  child: ChildProcess
  said: () => string
  ended: Promise<number | null>
}

/** `npm start` as a person types it, with folders and ports of its own. */
const start = (env: Record<string, string>): Start => run(env, ['workers/start.ts'], '')

function run(env: Record<string, string>, script: string[], typed: string): Start {
  const child = spawn(process.execPath, ['--import', 'tsx', ...script], {
    env: { ...process.env, NODE_ENV: '', DATABASE_URL: '', DATABASE_AUTH_URL: '', DATABASE_OWNER_URL: '', ...env },
    stdio: ['pipe', 'pipe', 'pipe'],
  })
  child.stdin.end(typed)
  let text = ''
  child.stdout.on('data', (part) => (text += part))
  child.stderr.on('data', (part) => (text += part))
  const begun: Start = {
    child,
    said: () => text,
    ended: new Promise((resolve) => child.once('exit', (code) => resolve(code))),
  }
  running.add(begun)
  void begun.ended.then(() => running.delete(begun))
  return begun
}

async function until(what: () => boolean | Promise<boolean>, patience: number): Promise<number> {
  const begun = Date.now()
  while (!(await what())) {
    if (Date.now() - begun > patience) throw new Error(`Not within ${patience} ms.`)
    await wait(50)
  }
  return Date.now() - begun
}

const statusOf = async (url: string) => (await fetch(url, { redirect: 'manual' }).catch(() => null))?.status ?? 0

const ports = { web: await freePort(), database: await freePort() }
const origin = `http://127.0.0.1:${ports.web}`
const env = { DATA_FOLDER: folder, PORT: String(ports.web), DATABASE_PORT: String(ports.database) }
/** What the framework answers by itself, before any of our routes: files, addresses it cannot read. */
async function expectHeaders(paths: readonly string[]): Promise<void> {
  for (const path of paths) {
    const { headers } = await fetch(origin + path)
    expect(headers.get('X-Content-Type-Options'), path).toBe('nosniff')
    expect(headers.get('X-Frame-Options'), path).toBe('DENY')
    // The framework's own error page brings the stricter of the two.
    expect(headers.get('Content-Security-Policy'), path).toMatch(/frame-ancestors 'none'|^default-src 'none'$/)
    expect(headers.get('Referrer-Policy'), path).toBe('same-origin')
  }
  const malformed = await fetch(`${origin}/sign-in`, { method: 'POST', headers: { Origin: 'no origin' }, body: '' })
  expect(malformed.status).toBeGreaterThanOrEqual(400)
  expect(malformed.headers.get('X-Content-Type-Options')).toBe('nosniff')
}

const isUp = (begun: Start) => async () => {
  if (begun.child.exitCode !== null) throw new Error(begun.said())
  return begun.said().includes('Sign in as')
}

afterEach(async () => {
  for (const begun of running) begun.child.kill('SIGTERM')
  await Promise.all([...running].map(({ ended }) => ended))
})
afterAll(() => rmSync(folder, { recursive: true, force: true }))

describe('npm start', () => {
  it('makes everything, says where and as whom, and stops everything it started', async () => {
    const first = start(env)
    await until(isUp(first), 120_000)
    expect(first.said()).toContain(origin)
    expect(first.said()).toContain('designer@inglefield.test')
    expect(await statusOf(`${origin}/readyz`)).toBe(200)
    expect(await statusOf(`${origin}/jobs`)).toBe(302)
    expect(first.said()).not.toContain('.env')
    await expectHeaders(['/icon.svg', '/%ff', '/assets/none.js'])
    first.child.kill('SIGTERM')
    expect(await first.ended).toBe(0)
    expect(await statusOf(`${origin}/healthz`)).toBe(0)
    expect(() => readFileSync(path.join(folder, 'pg/postmaster.pid'))).toThrow()
  }, 180_000)

  it('takes seconds the second time, keeps the data, and makes up for what dies', async () => {
    const again = start(env)
    const took = await until(isUp(again), 60_000)
    if (!again.said().includes('Building')) expect(took).toBeLessThan(10_000)
    expect(again.said()).not.toContain('demonstration was added')

    const postmaster = Number(readFileSync(path.join(folder, 'pg/postmaster.pid'), 'utf8').split('\n')[0])
    process.kill(postmaster, 'SIGKILL')
    await until(async () => (await statusOf(`${origin}/readyz`)) === 503, 5000)
    expect(await statusOf(`${origin}/healthz`)).toBe(200)
    await until(async () => (await statusOf(`${origin}/readyz`)) === 200, 15_000)

    const third = start({ ...env })
    expect(await third.ended).toBe(1)
    expect(third.said()).toContain(`Port ${ports.web} is taken`)
    expect(await statusOf(`${origin}/readyz`)).toBe(200)
  }, 180_000)

  it('refuses demonstration accounts where others could reach them', async () => {
    const open = start({ ...env, PUBLIC_ORIGIN: 'https://terraces.example' })
    await until(() => open.said().includes('refused at this address'), 60_000)
    expect(open.said()).not.toContain('warm-terrace-demo')
    const answer = await fetch(`${origin}/sign-in`, {
      method: 'POST',
      redirect: 'manual',
      headers: { Origin: 'https://terraces.example' },
      body: new URLSearchParams({ email: 'designer@inglefield.test', password: 'warm-terrace-demo' }),
    })
    expect(answer.status).toBe(401)
    expect(answer.headers.get('Strict-Transport-Security')).toContain('max-age')
  }, 120_000)

  it('serves elsewhere whom npm run owner made, once', async () => {
    const make = (password: string) =>
      run(env, ['workers/start-owner.ts', 'Hazel & Rime', 'Ada Hazel', 'Ada@rime.example'], `${password}\n`)
    const short = make('too short')
    expect([await short.ended, short.said()]).toEqual([1, expect.stringContaining('12 to 128 characters')])
    const made = make('nine warm evenings')
    expect([await made.ended, made.said()]).toEqual([0, expect.stringContaining('ada@rime.example is the owner of')])
    const again = make('nine warm evenings')
    expect([await again.ended, again.said()]).toEqual([1, expect.stringContaining('is there already')])

    const open = start({ ...env, PUBLIC_ORIGIN: 'https://terraces.example' })
    await until(() => open.said().includes('refused at this address'), 60_000)
    const answer = await fetch(`${origin}/sign-in`, {
      method: 'POST',
      redirect: 'manual',
      headers: { Origin: 'https://terraces.example' },
      body: new URLSearchParams({ email: 'ada@rime.example', password: 'nine warm evenings' }),
    })
    expect([answer.status, answer.headers.get('Location')]).toEqual([302, '/jobs'])
    const cookie = answer.headers.getSetCookie()[0]?.split(';')[0] ?? ''
    const heaters = await fetch(`${origin}/api/heaters`, { headers: { Cookie: cookie } })
    expect(await heaters.text()).toContain('betony-2-0')
    expect(await (await fetch(`${origin}/api/jobs`, { headers: { Cookie: cookie } })).json()).toEqual({ jobs: [] })
  }, 180_000)

  it.each([
    ['a folder that was left half made', { 'pg/PG_VERSION': '15\n' }, /is not whole .*pg_control.*mv /s],
    [
      'a folder of another version',
      { 'pg/PG_VERSION': '9.6\n', 'pg/global/pg_control': '', 'pg/inglefield-secret': 'x' },
      /made by PostgreSQL 9\.6/,
    ],
    [
      'a database that does not start',
      { 'pg/PG_VERSION': '15\n', 'pg/global/pg_control': '', 'pg/inglefield-secret': 'x' },
      /does not start\. Its log/,
    ],
  ])(
    'says what to do about %s',
    async (_, files, words) => {
      const broken = newFolder()
      for (const [name, content] of Object.entries(files)) {
        mkdirSync(path.dirname(path.join(broken, name)), { recursive: true })
        writeFileSync(path.join(broken, name), content)
      }
      const begun = start({ ...env, DATA_FOLDER: broken })
      expect(await begun.ended).toBe(1)
      expect(begun.said()).toMatch(words)
      rmSync(broken, { recursive: true })
    },
    60_000,
  )

  it('does not use another database that has its port', async () => {
    const other = await startLocalDatabase('test')
    const begun = start({ ...env, DATABASE_PORT: String(other.port) })
    expect(await begun.ended).toBe(1)
    expect(begun.said()).toMatch(/is used by another PostgreSQL, perhaps of another checkout.*DATABASE_PORT=/)
  }, 60_000)

  it('does not serve with a role that row-level security does not bind', async () => {
    const { adminUrl, urls } = await startLocalDatabase('test')
    const given = { DATABASE_OWNER_URL: urls('postgres').owner, DATABASE_AUTH_URL: urls('postgres').auth }
    const begun = start({ ...env, ...given, DATABASE_URL: adminUrl('postgres') })
    expect(await begun.ended).toBe(1)
    expect(begun.said()).toContain('bypasses row-level security')
  }, 60_000)
})
