import { refuseComputation } from '#app/server/computation-refusal.server.ts'
import { findLaidOut } from '#app/server/data/laid-out.server.ts'
import { requireVariant } from '#app/server/data/variants.server.ts'
import { missing } from '#app/server/missing.server.ts'
import { thumbnailOf } from '#app/server/render/thumbnail.server.tsx'
import type { Route } from './+types/thumbnail'

export { readOnly as action } from '#app/server/other-methods.server.ts'

/** An SVG that is opened by itself runs nothing and loads nothing. */
const policy = "default-src 'none'; style-src 'unsafe-inline'; sandbox"

/** GET /api/variants/:variantId/thumbnail.svg: the variant's small plan with its heat. */
export async function loader({ request, params }: Route.LoaderArgs) {
  const open = await requireVariant(request, params.variantId, 'view')
  const laid = await findLaidOut(open)
  if (!laid) throw missing(request, 'variant')
  try {
    const headers = { 'Content-Type': 'image/svg+xml', 'Content-Security-Policy': policy }
    return new Response(await thumbnailOf(laid), { headers })
  } catch (problem) {
    return refuseComputation(problem)
  }
}
