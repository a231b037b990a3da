import fc from 'fast-check'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { z } from 'zod'
import { openApi, type ApiDesk, type Caller } from '#tests/support/api.ts'

const refusalSchema = z.looseObject({ error: z.string().min(1), path: z.string() })
type Json = string | number | boolean | null | Json[] | { [key: string]: Json }

let desk: ApiDesk
let designer: Caller
let jobId: string
let variantId: string
beforeAll(async () => {
  desk = await openApi()
  designer = desk.as('designer')
  const { rows } = await desk.admin.query<{ id: string; job_id: string }>(
    `select v.id, v.job_id from variants v join jobs j on j.id = v.job_id where j.name like 'Sallow%' and v.number = 1`,
  )
  jobId = rows[0]!.job_id
  variantId = rows[0]!.id
  // The first question starts the thread, which takes its time once.
  await designer('POST', '/api/flux', { body: { heaters: [], points: [] } })
})
afterAll(async () => {
  const { stopFluxThreads } = await import('#app/server/flux.server.ts')
  await stopFluxThreads()
  await desk.close()
})

/** What JSON.stringify cannot write goes in as a mark and is put in its place in the text. */
const marks: Record<string, string> = {
  '@infinite@': '1e309',
  '@minus-infinite@': '-1e309',
  '@lone@': '"\\ud800"',
  '@lone-low@': '"x\\udc00y"',
  '@nul@': '"a\\u0000b"',
  '@deep@': '['.repeat(20_000) + ']'.repeat(20_000),
  '@deep-objects@': '{"a":'.repeat(5000) + '1' + '}'.repeat(5000),
  '@proto@': '{"__proto__":{"polluted":true}}',
  '@constructor@': '{"constructor":{"prototype":{"polluted":true}}}',
  '@long@': JSON.stringify('x'.repeat(990_000)),
  '@over-limit@': JSON.stringify('x'.repeat(1_000_001)),
  '@long-number@': '9'.repeat(400),
  '@tiny@': '5e-324',
}
const textOf = (value: Json): string =>
  JSON.stringify(value).replace(/"(@[a-z-]+@)"/g, (whole, mark: string) => marks[mark] ?? whole)

/** Every place inside a JSON value, as the way to it. */
function placesIn(value: Json, way: (string | number)[] = []): (string | number)[][] {
  if (typeof value !== 'object' || value === null) return [way]
  const inner = Array.isArray(value) ? value.map((v, i) => [i, v] as const) : Object.entries(value)
  return [way, ...inner.flatMap(([key, next]) => placesIn(next, [...way, key]))]
}
function changed(value: Json, [key, ...rest]: (string | number)[], change: (inner: Json) => Json): Json {
  if (key === undefined) return change(value)
  if (Array.isArray(value)) return value.map((inner, i) => (i === key ? changed(inner, rest, change) : inner))
  if (typeof value !== 'object' || value === null) return value
  return { ...value, [key]: changed(value[key]!, rest, change) }
}

const nasty = fc.oneof(
  { weight: 3, arbitrary: fc.constantFrom(...Object.keys(marks)) },
  { weight: 2, arbitrary: fc.constantFrom<Json>(null, true, '', 0, -1, 1e308, [], {}, '=cmd', '<script>', -0.0, 1.5) },
  { weight: 2, arbitrary: fc.jsonValue({ maxDepth: 3 }) as fc.Arbitrary<Json> },
  { weight: 1, arbitrary: fc.string({ unit: 'binary', maxLength: 60 }) },
)

