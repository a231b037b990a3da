import { Client } from 'pg'
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest'
import { type Application, openApplication, requestOf, routeLines } from '#tests/support/application.ts'

let application: Application
let cookie: string
const ids: Record<string, string> = {}
const sent: string[] = []

/** Every statement that leaves this process, whichever pool it takes; beginning and ending are not counted. */
function listen(): void {
  const query = Client.prototype.query
  vi.spyOn(Client.prototype, 'query').mockImplementation(function (this: Client, ...given: unknown[]) {
    const [first] = given
    const text = typeof first === 'string' ? first : Object(first).text
    if (typeof text === 'string' && !/^\s*(begin|commit|rollback)\b/i.test(text)) sent.push(text)
    return Reflect.apply(query, this, given)
  })
}

beforeAll(async () => {
  application = await openApplication()
  cookie = await application.signInAs('owner')
  const { rows } = await application.admin.query(
    `select v.job_id as "jobId", v.id as "variantId", p.id as "photoId",
      (select id from rule_sets where organisation_id = v.organisation_id limit 1) as "setId" from variants v
      join photos p on p.organisation_id = v.organisation_id and p.job_id = v.job_id
      where v.organisation_id = (select id from organization where slug = 'osierfold') limit 1`,
  )
  Object.assign(ids, rows[0], { code: 'betony-3-0' })
  listen()
  // What is asked once in a process, not for every request: whether the database role is bound by row-level security.
  await application.handle(requestOf('GET', '/jobs', { cookie }))
})
afterAll(async () => {
  vi.restoreAllMocks()
  await application.close()
})

/** Acceptance figures of speed: statements of a list at most 4, of anything about one job at most 6. */
const most = (pattern: string) => (pattern.includes(':jobId') ? 6 : 4)

/** Pages that show something of an organisation: a route with a component that asks for a member. */
const pages = routeLines
  .filter(({ entry, pattern }) => entry.file.endsWith('.tsx') && /^\/(jobs|heaters|rules|team)/.test(pattern))
  .map(({ pattern }) => pattern)

describe('statements of a page', () => {
  it('are counted for every page', () => {
    expect(pages).toContain('/jobs/:jobId/variants/:variantId')
    expect(pages.length).toBeGreaterThanOrEqual(8)
  })

  it.each(pages.flatMap((pattern) => [[pattern], [`${pattern}.data`]]))('GET %s', async (pattern) => {
    sent.length = 0
    const path = pattern.replace(/:(\w+)/g, (_, name: string) => ids[name] ?? '')
    const response = await application.handle(requestOf('GET', path, { cookie }))
    await response.text()
    expect(response.status).toBe(200)
    // The session's row at least: a page without a statement would not have been heard.
    expect(sent.length).toBeGreaterThan(0)
    expect(sent.length, sent.join('\n')).toBeLessThanOrEqual(most(pattern))
  })
})
