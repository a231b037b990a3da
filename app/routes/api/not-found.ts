import { refuse } from '#app/server/answers.server.ts'
import { requireMember } from '#app/server/session.server.ts'
import type { Route } from './+types/not-found'

const nothingHere = () => refuse(404, 'No such address.', '')

/** Any other address under /api: 404 as JSON. */
export async function loader({ request }: Route.LoaderArgs) {
  await requireMember(request)
  return nothingHere()
}

export async function action({ request }: Route.ActionArgs) {
  await requireMember(request)
  return nothingHere()
}
