import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { type Application, openApplication, type Person, requestOf } from '#tests/support/application.ts'

let application: Application
const cookies = new Map<Person, string>()

beforeAll(async () => {
  application = await openApplication()
  for (const person of ['designer', 'engineer', 'owner', 'outsider'] as const) {
    cookies.set(person, await application.signInAs(person))
  }
})
afterAll(() => application.close())

async function open(person: Person, path: string) {
  const response = await application.handle(requestOf('GET', path, { cookie: cookies.get(person) }))
  return { status: response.status, html: await response.text() }
}

const post = (person: Person, path: string, fields: Record<string, string>) =>
  application.handle(
    requestOf('POST', path, {
      cookie: cookies.get(person),
      body: new URLSearchParams(fields).toString(),
      headers: { 'Content-Type': 'application/x-www-form-urlencoded' },
    }),
  )

const form = (change: Record<string, string> = {}) => ({
  revision: '0',
  count: '1',
  name: 'Test district',
  place: 'here',
  edition: '2026',
  'articles.0.article': '7.1',
  'articles.0.rule': 'clearance-above',
  'articles.0.figure': '18 in',
  'articles.0.note': '',
  'articles.0.source': 'read',
  ...change,
})

const rowsOf = async (query: string, values: unknown[] = []) => (await application.admin.query(query, values)).rows

describe('rule sets', () => {
  it('are listed, the invented one marked as invented', async () => {
    const { html } = await open('designer', '/rules')
    expect(html).toContain('Demo district')
    expect(html).not.toContain('/rules/sets/new')
    const [{ id }] = await rowsOf(`select id from rule_sets where name = 'Demo district' limit 1`)
    const shown = await open('engineer', `/rules/sets/${id}`)
    const other = await open('outsider', `/rules/sets/${id}`)
    expect([shown.status, other.status].sort()).toEqual([200, 404])
    expect(shown.html + other.html).toContain('no such article exists')
  })

  it('are made by an engineer, changed in revisions that stay, and never over somebody else’s', async () => {
    const made = await post('engineer', '/rules/sets/new', form())
    expect(made.status).toBe(302)
    const path = made.headers.get('Location')!
    const id = path.split('/').at(-1)
    const [kept] = await rowsOf('select articles, revision from rule_sets where id = $1', [id])
    expect(kept).toMatchObject({ revision: 1, articles: [{ figure: 0.4572, unit: 'm' }] })

    expect((await post('engineer', path, form({ revision: '1', name: 'Renamed' }))).status).toBe(302)
    const revisions = await rowsOf('select revision, body from rule_set_revisions where rule_set_id = $1 order by 1', [id]) // prettier-ignore
    expect(revisions.map(({ revision, body }) => [revision, body.name])).toEqual([
      [1, 'Test district'],
      [2, 'Renamed'],
    ])
    const events = await rowsOf(`select detail from audit_events where subject = $1 order by at`, [`rules/sets/${id}`])
    expect(events.map(({ detail }) => detail.revision)).toEqual([1, 2])
  })

  it('are not overwritten by one who saw an older revision: both values, by whom, and from where it goes on', async () => {
    const [{ id }] = await rowsOf(`select id from rule_sets where name = 'Renamed'`)
    const path = `/rules/sets/${id}`
    const stale = await post('owner', path, form({ revision: '1', name: 'Stale', 'articles.0.figure': '20 in' }))
    expect(stale.status).toBe(412)
    const html = await stale.text()
    const [{ name }] = await rowsOf(`select name from "user" where email = 'engineer@inglefield.test'`)
    expect(html).toContain(`Saved by ${name}`)
    // 18 in and 20 in are 457.2 and 508 mm. The article is theirs as it was at first, so that only mine is another.
    for (const value of ['Renamed', 'Stale', '0.4572 m, read', '0.508 m, read']) expect(html).toContain(`Use <!-- -->${value}`) // prettier-ignore
    for (const kept of ['name="revision" value="1"', 'name="name" value="Stale"']) expect(html).toContain(kept)
    expect((await rowsOf('select name from rule_sets where id = $1', [id]))[0].name).toBe('Renamed')
    const settled = await post('owner', path, form({ revision: '2', name: 'Renamed', 'articles.0.figure': '20 in' }))
    expect([settled.status, (await rowsOf('select revision from rule_sets where id = $1', [id]))[0].revision]).toEqual([302, 3]) // prettier-ignore
    expect((await post('owner', path, form({ revision: 'none' }))).status).toBe(412)
    expect((await post('outsider', path, form({ revision: '3' }))).status).toBe(404)
  })

  it('name who wrote each revision', async () => {
    const [{ id }] = await rowsOf(`select id from rule_sets where name = 'Renamed'`)
    const people = await rowsOf(`select email, name from "user"`)
    const named = (role: string) => people.find(({ email }) => email === `${role}@inglefield.test`).name
    const { html } = await open('designer', `/rules/sets/${id}`)
    const table = /<caption[^>]*>Revisions<.*?<\/table>/s.exec(html)![0].replace(/<[^>]*>/g, ' ')
    expect(table).toMatch(
      new RegExp(`3 .*${named('owner')}.* 2 .*${named('engineer')}.* 1 .*${named('engineer')}`, 's'),
    )
    expect(html).not.toContain('A colleague')
  })

  it('keep what was typed when a figure is refused, with the reason beside it', async () => {
    const refused = await post('engineer', '/rules/sets/new', form({ 'articles.0.figure': 'wide' }))
    expect(refused.status).toBe(400)
    const html = await refused.text()
    expect(html).toContain('value="wide"')
    expect(html).toContain('id="articles.0.figure-note"')
    expect((await post('designer', '/rules/sets/new', form())).status).toBe(403)
  })
})

describe('a job’s rule set', () => {
  it('is a revision that the organisation keeps, to the letter', async () => {
    const [job] = await rowsOf(
      `select b.job_id as id, b.body, b.revision, r.id as set_id, rr.body as set_body from briefs b
       join rule_sets r on r.organisation_id = b.organisation_id and r.name = 'Demo district'
       join rule_set_revisions rr on rr.rule_set_id = r.id
       join jobs j on j.id = b.job_id where j.name like 'Sallow%' limit 1`,
    )
    const chosen = { id: job.set_id, revision: 1, ...job.set_body }
    const save = (ruleSet: object, revision: number) =>
      application.handle(
        requestOf('PUT', `/api/jobs/${job.id}/brief`, {
          cookie: cookies.get('designer'),
          body: JSON.stringify({ ...job.body, ruleSet }),
          headers: {
            'Content-Type': 'application/json',
            'Idempotency-Key': crypto.randomUUID(),
            'If-Match': `"${revision}"`,
          },
        }),
      )
    const forged = await save({ ...chosen, articles: [] }, job.revision)
    expect(forged.status).toBe(400)
    expect(await forged.json()).toMatchObject({ path: 'ruleSet' })
    expect((await save({ ...chosen, revision: 9 }, job.revision)).status).toBe(400)
    expect((await save(chosen, job.revision)).status).toBe(200)
  })
})
