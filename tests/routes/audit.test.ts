import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { Client } from 'pg'
import { z } from 'zod'
import { type Application, openApplication, requestOf } from '#tests/support/application.ts'

const password = 'warm-terrace-demo'
const guess = 'a-wrong-guess-of-mine'
let application: Application
let cookie: string
beforeAll(async () => {
  application = await openApplication()
  cookie = await application.signInAs('designer')
})
afterAll(() => application.close())

const eventSchema = z.object({
  action: z.string(),
  subject: z.string(),
  detail: z.unknown(),
  person: z.string().nullable(),
  organisation: z.string(),
})
async function listEvents() {
  const { rows } = await application.admin.query(
    `select e.action, e.subject, e.detail, u.email as person, o.slug as organisation from audit_events e
       join organization o on o.id = e.organisation_id left join "user" u on u.id = e.person_id order by e.at, e.action`,
  )
  return eventSchema.array().parse(rows)
}
/** What a piece of work adds to the audit. */
async function eventsOf(work: () => Promise<unknown>) {
  const before = (await listEvents()).length
  await work()
  return (await listEvents()).slice(before)
}
const byDesigner = { person: 'designer@inglefield.test', organisation: 'osierfold' }

const form = (path: string, fields: Record<string, string>, as?: string) =>
  application.handle(
    requestOf('POST', path, {
      cookie: as,
      body: new URLSearchParams(fields).toString(),
      headers: { 'Content-Type': 'application/x-www-form-urlencoded' },
    }),
  )

async function send(method: string, path: string, body?: unknown, headers: Record<string, string> = {}) {
  const response = await application.handle(
    requestOf(method, path, {
      cookie,
      headers: { 'Idempotency-Key': crypto.randomUUID(), ...headers },
      ...(body === undefined ? {} : { body: JSON.stringify(body) }),
    }),
  )
  const json: unknown = await response.json()
  return { status: response.status, json: z.looseObject({}).parse(json), etag: response.headers.get('ETag') ?? '' }
}

const enquiry = {
  units: 'metric',
  name: 'Sedge Mill courtyard',
  place: 'Sedge Mill',
  customer: '',
  along: '8.4 m',
  deep: '5 m',
  airTemperature: '6',
  windDesign: '1.2',
  clothing: '1.3',
  supply: '400',
  sparePerPhase: '40, 32, 40',
  targetLow: '150',
  targetHigh: '350',
}
async function newJob(key = crypto.randomUUID()): Promise<string> {
  const answer = await form('/jobs/new', { ...enquiry, key }, cookie)
  return /^\/jobs\/([^/]+)\/site$/.exec(answer.headers.get('Location') ?? '')?.[1] ?? ''
}
const heater = {
  id: 'H1',
  model: 'betony-2-0',
  supplyVoltage: 230,
  x: 1,
  y: 2,
  lowestPoint: 2.4,
  turnDeg: 0,
  tiltDeg: 0,
  mount: 'chain',
  memberId: null,
}
const stageOf = async (jobId: string) =>
  (await application.admin.query('select stage from jobs where id = $1', [jobId])).rows[0]?.stage
const variantIdOf = async (jobId: string): Promise<string> =>
  (await application.admin.query('select id from variants where job_id = $1', [jobId])).rows[0]?.id
/** Saves what a URL of the API gives as it is, or changed. */
async function saveAgain(path: string, key: 'site' | 'brief') {
  const kept = await send('GET', path)
  return send('PUT', path, kept.json[key], { 'If-Match': kept.etag })
}

