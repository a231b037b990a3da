import { refuse } from '#app/server/answers.server.ts'
import { FluxBusyError } from '#app/server/flux.server.ts'

/** The JSON response when a computation off the event loop gives nothing: 422 or 503. Throws what is broken code. */
export function refuseComputation(problem: unknown): Response {
  if (problem instanceof RangeError) return refuse(422, 'Figures without meaning: nothing can be computed.', 'heaters')
  if (!(problem instanceof FluxBusyError)) throw problem
  const error = 'Too much is being computed just now. Try again in a minute.'
  return Response.json({ error, path: '' }, { status: 503, headers: { 'Retry-After': '30' } })
}
