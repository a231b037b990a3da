import { canonicalJson } from '#drizzle/content-hash.ts'

/** A request that is refused: the status, why in a sentence, and the field or header by its dotted path. */
export interface Refusal {
  readonly status: 400 | 403 | 404 | 405 | 409 | 412 | 413 | 422 | 428
  readonly error: string
  readonly path: string
  /** Each place that is wrong in a table, 1-based, when there may be several. */
  readonly faults?: readonly { readonly row: number; readonly column: number; readonly error: string }[]
  /** The server's copy, when the refusal is about a newer one. */
  readonly current?: unknown
  /** Who saved that copy, by name, and when, ISO 8601. */
  readonly changed?: { readonly by: string | null; readonly at: string }
}

/** A request that is carried out: what goes back as JSON, and the revision it now has. */
export interface Answer {
  readonly status: 200 | 201
  readonly body: unknown
  readonly revision: number | null
}

/** Whether a result is a refusal. */
export function isRefusal<T extends object>(result: T | Refusal): result is Refusal {
  return 'error' in result && 'path' in result && 'status' in result
}

/** The entity tag of a revision: its number in quotes. */
export const etagOf = (revision: number): string => `"${revision}"`

/**
 * The JSON response to a refusal or an answer; a revision goes out as ETag too. Keys are sorted, so that an answer given
 * again from storage is the same to the byte.
 */
export function respond(result: Answer | Refusal): Response {
  if (isRefusal(result)) {
    const { status, ...said } = result
    return Response.json(said, { status })
  }
  const headers = new Headers({ 'Content-Type': 'application/json' })
  if (result.revision !== null) headers.set('ETag', etagOf(result.revision))
  return new Response(canonicalJson(result.body), { status: result.status, headers })
}

/** A refusal as the JSON response of an API route. */
export const refuse = (status: Refusal['status'], error: string, path: string): Response =>
  respond({ status, error, path })

/** The answer to a method that a URL does not know. */
export function refuseMethod(request: Request, ...known: readonly string[]): Response {
  const response = refuse(405, `${request.method} is not known here; known: ${known.join(', ')}.`, 'method')
  response.headers.set('Allow', known.join(', '))
  return response
}
