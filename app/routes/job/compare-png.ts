import { refuseComputation } from '#app/server/computation-refusal.server.ts'
import { findCompared, recordExport } from '#app/server/data/compared.server.ts'
import { requireJob } from '#app/server/data/jobs.server.ts'
import { attachment } from '#app/server/file-name.server.ts'
import { missing } from '#app/server/missing.server.ts'
import { comparisonSheet } from '#app/server/render/comparison.server.tsx'
import { pngOf, svgOf } from '#app/server/render/picture.server.ts'
import type { Route } from './+types/compare-png'

/** GET /jobs/:jobId/compare.png?variants=1,3: the customer's sheet as a picture of twice its size, a download. */
export async function loader({ request, params, url }: Route.LoaderArgs) {
  const job = await requireJob(request, params.jobId, 'export')
  const compared = await findCompared(job, url.searchParams.get('variants'))
  if (compared.chosen.length === 0) throw missing(request, 'variant')
  try {
    const sheet = await comparisonSheet(compared, job.member.organisationName, new Date())
    const png = await pngOf(svgOf(sheet), 2)
    await recordExport(job, 'png', compared.chosen)
    const numbers = compared.chosen.map(({ number }) => String(number))
    return new Response(new Uint8Array(png), {
      headers: {
        'Content-Type': 'image/png',
        'Content-Disposition': attachment([job.name, 'variants', ...numbers], 'png'),
      },
    })
  } catch (problem) {
    return refuseComputation(problem)
  }
}
