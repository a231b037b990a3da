import { PassThrough } from 'node:stream'
import { createReadableStreamFromReadable } from '@react-router/node'
import { isbot } from 'isbot'
import { renderToPipeableStream } from 'react-dom/server'
import { isRouteErrorResponse, ServerRouter, type EntryContext, type RouterContextProvider } from 'react-router'
import { nonceContext } from '#app/server/middleware.server.ts'

/** How long a page may wait for its slowest part, ms. */
export const streamTimeout = 5_000

/** Renders a page to a stream. Its inline scripts carry the nonce of the content security policy. */
export default function handleRequest(
  request: Request,
  status: number,
  headers: Headers,
  routerContext: EntryContext,
  context: RouterContextProvider,
) {
  if (request.method === 'HEAD') return new Response(null, { status, headers })
  const nonce = context.get(nonceContext)
  const marked = nonce === undefined ? {} : { nonce }
  return new Promise<Response>((resolve, reject) => {
    let shellRendered = false
    let answeredStatus = status
    const whenReady = isbot(request.headers.get('user-agent') ?? '') ? 'onAllReady' : 'onShellReady'
    const { pipe, abort } = renderToPipeableStream(
      <ServerRouter context={routerContext} url={request.url} {...marked} />,
      {
        [whenReady]() {
          shellRendered = true
          const body = new PassThrough({
            final(done) {
              clearTimeout(timer)
              done()
            },
          })
          headers.set('Content-Type', 'text/html; charset=utf-8')
          pipe(body)
          resolve(new Response(createReadableStreamFromReadable(body), { headers, status: answeredStatus }))
        },
        onShellError: reject,
        onError(error: unknown) {
          answeredStatus = 500
          if (shellRendered) console.error(error)
        },
      },
    )
    const timer = setTimeout(abort, streamTimeout + 1000)
  })
}

/** Faults of ours go to the log; a request that asks for what is not there does not fill it. */
export function handleError(problem: unknown, { request }: { request: Request }): void {
  if (request.signal.aborted || (isRouteErrorResponse(problem) && problem.status < 500)) return
  console.error(problem)
}
