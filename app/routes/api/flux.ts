import { isRefusal, refuseMethod, respond } from '#app/server/answers.server.ts'
import { refuseComputation } from '#app/server/computation-refusal.server.ts'
import { findModels } from '#app/server/data/heaters.server.ts'
import { readFluxRequest } from '#app/server/flux-request.server.ts'
import { fluxResponse } from '#app/server/flux-response.server.ts'
import { pointFluxes } from '#app/server/flux.server.ts'
import { readJson } from '#app/server/json-body.server.ts'
import { requireMember } from '#app/server/session.server.ts'
import type { Route } from './+types/flux'

export { postOnly as loader } from '#app/server/other-methods.server.ts'

/** POST /api/flux: irradiance at points from groups of elements and catalogue models, by any signed-in member. */
export async function action({ request }: Route.ActionArgs) {
  const member = await requireMember(request)
  if (request.method !== 'POST') return refuseMethod(request, 'POST')
  const read = await readJson(request)
  if (isRefusal(read)) return respond(read)
  const asked = readFluxRequest(read.json, await findModels(member))
  if (isRefusal(asked)) return respond(asked)
  try {
    return fluxResponse(await pointFluxes(asked.emitters, asked.points), asked.warnings)
  } catch (problem) {
    return refuseComputation(problem)
  }
}
