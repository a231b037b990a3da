import { createHmac, randomBytes, randomUUID } from 'node:crypto'
import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import path from 'node:path'
import type { RouteConfigEntry } from '@react-router/dev/routes'
import { Client } from 'pg'
import {
  createRequestHandler,
  type ServerBuild,
  UNSAFE_withComponentProps as withComponentProps,
  UNSAFE_withErrorBoundaryProps as withErrorBoundaryProps,
} from 'react-router'
import routes from '#app/routes.ts'
import type { Role } from '#app/domain/access/roles.ts'
import { type SeededDatabase, seededDatabase } from '#tests/support/seeded-database.ts'

/** Our own public origin in these tests. */
export const ownOrigin = 'http://127.0.0.1:3000'

/** A line of routes.ts with the patterns of its parents put before its own. */
export interface RouteLine {
  readonly id: string
  readonly parentId: string
  readonly pattern: string
  readonly entry: RouteConfigEntry
}

function linesOf(entries: readonly RouteConfigEntry[], parentId = 'root', above = ''): RouteLine[] {
  return entries.flatMap((entry) => {
    const pattern = `${above}/${entry.path ?? ''}`.replace(/\/+/g, '/').replace(/(.)\/$/, '$1')
    const id = entry.id ?? entry.file
    return [{ id, parentId, pattern, entry }, ...linesOf(entry.children ?? [], id, pattern)]
  })
}

/** Every line of routes.ts, parents before their children. */
export const routeLines: readonly RouteLine[] = linesOf(routes)

type Module = Record<string, unknown>

const assetsOf = (id: string, module: Module, line?: RouteLine) => ({
  id,
  path: line?.entry.path,
  index: line?.entry.index,
  parentId: line?.parentId,
  hasAction: 'action' in module,
  hasLoader: 'loader' in module,
  hasClientAction: false,
  hasClientLoader: false,
  hasClientMiddleware: false,
  hasDefaultExport: 'default' in module,
  hasErrorBoundary: 'ErrorBoundary' in module,
  module: `/assets/${id}.js`,
  imports: [],
  css: [],
})

/** The framework's bundling gives pages their data as properties; so do we. */
function withProps(module: Module): Module {
  const { default: page, ErrorBoundary: errorPage } = module
  return {
    ...module,
    ...(typeof page === 'function' ? { default: withComponentProps(page as never) } : {}),
    ...(typeof errorPage === 'function' ? { ErrorBoundary: withErrorBoundaryProps(errorPage as never) } : {}),
  }
}

/** The application as the server runs it: real middleware, real route modules, real rendering; no bundling. */
async function buildApplication(): Promise<ServerBuild> {
  const modules = import.meta.glob<Module>('../../app/routes/**/*.{ts,tsx}')
  const root = await import('#app/root.tsx')
  const entry = await import('#app/entry.server.tsx')
  const loaded = new Map<string, Module>()
  for (const { id, entry: line } of routeLines) {
    loaded.set(id, withProps(await modules[`../../app/${line.file}`]!()))
  }
  const manifest: Record<string, unknown> = { root: { id: 'root', path: '', module: withProps(root) } }
  const assets: Record<string, unknown> = { root: assetsOf('root', root) }
  for (const line of routeLines) {
    const module = loaded.get(line.id)!
    const { path: own, index } = line.entry
    manifest[line.id] = { id: line.id, parentId: line.parentId, path: own, index, module }
    assets[line.id] = assetsOf(line.id, module, line)
  }
  const build = {
    entry: { module: entry },
    routes: manifest,
    assets: {
      entry: { imports: [], module: '/assets/entry.js' },
      routes: assets,
      url: '/assets/manifest.js',
      version: '1',
    },
    publicPath: '/',
    assetsBuildDirectory: '',
    future: { v8_middleware: true, v8_passThroughRequests: true, v8_trailingSlashAwareDataRequests: true },
    ssr: true,
    isSpaMode: false,
    prerender: [],
    routeDiscovery: { mode: 'initial', manifestPath: '/__manifest' },
    allowedActionOrigins: ['**'],
  }
  return build as unknown as ServerBuild
}

/** The roles of the demonstration's organisation, and the owner of another one. */
export type Person = Role | 'outsider'

const addressOf = (person: Person) => (person === 'outsider' ? 'owner@quillet.test' : `${person}@inglefield.test`)

/** The whole application on a database of its own with the demonstration in it. */
export interface Application {
  readonly handle: (request: Request) => Promise<Response>
  /** A connection that sees every row, for looking behind the application. */
  readonly admin: Client
  readonly database: SeededDatabase
  /** The cookie of a new session of that person. */
  readonly signInAs: (person: Person) => Promise<string>
  readonly close: () => Promise<void>
}

/** A signed session cookie, made as the sign-in makes it. */
async function newSession(admin: Client, email: string, secret: string): Promise<string> {
  const token = randomBytes(24).toString('base64url')
  const made = await admin.query(
    `insert into session (id, token, user_id, expires_at) select $1, $2, id, now() + interval '1 day' from "user" where email = $3`,
    [randomUUID(), token, email],
  )
  if (made.rowCount !== 1) throw new Error(`Nobody has the address ${email}.`)
  const signature = createHmac('sha256', secret).update(token).digest('base64')
  return `inglefield.session_token=${encodeURIComponent(`${token}.${signature}`)}`
}

/** Starts the application in this process. Close it when the tests of the file are done. */
export async function openApplication(env: Record<string, string> = {}): Promise<Application> {
  const database = await seededDatabase()
  const secret = randomBytes(32).toString('hex')
  const folder = mkdtempSync(path.join(tmpdir(), 'inglefield-test-'))
  Object.assign(process.env, {
    NODE_ENV: 'test',
    HOST: '127.0.0.1',
    PORT: '3000',
    PUBLIC_ORIGIN: ownOrigin,
    DATABASE_URL: database.urls.app,
    DATABASE_AUTH_URL: database.urls.auth,
    DATABASE_OWNER_URL: database.urls.owner,
    SESSION_SECRET: secret,
    DATA_FOLDER: folder,
    ...env,
  })
  const handle = createRequestHandler(await buildApplication(), 'production')
  const admin = new Client({ connectionString: database.adminUrl })
  await admin.connect()
  return {
    handle,
    admin,
    database,
    signInAs: (person) => newSession(admin, addressOf(person), secret),
    close: async () => {
      await admin.end()
      const { closeDatabase } = await import('#app/server/db.server.ts')
      await closeDatabase()
      await database.drop()
      rmSync(folder, { recursive: true, force: true })
    },
  }
}

/** What a request of our own pages carries; a body gets its length. */
export function requestOf(
  method: string,
  path: string,
  options: { cookie?: string | undefined; body?: string; headers?: Record<string, string> } = {},
): Request {
  const { cookie, body, headers } = options
  return new Request(ownOrigin + path, {
    method,
    headers: {
      ...(method === 'GET' || method === 'HEAD' ? {} : { Origin: ownOrigin }),
      ...(cookie ? { Cookie: cookie } : {}),
      ...(body === undefined ? {} : { 'Content-Length': String(Buffer.byteLength(body)) }),
      ...headers,
    },
    ...(body === undefined ? {} : { body }),
  })
}
