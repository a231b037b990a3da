import { beamCsv } from '#app/domain/flux/beam-table.ts'
import { beamWrittenOut } from '#app/domain/heaters/beam-written-out.ts'
import { findBeam } from '#app/server/data/beams.server.ts'
import { attachment } from '#app/server/file-name.server.ts'
import { missing } from '#app/server/missing.server.ts'
import { requireMay } from '#app/server/session.server.ts'
import type { Route } from './+types/heater-beam-csv'

export { readOnly as action } from '#app/server/other-methods.server.ts'

/** GET /api/heaters/:code/beam.csv: the beam in use as a table that PUT …/beam takes; 404 without beam data. */
export async function loader({ request, params: { code } }: Route.LoaderArgs) {
  const member = await requireMay(request, 'export')
  const shown = await findBeam({ member, code })
  if (!shown?.beam) throw missing(request, 'heater')
  return new Response(beamCsv(beamWrittenOut(shown.beam)), {
    headers: {
      'Content-Type': 'text/csv; charset=utf-8',
      'Content-Disposition': attachment([code, 'beam', String(shown.revision)], 'csv'),
    },
  })
}
