import { isRefusal, refuseMethod, respond } from '#app/server/answers.server.ts'
import { restoreSchema, undeleteVariant } from '#app/server/data/variant-creation.server.ts'
import { restoreRevision } from '#app/server/data/variant-revisions.server.ts'
import { requireVariant } from '#app/server/data/variants.server.ts'
import { readSave } from '#app/server/saving.server.ts'
import type { Route } from './+types/variant-restore'

export { postOnly as loader } from '#app/server/other-methods.server.ts'

/**
 * POST /api/variants/:variantId/restore with a key. `{ revision }` with If-Match brings that revision's layout back as
 * a new revision; `{ deleted: true }` undoes the variant's deletion.
 */
export async function action({ request, params }: Route.ActionArgs) {
  const variant = await requireVariant(request, params.variantId, 'edit-layout', 'let through')
  if (request.method !== 'POST') return refuseMethod(request, 'POST')
  const save = await readSave(request, restoreSchema)
  if (isRefusal(save)) return respond(save)
  const { body } = save
  return respond(
    'revision' in body ? await restoreRevision(variant, save, body.revision) : await undeleteVariant(variant, save),
  )
}
