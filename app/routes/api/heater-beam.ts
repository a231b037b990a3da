import { etagOf, refuseMethod, isRefusal, respond } from '#app/server/answers.server.ts'
import { readBeamSave } from '#app/server/beam-body.server.ts'
import { dropBeam, findBeam, requireHeater, saveBeam } from '#app/server/data/beams.server.ts'
import { missing } from '#app/server/missing.server.ts'
import { readExpected } from '#app/server/preconditions.server.ts'
import { requireMay } from '#app/server/session.server.ts'
import type { Route } from './+types/heater-beam'

/** GET /api/heaters/:code/beam: the beam that every figure of the model rests on; the own beam's revision is the ETag. */
export async function loader({ request, params: { code } }: Route.LoaderArgs) {
  const member = await requireMay(request, 'view')
  const shown = await findBeam({ member, code })
  if (!shown) throw missing(request, 'heater')
  return Response.json(shown, { headers: { ETag: etagOf(shown.revision) } })
}

/** PUT: a table that was measured, by the one rule for saving. DELETE: with If-Match; the data sheet's beam again. */
export async function action({ request, params }: Route.ActionArgs) {
  const heater = await requireHeater(request, params.code, 'edit-beams')
  if (request.method === 'PUT') {
    const save = await readBeamSave(request)
    return respond(isRefusal(save) ? save : await saveBeam(heater, save))
  }
  if (request.method !== 'DELETE') return refuseMethod(request, 'GET', 'PUT', 'DELETE')
  const wanted = readExpected(request)
  return respond(isRefusal(wanted) ? wanted : await dropBeam(heater, wanted.expected))
}
