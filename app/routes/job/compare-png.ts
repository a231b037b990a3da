import { requireJob } from '#app/server/data/jobs.server.ts'
import { downloadComparison } from '#app/server/exports.server.ts'
import { pngFile } from '#app/server/render/picture-file.server.ts'
import type { Route } from './+types/compare-png'

/** GET /jobs/:jobId/compare.png?variants=1,3: the customer's sheet as a picture of twice its size, a download. */
export async function loader({ request, params, url }: Route.LoaderArgs) {
  const job = await requireJob(request, params.jobId, 'export')
  return downloadComparison(request, job, url.searchParams, pngFile)
}
