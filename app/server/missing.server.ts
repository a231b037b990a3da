import { z } from 'zod'

/** Whether a part of a URL can be an id at all. */
export const isId = (text: string | undefined): text is string => z.uuid().safeParse(text).success

/** The answer to a thing that is not there: the same whether it never was or belongs to another organisation. */
export function missing(request: Request, thing: 'job' | 'variant' | 'photo' | 'seat' | 'rule set' | 'page'): Response {
  const error = `No such ${thing}.`
  if (!new URL(request.url).pathname.startsWith('/api/')) return new Response(error, { status: 404, statusText: error })
  return Response.json({ error, path: thing === 'page' ? '' : `${thing}Id` }, { status: 404 })
}
