import type { Pool } from 'pg'
import { z } from 'zod'
import { files } from '#app/server/outside/storage.server.ts'
import { smallKey } from '#app/server/photo-files.server.ts'

const rowSchema = z.object({ organisation_id: z.string(), id: z.string(), file_key: z.string() })

/**
 * Removes the files, then the rows, of photos that were deleted a week ago, which nobody can bring back any more; an hour
 * more than that, so that a request that still could is over. A store that fails leaves the row for the next time; twice
 * does no harm. As the owner role, whose policies allow just these rows.
 */
export async function sweepPhotos(ownerPool: Pool): Promise<void> {
  const { rows } = await ownerPool.query(
    `select organisation_id, id, file_key from photos where deleted_at < now() - interval '7 days 1 hour'`,
  )
  for (const { organisation_id: organisationId, id, file_key: fileKey } of rowSchema.array().parse(rows)) {
    try {
      for (const key of [fileKey, smallKey(fileKey)]) await files.remove(key)
      await ownerPool.query('delete from photos where organisation_id = $1 and id = $2', [organisationId, id])
    } catch (problem) {
      console.error(`Photo ${id} is still kept:`, problem)
    }
  }
}
