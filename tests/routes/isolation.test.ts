import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { can, roles } from '#app/domain/access/roles.ts'
import {
  type Application,
  type Person,
  type RouteLine,
  openApplication,
  ownOrigin,
  routeLines,
} from '#tests/support/application.ts'
import { type Method, methods, reachOf } from './route-table.ts'

const canary = { own: 'canary-osierfold-7c1f', other: 'canary-quillet-e93b' }
const nowhere = {
  jobId: '00000000-0000-4000-8000-000000000000',
  variantId: '00000000-0000-4000-8000-000000000001',
  photoId: '00000000-0000-4000-8000-000000000002',
  setId: '00000000-0000-4000-8000-000000000003',
  code: 'never-was',
}
type Ids = typeof nowhere

let application: Application
const cookies = new Map<string, string>()
const ids: Record<'own' | 'other', Ids> = { own: nowhere, other: nowhere }

/** Marks every text of an organisation that a page or an answer could show. */
async function plantCanary(slug: string, text: string): Promise<Ids> {
  const { admin } = application
  const organisation = await admin.query('select id from organization where slug = $1', [slug])
  const of = [organisation.rows[0].id, text]
  await admin.query('update organization set name = $2 where id = $1', of)
  await admin.query('update jobs set name = $2, customer = $2, place = $2 where organisation_id = $1', of)
  await admin.query(
    `update sites set body = jsonb_set(body, '{name}', to_jsonb($2::text)) where organisation_id = $1`,
    of,
  )
  await admin.query(
    `update briefs set body = jsonb_set(body, '{story}', to_jsonb($2::text)) where organisation_id = $1`,
    of,
  )
  await admin.query('update variants set title = $2 where organisation_id = $1', of)
  await admin.query(
    `update heater_models set body = jsonb_set(body, '{note}', to_jsonb($2::text)) where organisation_id = $1`,
    of,
  )
  // The catalogues of both are the same; this one model each has alone.
  const alone = [of[0], `only-${slug}`]
  await admin.query(
    `insert into heater_models (organisation_id, code, body) select organisation_id, $2, jsonb_set(body, '{code}', to_jsonb($2::text))
      from heater_models where organisation_id = $1 and code = 'betony-3-0'`,
    alone,
  )
  await admin.query('update photos set name = $2 where organisation_id = $1', of)
  await admin.query('update rule_sets set name = $2, place = $2 where organisation_id = $1', of)
  const found = await admin.query(
    `select v.job_id as "jobId", v.id as "variantId", p.id as "photoId", r.id as "setId", $2::text as code from variants v
     join rule_sets r on r.organisation_id = v.organisation_id join photos p
     on p.organisation_id = v.organisation_id and p.job_id = v.job_id where v.organisation_id = $1 order by v.id limit 1`,
    alone,
  )
  return found.rows[0]
}

/** Sessions that are no longer good, whoever held them. */
async function makeGoneSessions(): Promise<void> {
  const { admin, signInAs } = application
  cookies.set('signed out', await signInAs('engineer'))
  await admin.query(
    `delete from session where user_id = (select id from "user" where email = 'engineer@inglefield.test')`,
  )
  cookies.set('expired', await signInAs('sales'))
  await admin.query(
    `update session set expires_at = now() - interval '1 second' where user_id = (select id from "user" where email = 'sales@inglefield.test')`,
  )
  await admin.query(`insert into "user" (name, email) values ('Gone', 'gone@inglefield.test')`)
  await admin.query(
    `insert into member (organization_id, user_id, role) select o.id, u.id, 'owner' from organization o, "user" u where o.slug = 'osierfold' and u.email = 'gone@inglefield.test'`,
  )
  cookies.set('removed', await signInAs('gone' as Person))
  await admin.query(
    `update session set active_organization_id = (select id from organization where slug = 'osierfold') where user_id = (select id from "user" where email = 'gone@inglefield.test')`,
  )
  await admin.query(`delete from member where user_id = (select id from "user" where email = 'gone@inglefield.test')`)
}

