import { z } from 'zod'
import { isRefusal, refuseMethod, respond } from '#app/server/answers.server.ts'
import { undeletePhoto } from '#app/server/data/photo-keeping.server.ts'
import { requirePhoto } from '#app/server/data/photos.server.ts'
import { readSave } from '#app/server/saving.server.ts'
import type { Route } from './+types/photo-restore'

const restoreSchema = z.strictObject({ deleted: z.literal(true) })

/** POST /api/photos/:photoId/restore: `{ deleted: true }` undoes a deletion, with a key. */
export async function action({ request, params }: Route.ActionArgs) {
  const photo = await requirePhoto(request, params.photoId, 'edit-site', 'let through')
  if (request.method !== 'POST') return refuseMethod(request, 'POST')
  const save = await readSave(request, restoreSchema)
  return respond(isRefusal(save) ? save : await undeletePhoto(photo, save))
}
