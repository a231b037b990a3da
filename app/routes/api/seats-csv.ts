import { seatWarmth } from '#app/domain/comfort/seat-warmth.ts'
import { findLaidOut } from '#app/server/data/laid-out.server.ts'
import { requireVariant } from '#app/server/data/variants.server.ts'
import { attachment } from '#app/server/file-name.server.ts'
import { missing } from '#app/server/missing.server.ts'
import { seatsCsv } from '#app/server/seats-csv.server.ts'
import type { Route } from './+types/seats-csv'

/** GET /api/variants/:variantId/seats.csv: every seat's figures, by the engine that the page uses. */
export async function loader({ request, params }: Route.LoaderArgs) {
  const open = await requireVariant(request, params.variantId, 'export')
  const laid = await findLaidOut(open)
  if (!laid) throw missing(request, 'variant')
  const { site, variant } = laid
  const warmth = seatWarmth({ ...laid, layout: variant })
  return new Response(seatsCsv(warmth), {
    headers: {
      'Content-Type': 'text/csv; charset=utf-8',
      'Content-Disposition': attachment([site.name, `${variant.number}.${variant.revision}`, 'seats'], 'csv'),
    },
  })
}