beforeAll(async () => {
  application = await openApplication()
  ids.own = await plantCanary('osierfold', canary.own)
  ids.other = await plantCanary('quillet', canary.other)
  await makeGoneSessions()
  for (const person of [...roles, 'outsider'] as const) cookies.set(person, await application.signInAs(person))
})
afterAll(() => application.close())

const filled = (pattern: string, { jobId, variantId, photoId, setId, code }: Ids) =>
  pattern
    .replace(':jobId', jobId)
    .replace(':variantId', variantId)
    .replace(':photoId', photoId)
    .replace(':setId', setId)
    .replace(':code', code)
    .replace(/:[^/]+/g, 'none')
    .replace('*', 'no/such')

/** A document or API request, and every way to ask for the data of some of its routes only. */
function addressesOf(line: RouteLine, of: Ids): string[] {
  const path = filled(line.pattern, of)
  const data = path === '/' ? '/_.data' : `${path}.data`
  const chain = ['root', line.parentId, line.id].filter((id, at, all) => all.indexOf(id) === at)
  const subsets = chain.reduce<string[][]>((sets, id) => [...sets, ...sets.map((set) => [...set, id])], [[]])
  return [
    path,
    data,
    ...subsets.filter((set) => set.length > 0).map((set) => `${data}?_routes=${encodeURIComponent(set.join(','))}`),
  ]
}

interface Answered {
  status: number
  body: string
  location: string | null
}

async function ask(who: string, method: string, address: string): Promise<Answered> {
  const cookie = cookies.get(who)
  const body = method === 'GET' || method === 'HEAD' ? null : '{}'
  const response = await application.handle(
    new Request(ownOrigin + address, {
      method,
      body,
      headers: {
        ...(cookie ? { Cookie: cookie } : {}),
        ...(body ? { 'Content-Type': 'application/json', 'Content-Length': '2', Origin: ownOrigin } : {}),
      },
    }),
  )
  return { status: response.status, body: await response.text(), location: response.headers.get('Location') }
}

/** The same answer but for the ids that were asked for and this answer's nonce. */
function comparable({ status, body, location }: Answered, of: Ids): string {
  return `${status} ${location} ${body}`
    .replaceAll(of.jobId, 'JOB')
    .replaceAll(of.variantId, 'VARIANT')
    .replaceAll(of.photoId, 'PHOTO')
    .replaceAll(of.setId, 'SET')
    .replaceAll(of.code, 'CODE')
    .replace(/nonce="[^"]*"/g, '')
}

const lines = routeLines.filter(({ entry }) => entry.path !== undefined || entry.index)
const named = lines.map((line) => ({
  line,
  pattern: line.pattern,
  reach: reachOf[line.pattern] ?? ('missing' as const),
}))
const closed = named.filter(({ reach }) => reach !== 'open')
const withIds = closed.filter(({ pattern }) => /:(jobId|variantId|photoId|setId|code)/.test(pattern))

/** What a method of a line asks of a role; undefined where the line does not know the method. */
function needOf(reach: (typeof named)[number]['reach'], method: Method) {
  if (reach === 'any member' || reach === 'missing' || reach === 'open') return 'any member'
  return reach[method]
}

it('has a row for every line of routes.ts', () => {
  expect(named.filter(({ reach }) => reach === 'missing').map(({ pattern }) => pattern)).toEqual([])
})

describe.each(closed)('$pattern', ({ line }) => {
  it('tells nothing to somebody who is not, or no longer, a member', async () => {
    for (const who of ['nobody', 'signed out', 'expired', 'removed']) {
      for (const method of [...methods, 'HEAD']) {
        for (const address of addressesOf(line, ids.own)) {
          const { status, body, location } = await ask(who, method, address)
          const shut =
            method === 'HEAD' ||
            status >= 400 ||
            (status === 302 && location?.startsWith('/sign-in')) ||
            isRedirectToSignIn(body)
          expect(shut, `${who} ${method} ${address} → ${status}`).toBe(true)
          expect(status).toBeLessThan(500)
          expect(body).not.toContain('canary')
          if (method === 'HEAD') expect(body).toBe('')
        }
      }
    }
  })
})

