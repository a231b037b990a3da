import { photoMarksSchema } from '#app/domain/photo/measurements.ts'
import { etagOf, isRefusal, refuseMethod, respond } from '#app/server/answers.server.ts'
import { deletePhoto, saveMarks } from '#app/server/data/photo-keeping.server.ts'
import { requirePhoto } from '#app/server/data/photos.server.ts'
import { readExpected } from '#app/server/preconditions.server.ts'
import { readSave } from '#app/server/saving.server.ts'
import type { Route } from './+types/photo'

/** GET /api/photos/:photoId: the photo with its marks; its revision is the ETag too. */
export async function loader({ request, params }: Route.LoaderArgs) {
  const { id, jobId, name, width, height, revision, marks } = await requirePhoto(request, params.photoId, 'view')
  const photo = { id, jobId, name, width, height, revision, marks }
  return Response.json(photo, { headers: { ETag: etagOf(revision) } })
}

/** PUT: the marks, by the one rule for saving. DELETE: with If-Match; it can be brought back. */
export async function action({ request, params }: Route.ActionArgs) {
  const photo = await requirePhoto(request, params.photoId, 'edit-site')
  if (request.method === 'PUT') {
    const save = await readSave(request, photoMarksSchema)
    return respond(isRefusal(save) ? save : await saveMarks(photo, save))
  }
  if (request.method !== 'DELETE') return refuseMethod(request, 'GET', 'PUT', 'DELETE')
  const wanted = readExpected(request)
  return respond(isRefusal(wanted) ? wanted : await deletePhoto(photo, wanted.expected))
}
