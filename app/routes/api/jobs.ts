import { listJobs } from '#app/server/data/jobs.server.ts'
import { requireMay } from '#app/server/session.server.ts'
import type { Route } from './+types/jobs'

export { readOnly as action } from '#app/server/other-methods.server.ts'

/** GET /api/jobs: `{ jobs }`, the one changed last first. */
export async function loader({ request }: Route.LoaderArgs) {
  const member = await requireMay(request, 'view')
  return Response.json({ jobs: await listJobs(member) })
}