/** A good body spoiled in one to three places, or text that never was a body. */
function payloadsFrom(good: Json): fc.Arbitrary<string> {
  const places = placesIn(good)
  const spoil = fc.record({
    at: fc.constantFrom(...places),
    how: fc.constantFrom('replace', 'drop', 'add', 'repeat'),
    what: nasty,
    name: fc.oneof(fc.constantFrom('__proto__', 'constructor', 'id', 'revision', '', 'a.b', '\u0000'), fc.string()),
  })
  const spoiled = fc.array(spoil, { minLength: 1, maxLength: 3 }).map((spoils) =>
    textOf(
      spoils.reduce<Json>(
        (body, { at, how, what, name }) =>
          changed(body, at, (inner) => {
            if (how === 'replace' || typeof inner !== 'object' || inner === null) return what
            if (Array.isArray(inner))
              return how === 'drop' ? inner.slice(1) : [...inner, how === 'add' ? what : (inner[0] ?? what)]
            const entries = Object.entries(inner)
            return Object.fromEntries(how === 'drop' ? entries.slice(1) : [...entries, [name, what]])
          }),
        good,
      ),
    ),
  )
  const texts = places.filter(
    (place) => typeof place.reduce<Json | undefined>((inner, key) => (inner as never)[key], good) === 'string',
  )
  const badText = fc
    .tuple(
      fc.constantFrom(...(texts.length > 0 ? texts : [[]])),
      fc.oneof(fc.constantFrom('@nul@', '@lone@', '@lone-low@', '@long@'), fc.string({ unit: 'binary' })),
    )
    .map(([at, what]) => textOf(changed(good, at, () => what)))
  const garbage = fc.oneof(
    fc.string({ unit: 'binary', maxLength: 200 }),
    fc.constantFrom(
      '',
      '{',
      '[]',
      'null',
      '"text"',
      '{"a":1}{',
      '\ufeff{}',
      'NaN',
      '{"title":"a","title":"b"}',
      '[[[[',
    ),
    nasty.map(textOf),
  )
  return fc.oneof(
    { weight: 3, arbitrary: spoiled },
    { weight: 1, arbitrary: badText },
    { weight: 1, arbitrary: garbage },
  )
}
const headers = fc.record(
  {
    'If-Match': fc.constantFrom('"1"', '"999999999"', '"0"', '*', 'W/"1"', '"x"', '1', '""', '"9999999999"', '"-1"'),
    'Idempotency-Key': fc.oneof(fc.uuid(), fc.constantFrom('', 'k', 'x'.repeat(500), 'a b', '\u00ff')),
  },
  { requiredKeys: [] },
)

const heaters = [
  {
    id: 'H1',
    model: 'betony-2-0',
    supplyVoltage: 230,
    ratedVoltage: 240,
    stage: 1,
    x: 1,
    y: 2,
    lowestPoint: 2.4,
    turnDeg: 0,
    tiltDeg: 0,
    mount: 'chain',
    memberId: null,
  },
]
const keptSchema = z.looseObject({ seats: z.array(z.json()), members: z.array(z.json()) }).catchall(z.json())
const read = async (path: string): Promise<unknown> => (await designer('GET', path)).json()

/** The mutating routes, each with a good body. */
const routes: [name: string, method: string, path: () => string, good: () => Promise<Json>][] = [
  ['a variant', 'PUT', () => `/api/variants/${variantId}`, async () => ({ title: 'T', heaters })],
  [
    'a site',
    'PUT',
    () => `/api/jobs/${jobId}/site`,
    async () => {
      const { site } = z.looseObject({ site: keptSchema }).parse(await read(`/api/jobs/${jobId}/site`))
      return { ...site, seats: site.seats.slice(0, 2), members: site.members.slice(0, 2) }
    },
  ],
  [
    'a brief',
    'PUT',
    () => `/api/jobs/${jobId}/brief`,
    async () => z.looseObject({ brief: z.json() }).parse(await read(`/api/jobs/${jobId}/brief`)).brief,
  ],
  ['a new variant', 'POST', () => `/api/jobs/${jobId}/variants`, async () => ({ title: 'T', heaters })],
  ['a restoration', 'POST', () => `/api/variants/${variantId}/restore`, async () => ({ revision: 1 })],
  ['a deletion', 'DELETE', () => `/api/variants/${variantId}`, async () => ({})],
  [
    'a flux question',
    'POST',
    () => '/api/flux',
    async () => ({
      heaters: [
        {
          at: { x: 0, y: 0, z: 2 },
          turnDeg: 0,
          tiltDeg: 0,
          beam: { kind: 'cosine', across: 2, along: 1 },
          elements: [{ offset: 0, length: 1, radiantPower: 100 }],
        },
        {
          model: 'betony-3-0',
          supplyVoltage: 230,
          ratedVoltage: 240,
          stage: 1,
          at: { x: 0, y: 0, z: 2 },
          turnDeg: 0,
          tiltDeg: 0,
        },
      ],
      points: [{ x: 0, y: 0, z: 0, normal: [0, 0, 1] }],
    }),
  ],
]

/** The revision that a right request to the address names; a restoration is of its variant. */
async function revisionOf(method: string, path: string): Promise<string> {
  const resource = method === 'POST' ? `/api/variants/${variantId}` : path
  return (await designer('GET', resource)).headers.get('ETag')?.slice(1, -1) ?? ''
}

