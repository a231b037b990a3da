import { isRefusal, refuse, refuseMethod, respond } from '#app/server/answers.server.ts'
import { requireJob } from '#app/server/data/jobs.server.ts'
import { addPhoto } from '#app/server/data/photo-keeping.server.ts'
import { listPhotos } from '#app/server/data/photos.server.ts'
import { readUpload } from '#app/server/photo-upload.server.ts'
import type { Route } from './+types/job-photos'

/** GET /api/jobs/:jobId/photos: `{ photos }` with their marks, oldest first. */
export async function loader({ request, params }: Route.LoaderArgs) {
  const job = await requireJob(request, params.jobId, 'view')
  return Response.json({ photos: await listPhotos(job) })
}

/** POST: one picture as the field `photo` of a multipart form, with a key. 201 with the new photo. */
export async function action({ request, params }: Route.ActionArgs) {
  const job = await requireJob(request, params.jobId, 'edit-site')
  if (request.method !== 'POST') return refuseMethod(request, 'GET', 'POST')
  const sent = await readUpload(request)
  if (isRefusal(sent)) return respond(sent)
  try {
    return respond(await addPhoto(job, sent))
  } catch (problem) {
    console.error(problem)
    const answer = refuse(422, 'The photo could not be kept. Send it again.', 'photo')
    return new Response(answer.body, { status: 503, headers: answer.headers })
  }
}
