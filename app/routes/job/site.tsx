import { useState } from 'react'
import { z } from 'zod'
import { Link } from 'react-router'
import { can } from '#app/domain/access/roles.ts'
import { siteSchema, type Site } from '#app/domain/site/site.ts'
import { Button } from '#app/components/button.tsx'
import { Choice } from '#app/components/choice.tsx'
import { ConflictPanel } from '#app/components/conflict-panel.tsx'
import { JobFrame } from '#app/components/page-frame.tsx'
import { SaveAndUndo } from '#app/components/save-and-undo.tsx'
import { useDark } from '#app/components/use-dark.ts'
import { changedWords, statusOf } from '#app/editor/save-status.ts'
import { CopyForm, type OtherJob } from '#app/editor/site/copy-form.tsx'
import { SiteEditingProvider } from '#app/editor/site/editing.ts'
import { mergedSite, siteDifferences } from '#app/editor/site/site-conflict.ts'
import { SiteEditor } from '#app/editor/site/site-editor.tsx'
import { TemplateForm } from '#app/editor/site/template-form.tsx'
import { useDocument } from '#app/editor/use-document.ts'
import { requireJob } from '#app/server/data/jobs.server.ts'
import { findHousedSite } from '#app/server/data/sites.server.ts'
import { viewerOf } from '#app/server/viewer.server.ts'
import type { Route } from './+types/site'

export const meta: Route.MetaFunction = ({ loaderData }) => [
  { title: `Site · ${loaderData?.job.name ?? 'Job'} · Inglefield` },
]

export async function loader({ request, params }: Route.LoaderArgs) {
  const job = await requireJob(request, params.jobId, 'view')
  const { revision, site, house } = await findHousedSite(job)
  return {
    viewer: viewerOf(job.member),
    job: { id: job.id, name: job.name },
    kept: { revision, body: site },
    rules: house.rules,
    readOnly: !can(job.member.role, 'edit-site'),
  }
}

/** The page saves by itself; what it loaded stays until it is opened again. */
export const shouldRevalidate = () => false

export default function SitePage({ loaderData }: Route.ComponentProps) {
  return <SiteOfJob key={loaderData.job.id} {...loaderData} />
}

const jobsSchema = z.object({ jobs: z.array(z.object({ id: z.string(), name: z.string() })) })
const keptSchema = z.object({ site: siteSchema })

async function readJson<T>(url: string, schema: z.ZodType<T>): Promise<T | null> {
  try {
    const response = await fetch(url)
    return response.ok ? schema.parse(await response.json()) : null
  } catch {
    return null
  }
}

const findSiteOf = async (jobId: string): Promise<Site | null> =>
  (await readJson(`/api/jobs/${jobId}/site`, keptSchema))?.site ?? null

/** Nothing is drawn on the site but its floor. */
const isBare = (site: Site): boolean =>
  [site.covers, site.members, site.walls, site.poles, site.obstacles, site.tables, site.seats].every(
    (things) => things.length === 0,
  )

type Loaded = Route.ComponentProps['loaderData']
type Opened = { kind: 'template' } | { kind: 'copy'; jobs: readonly OtherJob[] } | null

function SiteOfJob({ viewer, job, kept, rules, readOnly }: Loaded) {
  const [{ history, save }, document] = useDocument<Site>(kept, {
    url: `/api/jobs/${job.id}/site`,
    name: 'site',
    schema: siteSchema,
  })
  const site = history.present
  const [sizes, setSizes] = useState(false)
  const [opened, setOpened] = useState<Opened>(() => (isBare(site) && !readOnly ? { kind: 'template' } : null))
  const dark = useDark()
  const openCopy = async () => {
    const found = await readJson('/api/jobs', jobsSchema)
    setOpened({ kind: 'copy', jobs: (found?.jobs ?? []).filter(({ id }) => id !== job.id) })
  }

  const tools = (
    <SaveAndUndo
      status={readOnly ? { kind: 'read-only', why: 'You read this site' } : statusOf(save, false)}
      onRetry={document.retry}
      history={readOnly ? null : history}
      onUndo={document.undo}
      onRedo={document.redo}
    />
  )
  return (
    <JobFrame viewer={viewer} job={job} current="site" tools={tools}>
      <header className="flex flex-wrap items-center gap-x-3 gap-y-2 pb-3">
        <h1 className="text-xl font-strong">Site</h1>
        <p className="w-full min-w-0 text-ink-2 max-tablet:order-last tablet:w-auto tablet:flex-1">{siteWords(site)}</p>
        <Button
          aria-pressed={sizes}
          className="aria-pressed:border-ink aria-pressed:bg-ink aria-pressed:text-paper-raised"
          onClick={() => setSizes(!sizes)}
        >
          Sizes
        </Button>
        <Link to={`/jobs/${job.id}/photos`} className="underline pointer-coarse:py-3">
          Photos
        </Link>
        {!readOnly && (
          <>
            <Choice
              label="Units"
              value={site.displayUnits}
              options={[
                { value: 'metric', label: 'm' },
                { value: 'imperial', label: 'ft in' },
              ]}
              onChange={(displayUnits) => document.change((old) => ({ ...old, displayUnits }))}
            />
            <Button onClick={() => setOpened({ kind: 'template' })}>Start anew</Button>
            <Button icon="copy" onClick={() => void openCopy()}>
              From another job
            </Button>
          </>
        )}
      </header>
      {save.kind === 'conflict' && (
        <ConflictPanel
          {...changedWords(save.conflict)}
          rows={siteDifferences(site, save.conflict.theirs.body, save.conflict.base)}
          onSettle={(taken) => document.settle(mergedSite(site, save.conflict.theirs.body, taken))}
        />
      )}
      {opened && (
        <SiteEditingProvider value={{ site, rules, readOnly, change: document.change }}>
          {opened.kind === 'template' ? (
            <TemplateForm onDone={() => setOpened(null)} />
          ) : (
            <CopyForm jobs={opened.jobs} findSite={findSiteOf} onDone={() => setOpened(null)} />
          )}
        </SiteEditingProvider>
      )}
      <SiteEditor {...{ site, rules, document, readOnly, sizes }} theme={dark ? 'dusk' : 'day'} />
    </JobFrame>
  )
}

function siteWords(site: Site): string {
  const counted = (count: number, one: string, many = `${one}s`) => `${count} ${count === 1 ? one : many}`
  const parts = [site.kind, counted(site.seats.length, 'seat'), counted(site.members.length, 'member')]
  return parts.filter(Boolean).join(', ')
}
