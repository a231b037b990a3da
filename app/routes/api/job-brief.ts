import { briefSchema } from '#app/domain/brief/brief.ts'
import { etagOf, isRefusal, refuseMethod, respond } from '#app/server/answers.server.ts'
import { findBrief, saveBrief } from '#app/server/data/briefs.server.ts'
import { requireJob } from '#app/server/data/jobs.server.ts'
import { readSave } from '#app/server/saving.server.ts'
import type { Route } from './+types/job-brief'

/** GET /api/jobs/:jobId/brief: `{ revision, brief }`. */
export async function loader({ request, params }: Route.LoaderArgs) {
  const job = await requireJob(request, params.jobId, 'view')
  const kept = await findBrief(job)
  return Response.json(kept, { headers: { ETag: etagOf(kept.revision) } })
}

/** PUT /api/jobs/:jobId/brief: a whole Brief, by the one rule for saving. */
export async function action({ request, params }: Route.ActionArgs) {
  const job = await requireJob(request, params.jobId, 'edit-brief')
  if (request.method !== 'PUT') return refuseMethod(request, 'GET', 'PUT')
  const save = await readSave(request, briefSchema)
  return respond(isRefusal(save) ? save : await saveBrief(job, save))
}
