import { etagOf, isRefusal, refuseMethod, respond } from '#app/server/answers.server.ts'
import { deleteVariant } from '#app/server/data/variant-creation.server.ts'
import { savedLayoutSchema, saveVariant } from '#app/server/data/variant-revisions.server.ts'
import { findOpenVariant, requireVariant } from '#app/server/data/variants.server.ts'
import { missing } from '#app/server/missing.server.ts'
import { readExpected } from '#app/server/preconditions.server.ts'
import { readSave } from '#app/server/saving.server.ts'
import type { Route } from './+types/variant'

/** GET /api/variants/:variantId: the variant with its heaters; its revision is the ETag too. */
export async function loader({ request, params }: Route.LoaderArgs) {
  const open = await requireVariant(request, params.variantId, 'view')
  const variant = await findOpenVariant(open)
  if (!variant) throw missing(request, 'variant')
  return Response.json(variant, { headers: { ETag: etagOf(variant.revision) } })
}

/** PUT: title and heaters, by the one rule for saving. DELETE: with If-Match; it can be brought back. */
export async function action({ request, params }: Route.ActionArgs) {
  const variant = await requireVariant(request, params.variantId, 'edit-layout')
  if (request.method === 'PUT') {
    const save = await readSave(request, savedLayoutSchema)
    return respond(isRefusal(save) ? save : await saveVariant(variant, save))
  }
  if (request.method !== 'DELETE') return refuseMethod(request, 'GET', 'PUT', 'DELETE')
  const wanted = readExpected(request)
  return respond(isRefusal(wanted) ? wanted : await deleteVariant(variant, wanted.expected))
}
