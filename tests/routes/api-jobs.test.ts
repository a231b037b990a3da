import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { z } from 'zod'
import type { JobRequest } from '#app/domain/job/job-request.ts'
import { demoSites } from '#drizzle/seed/demo-sites.ts'
import { contentHash } from '#drizzle/content-hash.ts'
import { badSites } from '#tests/support/bad-sites.ts'
import { openApi, type ApiDesk } from '#tests/support/api.ts'

const refusalSchema = z.looseObject({ error: z.string().min(1), path: z.string() })
let desk: ApiDesk
let jobId: string
beforeAll(async () => {
  desk = await openApi()
  const { rows } = await desk.admin.query<{ id: string }>(`select id from jobs where name like 'Hotel%'`)
  jobId = rows[0]!.id
})
afterAll(() => desk.close())

const demo = demoSites().find(({ key }) => key === 'B')!
const key = () => crypto.randomUUID()
const kinds = [
  {
    name: 'site',
    good: demo.site,
    other: { ...demo.site, name: 'Another name' },
    bad: { ...demo.site, floor: [] },
    path: 'floor',
  },
  {
    name: 'brief',
    good: demo.brief,
    other: { ...demo.brief, place: 'Another place' },
    bad: { ...demo.brief, airTemperature: 60 },
    path: 'airTemperature',
  },
] as const

describe.each(kinds)('saving a $name', ({ name, good, other, bad, path }) => {
  const put = (
    who: 'designer' | 'engineer' | 'sales' | 'installer' | 'other',
    body: object,
    match?: number,
    withKey = key(),
  ) =>
    desk.as(who)('PUT', `/api/jobs/${jobId}/${name}`, {
      body,
      headers: { 'Idempotency-Key': withKey, ...(match === undefined ? {} : { 'If-Match': `"${match}"` }) },
    })
  const refused = async (response: Response) => ({
    status: response.status,
    ...refusalSchema.parse(await response.json()),
  })

  it('follows the same rule as a variant, in the same order', async () => {
    expect((await put('installer', good, 1)).status).toBe(403)
    expect((await put('other', good, 1)).status).toBe(404)
    expect(await refused(await put('designer', bad))).toMatchObject({ status: 400, path })
    expect((await refused(await put('designer', other))).status).toBe(428)
    const once = key()
    const saved = await put('designer', other, 1, once)
    expect(saved.headers.get('ETag')).toBe('"2"')
    const answer = await saved.text()
    expect(JSON.parse(answer)).toMatchObject({ revision: 2, [name]: other })
    expect(await refused(await put('engineer', good, 1))).toMatchObject({
      status: 412,
      changed: { by: 'Tilda Fenwick' },
      current: { revision: 2, [name]: other },
    })
    expect((await put('engineer', good, 2)).status).toBe(200)
    expect(await (await put('designer', other, 1, once)).text()).toBe(answer)
    expect((await refused(await put('designer', good, 3, once))).status).toBe(409)
    const { rows } = await desk.admin.query(
      `select revision, body, content_hash from ${name}_revisions where job_id = $1 order by 1`,
      [jobId],
    )
    expect(rows.map(({ revision }) => revision)).toEqual([1, 2, 3])
    for (const { body, content_hash } of rows) expect(content_hash).toBe(contentHash(body))
    const read = await desk.as('designer')('GET', `/api/jobs/${jobId}/${name}`)
    expect(read.headers.get('ETag')).toBe('"3"')
    expect(await read.json()).toEqual({ revision: 3, [name]: good })
  })
})

it('the brief is sales’ too, the site is not', async () => {
  const put = (name: string, body: object) =>
    desk.as('sales')('PUT', `/api/jobs/${jobId}/${name}`, {
      body,
      headers: { 'Idempotency-Key': key(), 'If-Match': '"3"' },
    })
  expect((await put('site', demo.site)).status).toBe(403)
  expect((await put('brief', { ...demo.brief, place: 'Roof, tenth floor' })).status).toBe(200)
  const { jobs } = await (await desk.as('sales')('GET', '/api/jobs')).json()
  expect(jobs.find(({ id }: { id: string }) => id === jobId)).toMatchObject({ place: 'Roof, tenth floor' })
})

