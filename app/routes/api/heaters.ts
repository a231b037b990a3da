import { listModels } from '#app/server/data/heaters.server.ts'
import { requireMay } from '#app/server/session.server.ts'
import type { Route } from './+types/heaters'

export { readOnly as action } from '#app/server/other-methods.server.ts'

/** GET /api/heaters: `{ heaters }`, the whole catalogue; lengths m, power W. */
export async function loader({ request }: Route.LoaderArgs) {
  const member = await requireMay(request, 'view')
  return Response.json({ heaters: await listModels(member) })
}
