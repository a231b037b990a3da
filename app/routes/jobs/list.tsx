import { Form, Link, useSubmit } from 'react-router'
import { can } from '#app/domain/access/roles.ts'
import { stages, type Stage } from '#app/domain/job/stage.ts'
import { ButtonLink } from '#app/components/button.tsx'
import { ColdTerrace } from '#app/components/cold-terrace.tsx'
import { Icon } from '#app/components/icons.tsx'
import { PageFrame } from '#app/components/page-frame.tsx'
import { StageBar } from '#app/components/stage-bar.tsx'
import { When } from '#app/components/when.tsx'
import { listJobOverviews } from '#app/server/data/job-overviews.server.ts'
import { requireMay } from '#app/server/session.server.ts'
import { viewerOf } from '#app/server/viewer.server.ts'
import type { Route } from './+types/list'

export const meta: Route.MetaFunction = () => [{ title: 'Jobs · Inglefield' }]

export async function loader({ request, url }: Route.LoaderArgs) {
  const member = await requireMay(request, 'view')
  const all = await listJobOverviews(member)
  const search = (url.searchParams.get('q') ?? '').trim().slice(0, 100)
  const stage = stages.find((each) => each === url.searchParams.get('stage')) ?? null
  const found = all.filter(({ name, place, customer }) => contains([name, place, customer], search))
  return {
    viewer: viewerOf(member),
    mayCreate: can(member.role, 'create-job'),
    search,
    stage,
    none: all.length === 0,
    counts: stages.map((each) => ({ stage: each, count: found.filter((job) => job.stage === each).length })),
    found: found.length,
    jobs: stage ? found.filter((job) => job.stage === stage) : found,
  }
}

const contains = (texts: readonly string[], search: string) =>
  texts.some((text) => text.toLocaleLowerCase('en').includes(search.toLocaleLowerCase('en')))

export default function JobsPage({ loaderData }: Route.ComponentProps) {
  const { viewer, mayCreate, search, stage, none, jobs } = loaderData
  const enquiry = mayCreate && (
    <ButtonLink to="/jobs/new" kind="primary" icon="plus">
      Enquiry
    </ButtonLink>
  )
  if (none) return <NoJobs viewer={viewer} mayCreate={mayCreate} />
  return (
    <PageFrame
      viewer={viewer}
      tools={
        <>
          <Search search={search} stage={stage} />
          {enquiry}
        </>
      }
    >
      <header className="flex flex-wrap items-end justify-between gap-x-8 gap-y-2 pt-1 pb-3">
        <h1 className="text-xl font-strong">Jobs</h1>
        <StageLinks {...loaderData} />
      </header>
      <p
        aria-hidden="true"
        className="hidden gap-x-6 pb-1.5 text-2xs text-ink-3 desk:grid desk:grid-cols-[14rem_minmax(0,1fr)_18rem_7rem]"
      >
        <span>Job</span>
        <span>Variants</span>
        <span>Stage</span>
        <span>Changed</span>
      </p>
      <ol className="border-t border-rule" aria-label="Jobs, the one changed last first">
        {jobs.map((job) => (
          <JobRow key={job.id} job={job} />
        ))}
      </ol>
      {jobs.length === 0 && (
        <p className="py-8 text-base text-ink-2">
          No job fits.{' '}
          <Link to="/jobs" className="underline">
            Show all jobs
          </Link>
        </p>
      )}
    </PageFrame>
  )
}

type Loaded = Route.ComponentProps['loaderData']

function Search({ search, stage }: Pick<Loaded, 'search' | 'stage'>) {
  const submit = useSubmit()
  return (
    <Form
      role="search"
      action="/jobs"
      className="order-last w-full pb-2 tablet:order-none tablet:w-auto tablet:pb-0 wide-tablet:w-66"
      onChange={(event) => void submit(event.currentTarget, { replace: true })}
    >
      {stage && <input type="hidden" name="stage" value={stage} />}
      <label className="flex h-8 items-center gap-2 rounded-md border border-rule-strong bg-paper-raised px-2.5 has-[:focus-visible]:outline-2 has-[:focus-visible]:outline-offset-1 has-[:focus-visible]:outline-focus pointer-coarse:h-11">
        <Icon name="search" />
        <span className="sr-only">Search by job, place or customer</span>
        <input
          type="search"
          name="q"
          key={stage ?? 'all'}
          defaultValue={search}
          placeholder="Job, place or customer"
          className="min-w-0 flex-1 bg-transparent outline-none placeholder:text-ink-3"
        />
      </label>
    </Form>
  )
}

