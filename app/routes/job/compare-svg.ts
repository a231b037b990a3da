import { refuseComputation } from '#app/server/computation-refusal.server.ts'
import { findCompared, recordExport } from '#app/server/data/compared.server.ts'
import { requireJob } from '#app/server/data/jobs.server.ts'
import { attachment } from '#app/server/file-name.server.ts'
import { missing } from '#app/server/missing.server.ts'
import { comparisonSheet } from '#app/server/render/comparison.server.tsx'
import { svgDocument } from '#app/server/render/picture.server.ts'
import type { Route } from './+types/compare-svg'

/** An SVG that is opened by itself runs nothing and loads nothing but the fonts it carries. */
const policy = "default-src 'none'; style-src 'unsafe-inline'; font-src data:; sandbox"

/** GET /jobs/:jobId/compare.svg?variants=1,3: the customer's sheet as a drawing that stands alone, a download. */
export async function loader({ request, params, url }: Route.LoaderArgs) {
  const job = await requireJob(request, params.jobId, 'export')
  const compared = await findCompared(job, url.searchParams.get('variants'))
  if (compared.chosen.length === 0) throw missing(request, 'variant')
  try {
    const svg = await svgDocument(await comparisonSheet(compared, job.member.organisationName, new Date()))
    await recordExport(job, 'svg', compared.chosen)
    const numbers = compared.chosen.map(({ number }) => String(number))
    return new Response(svg, {
      headers: {
        'Content-Type': 'image/svg+xml; charset=utf-8',
        'Content-Security-Policy': policy,
        'Content-Disposition': attachment([job.name, 'variants', ...numbers], 'svg'),
      },
    })
  } catch (problem) {
    return refuseComputation(problem)
  }
}
