import { and, asc, eq, gt, isNull, or, sql } from 'drizzle-orm'
import type { Action } from '#app/domain/access/roles.ts'
import { photoMarksSchema, type PhotoMarks } from '#app/domain/photo/measurements.ts'
import type { OpenJob } from '#app/server/data/jobs.server.ts'
import { readHousedSite, type HousedSite } from '#app/server/data/sites.server.ts'
import { isId, missing } from '#app/server/missing.server.ts'
import { asOrganisation, own, type Transaction } from '#app/server/organisation.server.ts'
import type { Locked } from '#app/server/saving.server.ts'
import { requireMay, type Member } from '#app/server/session.server.ts'
import { photos } from '#drizzle/photo-schema.ts'

/** A photo of a job with what is marked in it; its picture is kept under its file key, which no page sees. */
export interface Photo {
  readonly id: string
  readonly jobId: string
  readonly name: string
  /** px. */
  readonly width: number
  readonly height: number
  readonly revision: number
  readonly marks: PhotoMarks
}

/** A photo that the person who asks may see, that person, and where its picture is kept. */
export interface OpenPhoto extends Photo {
  readonly fileKey: string
  readonly member: Member
}

/** Columns of a photo. */
export const photoColumns = {
  id: photos.id,
  jobId: photos.jobId,
  name: photos.name,
  width: photos.width,
  height: photos.height,
  revision: photos.revision,
  marks: photos.marks,
}

/** A deleted photo keeps its row for a week so that it can be brought back; then it is as if it never was. */
export const presentPhoto = isNull(photos.deletedAt)
export const restorablePhoto = or(presentPhoto, gt(photos.deletedAt, sql`now() - interval '7 days'`))

/** A row as the rest of the program knows it. */
export const photoOf = (row: Omit<Photo, 'marks'> & { marks: unknown }): Photo => ({
  ...row,
  marks: photoMarksSchema.parse(row.marks),
})

/** The photos of a job with their marks, oldest first. */
export const listPhotos = (job: OpenJob): Promise<Photo[]> =>
  asOrganisation(job.member.organisationId, (tx) => readPhotos(tx, job.id))

/** The photos of a job, and the site that is measured in them with what the house decided. */
export const listPhotosWithSite = (job: OpenJob): Promise<{ photos: Photo[]; kept: HousedSite }> =>
  asOrganisation(job.member.organisationId, async (tx) => ({
    photos: await readPhotos(tx, job.id),
    kept: await readHousedSite(tx, job.id),
  }))

async function readPhotos(tx: Transaction, jobId: string): Promise<Photo[]> {
  const rows = await tx
    .select(photoColumns)
    .from(photos)
    .where(and(own(photos), eq(photos.jobId, jobId), presentPhoto))
    .orderBy(asc(photos.createdAt), asc(photos.id))
  return rows.map(photoOf)
}

/**
 * The photo that a URL names, for a person who may do that to it. Throws 401, 403, or 404 when it is not a photo of the
 * person's organisation or was deleted; `deleted` lets those through that can be
 * brought back.
 */
export async function requirePhoto(
  request: Request,
  photoId: string | undefined,
  action: Action,
  deleted: 'refused' | 'let through' = 'refused',
): Promise<OpenPhoto> {
  const member = await requireMay(request, action)
  if (!isId(photoId)) throw missing(request, 'photo')
  const [row] = await asOrganisation(member.organisationId, (tx) =>
    tx
      .select({ ...photoColumns, fileKey: photos.fileKey })
      .from(photos)
      .where(and(own(photos), eq(photos.id, photoId), deleted === 'refused' ? presentPhoto : restorablePhoto)),
  )
  if (!row) throw missing(request, 'photo')
  const { fileKey, ...photo } = row
  return { ...photoOf(photo), fileKey, member }
}

/** A photo that is not deleted, locked until the transaction ends; null when there is none. */
export async function lockPhoto(tx: Transaction, id: string): Promise<(Locked & { readonly shown: Photo }) | null> {
  const [row] = await tx
    .select({ ...photoColumns, updatedBy: photos.updatedBy, updatedAt: photos.updatedAt })
    .from(photos)
    .where(and(own(photos), eq(photos.id, id), presentPhoto))
    .for('update')
  if (!row) return null
  const { updatedBy, updatedAt, ...shown } = row
  return { revision: row.revision, shown: photoOf(shown), updatedBy, updatedAt }
}
