import { createHash } from 'node:crypto'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { z } from 'zod'
import { openApi, type ApiDesk, type Caller } from '#tests/support/api.ts'

const variantSchema = z.object({
  id: z.string(),
  jobId: z.string(),
  number: z.number(),
  revision: z.number(),
  title: z.string(),
  heaters: z.array(z.looseObject({ id: z.string(), x: z.number() })),
})
const refusalSchema = z.object({
  error: z.string().min(1),
  path: z.string(),
  current: z.unknown().optional(),
  changed: z.object({ by: z.string().nullable(), at: z.iso.datetime() }).optional(),
})

let desk: ApiDesk
let designer: Caller
let jobId: string
beforeAll(async () => {
  desk = await openApi()
  designer = desk.as('designer')
  const { jobs } = z
    .object({ jobs: z.array(z.looseObject({ id: z.string(), name: z.string() })) })
    .parse(await (await designer('GET', '/api/jobs')).json())
  jobId = jobs.find(({ name }) => name.startsWith('The Tansy Weir'))!.id
})
afterAll(() => desk.close())

const key = () => crypto.randomUUID()
const heater = (id: string, x: number) => ({
  id,
  model: 'betony-2-0',
  supplyVoltage: 230,
  x,
  y: 2,
  lowestPoint: 2.4,
  turnDeg: 0,
  tiltDeg: 0,
  mount: 'chain',
  memberId: null,
})
const layout = (title: string, ...heaters: object[]) => ({ title, heaters })
const post = (path: string, body: unknown, headers: Record<string, string> = {}) =>
  designer('POST', path, { body, headers: { 'Idempotency-Key': key(), ...headers } })
const variantOf = async (response: Response) => variantSchema.parse(await response.json())
const refusalOf = async (response: Response) => ({
  status: response.status,
  ...refusalSchema.parse(await response.json()),
})

/** A variant of its own for a test, at revision 1, with one heater. */
async function fresh() {
  const response = await post(`/api/jobs/${jobId}/variants`, layout('For a test', heater('H1', 1)))
  expect(response.status).toBe(201)
  expect(response.headers.get('ETag')).toBe('"1"')
  return variantOf(response)
}

interface Put {
  readonly id: string
  readonly body?: unknown
  readonly text?: string
  /** The revision or the raw header; absent: no header. */
  readonly match?: number | string | undefined
  readonly key?: string | null
  readonly as?: Caller
}
function put({ id, match, as = designer, ...rest }: Put): Promise<Response> {
  const withKey = rest.key === undefined ? key() : rest.key
  const headers = {
    ...(match === undefined ? {} : { 'If-Match': typeof match === 'number' ? `"${match}"` : match }),
    ...(withKey === null ? {} : { 'Idempotency-Key': withKey }),
  }
  return as('PUT', `/api/variants/${id}`, { ...('text' in rest ? { text: rest.text! } : { body: rest.body }), headers })
}
const revisionsIn = async (id: string): Promise<{ revision: number; layout: object; content_hash: string }[]> =>
  (
    await desk.admin.query(
      'select revision, layout, content_hash from variant_revisions where variant_id = $1 order by revision',
      [id],
    )
  ).rows

