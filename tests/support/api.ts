import { createHmac, randomBytes, randomUUID } from 'node:crypto'
import { Client } from 'pg'
import { createRequestHandler, type ServerBuild } from 'react-router'
import routes from '#app/routes.ts'
import type { Role } from '#app/domain/access/roles.ts'
import { seededDatabase } from '#tests/support/seeded-database.ts'

type Node = (typeof routes)[number]
const origin = 'http://127.0.0.1:3000'

/** The API as the server serves it: the real middleware, the real route modules, no pages. */
async function apiHandler(): Promise<(request: Request) => Promise<Response>> {
  const { middleware } = await import('#app/server/middleware.server.ts')
  const modules = import.meta.glob('../../app/routes/api/*.{ts,tsx}')
  const manifest: Record<string, unknown> = {
    root: { id: 'root', path: '', module: { default: () => null, middleware } },
  }
  for (const { path, file } of routes.filter((node: Node) => node.file.startsWith('routes/api/'))) {
    const module = await modules[`../../app/${file}`]!()
    manifest[file] = { id: file, parentId: 'root', path, module }
  }
  const build = {
    entry: {
      module: { default: () => new Response('a page'), handleError: (problem: unknown) => console.error(problem) },
    },
    routes: manifest,
    assets: { entry: { imports: [], module: '' }, routes: {}, url: '', version: '' },
    publicPath: '/',
    assetsBuildDirectory: '',
    future: { v8_middleware: true, v8_passThroughRequests: true },
    ssr: true,
    isSpaMode: false,
    prerender: [],
    routeDiscovery: { mode: 'initial', manifestPath: '/__manifest' },
  }
  return createRequestHandler(build as unknown as ServerBuild, 'production')
}

/** Somebody who uses the API: a request goes out as from one of our own pages, with the person's session. */
export interface Caller {
  (
    method: string,
    path: string,
    options?: { body?: unknown; text?: string; headers?: Record<string, string> },
  ): Promise<Response>
}

/** The API on a database of its own with the demonstration in it. */
export interface ApiDesk {
  /** By role in the demonstration's organisation; `other` is the second organisation's owner, `nobody` signed out. */
  readonly as: (who: Role | 'other' | 'nobody') => Caller
  /** A connection that sees every row, for looking behind the API. */
  readonly admin: Client
  readonly close: () => Promise<void>
}

async function sessionFor(auth: Client, email: string, secret: string): Promise<string> {
  const token = randomBytes(24).toString('base64url')
  await auth.query(
    `insert into session (id, token, user_id, expires_at) select $1, $2, id, now() + interval '1 day' from "user" where email = $3`,
    [randomUUID(), token, email],
  )
  const signature = createHmac('sha256', secret).update(token).digest('base64')
  return `inglefield.session_token=${encodeURIComponent(`${token}.${signature}`)}`
}

const emails: Record<Role | 'other', string> = {
  owner: 'owner@inglefield.test',
  designer: 'designer@inglefield.test',
  engineer: 'engineer@inglefield.test',
  sales: 'sales@inglefield.test',
  installer: 'installer@inglefield.test',
  other: 'owner@quillet.test',
}

function callerWith(handle: (request: Request) => Promise<Response>, cookie: string | null): Caller {
  return (method, path, { body, text, headers } = {}) => {
    const sent = text ?? (body === undefined ? undefined : JSON.stringify(body))
    const always = { Origin: origin, ...(cookie === null ? {} : { Cookie: cookie }) }
    const length = sent === undefined ? {} : { 'Content-Length': String(Buffer.byteLength(sent)) }
    return handle(
      new Request(origin + path, {
        method,
        headers: { ...always, ...length, ...headers },
        ...(sent === undefined ? {} : { body: sent }),
      }),
    )
  }
}

/** Starts the API on a fresh database. Close it when the tests of the file are done. */
export async function openApi(): Promise<ApiDesk> {
  const database = await seededDatabase()
  const secret = randomBytes(32).toString('hex')
  Object.assign(process.env, {
    NODE_ENV: 'test',
    DATABASE_URL: database.urls.app,
    DATABASE_AUTH_URL: database.urls.auth,
    SESSION_SECRET: secret,
  })
  const handle = await apiHandler()
  const admin = new Client({ connectionString: database.adminUrl })
  await admin.connect()
  const cookies = new Map<string, string>()
  for (const [who, email] of Object.entries(emails)) cookies.set(who, await sessionFor(admin, email, secret))
  return {
    as: (who) => callerWith(handle, cookies.get(who) ?? null),
    admin,
    close: async () => {
      await admin.end()
      const { closeDatabase } = await import('#app/server/db.server.ts')
      await closeDatabase()
      await database.drop()
    },
  }
}
