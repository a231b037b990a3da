import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest'
import { type Application, openApplication, requestOf } from '#tests/support/application.ts'

let application: Application
let cookie: string
beforeAll(async () => {
  vi.spyOn(console, 'error').mockImplementation(() => undefined)
  application = await openApplication({
    DATABASE_URL: 'postgres://inglefield_app@127.0.0.1:1/away',
    DATABASE_AUTH_URL: 'postgres://inglefield_auth@127.0.0.1:1/away',
  })
  cookie = await application.signInAs('designer')
})
afterAll(() => application.close())

describe('while the database is away', () => {
  const timed = async (path: string) => {
    const begun = performance.now()
    const response = await application.handle(requestOf('GET', path, { cookie }))
    expect(performance.now() - begun).toBeLessThan(3000)
    return response
  }

  it('the process is alive but not ready', async () => {
    expect((await timed('/healthz')).status).toBe(200)
    expect((await timed('/readyz')).status).toBe(503)
  })

  it('a page says what is safe and offers another try', async () => {
    const response = await timed('/jobs')
    expect(response.status).toBe(503)
    expect(response.headers.get('Retry-After')).toBe('5')
    const page = await response.text()
    expect(page).toContain('The records cannot be reached')
    expect(page).toContain('Try again')
  })

  it('the API says so in its own way', async () => {
    const response = await timed('/api/jobs')
    expect(response.status).toBe(503)
    expect(await response.json()).toEqual({ error: expect.stringContaining('cannot be reached'), path: '' })
  })
})
