import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { type Application, openApplication, ownOrigin, routeLines } from '#tests/support/application.ts'

let application: Application
let cookie: string
beforeAll(async () => {
  application = await openApplication()
  cookie = await application.signInAs('owner')
})
afterAll(() => application.close())

const paths = routeLines.map(({ pattern }) => pattern.replace('*', 'no/such').replace(/:[^/]+/g, crypto.randomUUID()))
const changing = ['POST', 'PUT', 'PATCH', 'DELETE']

async function send(method: string, path: string, headers: Record<string, string>): Promise<Response> {
  return application.handle(
    new Request(ownOrigin + path, {
      method,
      body: '{}',
      headers: { Cookie: cookie, 'Content-Type': 'application/json', 'Content-Length': '2', ...headers },
    }),
  )
}

const elsewhere: Record<string, string>[] = [
  {},
  { Origin: 'null' },
  { Origin: 'https://evil.example' },
  { Origin: 'http://127.0.0.1:3001' },
  { Origin: 'https://127.0.0.1:3000' },
  { Origin: 'http://127.0.0.1.evil.example:3000' },
  { Origin: 'null', 'Sec-Fetch-Site': 'same-origin' },
  { Origin: 'https://evil.example', 'Sec-Fetch-Site': 'same-origin' },
  ...['cross-site', 'same-site', 'none', ''].flatMap((site) => [
    { 'Sec-Fetch-Site': site },
    { Origin: ownOrigin, 'Sec-Fetch-Site': site },
  ]),
]
const ours: Record<string, string>[] = [
  { Origin: ownOrigin },
  { Origin: ownOrigin, 'Sec-Fetch-Site': 'same-origin' },
  { 'Sec-Fetch-Site': 'same-origin' },
  { Origin: 'http://localhost:3000' },
]

describe('a request that would change something', () => {
  it.each(paths)('is refused at %s unless our own page sends it', async (path) => {
    for (const method of changing) {
      for (const address of [path, `${path === '/' ? '/_' : path}.data`]) {
        for (const headers of elsewhere) {
          const { status } = await send(method, address, headers)
          expect(status, `${method} ${address} ${JSON.stringify(headers)}`).toBe(403)
        }
      }
    }
  })

  it('leaves everything as it was', async () => {
    const job = await application.admin.query('select id, job_id, revision from variants limit 1')
    const { id, revision } = job.rows[0]
    const before = await application.admin.query("select md5(string_agg(v::text, '' order by id)) from variants v")
    for (const headers of elsewhere) {
      await send('DELETE', `/api/variants/${id}`, { ...headers, 'If-Match': `"${revision}"`, 'Idempotency-Key': 'k' })
      await send('POST', '/sign-out', headers)
    }
    const after = await application.admin.query("select md5(string_agg(v::text, '' order by id)) from variants v")
    expect(after.rows).toEqual(before.rows)
    const sessions = await application.admin.query('select count(*)::int as kept from session')
    expect(sessions.rows[0].kept).toBe(1)
  })

  it('passes from our own pages', async () => {
    for (const headers of ours) {
      expect((await send('POST', '/api/no-such-thing', headers)).status, JSON.stringify(headers)).not.toBe(403)
      expect((await send('POST', '/no-such-page', headers)).status, JSON.stringify(headers)).not.toBe(403)
    }
  })

  it('may be read from anywhere', async () => {
    const request = new Request(`${ownOrigin}/healthz`, {
      headers: { Origin: 'https://evil.example', 'Sec-Fetch-Site': 'cross-site' },
    })
    expect((await application.handle(request)).status).toBe(200)
  })
})

describe('a body', () => {
  const post = async (path: string, size: number, type: string) => {
    const begun = performance.now()
    const response = await application.handle(
      new Request(ownOrigin + path, {
        method: 'POST',
        body: 'x',
        headers: { Origin: ownOrigin, Cookie: cookie, 'Content-Type': type, 'Content-Length': String(size) },
      }),
    )
    expect(performance.now() - begun).toBeLessThan(1000)
    return response.status
  }

  it.each(['/api/jobs', '/sign-in', '/no-such-page'])('of more than 1 MB is too large at %s', async (path) => {
    expect(await post(path, 1_000_001, 'application/json')).toBe(413)
    expect(await post(path, 1_000_001, 'application/x-www-form-urlencoded')).toBe(413)
    expect(await post(path, 1_000_000, 'application/json')).not.toBe(413)
  })

  it('of an upload may have 20 MB, from members', async () => {
    expect(await post('/jobs/new', 20_000_001, 'multipart/form-data; boundary=x')).toBe(413)
    expect(await post('/jobs/new', 20_000_000, 'multipart/form-data; boundary=x')).not.toBe(413)
    expect(await post('/sign-in', 1_000_001, 'multipart/form-data; boundary=x')).toBe(413)
  })

  it('says how long it is', async () => {
    let pulls = 0
    const body = new ReadableStream({
      pull: (stream) => (++pulls < 100 ? stream.enqueue(new Uint8Array(65_536)) : stream.close()),
    })
    const request = new Request(`${ownOrigin}/sign-in`, {
      method: 'POST',
      body,
      headers: { Origin: ownOrigin, 'Transfer-Encoding': 'chunked' },
      duplex: 'half',
    } as RequestInit)
    expect((await application.handle(request)).status).toBe(411)
    expect(pulls).toBeLessThan(3)
    expect(await post('/sign-in', Number.NaN, 'application/json')).toBe(413)
  })
})
