import { useMemo } from 'react'
import { Link } from 'react-router'
import { JobFrame } from '#app/components/page-frame.tsx'
import { DoubtfulSizes } from '#app/editor/doubt/doubtful-sizes.tsx'
import { requireJob } from '#app/server/data/jobs.server.ts'
import { requireLaidOut } from '#app/server/data/laid-out.server.ts'
import { viewerOf } from '#app/server/viewer.server.ts'
import type { Route } from './+types/sizes'

export const meta: Route.MetaFunction = ({ loaderData }) => [
  { title: `Measure these next · ${loaderData?.job.name ?? 'Job'} · Inglefield` },
]

export async function loader({ request, params }: Route.LoaderArgs) {
  const job = await requireJob(request, params.jobId, 'view')
  const { variant, site, brief, models, house } = await requireLaidOut(job, params.variantId)
  const used = new Set(variant.heaters.map(({ model }) => model))
  return {
    viewer: viewerOf(job.member),
    job: { id: job.id, name: job.name },
    variant: { id: variant.id, number: variant.number, title: variant.title, heaters: variant.heaters },
    site,
    brief,
    house,
    models: [...models.values()].filter(({ code }) => used.has(code)),
  }
}

export default function SizesPage({ loaderData }: Route.ComponentProps) {
  const { viewer, job, variant, site, brief, models, house } = loaderData
  const question = useMemo(
    () => ({
      site,
      brief,
      house,
      layout: { title: variant.title, heaters: variant.heaters },
      models: new Map(models.map((model) => [model.code, model])),
    }),
    [site, brief, variant, models, house],
  )
  const back = `/jobs/${job.id}/variants/${variant.id}`
  return (
    <JobFrame viewer={viewer} job={job} current="variants">
      <DoubtfulSizes
        key={variant.id}
        question={question}
        variant={
          <Link to={back} className="underline hover:text-ink pointer-coarse:py-3">
            {`Variant ${variant.number}, ${variant.title}`}
          </Link>
        }
        listTitle={`${job.name}: please measure these next`}
        photoLink={({ photoId, measurementId }) => (
          <Link
            to={`/jobs/${job.id}/photos/${photoId}?at=${measurementId}`}
            className="underline hover:text-ink pointer-coarse:py-3"
          >
            photo
          </Link>
        )}
      />
    </JobFrame>
  )
}
