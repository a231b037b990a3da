import { Link, useSearchParams } from 'react-router'
import { can } from '#app/domain/access/roles.ts'
import { addPhotoSize, replaceByPhotoSize, traceOf } from '#app/domain/photo/into-site.ts'
import { photoMarksSchema, type PhotoMarks } from '#app/domain/photo/measurements.ts'
import { siteSchema, type Site } from '#app/domain/site/site.ts'
import { ConflictPanel } from '#app/components/conflict-panel.tsx'
import { JobFrame } from '#app/components/page-frame.tsx'
import { SaveAndUndo } from '#app/components/save-and-undo.tsx'
import { useToast } from '#app/components/toast.tsx'
import type { DocumentState } from '#app/editor/document.ts'
import { PhotoEditor } from '#app/editor/photo/photo-editor.tsx'
import type { SizeUse } from '#app/editor/photo/use-as-size.tsx'
import { mergedSite, siteDifferences } from '#app/editor/site/site-conflict.ts'
import { changedWords, statusOf } from '#app/editor/save-status.ts'
import { useDocument } from '#app/editor/use-document.ts'
import { requireJob } from '#app/server/data/jobs.server.ts'
import { listPhotosWithSite } from '#app/server/data/photos.server.ts'
import { missing } from '#app/server/missing.server.ts'
import { viewerOf } from '#app/server/viewer.server.ts'
import type { Route } from './+types/photo'

export const meta: Route.MetaFunction = ({ loaderData }) => [
  { title: `${loaderData?.photo.name ?? 'Photo'} · ${loaderData?.job.name ?? 'Job'} · Inglefield` },
]

export async function loader({ request, params }: Route.LoaderArgs) {
  const job = await requireJob(request, params.jobId, 'view')
  const { photos, kept } = await listPhotosWithSite(job)
  const found = photos.find(({ id }) => id === params.photoId)
  if (!found) throw missing(request, 'photo')
  const { id, name, width, height } = found
  return {
    viewer: viewerOf(job.member),
    job: { id: job.id, name: job.name },
    photo: { id, name, width, height },
    kept: { revision: found.revision, body: found.marks },
    others: photos.filter((photo) => photo.id !== id).map((photo) => ({ id: photo.id, marks: photo.marks })),
    rules: kept.house.rules,
    keptSite: { revision: kept.revision, body: kept.site },
    readOnly: !can(job.member.role, 'edit-site'),
  }
}

/** The page saves by itself; what it loaded stays until it is opened again. */
export const shouldRevalidate = () => false

export default function PhotoPage({ loaderData }: Route.ComponentProps) {
  return <Measuring key={loaderData.photo.id} {...loaderData} />
}

function Measuring({
  viewer,
  job,
  photo,
  kept,
  others,
  rules,
  keptSite,
  readOnly,
}: Route.ComponentProps['loaderData']) {
  const [marking, marks] = useDocument<PhotoMarks>(kept, {
    url: `/api/photos/${photo.id}`,
    name: 'marks',
    schema: photoMarksSchema,
  })
  const [siting, siteDocument] = useDocument<Site>(keptSite, {
    url: `/api/jobs/${job.id}/site`,
    name: 'site',
    schema: siteSchema,
  })
  const [search] = useSearchParams()
  const toast = useToast()
  const site = siting.history.present
  const undoSite = { label: 'Undo', run: siteDocument.undo }

  const use: SizeUse['onUse'] = ({ measurementId, ...size }, replaces) => {
    const whole = { ...size, photo: { photoId: photo.id, measurementId } }
    const next = replaces === null ? addPhotoSize(site, whole) : replaceByPhotoSize(site, replaces, whole)
    if (!next) return toast({ text: 'The site cannot be like that. The size stays as it was.' })
    siteDocument.change(() => next)
    toast({ text: `${size.label} is among the site’s sizes`, action: undoSite })
  }
  const { history, save } = marking
  const siteSaved = siting.save.kind === 'saved'
  const tools = (
    <SaveAndUndo
      status={
        readOnly
          ? { kind: 'read-only', why: 'You read this photo' }
          : siteSaved
            ? statusOf(save, false)
            : statusOf(siting.save, false)
      }
      onRetry={siteSaved ? marks.retry : siteDocument.retry}
      history={readOnly ? null : history}
      onUndo={marks.undo}
      onRedo={marks.redo}
    />
  )
  return (
    <JobFrame viewer={viewer} job={job} current="site" tools={tools}>
      <header className="flex flex-wrap items-baseline gap-x-4 pb-1">
        <h1 className="text-xl font-strong">{photo.name}</h1>
        <p className="text-ink-2">
          {photo.width} × {photo.height} px
        </p>
        <span className="flex-1" />
        <Link to={`/jobs/${job.id}/photos`} className="underline pointer-coarse:py-3">
          All photos
        </Link>
        <Link to={`/jobs/${job.id}/site`} className="underline pointer-coarse:py-3">
          Site
        </Link>
      </header>
      {save.kind === 'conflict' && (
        <ConflictPanel
          {...changedWords(save.conflict)}
          rows={[marksRow(history.present, save.conflict.theirs.body)]}
          onSettle={(taken) => marks.settle(taken.size > 0 ? save.conflict.theirs.body : history.present)}
        />
      )}
      <SiteConflict siting={siting} onSettle={siteDocument.settle} />
      <PhotoEditor
        photo={photo}
        picture={`/api/photos/${photo.id}/picture.jpg`}
        marks={history.present}
        others={others}
        site={site}
        rules={rules}
        readOnly={readOnly}
        opened={search.get('at')}
        onChange={marks.change}
        onUndo={marks.undo}
        onRedo={marks.redo}
        onUse={use}
        onTrace={({ length, origin, turnDeg }, [from, to]) => {
          if (!from || !to) return
          const trace = traceOf({ photoId: photo.id, height: photo.height, from, to, length, origin, turnDeg })
          if ('error' in trace) return toast({ text: trace.error })
          siteDocument.change((old) => ({ ...old, trace }))
          toast({ text: 'The picture lies under the site’s plan', action: undoSite })
        }}
        onUntrace={() => {
          siteDocument.change((old) => ({ ...old, trace: null }))
          toast({ text: 'The picture is no longer under the plan', action: undoSite })
        }}
      />
    </JobFrame>
  )
}

interface SiteConflictProps {
  readonly siting: DocumentState<Site>
  readonly onSettle: (site: Site) => void
}

/** The site was changed elsewhere while a size or a trace went into it. */
function SiteConflict({ siting: { history, save }, onSettle }: SiteConflictProps) {
  if (save.kind !== 'conflict') return null
  const { theirs, base } = save.conflict
  return (
    <ConflictPanel
      {...changedWords(save.conflict)}
      rows={siteDifferences(history.present, theirs.body, base)}
      onSettle={(taken) => onSettle(mergedSite(history.present, theirs.body, taken))}
    />
  )
}

const marksRow = (mine: PhotoMarks, theirs: PhotoMarks) => ({
  key: 'marks',
  label: 'Marks',
  mine: marksWords(mine),
  theirs: marksWords(theirs),
})

function marksWords({ planes, measurements }: PhotoMarks): string {
  return `${planes.length} ${planes.length === 1 ? 'plane' : 'planes'}, ${measurements.length} ${measurements.length === 1 ? 'measurement' : 'measurements'}`
}
