import { createServer, type RequestListener } from 'node:http'
import { afterAll, expect, it } from 'vitest'

Object.assign(process.env, {
  DATABASE_URL: 'postgres://nobody@127.0.0.1:1/none',
  DATABASE_AUTH_URL: 'postgres://nobody@127.0.0.1:1/none',
  SESSION_SECRET: 'x'.repeat(32),
})
const { protectEveryAnswer } = await import('#app/server/response-headers.server.ts')
protectEveryAnswer()

let answerWith: RequestListener
const server = createServer((request, response) => answerWith(request, response)).listen(0, '127.0.0.1')
afterAll(() => server.close())

async function headersOf(listener: RequestListener): Promise<Headers> {
  answerWith = listener
  const address = server.address()
  const port = typeof address === 'object' && address ? address.port : 0
  return (await fetch(`http://127.0.0.1:${port}/`)).headers
}

it('puts headers on an answer that has none, however it is begun', async () => {
  for (const listener of [
    (_, response) => response.end('a file'),
    (_, response) => response.writeHead(400, { 'Content-Type': 'text/html' }).end('bad'),
    (_, response) => response.writeHead(404, 'Nothing here').end(),
  ] satisfies RequestListener[]) {
    const headers = await headersOf(listener)
    expect(headers.get('X-Content-Type-Options')).toBe('nosniff')
    expect(headers.get('X-Frame-Options')).toBe('DENY')
    expect(headers.get('Referrer-Policy')).toBe('same-origin')
    expect(headers.get('Content-Security-Policy')).toContain("frame-ancestors 'none'")
  }
})

it('leaves what an answer has, and says it once', async () => {
  const headers = await headersOf((_, response) => {
    response.setHeader('Content-Security-Policy', "default-src 'none'")
    response.appendHeader('x-content-type-options', 'nosniff')
    response.end()
  })
  expect(headers.get('Content-Security-Policy')).toBe("default-src 'none'")
  expect(headers.get('X-Content-Type-Options')).toBe('nosniff')
})
