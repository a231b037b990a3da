import { randomUUID } from 'node:crypto'
import { and, count, eq, sql } from 'drizzle-orm'
import { noMarks, type PhotoMarks } from '#app/domain/photo/measurements.ts'
import { mostPhotos } from '#app/domain/photo/photo-limits.ts'
import { outsideOf } from '#app/domain/photo/mark-places.ts'
import type { Answer, Refusal } from '#app/server/answers.server.ts'
import { recordEvent } from '#app/server/audit.server.ts'
import { touchJob, type OpenJob } from '#app/server/data/jobs.server.ts'
import {
  lockPhoto,
  photoColumns,
  photoOf,
  presentPhoto,
  restorablePhoto,
  type OpenPhoto,
  type Photo,
} from '#app/server/data/photos.server.ts'
import { asOrganisation, own, type Transaction } from '#app/server/organisation.server.ts'
import { files } from '#app/server/outside/storage.server.ts'
import { smallKey } from '#app/server/photo-files.server.ts'
import type { SentPhoto } from '#app/server/photo-upload.server.ts'
import { answerOnce, gone, saveRevision, staleness, type Revisioned, type Save } from '#app/server/saving.server.ts'
import { photos } from '#drizzle/photo-schema.ts'
import { jobs } from '#drizzle/schema.ts'

/** Locks a job, so that its photos are counted once at a time. */
async function countPhotos(tx: Transaction, jobId: string): Promise<number> {
  await tx
    .select({ id: jobs.id })
    .from(jobs)
    .where(and(own(jobs), eq(jobs.id, jobId)))
    .for('update')
  const [kept] = await tx
    .select({ photos: count() })
    .from(photos)
    .where(and(own(photos), eq(photos.jobId, jobId), presentPhoto))
  return kept?.photos ?? 0
}

const full: Refusal = {
  status: 422,
  error: `A job has at most ${mostPhotos} photos. Remove one first.`,
  path: 'photo',
}

/** Adds a photo to a job once per key: its picture first, then its row. Refused (422) when the job is full. */
export function addPhoto({ id: jobId, member }: OpenJob, sent: SentPhoto): Promise<Answer | Refusal> {
  const asked = { member, resource: `jobs/${jobId}/photos`, key: sent.key, bodyHash: sent.bodyHash }
  return asOrganisation(member.organisationId, (tx) =>
    answerOnce(tx, asked, async () => {
      if ((await countPhotos(tx, jobId)) >= mostPhotos) return full
      const { organisationId, userId: updatedBy } = member
      const { width, height, bytes, small } = sent.picture
      const id = randomUUID()
      const fileKey = `photos/${organisationId}/${id}.jpg`
      try {
        await files.keep(fileKey, bytes, 'image/jpeg')
        await files.keep(smallKey(fileKey), small, 'image/jpeg')
        const [row] = await tx
          .insert(photos)
          .values({
            organisationId,
            id,
            jobId,
            name: sent.name,
            width,
            height,
            fileKey,
            revision: 1,
            marks: noMarks,
            updatedBy,
          })
          .returning(photoColumns)
        if (!row) throw new Error('The new photo was not returned.')
        await touchJob(tx, jobId)
        await recordEvent(tx, member, { action: 'photo added', subject: `photos/${id}`, detail: { width, height } })
        return { status: 201, body: photoOf(row), revision: 1 }
      } catch (problem) {
        await dropFiles(fileKey)
        throw problem
      }
    }),
  )
}

/** Takes away the files of a photo that was not added after all; what the store does not take away stays. */
async function dropFiles(fileKey: string): Promise<void> {
  const removed = await Promise.allSettled([fileKey, smallKey(fileKey)].map((key) => files.remove(key)))
  for (const each of removed) if (each.status === 'rejected') console.error(`${fileKey} is still kept:`, each.reason)
}

const marksOf = ({ id, jobId, member }: OpenPhoto): Revisioned<PhotoMarks> => ({
  resource: `photos/${id}`,
  saved: 'photo marks saved',
  lock: async (tx) => lockPhoto(tx, id),
  write: async (tx, revision, marks) => {
    const [row] = await tx
      .update(photos)
      .set({ revision, marks, updatedAt: new Date(), updatedBy: member.userId })
      .where(and(own(photos), eq(photos.id, id)))
      .returning(photoColumns)
    if (!row) throw new Error('The photo was not returned.')
    await touchJob(tx, jobId)
    return photoOf(row)
  },
})

/** Saves what is marked in a photo by the one rule for saving; a mark outside the picture is refused (400). */
export const saveMarks = (photo: OpenPhoto, save: Save<PhotoMarks>): Promise<Answer | Refusal> =>
  saveRevision(photo.member, marksOf(photo), save, () => {
    const outside = outsideOf(save.body, photo)
    if (!outside) return Promise.resolve(save.body)
    return Promise.resolve({ status: 400, ...outside })
  })

/** Deletes a photo that still is at the expected revision. It can be brought back for a week. */
export function deletePhoto({ id, jobId, member }: OpenPhoto, expected: number | null): Promise<Answer | Refusal> {
  return asOrganisation(member.organisationId, async (tx) => {
    const kept = await lockPhoto(tx, id)
    if (!kept) return gone('photo')
    const stale = await staleness(expected, kept)
    if (stale) return stale
    await tx
      .update(photos)
      .set({ deletedAt: sql`now()` })
      .where(and(own(photos), eq(photos.id, id)))
    await touchJob(tx, jobId)
    await recordEvent(tx, member, { action: 'photo deleted', subject: `photos/${id}` })
    return { status: 200, body: { id, revision: kept.revision, deleted: true }, revision: kept.revision }
  })
}

async function bringBack(tx: Transaction, { id, jobId, member }: OpenPhoto): Promise<Answer | Refusal> {
  const answer = (photo: Photo): Answer => ({ status: 200, body: photo, revision: photo.revision })
  const kept = await lockPhoto(tx, id)
  if (kept) return answer(kept.shown)
  if ((await countPhotos(tx, jobId)) >= mostPhotos) return full
  const [row] = await tx
    .update(photos)
    .set({ deletedAt: null })
    .where(and(own(photos), eq(photos.id, id), restorablePhoto))
    .returning(photoColumns)
  if (!row) return gone('photo')
  await touchJob(tx, jobId)
  await recordEvent(tx, member, { action: 'photo brought back', subject: `photos/${id}` })
  return answer(photoOf(row))
}

/** Brings a photo that was deleted within the week back as it was, once per key. */
export const undeletePhoto = (photo: OpenPhoto, { key, bodyHash }: Save<unknown>): Promise<Answer | Refusal> =>
  asOrganisation(photo.member.organisationId, (tx) =>
    answerOnce(tx, { member: photo.member, resource: `photos/${photo.id}`, key, bodyHash }, () => bringBack(tx, photo)),
  )