describe('a site is kept only when it makes sense', () => {
  const floorOf = (x: number, y: number) => [
    [0, 0],
    [x, 0],
    [x, y],
    [0, y],
  ]
  const member = { ...demoSites()[0]!.site.members[0]!, underside: { follows: 'no such cover' } }
  const seats = Array.from({ length: 2001 }, (_, i) => ({ ...demo.site.seats[0]!, id: `s${i}` }))
  it.each([
    ['floor', { floor: floorOf(100.01, 10) }],
    ['floor', { floor: floorOf(61, 61) }],
    ['seats', { seats }],
    ['seats.1.id', { seats: [demo.site.seats[0], demo.site.seats[0]] }],
    ['tables.0.id', { tables: [{ ...demo.site.tables[0], id: demo.site.poles[0]!.id }] }],
    ['members.0.underside.follows', { members: [member] }],
    ['beyond.0.edge', { beyond: [{ edge: 4, kind: 'street', name: '' }] }],
  ])('400 at %s', async (path, change) => {
    const response = await desk.as('designer')('PUT', `/api/jobs/${jobId}/site`, {
      body: { ...demo.site, ...change },
      headers: { 'Idempotency-Key': key(), 'If-Match': '"3"' },
    })
    expect({ status: response.status, ...(await response.json()) }).toMatchObject({ status: 400, path })
  })

  it.each(badSites)('400 for %s, with the page’s words', async (_, site, path, words) => {
    const response = await desk.as('designer')('PUT', `/api/jobs/${jobId}/site`, {
      body: site,
      headers: { 'Idempotency-Key': key(), 'If-Match': '"3"' },
    })
    const refusal = refusalSchema.parse(await response.json())
    expect({ status: response.status, path: refusal.path }).toEqual({ status: 400, path })
    expect(refusal.error).toMatch(words)
  })

  it.each([
    [100, 60],
    [60, 100],
  ])('%d × %d m is still kept', async (x, y) => {
    const { revision } = await (await desk.as('designer')('GET', `/api/jobs/${jobId}/site`)).json()
    const response = await desk.as('designer')('PUT', `/api/jobs/${jobId}/site`, {
      body: { ...demo.site, floor: floorOf(x, y) },
      headers: { 'Idempotency-Key': key(), 'If-Match': `"${revision}"` },
    })
    expect(response.status).toBe(200)
  })
})

interface Size {
  value: number
  tolerance: number
  source: string
}

describe('creating a job', () => {
  const asked: JobRequest = {
    name: 'Made fifty times',
    customer: 'Nobody',
    displayUnits: 'metric',
    floor: null,
    brief: demo.brief,
  }
  const members = async () => {
    const { rows } = await desk.admin.query(
      `select m.user_id as "userId", m.organization_id as "organisationId", u.email, u.name, m.role from member m join "user" u on u.id = m.user_id where u.email = 'sales@inglefield.test'`,
    )
    return { ...rows[0], organisationName: '' }
  }

  it('fifty times at once with one key makes one job, with a bare floor of guessed size and one variant', async () => {
    const { createJob } = await import('#app/server/data/job-creation.server.ts')
    const [member, once] = [await members(), key()]
    const answers = await Promise.all(Array.from({ length: 50 }, () => createJob(member, once, asked)))
    const made = answers.map(
      (answer) => z.object({ body: z.object({ id: z.uuid(), variantId: z.uuid() }) }).parse(answer).body,
    )
    expect(new Set(made.map(({ id, variantId }) => id + variantId)).size).toBe(1)
    const { rows } = await desk.admin.query(`select count(*)::int as n from jobs where name = 'Made fifty times'`)
    expect(rows).toEqual([{ n: 1 }])
    const job = await (await desk.as('sales')('GET', `/api/jobs/${made[0]!.id}`)).json()
    expect(job).toMatchObject({
      stage: 'enquiry',
      place: demo.brief.place,
      seats: [],
      revisions: { site: 1, brief: 1 },
    })
    expect(job.site).toMatchObject({ floor: floorCorners(6, 4), covers: [], members: [] })
    expect(
      job.site.dimensions.map(({ value, tolerance, source }: Size) => [value, tolerance.toFixed(2), source]),
    ).toEqual([
      [6, '0.60', 'guessed'],
      [4, '0.40', 'guessed'],
    ])
    expect(
      job.variants.map(({ id, number, revision }: { id: string; number: number; revision: number }) => [
        id,
        number,
        revision,
      ]),
    ).toEqual([[made[0]!.variantId, 1, 1]])
    expect(await createJob(member, once, { ...asked, name: 'Other' })).toMatchObject({ status: 409 })
    for (const name of ['', 'a\u0000b', 'a\ud800']) {
      expect(await createJob(member, key(), { ...asked, name })).toMatchObject({ status: 400, path: 'name' })
    }
  })

  const floorCorners = (x: number, y: number) => [
    [0, 0],
    [x, 0],
    [x, y],
    [0, y],
  ]
})

it('a database that has something in it is not seeded again', async () => {
  const { seedDemo } = await import('#drizzle/seed/seed.ts')
  const counts = async () =>
    (
      await desk.admin.query(
        'select (select count(*) from jobs) as jobs, (select count(*) from heater_models) as models, (select count(*) from "user") as people',
      )
    ).rows
  const before = await counts()
  expect(await seedDemo({ auth: process.env.DATABASE_AUTH_URL!, app: process.env.DATABASE_URL! })).toBe(false)
  expect(await counts()).toEqual(before)
})
