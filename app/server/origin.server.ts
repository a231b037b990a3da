import { env, servesLoopbackOnly } from '#app/server/env.server.ts'

/** On one's own computer the same server has several names. */
function loopbackNames(): string[] {
  const { protocol, port } = new URL(env.PUBLIC_ORIGIN)
  const end = port ? `:${port}` : ''
  return ['127.0.0.1', 'localhost', '[::1]'].map((host) => `${protocol}//${host}${end}`)
}

const ownOrigins = new Set(servesLoopbackOnly ? [env.PUBLIC_ORIGIN, ...loopbackNames()] : [env.PUBLIC_ORIGIN])
const changesNothing = new Set(['GET', 'HEAD', 'OPTIONS'])

/**
 * Whether a request may change something: it says that it comes from our own pages. Browsers send Origin or
 * Sec-Fetch-Site and no page can forge them; a script sends `Origin` = the public origin. Neither: no.
 */
export function comesFromOurselves(request: Request): boolean {
  if (changesNothing.has(request.method)) return true
  const origin = request.headers.get('Origin')
  const site = request.headers.get('Sec-Fetch-Site')
  if (site !== null && site !== 'same-origin') return false
  return origin === null ? site === 'same-origin' : ownOrigins.has(origin)
}