describe('the audit', () => {
  it('knows who signed in', async () => {
    const events = await eventsOf(() => form('/sign-in', { email: 'Designer@inglefield.test', password }))
    expect(events).toMatchObject([{ action: 'signed in', detail: null, ...byDesigner }])
  })

  it('knows whose password was tried in vain, not by whom, and nothing of addresses that nobody has', async () => {
    const events = await eventsOf(async () => {
      await form('/sign-in', { email: 'designer@inglefield.test', password: guess })
      await form('/sign-in', { email: 'nobody@inglefield.test', password: guess })
    })
    const { rows } = await application.admin.query(`select id from "user" where email = 'designer@inglefield.test'`)
    expect(events).toEqual([
      {
        action: 'sign-in failed',
        subject: `people/${rows[0].id}`,
        detail: null,
        person: null,
        organisation: 'osierfold',
      },
    ])
  })

  it('has one event for a job, however often it is sent', async () => {
    const key = crypto.randomUUID()
    const ids: string[] = []
    const events = await eventsOf(async () => {
      ids.push(...(await Promise.all([newJob(key), newJob(key), newJob(key)])))
    })
    expect(new Set(ids).size).toBe(1)
    expect(events).toEqual([
      {
        action: 'job created',
        subject: `jobs/${ids[0]}`,
        detail: { variantId: await variantIdOf(ids[0] ?? '') },
        ...byDesigner,
      },
    ])
  })

  it('has one event for each saved revision of site and brief, none for what is refused', async () => {
    const jobId = await newJob()
    const events = await eventsOf(async () => {
      for (const thing of ['site', 'brief'] as const) {
        expect((await saveAgain(`/api/jobs/${jobId}/${thing}`, thing)).status).toBe(200)
        const { json } = await send('GET', `/api/jobs/${jobId}/${thing}`)
        const stale = await send('PUT', `/api/jobs/${jobId}/${thing}`, json[thing], { 'If-Match': '"1"' })
        expect(stale.status).toBe(412)
      }
    })
    expect(events).toEqual(
      ['site', 'brief'].map((thing) => ({
        action: `${thing} saved`,
        subject: `jobs/${jobId}/${thing}`,
        detail: { revision: 2 },
        ...byDesigner,
      })),
    )
  })

  it('follows a variant through its life', async () => {
    const jobId = await newJob()
    const events = await eventsOf(async () => {
      const made = await send('POST', `/api/jobs/${jobId}/variants`, { title: 'Six', heaters: [heater] })
      const url = `/api/variants/${String(made.json['id'])}`
      const key = { 'Idempotency-Key': 'the-same-save' }
      for (let twice = 0; twice < 2; twice++) {
        await send('PUT', url, { title: 'Seven', heaters: [] }, { 'If-Match': '"1"', ...key })
      }
      await send('POST', `${url}/restore`, { revision: 1 }, { 'If-Match': '"2"' })
      await send('DELETE', url, undefined, { 'If-Match': '"3"' })
      await send('POST', `${url}/restore`, { deleted: true })
      await send('POST', `${url}/restore`, { deleted: true })
      await send('DELETE', url, undefined, { 'If-Match': '"2"' })
    })
    expect(events.map(({ action, detail }) => [action, detail])).toEqual([
      ['variant created', { number: 2 }],
      ['variant saved', { revision: 2 }],
      ['variant restored', { revision: 3 }],
      ['variant deleted', { revision: 3 }],
      ['variant brought back', { revision: 3 }],
    ])
    expect(new Set(events.map(({ subject }) => subject)).size).toBe(1)
    expect(new Set(events.map(({ person }) => person))).toEqual(new Set(['designer@inglefield.test']))
  })

  it.each(['png', 'svg'])(
    'says which revisions left the house as a picture: %s',
    async (format) => {
      const { rows } = await application.admin.query(`select id from jobs where name like 'Sallow%'`)
      const path = `/jobs/${rows[0].id}/compare.${format}?variants=2,1`
      const events = await eventsOf(async () => {
        expect((await application.handle(requestOf('GET', path, { cookie }))).status).toBe(200)
      })
      expect(events).toEqual([
        {
          action: 'comparison exported',
          subject: `jobs/${rows[0].id}`,
          detail: {
            format,
            variants: [
              { number: 2, revision: 1 },
              { number: 1, revision: 1 },
            ],
          },
          ...byDesigner,
        },
      ])
    },
    60_000,
  )

  it('holds no secret', async () => {
    const everything = JSON.stringify((await application.admin.query('select * from audit_events')).rows)
    const { rows } = await application.admin.query(
      'select token as secret from session union select password from account where password is not null',
    )
    expect(rows.length).toBeGreaterThan(5)
    for (const secret of [password, guess, cookie, ...rows.map(({ secret }) => secret)]) {
      expect(everything).not.toContain(secret)
    }
  })

  it('cannot be changed or emptied, by whatever role', async () => {
    const before = await listEvents()
    const { urls, adminUrl } = application.database
    const { rows } = await application.admin.query(`select id from organization where slug = 'osierfold'`)
    for (const url of [urls.app, urls.auth, urls.owner, adminUrl]) {
      const client = new Client({ connectionString: url })
      await client.connect()
      for (const statement of [
        `update audit_events set action = 'nothing'`,
        'delete from audit_events',
        'truncate audit_events',
      ]) {
        await client.query('begin')
        await client.query(`select set_config('app.org', $1, true)`, [rows[0].id])
        const outcome = await client.query(statement).then(
          ({ rowCount }) => `${rowCount} rows`,
          (problem: Error) => problem.message,
        )
        await client.query('rollback')
        // The owner role, which no policy lets in, finds no row to change.
        expect(outcome).toMatch(/permission denied|kept for good|^0 rows$/)
        if (url === adminUrl || url === urls.app) expect(outcome).toMatch(/permission denied|kept for good/)
      }
      await client.end()
    }
    expect(await listEvents()).toEqual(before)
  })

  it('is written with its effect or not at all', async () => {
    const jobId = await newJob()
    await application.admin.query('revoke insert on audit_events from inglefield_app')
    try {
      const url = `/api/variants/${await variantIdOf(jobId)}`
      const put = requestOf('PUT', url, {
        cookie,
        body: JSON.stringify({ title: 'Unseen', heaters: [] }),
        headers: { 'If-Match': '"1"', 'Idempotency-Key': crypto.randomUUID() },
      })
      expect((await application.handle(put)).status).toBe(500)
      expect((await send('GET', url)).json).toMatchObject({ revision: 1, title: 'First layout' })
      const signedIn = await form('/sign-in', { email: 'designer@inglefield.test', password })
      expect([signedIn.status, signedIn.headers.getSetCookie()]).toEqual([500, []])
    } finally {
      await application.admin.query('grant insert on audit_events to inglefield_app')
    }
  })
})

