import { requireJob } from '#app/server/data/jobs.server.ts'
import { downloadPicture } from '#app/server/exports.server.ts'
import { svgFile } from '#app/server/render/picture-file.server.ts'
import type { Route } from './+types/picture-svg'

/** GET /jobs/:jobId/variants/:variantId/picture.svg?corner=lower+left&theme=day: the variant in space, a download. */
export async function loader({ request, params, url }: Route.LoaderArgs) {
  const job = await requireJob(request, params.jobId, 'export')
  return downloadPicture(job, params.variantId, url.searchParams, svgFile)
}
