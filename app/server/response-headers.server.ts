import { subscribe } from 'node:diagnostics_channel'
import { ServerResponse } from 'node:http'
import { env } from '#app/server/env.server.ts'

/** The policy of a page: nothing from elsewhere, no inline script without the nonce of this very answer. */
function contentPolicy(nonce: string): string {
  const development = env.NODE_ENV === 'development'
  // The development server injects its own inline scripts and styles and talks over a socket.
  const inline = development ? "'unsafe-inline'" : `'nonce-${nonce}'`
  return [
    "default-src 'self'",
    `script-src 'self' ${inline}`,
    `style-src 'self' ${inline}`,
    "style-src-attr 'unsafe-inline'",
    "worker-src 'self'",
    `connect-src 'self'${development ? ' ws:' : ''}`,
    "img-src 'self' data: blob:",
    "font-src 'self'",
    "object-src 'none'",
    "base-uri 'none'",
    "form-action 'self'",
    "frame-ancestors 'none'",
  ].join('; ')
}

const always = {
  'X-Content-Type-Options': 'nosniff',
  'X-Frame-Options': 'DENY',
  'Referrer-Policy': 'same-origin',
  'Permissions-Policy': 'camera=(), geolocation=(), microphone=(), payment=(), usb=()',
  'Cross-Origin-Opener-Policy': 'same-origin',
  'Cross-Origin-Resource-Policy': 'same-origin',
}

/** What an answer carries that none of our routes gave: a file, an address that cannot be read. */
const unlessGiven = {
  ...always,
  'Content-Security-Policy': "default-src 'self'; style-src 'self' 'unsafe-inline'; frame-ancestors 'none'",
}

/**
 * Gives every answer of this process its headers, also those that the server sends before or beside our routes. A
 * header that is set already stays as it is.
 */
export function protectEveryAnswer(): void {
  subscribe('http.server.request.start', (message) => {
    if (typeof message !== 'object' || message === null || !('response' in message)) return
    const { response } = message
    if (!(response instanceof ServerResponse)) return
    const { writeHead } = response
    response.writeHead = (...given: unknown[]) => {
      for (const [name, value] of Object.entries(unlessGiven)) {
        if (!response.hasHeader(name)) response.setHeader(name, value)
      }
      return Reflect.apply(writeHead, response, given)
    }
  })
}

/** Adds what every answer carries; a route that set its own policy or its own caching keeps it. */
export function protectResponse({ status, headers }: Response, nonce: string): void {
  for (const [name, value] of Object.entries(always)) headers.set(name, value)
  if (env.PUBLIC_ORIGIN.startsWith('https:')) headers.set('Strict-Transport-Security', 'max-age=31536000')
  if (!headers.has('Content-Security-Policy')) headers.set('Content-Security-Policy', contentPolicy(nonce))
  if (status === 503) headers.set('Retry-After', '5')
  if (!headers.has('Cache-Control')) headers.set('Cache-Control', 'private, no-store')
}