describe('saving a variant', () => {
  it('gives the next revision in ETag and body and keeps an immutable row with its hash', async () => {
    const { id } = await fresh()
    const response = await put({ id, match: 1, body: layout('Moved', heater('H1', 3.5)) })
    expect(response.status).toBe(200)
    expect(response.headers.get('ETag')).toBe('"2"')
    expect(await variantOf(response)).toMatchObject({ revision: 2, title: 'Moved', heaters: [{ x: 3.5 }] })
    const read = await designer('GET', `/api/variants/${id}`)
    expect(read.headers.get('ETag')).toBe('"2"')
    expect(await variantOf(read)).toMatchObject({ revision: 2, title: 'Moved' })
    const rows = await revisionsIn(id)
    expect(rows.map(({ revision }) => revision)).toEqual([1, 2])
    // The hash by hand: keys sorted, no spaces.
    const byHand = `{"heaters":[{"id":"H1","lowestPoint":2.4,"memberId":null,"model":"betony-2-0","mount":"chain","supplyVoltage":230,"tiltDeg":0,"turnDeg":0,"x":3.5,"y":2}],"title":"Moved"}`
    expect(rows[1]!.content_hash).toBe(createHash('sha256').update(byHand).digest('hex'))
    await expect(
      desk.admin.query('update variant_revisions set revision = 9 where variant_id = $1', [id]),
    ).rejects.toThrow(/kept for good/)
  })

  it('keeps lengths in whole tenths of a millimetre', async () => {
    const { id } = await fresh()
    const saved = await put({ id, match: 1, body: layout('T', { ...heater('H1', 1.234_56), y: -0.000_04 }) })
    expect((await variantOf(saved)).heaters[0]).toMatchObject({ x: 1.2346, y: 0, lowestPoint: 2.4 })
  })

  it('401 signed out, 403 by role, 404 unknown, foreign, deleted and not an id: before anything else', async () => {
    const { id } = await fresh()
    const bad = { body: { nonsense: true }, key: null }
    expect((await refusalOf(await put({ id, ...bad, as: desk.as('nobody') }))).status).toBe(401)
    expect((await refusalOf(await put({ id, ...bad, as: desk.as('sales') }))).status).toBe(403)
    expect((await refusalOf(await put({ id, ...bad, as: desk.as('installer') }))).status).toBe(403)
    const foreign = await refusalOf(await put({ id, ...bad, as: desk.as('other') }))
    const unknown = await refusalOf(await put({ id: crypto.randomUUID(), ...bad, as: desk.as('other') }))
    expect(foreign).toEqual(unknown)
    expect(foreign.status).toBe(404)
    expect((await refusalOf(await put({ id: 'nonsense', ...bad }))).status).toBe(404)
    await designer('DELETE', `/api/variants/${id}`, { headers: { 'If-Match': '"1"' } })
    expect((await refusalOf(await put({ id, ...bad }))).status).toBe(404)
  })

  it.each([
    ['not JSON', { text: '{"title":' }, 'body'],
    ['an array', { body: [] }, 'body'],
    ['no title', { body: { heaters: [] } }, 'title'],
    ['an unknown key', { body: { ...layout('T'), owner: 'me' } }, 'owner'],
    ['an unknown key of a heater', { body: layout('T', { ...heater('H1', 1), price: 3 }) }, 'heaters.0.price'],
    ['a text for a number', { body: layout('T', heater('H1', 1), { ...heater('H2', 1), y: '2' }) }, 'heaters.1.y'],
    ['an infinite number', { text: '{"title":"T","heaters":[{"x":1e309}]}' }, 'heaters.0.x'],
    ['an id twice', { body: layout('T', heater('H1', 1), heater('H1', 2)) }, 'heaters.1.id'],
    ['NUL', { body: layout('T\u0000') }, 'title'],
    ['half a pair', { text: '{"title":"\\ud800","heaters":[]}' }, 'title'],
    ['__proto__', { text: '{"title":"T","heaters":[],"__proto__":{"a":1}}' }, 'body'],
    ['201 heaters', { body: layout('T', ...Array.from({ length: 201 }, (_, i) => heater(`H${i}`, 1))) }, 'heaters'],
    ['no key', { body: layout('T'), key: null }, 'Idempotency-Key'],
    ['a key of 201 characters', { body: layout('T'), key: 'k'.repeat(201) }, 'Idempotency-Key'],
    ['any revision', { body: layout('T'), match: '*' }, 'If-Match'],
    ['a weak revision', { body: layout('T'), match: 'W/"1"' }, 'If-Match'],
    ['a bare revision', { body: layout('T'), match: '1' }, 'If-Match'],
  ])('400 for %s, naming the field', async (_, request, path) => {
    const { id } = await fresh()
    expect(await refusalOf(await put({ id, match: 1, ...request }))).toMatchObject({ status: 400, path })
    // Malformed comes before 428: without If-Match it is still 400.
    const unmatched = { id, ...request, match: undefined }
    if (path !== 'If-Match') expect(await refusalOf(await put(unmatched))).toMatchObject({ status: 400, path })
    expect(await revisionsIn(id)).toHaveLength(1)
  })

  it('413 for a body over 1 MB', async () => {
    const { id } = await fresh()
    const refused = await refusalOf(await put({ id, match: 1, body: layout('x'.repeat(1_000_001)) }))
    expect(refused.status).toBe(413)
  })

  it('a known key with the same body gives the first answer, whatever happened since and even without If-Match', async () => {
    const { id } = await fresh()
    const once = key()
    const body = layout('First', heater('H1', 2))
    const first = await put({ id, match: 1, key: once, body })
    const answer: unknown = await first.json()
    await put({ id, match: 2, body: layout('Second') })
    for (const match of [{ match: 1 }, { match: 3 }, {}]) {
      const again = await put({ id, ...match, key: once, body: { heaters: body.heaters, title: body.title } })
      expect(again.status).toBe(200)
      expect(again.headers.get('ETag')).toBe('"2"')
      expect(await again.json()).toEqual(answer)
    }
    expect(await revisionsIn(id)).toHaveLength(3)
  })

  it('409 for a known key with another body, before 428 and 412', async () => {
    const { id } = await fresh()
    const once = key()
    await put({ id, match: 1, key: once, body: layout('First') })
    for (const match of [{ match: 2 }, { match: 1 }, {}]) {
      const refused = await refusalOf(await put({ id, ...match, key: once, body: layout('Other') }))
      expect(refused).toMatchObject({ status: 409, path: 'Idempotency-Key' })
    }
    expect(await revisionsIn(id)).toHaveLength(2)
  })

  it('keys are per resource and per person', async () => {
    const [one, two] = [await fresh(), await fresh()]
    const once = key()
    for (const { id } of [one, two]) {
      expect((await put({ id, match: 1, key: once, body: layout('Same key') })).status).toBe(200)
    }
    const engineer = await put({ id: one.id, match: 2, key: once, body: layout('Same key'), as: desk.as('engineer') })
    expect((await variantOf(engineer)).revision).toBe(3)
  })

  it('428 without If-Match; the key stays free', async () => {
    const { id } = await fresh()
    const once = key()
    const body = layout('Wanted')
    expect(await refusalOf(await put({ id, key: once, body }))).toMatchObject({ status: 428, path: 'If-Match' })
    expect((await put({ id, key: once, match: 1, body })).status).toBe(200)
  })

  it('412 with the server’s copy when the revision has moved on; nothing is overwritten', async () => {
    const { id } = await fresh()
    await put({ id, match: 1, body: layout('Theirs', heater('H7', 7)), as: desk.as('engineer') })
    const refused = await refusalOf(await put({ id, match: 1, body: layout('Mine') }))
    expect(refused).toMatchObject({ status: 412, path: 'If-Match', changed: { by: 'Joss Harrow' } })
    expect(Math.abs(Date.now() - Date.parse(refused.changed?.at ?? ''))).toBeLessThan(60_000)
    expect(variantSchema.parse(refused.current)).toMatchObject({
      revision: 2,
      title: 'Theirs',
      heaters: [{ id: 'H7' }],
    })
    expect((await refusalOf(await put({ id, match: 5, body: layout('Future') }))).status).toBe(412)
    expect(await revisionsIn(id)).toHaveLength(2)
  })

  it('the same key 50 times at once has one effect', async () => {
    const { id } = await fresh()
    const once = key()
    const body = layout('Fifty', heater('H1', 5))
    const answers = await Promise.all(Array.from({ length: 50 }, () => put({ id, match: 1, key: once, body })))
    expect(answers.map(({ status }) => status)).toEqual(Array.from({ length: 50 }, () => 200))
    const bodies = new Set(await Promise.all(answers.map((answer) => answer.text())))
    expect(bodies.size).toBe(1)
    expect(await revisionsIn(id)).toHaveLength(2)
  })

  it('500 random interleavings of two editors: nothing is overwritten unseen', async () => {
    const { id } = await fresh()
    const editors = (['designer', 'engineer'] as const).map((who) => ({ as: desk.as(who), who, known: 1, count: 0 }))
    const accepted: string[] = []
    let seed = 20_260_301
    const random = () => (seed = (seed * 1_103_515_245 + 12_345) % 2 ** 31) / 2 ** 31
    const saveBy = async (editor: (typeof editors)[number]) => {
      const title = `${editor.who} ${++editor.count}`
      const response = await put({ id, match: editor.known, body: layout(title), as: editor.as })
      if (response.status === 200) {
        const { revision } = await variantOf(response)
        expect(revision).toBe(editor.known + 1)
        accepted[revision] = title
        editor.known = revision
        return
      }
      const refused = await refusalOf(response)
      expect(refused.status).toBe(412)
      const copy = variantSchema.parse(refused.current)
      expect(copy.revision).toBeGreaterThan(editor.known)
      editor.known = copy.revision
    }
    let refusals = 0
    for (let round = 0; round < 500; round++) {
      const before = accepted.length
      const both = random() < 0.5
      const [first, second] = random() < 0.5 ? editors : editors.toReversed()
      await (both ? Promise.all([saveBy(first!), saveBy(second!)]) : saveBy(first!))
      if (both && accepted.length - before < 2) refusals++
    }
    const rows = await revisionsIn(id)
    expect(rows.map(({ revision }) => revision)).toEqual(rows.map((_, index) => index + 1))
    expect(rows.slice(1).map(({ layout: kept }) => z.looseObject({ title: z.string() }).parse(kept).title)).toEqual(
      accepted.slice(2),
    )
    expect(refusals).toBeGreaterThan(50)
  }, 60_000)

  it('a method it does not know is 405 with the ones it knows', async () => {
    const { id } = await fresh()
    const response = await designer('PATCH', `/api/variants/${id}`, { body: {} })
    expect(response.headers.get('Allow')).toBe('GET, PUT, DELETE')
    expect(await refusalOf(response)).toMatchObject({ status: 405 })
    expect((await refusalOf(await designer('GET', '/api/nothing'))).status).toBe(404)
    const read = [
      'jobs',
      `jobs/${jobId}`,
      'heaters',
      ...['revisions', 'seats.csv', 'thumbnail.svg', 'seats/x/explain'].map((end) => `variants/${id}/${end}`),
    ]
    for (const path of read) {
      const refused = await refusalOf(await designer('POST', `/api/${path}`, { body: {} }))
      expect(refused, path).toMatchObject({ status: 405, path: 'method' })
    }
    for (const path of ['flux', `variants/${id}/restore`]) {
      expect(await refusalOf(await designer('GET', `/api/${path}`)), path).toMatchObject({
        status: 405,
        path: 'method',
      })
    }
  })
})

