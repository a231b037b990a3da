import { useState } from 'react'
import { can } from '#app/domain/access/roles.ts'
import { siteSchema, type Site } from '#app/domain/site/site.ts'
import type { Vec2 } from '#app/domain/vector.ts'
import { Button, IconButton } from '#app/components/button.tsx'
import { Choice } from '#app/components/choice.tsx'
import { ConflictPanel } from '#app/components/conflict-panel.tsx'
import { JobFrame } from '#app/components/page-frame.tsx'
import { SaveState } from '#app/components/status.tsx'
import { useToast } from '#app/components/toast.tsx'
import { useDark } from '#app/components/use-dark.ts'
import {
  chosenAfterClick,
  chosenWords,
  moveChosen,
  removeChosen,
  stillThere,
  type Chosen,
} from '#app/editor/site/chosen.ts'
import { MemberFields } from '#app/editor/site/member-fields.tsx'
import { middleOf, withMemberAt, withSeatAt } from '#app/editor/site/new-things.ts'
import { SeatFields } from '#app/editor/site/seat-fields.tsx'
import { mergedSite, siteDifferences } from '#app/editor/site/site-conflict.ts'
import { SitePlan } from '#app/editor/site/site-plan.tsx'
import { SiteTables } from '#app/editor/site/site-panel.tsx'
import type { KeyAction } from '#app/editor/tools/keys.ts'
import { changedWords, statusOf } from '#app/editor/save-status.ts'
import { useDocument } from '#app/editor/use-document.ts'
import { requireJob } from '#app/server/data/jobs.server.ts'
import { findSite } from '#app/server/data/sites.server.ts'
import { viewerOf } from '#app/server/viewer.server.ts'
import type { Route } from './+types/site'

export const meta: Route.MetaFunction = ({ loaderData }) => [
  { title: `Site · ${loaderData?.job.name ?? 'Job'} · Inglefield` },
]

export async function loader({ request, params }: Route.LoaderArgs) {
  const job = await requireJob(request, params.jobId, 'view')
  const { revision, site } = await findSite(job)
  return {
    viewer: viewerOf(job.member),
    job: { id: job.id, name: job.name },
    kept: { revision, body: site },
    readOnly: !can(job.member.role, 'edit-site'),
  }
}

/** The page saves by itself; what it loaded stays until it is opened again. */
export const shouldRevalidate = () => false

export default function SitePage({ loaderData }: Route.ComponentProps) {
  return <SiteEditor key={loaderData.job.id} {...loaderData} />
}

type Loaded = Route.ComponentProps['loaderData']
type Adding = 'seat' | 'member' | null

