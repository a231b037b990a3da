import { isRefusal, refuseMethod, respond } from '#app/server/answers.server.ts'
import { requireJob } from '#app/server/data/jobs.server.ts'
import { createVariant, variantRequestSchema } from '#app/server/data/variant-creation.server.ts'
import { listVariants } from '#app/server/data/variants.server.ts'
import { readSave } from '#app/server/saving.server.ts'
import type { Route } from './+types/job-variants'

/** GET /api/jobs/:jobId/variants: `{ variants }` by number, without their heaters. */
export async function loader({ request, params }: Route.LoaderArgs) {
  const job = await requireJob(request, params.jobId, 'view')
  return Response.json({ variants: await listVariants(job) })
}

/** POST /api/jobs/:jobId/variants with a key: `{ title?, heaters? }` or `{ title?, copyOf }`; 201. */
export async function action({ request, params }: Route.ActionArgs) {
  const job = await requireJob(request, params.jobId, 'edit-layout')
  if (request.method !== 'POST') return refuseMethod(request, 'GET', 'POST')
  const save = await readSave(request, variantRequestSchema)
  return respond(isRefusal(save) ? save : await createVariant(job, save))
}
