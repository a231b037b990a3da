import { refuseComputation } from '#app/server/computation-refusal.server.ts'
import { findLaidOut } from '#app/server/data/laid-out.server.ts'
import { requireVariant } from '#app/server/data/variants.server.ts'
import { attachment } from '#app/server/file-name.server.ts'
import { seatWarmthOffThread } from '#app/server/flux.server.ts'
import { missing } from '#app/server/missing.server.ts'
import { seatsCsv } from '#app/server/seats-csv.server.ts'
import type { Route } from './+types/seats-csv'

export { readOnly as action } from '#app/server/other-methods.server.ts'

/** GET /api/variants/:variantId/seats.csv: every seat's figures, by the engine that the page uses. */
export async function loader({ request, params }: Route.LoaderArgs) {
  const open = await requireVariant(request, params.variantId, 'export')
  const laid = await findLaidOut(open)
  if (!laid) throw missing(request, 'variant')
  const { site, brief, models, variant } = laid
  try {
    const warmth = await seatWarmthOffThread({ site, brief, models, layout: variant })
    return new Response(seatsCsv(warmth), {
      headers: {
        'Content-Type': 'text/csv; charset=utf-8',
        'Content-Disposition': attachment([site.name, `${variant.number}.${variant.revision}`, 'seats'], 'csv'),
      },
    })
  } catch (problem) {
    return refuseComputation(problem)
  }
}
