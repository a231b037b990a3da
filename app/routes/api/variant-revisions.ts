import { listRevisions } from '#app/server/data/variant-revisions.server.ts'
import { requireVariant } from '#app/server/data/variants.server.ts'
import type { Route } from './+types/variant-revisions'

export { readOnly as action } from '#app/server/other-methods.server.ts'

/** GET /api/variants/:variantId/revisions: `{ revisions }`, newest first, without their heaters. */
export async function loader({ request, params }: Route.LoaderArgs) {
  const variant = await requireVariant(request, params.variantId, 'view')
  return Response.json({ revisions: await listRevisions(variant) })
}
