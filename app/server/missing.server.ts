import { z } from 'zod'

/** Whether a part of a URL can be an id at all. */
export const isId = (text: string | undefined): text is string => z.uuid().safeParse(text).success

type Thing = 'job' | 'variant' | 'photo' | 'seat' | 'rule set' | 'heater' | 'page'

/** The part of the address that names a thing. */
function pathOf(thing: Thing): string {
  if (thing === 'page') return ''
  return thing === 'heater' ? 'code' : `${thing}Id`
}

/** The answer to a thing that is not there: the same whether it never was or belongs to another organisation. */
export function missing(request: Request, thing: Thing): Response {
  const error = `No such ${thing}.`
  if (!new URL(request.url).pathname.startsWith('/api/')) return new Response(error, { status: 404, statusText: error })
  return Response.json({ error, path: pathOf(thing) }, { status: 404 })
}
