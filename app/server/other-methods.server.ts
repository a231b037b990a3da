import { refuseMethod } from '#app/server/answers.server.ts'
import { requireMember } from '#app/server/session.server.ts'

/** The action of an address that can only be read: 405 for a member. */
export async function readOnly({ request }: { readonly request: Request }): Promise<Response> {
  await requireMember(request)
  return refuseMethod(request, 'GET')
}

/** The loader of an address that only takes a POST: 405 for a member. */
export async function postOnly({ request }: { readonly request: Request }): Promise<Response> {
  await requireMember(request)
  return refuseMethod(request, 'POST')
}
