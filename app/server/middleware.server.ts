import { randomBytes } from 'node:crypto'
import { type MiddlewareFunction, createContext } from 'react-router'
import { compress } from '#app/server/compression.server.ts'
import { env } from '#app/server/env.server.ts'
import { comesFromOurselves } from '#app/server/origin.server.ts'
import { protectEveryAnswer, protectResponse } from '#app/server/response-headers.server.ts'
import { requireMember } from '#app/server/session.server.ts'

/** The nonce of this answer's inline scripts and styles; undefined in development, where none is checked. */
export const nonceContext = createContext<string | undefined>(undefined)

/** Largest body of an upload and of anything else, bytes. */
const mostBytes = { upload: 20_000_000, other: 1_000_000 }

/** What anybody may open, by the pattern of its URL. Everything else asks for a member before its loader runs. */
const openPatterns = new Set([
  'sign-in',
  'sign-out',
  'reset-password',
  'reset-password/:token',
  'outbox',
  'healthz',
  'readyz',
  '*',
])

const isOpen = (pattern: string) => openPatterns.has(pattern.replace(/^\//, ''))

const refused = (status: number, error: string) => Response.json({ error, path: '' }, { status })

/** Security headers on every answer, errors and downloads included. */
const protect: MiddlewareFunction<Response> = async ({ context }, next) => {
  const nonce = randomBytes(18).toString('base64')
  context.set(nonceContext, env.NODE_ENV === 'development' ? undefined : nonce)
  const response = await next()
  protectResponse(response, nonce)
  return response
}

/** A body must say how long it is, and no longer than it may be. */
const limitBody: MiddlewareFunction<Response> = ({ request, pattern }) => {
  if (!request.body) return
  const said = request.headers.get('Content-Length')
  // HTTP/1.1: a request without either header has no body, whatever stream the server hands over (RFC 9112, 6.3).
  if (said === null && request.headers.get('Transfer-Encoding') === null) return
  if (said === null) throw refused(411, 'Say how long the body is (Content-Length).')
  const upload = !isOpen(pattern) && request.headers.get('Content-Type')?.startsWith('multipart/form-data')
  const most = upload ? mostBytes.upload : mostBytes.other
  if (!(Number(said) <= most)) throw refused(413, `The body is larger than ${most / 1_000_000} MB.`)
}

/** Nothing is changed by a page of somebody else. */
const checkOrigin: MiddlewareFunction<Response> = ({ request }) => {
  if (!comesFromOurselves(request)) throw refused(403, 'The request does not come from our own pages.')
}

const checkMember: MiddlewareFunction<Response> = async ({ request, pattern }) => {
  if (!isOpen(pattern)) await requireMember(request)
}

// The development server is the framework's own and loads this file again and again.
if (env.NODE_ENV !== 'development') protectEveryAnswer()

/** What the root route puts before every loader and action, outermost first. */
export const middleware = [compress, protect, checkOrigin, limitBody, checkMember]