/** The data of a page that sends people to sign in is a 202 that holds the way there. */
const isRedirectToSignIn = (body: string) => body.includes('redirect') && body.includes('/sign-in?next=')

describe.each(withIds)('$pattern', ({ line, reach }) => {
  it('answers what belongs to another organisation exactly as what was never there', async () => {
    for (const who of [...roles, 'outsider']) {
      const foreign = who === 'outsider' ? ids.own : ids.other
      for (const method of methods) {
        const missing = addressesOf(line, nowhere)
        for (const [at, address] of addressesOf(line, foreign).entries()) {
          const answer = await ask(who, method, address)
          const never = await ask(who, method, missing[at]!)
          expect(comparable(answer, foreign), `${who} ${method} ${address}`).toBe(comparable(never, nowhere))
          expect(answer.body).not.toContain(who === 'outsider' ? canary.own : canary.other)
          // The root's own data holds nothing of an organisation; a line without a loader has no other.
          const rootOnly = address.endsWith('_routes=root') || (method === 'GET' && !needOf(reach, 'GET'))
          if (!rootOnly) expect(answer.status, `${who} ${method} ${address}`).toBeGreaterThanOrEqual(400)
          expect(answer.status).toBeLessThan(500)
        }
      }
    }
  })

  it('answers an id that is none with 404', async () => {
    for (const id of ['x', '%00', "'--", '00000000-0000-4000-8000-00000000000g']) {
      const { status } = await ask(
        'designer',
        'GET',
        filled(line.pattern, { jobId: id, variantId: id, photoId: id, setId: id, code: id }),
      )
      expect(needOf(reach, 'GET') ? [404] : [400, 405], id).toContain(status)
    }
  })
})

describe.each(closed)('$pattern', ({ line, reach }) => {
  it('asks of each method what the table of roles says', async () => {
    for (const role of roles) {
      for (const method of methods) {
        const need = needOf(reach, method)
        if (!need) continue
        const { status } = await ask(role, method, filled(line.pattern, ids.own))
        const allowed = need === 'any member' || can(role, need)
        if (allowed) expect([401, 403], `${role} ${method}`).not.toContain(status)
        else expect(status, `${role} ${method}`).toBe(403)
        expect(status).toBeLessThan(500)
      }
    }
    // Pictures are drawn for every role that may have them.
  }, 90_000)
})

describe('with row-level security switched off, the application alone', () => {
  const everyTable = async (setting: string) => {
    const tables = await application.admin.query(
      `select relname from pg_class where relkind = 'r' and relnamespace = 'public'::regnamespace and relforcerowsecurity`,
    )
    expect(tables.rows.length).toBeGreaterThan(9)
    for (const { relname } of tables.rows)
      await application.admin.query(`alter table ${relname} ${setting} row level security`)
  }
  beforeAll(() => everyTable('disable'))
  afterAll(() => everyTable('enable'))

  it.each(withIds)('answers $pattern of another organisation as what was never there', async ({ line }) => {
    for (const who of ['owner', 'outsider']) {
      const foreign = who === 'outsider' ? ids.own : ids.other
      for (const method of methods) {
        const answer = await ask(who, method, filled(line.pattern, foreign))
        const never = await ask(who, method, filled(line.pattern, nowhere))
        expect(comparable(answer, foreign), `${who} ${method}`).toBe(comparable(never, nowhere))
      }
    }
  })

  it.each(closed)('lists nothing of another organisation at $pattern', async ({ line }) => {
    expect((await ask('owner', 'GET', filled(line.pattern, ids.own))).body).not.toContain(canary.other)
    expect((await ask('outsider', 'GET', filled(line.pattern, ids.other))).body).not.toContain(canary.own)
  })
})

it('changed nothing of the other organisation', async () => {
  const found = await application.admin.query(
    `select count(*)::int as jobs, min(name) as name from jobs where organisation_id = (select id from organization where slug = 'quillet')`,
  )
  expect(found.rows[0]).toEqual({ jobs: 1, name: canary.other })
})
