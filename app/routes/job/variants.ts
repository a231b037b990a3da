import { redirect } from 'react-router'
import { requireJob } from '#app/server/data/jobs.server.ts'
import { listVariants } from '#app/server/data/variants.server.ts'
import type { Route } from './+types/variants'

/** The first variant of a job; the site while it has none. */
export async function loader({ request, params }: Route.LoaderArgs) {
  const job = await requireJob(request, params.jobId, 'view')
  const [first] = await listVariants(job)
  throw redirect(first ? `/jobs/${job.id}/variants/${first.id}` : `/jobs/${job.id}/site`)
}
