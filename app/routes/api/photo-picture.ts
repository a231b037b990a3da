import { requirePhoto } from '#app/server/data/photos.server.ts'
import { missing } from '#app/server/missing.server.ts'
import { findPicture } from '#app/server/photo-files.server.ts'
import type { Route } from './+types/photo-picture'

/** GET /api/photos/:photoId/picture.jpg: the picture, with `?small` at most 480 px. It never changes under its id. */
export async function loader({ request, params }: Route.LoaderArgs) {
  const { id, fileKey } = await requirePhoto(request, params.photoId, 'view')
  const small = new URL(request.url).searchParams.has('small')
  const etag = `"${id}${small ? '-small' : ''}"`
  const headers = {
    'Cache-Control': 'private, max-age=600',
    'Content-Security-Policy': "default-src 'none'; sandbox",
    'Content-Disposition': 'inline',
    ETag: etag,
  }
  if (request.headers.get('If-None-Match') === etag) return new Response(null, { status: 304, headers })
  const picture = await findPicture(fileKey, small)
  if (!picture) throw missing(request, 'photo')
  return new Response(picture, {
    headers: { ...headers, 'Content-Type': 'image/jpeg', 'Content-Length': `${picture.size}` },
  })
}
