import { findBrief } from '#app/server/data/briefs.server.ts'
import { requireJob } from '#app/server/data/jobs.server.ts'
import { findHousedSite } from '#app/server/data/sites.server.ts'
import { listVariants } from '#app/server/data/variants.server.ts'
import type { Route } from './+types/job'

export { readOnly as action } from '#app/server/other-methods.server.ts'

/** GET /api/jobs/:jobId: the job with its site, its seats by id, its brief, the revisions of both, its variants. */
export async function loader({ request, params }: Route.LoaderArgs) {
  const job = await requireJob(request, params.jobId, 'view')
  const { member, ...shown } = job
  const [kept, asked, variants] = await Promise.all([findHousedSite(job), findBrief(job), listVariants(job)])
  return Response.json({
    ...shown,
    organisation: member.organisationName,
    site: kept.site,
    seats: kept.site.seats,
    brief: asked.brief,
    revisions: { site: kept.revision, brief: asked.revision },
    variants,
  })
}