describe('the stage of a job', () => {
  it('moves from enquiry to site to variants with the work', async () => {
    const jobId = await newJob()
    const variant = `/api/variants/${await variantIdOf(jobId)}`
    expect(await stageOf(jobId)).toBe('enquiry')
    await saveAgain(`/api/jobs/${jobId}/brief`, 'brief')
    await send('PUT', variant, { title: 'Still empty', heaters: [] }, { 'If-Match': '"1"' })
    expect(await stageOf(jobId)).toBe('enquiry')
    await saveAgain(`/api/jobs/${jobId}/site`, 'site')
    expect(await stageOf(jobId)).toBe('site')
    await send('PUT', variant, { title: 'One', heaters: [heater] }, { 'If-Match': '"2"' })
    expect(await stageOf(jobId)).toBe('variants')
  })

  it('never goes back', async () => {
    const jobId = await newJob()
    const made = await send('POST', `/api/jobs/${jobId}/variants`, { heaters: [heater] })
    expect(await stageOf(jobId)).toBe('variants')
    await saveAgain(`/api/jobs/${jobId}/site`, 'site')
    await send('PUT', `/api/variants/${String(made.json['id'])}`, { title: 'None', heaters: [] }, { 'If-Match': '"1"' })
    expect(await stageOf(jobId)).toBe('variants')
    await application.admin.query(`update jobs set stage = 'offer' where id = $1`, [jobId])
    await saveAgain(`/api/jobs/${jobId}/site`, 'site')
    await send('POST', `/api/jobs/${jobId}/variants`, { heaters: [heater] })
    expect(await stageOf(jobId)).toBe('offer')
    const listed = await send('GET', '/api/jobs')
    expect(JSON.stringify(listed.json)).toContain(`"stage":"offer"`)
  })
})
