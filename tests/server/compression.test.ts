import { once } from 'node:events'
import { createServer, type IncomingMessage, type ServerResponse } from 'node:http'
import type { AddressInfo } from 'node:net'
import { createRequire } from 'node:module'
import { brotliDecompressSync, gunzipSync } from 'node:zlib'
import { writeReadableStreamToWritable } from '@react-router/node'
import { RouterContextProvider } from 'react-router'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { compress } from '#app/server/compression.server.ts'
import { type Application, openApplication, requestOf } from '#tests/support/application.ts'

/** What goes out when a route answers a request that takes these encodings. */
async function outgoing(accepted: string, answer: Response): Promise<Response> {
  const request = new Request('http://127.0.0.1/', { headers: { 'Accept-Encoding': accepted } })
  const given = { request, context: new RouterContextProvider(), params: {}, pattern: '/', url: new URL(request.url) }
  const response = await compress(given, async () => answer)
  if (!response) throw new Error('Nothing goes out.')
  return response
}

const html = (body: string | ReadableStream = 'terrace '.repeat(400), type = 'text/html; charset=utf-8') =>
  new Response(body, { headers: { 'Content-Type': type } })

describe('an answer on its way out', () => {
  it.each([
    ['br, gzip', 'br'],
    ['gzip, deflate', 'gzip'],
    ['GZIP;q=0.5', 'gzip'],
    ['br;q=0, gzip', 'gzip'],
    ['br;q=0.0', null],
    ['deflate', null],
    ['', null],
  ])('to one who takes “%s” is %s', async (accepted, encoding) => {
    const answer = await outgoing(accepted, html())
    expect([answer.headers.get('Content-Encoding'), answer.headers.get('Vary')]).toEqual([encoding, 'Accept-Encoding'])
    const bytes = Buffer.from(await answer.arrayBuffer())
    const unpack = { br: brotliDecompressSync, gzip: gunzipSync }[encoding ?? ''] ?? ((same: Buffer) => same)
    expect(unpack(bytes).toString()).toBe('terrace '.repeat(400))
    if (encoding) expect(bytes.length).toBeLessThan(200)
  })

  it('stays as it is when it is no text, has no body or is packed already', async () => {
    expect((await outgoing('br', html('png', 'image/png'))).headers.get('Content-Encoding')).toBeNull()
    const moved = new Response(null, { status: 302, headers: { Location: '/jobs' } })
    expect(await outgoing('br', moved)).toBe(moved)
    const packed = new Response('x', { headers: { 'Content-Type': 'text/plain', 'Content-Encoding': 'zstd' } })
    expect(await outgoing('br', packed)).toBe(packed)
  })

  it('fails when its source fails, and lets the source go when nobody reads on', async () => {
    const broken = new ReadableStream({ pull: (out) => out.error(new Error('broken')) })
    await expect((await outgoing('br', html(broken))).arrayBuffer()).rejects.toThrow()
    let ended = false
    const endless = new ReadableStream({
      pull: (out) => out.enqueue(new Uint8Array(65_536).map((_, i) => (i * i * 7919) % 251)),
      cancel: () => void (ended = true),
    })
    const reader = (await outgoing('br', html(endless))).body!.getReader()
    await reader.read()
    await reader.cancel()
    await expect.poll(() => ended).toBe(true)
  })
})

describe('under the server’s own compression', () => {
  const served = createRequire(createRequire(import.meta.url).resolve('@react-router/serve/package.json'))
  type Layer = (request: IncomingMessage, response: ServerResponse, next: () => void) => void
  const layer: Layer = served('compression')()

  /** Warnings of this process while a page of many parts is read slowly, packed by us or by the layer alone. */
  async function warnings(packed: boolean): Promise<string[]> {
    const parts = 60
    const page = () => {
      let sent = 0
      return new ReadableStream({
        pull: (out) => (sent++ < parts ? out.enqueue(Buffer.from(`${sent} terrace `.repeat(4000))) : out.close()),
      })
    }
    const answer = async (response: ServerResponse) => {
      const out = packed ? await outgoing('br', html(page())) : html(page())
      for (const [name, value] of out.headers) response.setHeader(name, value)
      await writeReadableStreamToWritable(out.body!, response)
    }
    const server = createServer((request, response) => layer(request, response, () => void answer(response)))
    const heard: string[] = []
    const hear = ({ name, message }: Error) => heard.push(`${name} ${message}`)
    process.on('warning', hear)
    try {
      server.listen(0, '127.0.0.1')
      await once(server, 'listening')
      const { port } = server.address() as AddressInfo
      const got = await fetch(`http://127.0.0.1:${port}/`, { headers: { 'Accept-Encoding': 'br' } })
      expect(got.headers.get('Content-Encoding')).toBe('br')
      expect((await got.text()).match(/60 terrace/g)).toHaveLength(4000)
      await new Promise((resolve) => setImmediate(resolve))
    } finally {
      process.off('warning', hear)
      await new Promise((resolve) => server.close(resolve))
    }
    return heard
  }

  it('a page leaves no listeners behind, as it would without ours', async () => {
    expect((await warnings(false)).join()).toContain('11 drain listeners added to [BrotliCompress]')
    expect(await warnings(true)).toEqual([])
  })
})

describe('a page of the application', () => {
  let application: Application
  let cookie: string
  beforeAll(async () => {
    application = await openApplication()
    cookie = await application.signInAs('designer')
  })
  afterAll(() => application.close())

  it.each(['/rules', '/rules.data', '/api/heaters'])('%s goes out packed, the same as unpacked', async (path) => {
    const ask = (headers: Record<string, string>) => application.handle(requestOf('GET', path, { cookie, headers }))
    const [plain, packed] = [await ask({}), await ask({ 'Accept-Encoding': 'gzip, br' })]
    expect([plain.headers.get('Content-Encoding'), packed.headers.get('Content-Encoding')]).toEqual([null, 'br'])
    expect(packed.headers.get('X-Content-Type-Options')).toBe('nosniff')
    // A page's nonce is another each time.
    const unmarked = (text: string) => text.replaceAll(/nonce="[^"]*"|\\"nonce\\",\\"[^\\]*\\"/g, '')
    const text = brotliDecompressSync(Buffer.from(await packed.arrayBuffer())).toString()
    expect(unmarked(text)).toBe(unmarked(await plain.text()))
  })
})
