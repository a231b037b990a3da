import { requireJob } from '#app/server/data/jobs.server.ts'
import { downloadComparison } from '#app/server/exports.server.ts'
import { svgFile } from '#app/server/render/picture-file.server.ts'
import type { Route } from './+types/compare-svg'

/** GET /jobs/:jobId/compare.svg?variants=1,3: the customer's sheet as a drawing that stands alone, a download. */
export async function loader({ request, params, url }: Route.LoaderArgs) {
  const job = await requireJob(request, params.jobId, 'export')
  return downloadComparison(request, job, url.searchParams, svgFile)
}
