import { and, eq, inArray, sql } from 'drizzle-orm'
import { siteSchema, type Site } from '#app/domain/site/site.ts'
import type { Refusal } from '#app/server/answers.server.ts'
import { own, type Transaction } from '#app/server/organisation.server.ts'
import { photos } from '#drizzle/photo-schema.ts'
import { sites } from '#drizzle/schema.ts'

/** Everything of a site that refers to a photo, by its dotted path. */
const referencesOf = ({ trace, dimensions }: Pick<Site, 'trace' | 'dimensions'>) => [
  ...(trace ? [{ path: 'trace.photoId', photoId: trace.photoId }] : []),
  ...dimensions.flatMap(({ photo }, i) => (photo ? [{ path: `dimensions.${i}.photo.photoId`, photoId: photo.photoId }] : [])),
] // prettier-ignore

const keptSchema = siteSchema.pick({ trace: true, dimensions: true })

/**
 * The first reference to a photo that is none of the job's. What the site as it is kept refers to already is let be: its
 * photo may have been deleted for good. Null when there is nothing to refuse.
 */
export async function strangePhoto(tx: Transaction, jobId: string, site: Site): Promise<Refusal | null> {
  const references = referencesOf(site)
  if (references.length === 0) return null
  const asked = references.map(({ photoId }) => photoId)
  const found = await tx
    .select({ id: photos.id })
    .from(photos)
    .where(and(own(photos), eq(photos.jobId, jobId), inArray(photos.id, asked)))
  const known = new Set(found.map(({ id }) => id))
  const strange = references.filter(({ photoId }) => !known.has(photoId))
  if (strange.length === 0) return null
  const { body } = sites
  const [row] = await tx
    .select({ kept: sql`json_build_object('trace', ${body} -> 'trace', 'dimensions', ${body} -> 'dimensions')` })
    .from(sites)
    .where(and(own(sites), eq(sites.jobId, jobId)))
  for (const { photoId } of referencesOf(keptSchema.parse(row?.kept))) known.add(photoId)
  const first = strange.find(({ photoId }) => !known.has(photoId))
  return first ? { status: 400, error: 'No such photo of this job.', path: first.path } : null
}
