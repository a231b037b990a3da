import { etagOf, isRefusal, refuseMethod, respond } from '#app/server/answers.server.ts'
import { requireJob } from '#app/server/data/jobs.server.ts'
import { findHousedSite, saveSite, savedSiteSchema } from '#app/server/data/sites.server.ts'
import { readSave } from '#app/server/saving.server.ts'
import type { Route } from './+types/job-site'

/** GET /api/jobs/:jobId/site: `{ revision, site }`. */
export async function loader({ request, params }: Route.LoaderArgs) {
  const job = await requireJob(request, params.jobId, 'view')
  const { revision, site } = await findHousedSite(job)
  return Response.json({ revision, site }, { headers: { ETag: etagOf(revision) } })
}

/** PUT /api/jobs/:jobId/site: a whole Site, by the one rule for saving. */
export async function action({ request, params }: Route.ActionArgs) {
  const job = await requireJob(request, params.jobId, 'edit-site')
  if (request.method !== 'PUT') return refuseMethod(request, 'GET', 'PUT')
  const save = await readSave(request, savedSiteSchema)
  return respond(isRefusal(save) ? save : await saveSite(job, save))
}
