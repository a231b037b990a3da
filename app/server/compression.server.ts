import { pipeline, Readable } from 'node:stream'
import { constants, createBrotliCompress, createGzip } from 'node:zlib'
import { createReadableStreamFromReadable } from '@react-router/node'
import type { MiddlewareFunction } from 'react-router'

/** Quick enough for pages that are made for each request; what is made once is compressed by the server of files. */
const brotliQuality = 4

const packers = {
  br: () => createBrotliCompress({ params: { [constants.BROTLI_PARAM_QUALITY]: brotliQuality } }),
  gzip: () => createGzip(),
}

/** The better of the two encodings that a request takes; null when it takes neither. `q=0` refuses one. */
function encodingFor(accepted: string | null): keyof typeof packers | null {
  const taken = new Set(
    (accepted ?? '').split(',').flatMap((part) => {
      const [name = '', ...parameters] = part.split(';').map((word) => word.trim().toLowerCase())
      return parameters.some((parameter) => /^q=0(\.0*)?$/.test(parameter)) ? [] : [name]
    }),
  )
  return taken.has('br') ? 'br' : taken.has('gzip') ? 'gzip' : null
}

const isWords = (type: string | null): boolean => /^(text\/|application\/json|image\/svg\+xml)/.test(type ?? '')

async function* chunksOf(body: ReadableStream<Uint8Array>): AsyncGenerator<Uint8Array> {
  const reader = body.getReader()
  try {
    for (let part = await reader.read(); !part.done; part = await reader.read()) yield part.value
  } finally {
    await reader.cancel()
  }
}

/**
 * Compresses pages, data and drawings on their way out. The server's own compression would do so too, but it lets whoever
 * waits for it to drain add a listener to its stream and not take it away again: every pause of a streamed page left one.
 */
export const compress: MiddlewareFunction<Response> = async ({ request }, next) => {
  const response = await next()
  const { body, status, statusText, headers } = response
  if (!body || headers.has('Content-Encoding') || !isWords(headers.get('Content-Type'))) return response
  headers.append('Vary', 'Accept-Encoding')
  const encoding = encodingFor(request.headers.get('Accept-Encoding'))
  if (!encoding) return response
  headers.set('Content-Encoding', encoding)
  headers.delete('Content-Length')
  const packed = packers[encoding]()
  // What goes wrong on either side ends both; the reader of `packed` hears of it.
  pipeline(Readable.from(chunksOf(body)), packed, () => undefined)
  return new Response(createReadableStreamFromReadable(packed), { status, statusText, headers })
}