describe.each(routes)('500 malformed requests for %s', (name, method, path, goodBody) => {
  it('never end in 5xx or hang, and each refusal names its field', async () => {
    const good = await goodBody()
    const sent = fc.record({ text: payloadsFrom(good), headers, careful: fc.boolean() })
    const counts = new Map<number, number>()
    // A request that is right but for its body has to reach the records: it names the newest revision.
    let newest = Number(await revisionOf(method, path()))
    for (const { text, headers: some, careful } of fc.sample(sent, { numRuns: 500, seed: 7 })) {
      const right = {
        'Idempotency-Key': crypto.randomUUID(),
        ...(name === 'a deletion' ? {} : { 'If-Match': `"${newest}"` }),
      }
      const started = performance.now()
      const response = await designer(method, path(), {
        ...(method === 'DELETE' ? {} : { text }),
        headers: careful && name !== 'a deletion' ? right : some,
      })
      const answer = await response.text()
      const label = `${response.status} for ${text.slice(0, 200)} ${JSON.stringify(some)}: ${answer.slice(0, 200)}`
      expect(performance.now() - started, label).toBeLessThan(2000)
      expect(response.status, label).toBeLessThan(500)
      if (response.status >= 400) {
        const { path: field } = refusalSchema.parse(JSON.parse(answer))
        // A body that is too long was never read: there is no field to name.
        if (response.status !== 413) expect(field, label).not.toBe('')
      }
      if (response.status === 200) newest = Number(response.headers.get('ETag')?.slice(1, -1) ?? newest)
      counts.set(response.status, (counts.get(response.status) ?? 0) + 1)
      if (response.status === 200 && name === 'a deletion') {
        await desk.admin.query('update variants set deleted_at = null where id = $1', [variantId])
      }
    }
    expect(counts.get(name === 'a deletion' ? 428 : 400), JSON.stringify([...counts])).toBeGreaterThan(50)
    expect(Object.prototype).not.toHaveProperty('polluted')
  }, 120_000)
})

it.each(['%00', '%ff', '..%2f..', "' or 1=1", 'a'.repeat(50), '00000000-0000-0000-0000-000000000000', '%ud800'])(
  'an address with %j in it is 4xx',
  async (id) => {
    for (const path of [
      `jobs/${id}`,
      `jobs/${id}/site`,
      `variants/${id}`,
      `variants/${variantId}/seats/${id}/explain`,
    ]) {
      const { status } = await designer('GET', `/api/${path}`)
      expect(status, path).toBeGreaterThanOrEqual(400)
      expect(status, path).toBeLessThan(500)
    }
  },
)

describe('only declared fields change', () => {
  const tables = ['jobs', 'sites', 'briefs', 'variants', 'site_revisions', 'brief_revisions', 'variant_revisions']
  const everything = async () => {
    const rows: unknown[] = []
    for (const table of tables) rows.push((await desk.admin.query(`select * from ${table} order by 1, 2, 3`)).rows)
    return JSON.stringify(rows)
  }

  it.each(routes.filter(([name]) => name !== 'a deletion'))(
    '%s refuses every column of every row as a field',
    async (_, method, path, goodBody) => {
      const { rows: columns } = await desk.admin.query<{ name: string }>(
        `select distinct column_name as name from information_schema.columns where table_name = any($1)`,
        [tables],
      )
      const good = await goodBody()
      const camel = (name: string) => name.replace(/_([a-z])/g, (_, letter: string) => letter.toUpperCase())
      const before = await everything()
      for (const name of columns.flatMap(({ name }) => [name, camel(name)])) {
        if (Object.hasOwn(good as object, name)) continue
        const declaredElsewhere = method === 'POST' && path().endsWith('/restore') && name === 'deleted'
        if (declaredElsewhere) continue
        const { rows } = await desk.admin.query<{ revision: number }>('select revision from variants where id = $1', [
          variantId,
        ])
        const response = await designer(method, path(), {
          body: { ...(good as object), [name]: crypto.randomUUID() },
          headers: { 'If-Match': `"${rows[0]!.revision}"`, 'Idempotency-Key': crypto.randomUUID() },
        })
        expect({ name, status: response.status, ...(await response.json()) }).toMatchObject({
          name,
          status: 400,
          path: name,
        })
      }
      expect(await everything()).toBe(before)
    },
  )

  it('a saved variant changes title, heaters, revision and who and when, nothing else', async () => {
    const row = async () => (await desk.admin.query('select * from variants where id = $1', [variantId])).rows[0]
    const before = await row()
    const response = await designer('PUT', `/api/variants/${variantId}`, {
      body: { title: 'Changed', heaters: [{ ...heaters[0], x: 1.75, y: 2.25 }] },
      headers: { 'If-Match': `"${before.revision}"`, 'Idempotency-Key': crypto.randomUUID() },
    })
    expect(response.status).toBe(200)
    const after = await row()
    const names = Object.keys(before).filter((name) => JSON.stringify(before[name]) !== JSON.stringify(after[name]))
    expect(names.filter((name) => !['updated_at', 'updated_by'].includes(name)).toSorted()).toEqual([
      'heaters',
      'revision',
      'title',
    ])
    expect(after.revision).toBe(before.revision + 1)
  })
})
