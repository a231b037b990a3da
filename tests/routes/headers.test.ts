import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { type Application, openApplication, requestOf, routeLines } from '#tests/support/application.ts'

let application: Application
let cookie: string
beforeAll(async () => {
  application = await openApplication()
  cookie = await application.signInAs('designer')
})
afterAll(() => application.close())

const paths = routeLines.map(({ pattern }) =>
  pattern.replace('*', 'no/such/page').replace(/:[^/]+/g, '00000000-0000-4000-8000-000000000000'),
)

describe('headers of every answer, errors and downloads included', () => {
  it.each(paths.flatMap((path) => [path, `${path === '/' ? '/_' : path}.data`]))('GET %s', async (path) => {
    for (const request of [
      requestOf('GET', path),
      requestOf('GET', path, { cookie }),
      requestOf('HEAD', path, { cookie }),
    ]) {
      const { headers } = await application.handle(request)
      expect(headers.get('X-Content-Type-Options')).toBe('nosniff')
      expect(headers.get('X-Frame-Options')).toBe('DENY')
      expect(headers.get('Referrer-Policy')).toBe('same-origin')
      expect(headers.get('Content-Security-Policy')).toMatch(/frame-ancestors 'none'|default-src 'none'/)
      expect(headers.get('Cache-Control')).toMatch(/no-store/)
    }
  })
})