describe('creating, copying, deleting and bringing back', () => {
  it('numbers variants of a job once, also 50 at a time', async () => {
    const answers = await Promise.all(Array.from({ length: 50 }, () => post(`/api/jobs/${jobId}/variants`, {})))
    const numbers = await Promise.all(answers.map(async (answer) => (await variantOf(answer)).number))
    expect(new Set(numbers).size).toBe(50)
  })

  it('the same key creates one variant', async () => {
    const once = { 'Idempotency-Key': key() }
    const answers = await Promise.all(
      Array.from({ length: 50 }, () => post(`/api/jobs/${jobId}/variants`, { title: 'Once' }, once)),
    )
    const ids = await Promise.all(answers.map(async (answer) => (await variantOf(answer)).id))
    expect(new Set(ids).size).toBe(1)
    const { rows } = await desk.admin.query(`select count(*)::int as n from variants where title = 'Once'`)
    expect(rows).toEqual([{ n: 1 }])
  })

  it('needs a key', async () => {
    const response = await designer('POST', `/api/jobs/${jobId}/variants`, { body: {} })
    expect(await refusalOf(response)).toMatchObject({ status: 400, path: 'Idempotency-Key' })
  })

  it('copies a variant of the same job only', async () => {
    const original = await fresh()
    const copy = await variantOf(await post(`/api/jobs/${jobId}/variants`, { copyOf: original.id }))
    expect(copy).toMatchObject({ revision: 1, title: 'For a test (copy)', heaters: original.heaters })
    const { rows } = await desk.admin.query<{ id: string }>('select id from variants where job_id <> $1', [jobId])
    for (const { id } of rows) {
      const refused = await refusalOf(await post(`/api/jobs/${jobId}/variants`, { copyOf: id }))
      expect(refused).toMatchObject({ status: 404, path: 'copyOf' })
    }
    const both = await refusalOf(await post(`/api/jobs/${jobId}/variants`, { copyOf: original.id, heaters: [] }))
    expect(both).toMatchObject({ status: 400, path: 'copyOf' })
  })

  it('deletes with If-Match only, and undoes it', async () => {
    const { id } = await fresh()
    await put({ id, match: 1, body: layout('Second', heater('H1', 1)) })
    const path = `/api/variants/${id}`
    expect((await refusalOf(await designer('DELETE', path))).status).toBe(428)
    const stale = await refusalOf(await designer('DELETE', path, { headers: { 'If-Match': '"1"' } }))
    expect(stale).toMatchObject({ status: 412, current: { revision: 2 } })
    expect((await designer('DELETE', path, { headers: { 'If-Match': '"2"' } })).status).toBe(200)
    expect((await designer('GET', path)).status).toBe(404)
    expect((await designer('GET', `${path}/revisions`)).status).toBe(404)
    const once = { 'Idempotency-Key': key() }
    for (let again = 0; again < 2; again++) {
      const back = await post(`${path}/restore`, { deleted: true }, once)
      expect(await variantOf(back)).toMatchObject({ id, revision: 2, title: 'Second' })
    }
    expect((await designer('GET', path)).status).toBe(200)
  })

  it('brings an older revision back as a new one, by the same rule', async () => {
    const { id } = await fresh()
    await put({ id, match: 1, body: layout('Second', heater('H2', 2)) })
    const path = `/api/variants/${id}/restore`
    expect((await refusalOf(await post(path, { revision: 1 }))).status).toBe(428)
    expect((await refusalOf(await post(path, { revision: 1 }, { 'If-Match': '"1"' }))).status).toBe(412)
    expect(await refusalOf(await post(path, { revision: 9 }, { 'If-Match': '"2"' }))).toMatchObject({ status: 404 })
    const back = await post(path, { revision: 1 }, { 'If-Match': '"2"' })
    expect(await variantOf(back)).toMatchObject({ revision: 3, title: 'For a test', heaters: [{ id: 'H1' }] })
    const list = await designer('GET', `/api/variants/${id}/revisions`)
    const { revisions } = z
      .object({ revisions: z.array(z.object({ revision: z.number(), title: z.string(), contentHash: z.string() })) })
      .parse(await list.json())
    expect(revisions.map(({ revision, title }) => `${revision} ${title}`)).toEqual([
      '3 For a test',
      '2 Second',
      '1 For a test',
    ])
    expect(revisions[0]!.contentHash).toBe(revisions[2]!.contentHash)
  })
})