function SiteEditor({ viewer, job, kept, readOnly }: Loaded) {
  const [{ history, save }, document] = useDocument<Site>(kept, {
    url: `/api/jobs/${job.id}/site`,
    name: 'site',
    schema: siteSchema,
  })
  const site = history.present
  const [wanted, setChosen] = useState<Chosen | null>(null)
  const chosen = stillThere(site, wanted)
  const [adding, setAdding] = useState<Adding>(null)
  const toast = useToast()
  const dark = useDark()

  const remove = (what: Chosen) => {
    const words = chosenWords(site, what)
    document.change((old) => removeChosen(old, what))
    setChosen(null)
    toast({ text: `${words} removed`, action: { label: 'Undo', run: document.undo } })
  }
  const add = (kind: 'seat' | 'member', at: Vec2) => {
    const made = kind === 'seat' ? withSeatAt(site, at) : withMemberAt(site, at)
    document.change(() => made.site)
    setChosen(kind === 'seat' ? { kind, ids: [made.id] } : { kind, id: made.id })
  }
  const key = (action: KeyAction): boolean => {
    if (action.kind === 'let go') {
      setAdding(null)
      setChosen(null)
      return true
    }
    if (action.kind === 'undo' || action.kind === 'redo') document[action.kind]()
    else if (readOnly) return false
    else if (action.kind === 'select all') setChosen({ kind: 'seat', ids: site.seats.map(({ id }) => id) })
    else if (!chosen) return false
    else if (action.kind === 'nudge') document.change((old) => moveChosen(old, chosen, action.dx, action.dy))
    else if (action.kind === 'remove') remove(chosen)
    else return false
    return true
  }
  const member = chosen?.kind === 'member' ? site.members.find(({ id }) => id === chosen.id) : undefined

  const tools = (
    <>
      <SaveState
        status={readOnly ? { kind: 'read-only', why: 'You read this site' } : statusOf(save, false)}
        onRetry={document.retry}
      />
      {!readOnly && (
        <span className="flex">
          <IconButton icon="undo" label="Undo" disabled={history.past.length === 0} onClick={document.undo} />
          <IconButton icon="redo" label="Redo" disabled={history.future.length === 0} onClick={document.redo} />
        </span>
      )}
    </>
  )
  return (
    <JobFrame viewer={viewer} job={job} current="site" tools={tools}>
      <header className="flex flex-wrap items-center gap-x-4 gap-y-2 pb-3">
        <h1 className="text-xl font-strong">Site</h1>
        <p className="min-w-0 flex-1 text-ink-2">{siteWords(site)}</p>
        {!readOnly && (
          <Choice
            label="Units"
            value={site.displayUnits}
            options={[
              { value: 'metric', label: 'm' },
              { value: 'imperial', label: 'ft in' },
            ]}
            onChange={(displayUnits) => document.change((old) => ({ ...old, displayUnits }))}
          />
        )}
        {!readOnly && <AddButtons adding={adding} onAdding={setAdding} />}
      </header>
      {save.kind === 'conflict' && (
        <ConflictPanel
          {...changedWords(save.conflict)}
          rows={siteDifferences(site, save.conflict.theirs.body, save.conflict.base)}
          onSettle={(taken) => document.settle(mergedSite(site, save.conflict.theirs.body, taken))}
        />
      )}
      <div className="grid items-start gap-x-6 gap-y-5 *:min-w-0 wide:grid-cols-[minmax(0,1fr)_36rem]">
        <div className="min-w-0 wide:sticky wide:top-4">
          <SitePlan
            site={site}
            theme={dark ? 'dusk' : 'day'}
            chosen={chosen}
            readOnly={readOnly}
            adding={adding}
            onChoose={setChosen}
            onMove={(what, dx, dy) => document.change((old) => moveChosen(old, what, dx, dy))}
            onAdd={(at) => adding && add(adding, at)}
            onKey={key}
          />
          <p className="mt-1.5 text-xs text-ink-3">{site.axes}. Drag or use the arrows, 10 mm each, Shift 100 mm.</p>
        </div>
        <div className="min-w-0 space-y-4">
          {chosen?.kind === 'seat' && (
            <SeatFields
              site={site}
              ids={chosen.ids}
              readOnly={readOnly}
              onChange={document.change}
              onRemove={() => remove(chosen)}
            />
          )}
          {member && chosen && (
            <MemberFields
              site={site}
              member={member}
              readOnly={readOnly}
              onChange={document.change}
              onRemove={() => remove(chosen)}
            />
          )}
          <SiteTables
            site={site}
            chosen={chosen}
            readOnly={readOnly}
            onChange={document.change}
            onChoose={(what, shift) => setChosen(chosenAfterClick(chosen, what, shift))}
            onAdd={(kind) => add(kind, middleOf(site))}
          />
        </div>
      </div>
    </JobFrame>
  )
}

function siteWords(site: Site): string {
  const counted = (count: number, one: string, many = `${one}s`) => `${count} ${count === 1 ? one : many}`
  const parts = [site.kind, counted(site.seats.length, 'seat'), counted(site.members.length, 'member')]
  return parts.filter(Boolean).join(', ')
}

function AddButtons({ adding, onAdding }: { adding: Adding; onAdding: (adding: Adding) => void }) {
  const button = (kind: 'seat' | 'member', label: string) => (
    <Button
      icon="plus"
      aria-pressed={adding === kind}
      className="aria-pressed:border-ink aria-pressed:bg-ink aria-pressed:text-paper-raised"
      onClick={() => onAdding(adding === kind ? null : kind)}
    >
      {label}
    </Button>
  )
  return (
    <p className="flex items-center gap-2">
      {button('seat', 'Seats')}
      {button('member', 'Members')}
      {adding && <span role="status">Click the floor for each; Escape ends it</span>}
    </p>
  )
}