function StageLinks({ search, stage, counts, found }: Loaded) {
  const query = (wanted: Stage | null) => {
    const params = new URLSearchParams({ ...(search && { q: search }), ...(wanted && { stage: wanted }) })
    return `/jobs${params.size > 0 ? `?${params}` : ''}`
  }
  const entry = (wanted: Stage | null, label: string, count: number) => (
    <Link
      key={label}
      to={query(wanted)}
      aria-current={wanted === stage ? 'page' : undefined}
      className="flex-none border-b-2 border-transparent py-1 text-ink-2 hover:text-ink aria-[current]:border-ember aria-[current]:font-strong aria-[current]:text-ink pointer-coarse:py-3"
    >
      {label} <span className="ml-0.5 font-regular text-ink-3">{count}</span>
    </Link>
  )
  return (
    <nav aria-label="Stage" className="-mx-4 flex max-w-full gap-x-5 overflow-x-auto px-4">
      {entry(null, 'All', found)}
      {counts.map(({ stage: each, count }) => entry(each, capital(each), count))}
    </nav>
  )
}

const capital = (text: string) => text.charAt(0).toUpperCase() + text.slice(1)

type Job = Loaded['jobs'][number]

function JobRow({ job }: { job: Job }) {
  const seats = job.seats ? `${job.seats} ${job.seats === 1 ? 'seat' : 'seats'}` : 'no seats yet'
  return (
    <li className="grid gap-x-6 gap-y-3 border-b border-rule py-3.5 tablet:grid-cols-[14rem_minmax(0,1fr)] desk:grid-cols-[14rem_minmax(0,1fr)_18rem_7rem]">
      <div className="min-w-0 self-center">
        <h2 className="text-base font-strong">
          <Link to={`/jobs/${job.id}`} className="hover:underline pointer-coarse:inline-block pointer-coarse:py-2">
            {job.name}
          </Link>
        </h2>
        <p className="text-ink-2">{capital([job.kind, seats].filter(Boolean).join(', '))}</p>
        {job.customer && <p className="text-xs text-ink-3">{job.customer}</p>}
      </div>
      <Variants job={job} />
      <div className="self-center">
        <StageBar filled={stages.indexOf(job.stage) + 1} label={capital(job.stage)} />
        <p className="mt-1 text-ink-2">{openPoint(job)}</p>
      </div>
      <p className="self-center text-ink-2">
        <span className="text-ink-3 desk:sr-only">Changed </span>
        <When at={job.updatedAt} />
      </p>
    </li>
  )
}

function openPoint({ assumed, seats }: Job): string {
  if (seats === 0) return 'Seats to be placed'
  if (!assumed) return 'Nothing is assumed'
  return `${assumed} ${assumed === 1 ? 'answer' : 'answers'} assumed`
}

const shown = 3

function Variants({ job }: { job: Job }) {
  if (job.variants.length === 0) return <p className="self-center text-ink-3">No layout yet</p>
  const rest = job.variants.length - shown
  return (
    <ul className="flex flex-wrap items-end gap-x-3 gap-y-2">
      {job.variants.slice(0, shown).map(({ id, number, title, revision }) => (
        <li key={id} className="w-[min(10.25rem,44vw)]">
          <Link to={`/jobs/${job.id}/variants/${id}`} className="group block text-xs">
            <span className="flex h-19 items-center justify-center rounded-sm bg-dusk-ground">
              <img
                src={`/api/variants/${id}/thumbnail.svg?revision=${revision}`}
                alt=""
                loading="lazy"
                className="max-h-full max-w-full"
              />
            </span>
            <span className="mt-1 line-clamp-1 text-ink-2 group-hover:text-ink group-hover:underline">
              <span className="font-strong text-ink">{number}</span> {title}
            </span>
          </Link>
        </li>
      ))}
      {rest > 0 && (
        <li className="pb-6 text-xs text-ink-3">
          <Link to={`/jobs/${job.id}/variants`} className="underline">
            {rest} more
          </Link>
        </li>
      )}
    </ul>
  )
}

function NoJobs({ viewer, mayCreate }: Pick<Loaded, 'viewer' | 'mayCreate'>) {
  return (
    <PageFrame viewer={viewer}>
      <div className="mx-auto grid max-w-7xl items-center gap-10 px-4 pt-16 wide-tablet:grid-cols-[26rem_minmax(0,1fr)] wide-tablet:pt-40">
        <div>
          <h1 className="text-2xl font-strong">No jobs yet</h1>
          <p className="mt-3 text-base text-ink-2">
            A job starts with an enquiry: the place, the seats, the evening, the supply.
          </p>
          <p className="mt-2 text-base text-ink-2">Answers you do not have stay open and are marked as assumed.</p>
          {mayCreate && (
            <p className="mt-5">
              <ButtonLink to="/jobs/new" kind="primary" size="large" icon="plus">
                New enquiry
              </ButtonLink>
            </p>
          )}
        </div>
        <ColdTerrace />
      </div>
    </PageFrame>
  )
}
