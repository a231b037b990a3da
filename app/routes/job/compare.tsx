import { useMemo } from 'react'
import { Form, Link } from 'react-router'
import { can } from '#app/domain/access/roles.ts'
import { askFor, fewestCompared, mostCompared } from '#app/domain/comparison/chosen-variants.ts'
import { Button, ButtonLink, buttonClass } from '#app/components/button.tsx'
import { Icon } from '#app/components/icons.tsx'
import { JobFrame } from '#app/components/page-frame.tsx'
import { Comparison } from '#app/editor/compare/comparison.tsx'
import { findCompared } from '#app/server/data/compared.server.ts'
import { requireJob } from '#app/server/data/jobs.server.ts'
import { viewerOf } from '#app/server/viewer.server.ts'
import type { Route } from './+types/compare'

export const meta: Route.MetaFunction = ({ loaderData }) => [
  { title: `Compare · ${loaderData?.job.name ?? 'Job'} · Inglefield` },
]

export async function loader({ request, params, url }: Route.LoaderArgs) {
  const job = await requireJob(request, params.jobId, 'view')
  return {
    viewer: viewerOf(job.member),
    job: { id: job.id, name: job.name },
    mayExport: can(job.member.role, 'export'),
    ...(await findCompared(job, url.searchParams.get('variants'))),
  }
}

type Loaded = Route.ComponentProps['loaderData']

export default function ComparePage({ loaderData }: Route.ComponentProps) {
  const { viewer, job, site, brief, models, house, chosen, all, mayExport } = loaderData
  const linked = useMemo(
    () =>
      chosen.map((variant) => ({
        ...variant,
        link: (
          <Link to={`/jobs/${job.id}/variants/${variant.id}`} className="hover:underline">
            {variant.title}
          </Link>
        ),
      })),
    [chosen, job.id],
  )
  const numbers = chosen.map(({ number }) => number)
  if (chosen.length === 0) return <TooFew {...loaderData} />
  const picture = (ending: string) => `/jobs/${job.id}/compare.${ending}?${askFor(numbers)}`
  const tools = mayExport && (
    <>
      <a href={picture('svg')} download className={buttonClass('outline')}>
        SVG
      </a>
      <a href={picture('png')} download className={buttonClass('primary')}>
        <Icon name="download" />
        Picture
      </a>
    </>
  )
  return (
    <JobFrame viewer={viewer} job={job} current="compare" tools={tools}>
      <Comparison
        key={numbers.join()}
        site={site}
        brief={brief}
        models={models}
        house={house}
        chosen={linked}
        picker={<VariantPicker job={job} chosen={chosen} all={all} />}
      />
    </JobFrame>
  )
}

function TooFew({ viewer, job, all }: Loaded) {
  return (
    <JobFrame viewer={viewer} job={job} current="compare">
      <div className="mx-auto max-w-xl pt-24 text-base">
        <h1 className="text-2xl font-strong">Nothing to compare yet</h1>
        <p className="mt-3 text-ink-2">
          {all.length === 0 ? 'This job has no variant.' : 'This job has one variant.'} A comparison shows two to four
          side by side on one scale.
        </p>
        <p className="mt-5">
          <ButtonLink to={`/jobs/${job.id}/variants`} kind="primary" size="large">
            To the variants
          </ButtonLink>
        </p>
      </div>
    </JobFrame>
  )
}

/** Which variants are compared: a form that works as an address. */
function VariantPicker({ job, chosen, all }: Pick<Loaded, 'job' | 'chosen' | 'all'>) {
  const numbers = chosen.map(({ number }) => number)
  const address = (wanted: readonly number[]) => `/jobs/${job.id}/compare?${askFor(wanted)}`
  return (
    <details className="relative print:hidden">
      <summary className={`${buttonClass()} list-none [&::-webkit-details-marker]:hidden`}>
        <Icon name="plus" />
        Variant
      </summary>
      <div className="absolute right-0 z-30 mt-1 w-80 rounded-md border border-rule bg-paper-raised p-3 shadow-lift">
        <p className="pb-1.5 text-xs text-ink-2">Two to four variants of this job</p>
        <ul>
          {all.map(({ number, title }) => {
            const here = numbers.includes(number)
            const next = here ? numbers.filter((each) => each !== number) : [...numbers, number]
            const stuck = next.length < fewestCompared || next.length > mostCompared
            const words = (
              <>
                <span className="inline-flex size-4 flex-none items-center justify-center rounded-sm border border-rule-strong">
                  {here && <Icon name="tick" size={13} />}
                </span>
                <span className="font-strong">{number}</span>
                <span className="min-w-0 flex-1 truncate">{title}</span>
              </>
            )
            const look = 'flex min-h-8 items-center gap-2 rounded-md px-1.5 pointer-coarse:min-h-11'
            return (
              <li key={number}>
                {stuck ? (
                  <span className={`${look} text-ink-3`}>{words}</span>
                ) : (
                  <Link
                    to={address(next)}
                    preventScrollReset
                    aria-label={`${here ? 'Take out' : 'Add'} variant ${number}, ${title}`}
                    className={`${look} hover:bg-paper-sunk`}
                  >
                    {words}
                  </Link>
                )}
              </li>
            )
          })}
        </ul>
        <Form action={`/jobs/${job.id}/compare`} className="mt-2 flex items-end gap-2 border-t border-rule pt-2">
          <label className="flex-1 text-2xs text-ink-2">
            In this order
            <input
              name="variants"
              defaultValue={numbers.join(',')}
              key={numbers.join()}
              className="mt-0.5 block h-8 w-full rounded-md border border-rule-strong bg-paper-raised px-2 text-sm text-ink"
            />
          </label>
          <Button type="submit">Show</Button>
        </Form>
      </div>
    </details>
  )
}
