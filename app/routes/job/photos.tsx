import { Link, useRevalidator } from 'react-router'
import { z } from 'zod'
import { can } from '#app/domain/access/roles.ts'
import { mostPhotos } from '#app/domain/photo/photo-limits.ts'
import { IconButton } from '#app/components/button.tsx'
import { JobFrame } from '#app/components/page-frame.tsx'
import { useToast } from '#app/components/toast.tsx'
import { AddPhotos } from '#app/editor/photo/add-photos.tsx'
import type { SendPhoto } from '#app/editor/photo/use-photo-uploads.ts'
import { requireJob } from '#app/server/data/jobs.server.ts'
import { listPhotos } from '#app/server/data/photos.server.ts'
import { viewerOf } from '#app/server/viewer.server.ts'
import type { Route } from './+types/photos'

export const meta: Route.MetaFunction = ({ loaderData }) => [
  { title: `Photos · ${loaderData?.job.name ?? 'Job'} · Inglefield` },
]

export async function loader({ request, params }: Route.LoaderArgs) {
  const job = await requireJob(request, params.jobId, 'view')
  const photos = await listPhotos(job)
  return {
    viewer: viewerOf(job.member),
    job: { id: job.id, name: job.name },
    photos: photos.map(({ id, name, width, height, revision, marks }) => ({
      id,
      name,
      width,
      height,
      revision,
      planes: marks.planes.length,
      measurements: marks.measurements.map(({ label }) => label),
    })),
    readOnly: !can(job.member.role, 'edit-site'),
  }
}

const refusalSchema = z.object({ error: z.string() })

/** Sends a photo of a job and says what became of it. */
const sender =
  (jobId: string): SendPhoto =>
  async (file, key, signal) => {
    const form = new FormData()
    form.append('photo', file)
    const headers = { 'Idempotency-Key': key }
    try {
      const response = await fetch(`/api/jobs/${jobId}/photos`, { method: 'POST', headers, body: form, signal })
      if (response.ok) return { kind: 'kept' }
      return { kind: 'refused', reason: refusalSchema.parse(await response.json()).error }
    } catch {
      return { kind: 'refused', reason: signal.aborted ? 'Stopped.' : 'No connection. Send it again.' }
    }
  }

export default function PhotosPage({ loaderData }: Route.ComponentProps) {
  const { viewer, job, photos, readOnly } = loaderData
  const { revalidate } = useRevalidator()
  const again = () => void revalidate()
  return (
    <JobFrame viewer={viewer} job={job} current="site">
      <header className="flex flex-wrap items-baseline gap-x-4 pb-3">
        <h1 className="text-xl font-strong">Photos</h1>
        <p className="min-w-0 flex-1 text-ink-2">
          {photos.length} of at most {mostPhotos}. Lengths and heights are measured in them.
        </p>
        <Link to={`/jobs/${job.id}/site`} className="underline pointer-coarse:py-3">
          Site
        </Link>
      </header>
      {!readOnly && <AddPhotos count={photos.length} send={sender(job.id)} onDone={again} />}
      {photos.length === 0 && (
        <p className="mt-6 text-base text-ink-2">
          No photos yet. One with a rectangle of known size in it, such as a door, is enough to measure.
        </p>
      )}
      <ul className="mt-5 grid grid-cols-1 gap-x-5 gap-y-6 phone:grid-cols-2 wide-tablet:grid-cols-3 desk:grid-cols-4">
        {photos.map((photo) => (
          <PhotoCard key={photo.id} jobId={job.id} photo={photo} readOnly={readOnly} onChanged={again} />
        ))}
      </ul>
    </JobFrame>
  )
}

interface CardProps {
  readonly jobId: string
  readonly photo: Route.ComponentProps['loaderData']['photos'][number]
  readonly readOnly: boolean
  readonly onChanged: () => void
}

function PhotoCard({ jobId, photo, readOnly, onChanged }: CardProps) {
  const { id, name, width, height, revision, planes, measurements } = photo
  const toast = useToast()
  const change = async (method: string, path: string, headers: Record<string, string>, body?: string) => {
    const answer = await fetch(path, { method, headers, body: body ?? null }).catch(() => null)
    onChanged()
    return answer?.ok === true
  }
  const bringBack = () =>
    change('POST', `/api/photos/${id}/restore`, { 'Idempotency-Key': crypto.randomUUID() }, '{"deleted":true}')
  const remove = async () => {
    const removed = await change('DELETE', `/api/photos/${id}`, { 'If-Match': `"${revision}"` })
    if (removed) toast({ text: `${name} removed`, action: { label: 'Undo', run: () => void bringBack() } })
    else toast({ text: `${name} was changed meanwhile and stays. Look at it again.` })
  }
  return (
    <li>
      <Link to={`/jobs/${jobId}/photos/${id}`} className="block">
        <img
          src={`/api/photos/${id}/picture.jpg?small`}
          alt=""
          width={width}
          height={height}
          loading="lazy"
          className="aspect-4/3 w-full rounded-md border border-rule bg-paper-sunk object-cover"
        />
        <span className="mt-1.5 block font-medium underline decoration-rule-strong underline-offset-2">{name}</span>
      </Link>
      <p className="flex items-start justify-between gap-2 text-xs text-ink-2">
        <span className="py-1">
          {planes === 0
            ? 'Nothing is marked yet'
            : `${planes} ${planes === 1 ? 'plane' : 'planes'}${measurements.length > 0 ? `; measured: ${measurements.join(', ')}` : ''}`}
        </span>
        {!readOnly && <IconButton icon="remove" label={`Remove ${name}`} onClick={() => void remove()} />}
      </p>
    </li>
  )
}
