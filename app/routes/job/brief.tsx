import { useState } from 'react'
import { can } from '#app/domain/access/roles.ts'
import { briefSchema, type Brief } from '#app/domain/brief/brief.ts'
import type { BriefField } from '#app/domain/brief/brief-field.ts'
import { assumptionOf, briefFields, eveningFields, guestFields } from '#app/domain/brief/brief-fields.ts'
import { energyFields } from '#app/domain/brief/energy-fields.ts'
import { supplyFields } from '#app/domain/brief/supply-fields.ts'
import type { ChosenRuleSet } from '#app/domain/rules/rule-set.ts'
import type { DisplayUnits } from '#app/domain/units.ts'
import { Button } from '#app/components/button.tsx'
import { ConflictPanel } from '#app/components/conflict-panel.tsx'
import { CheckField, SelectField, TextAreaField, TextField } from '#app/components/field.tsx'
import { JobFrame } from '#app/components/page-frame.tsx'
import { SaveAndUndo } from '#app/components/save-and-undo.tsx'
import { changedWords, statusOf } from '#app/editor/save-status.ts'
import { RuleSetChoice } from '#app/editor/rules/rule-set-choice.tsx'
import { useDocument } from '#app/editor/use-document.ts'
import { findBriefPage } from '#app/server/data/briefs.server.ts'
import { requireJob } from '#app/server/data/jobs.server.ts'
import { viewerOf } from '#app/server/viewer.server.ts'
import type { Route } from './+types/brief'

export const meta: Route.MetaFunction = ({ loaderData }) => [
  { title: `Brief · ${loaderData?.job.name ?? 'Job'} · Inglefield` },
]

export async function loader({ request, params }: Route.LoaderArgs) {
  const job = await requireJob(request, params.jobId, 'view')
  const { revision, brief, units, ruleSets } = await findBriefPage(job)
  return {
    viewer: viewerOf(job.member),
    job: { id: job.id, name: job.name, customer: job.customer },
    kept: { revision, body: brief },
    units,
    ruleSets,
    readOnly: !can(job.member.role, 'edit-brief'),
  }
}

/** The page saves by itself; what it loaded stays until it is opened again. */
export const shouldRevalidate = () => false

const sections = [
  { title: 'The evening', fields: eveningFields },
  { title: 'The guests', fields: guestFields },
  { title: 'The supply', fields: supplyFields },
  { title: 'The cost', fields: energyFields },
]

export default function BriefPage({ loaderData }: Route.ComponentProps) {
  const { viewer, job } = loaderData
  return <BriefForm key={job.id} {...loaderData} viewer={viewer} />
}

type Loaded = Route.ComponentProps['loaderData']

function BriefForm({ viewer, job, kept, units, ruleSets, readOnly }: Loaded) {
  const [{ history, save }, document] = useDocument<Brief>(kept, {
    url: `/api/jobs/${job.id}/brief`,
    name: 'brief',
    schema: briefSchema,
  })
  const brief = history.present
  const confirm = (name: string, known: boolean) =>
    document.change((old) => ({
      ...old,
      assumed: known ? old.assumed.filter((each) => each !== name) : [...new Set([...old.assumed, name])],
    }))
  const write = (field: BriefField, text: string) => {
    const written = field.write(brief, text, units)
    if ('error' in written) return written.error
    document.change((old) => {
      const next = field.write(old, text, units)
      if ('error' in next || field.show(next.brief, units) === field.show(old, units)) return old
      return { ...next.brief, assumed: next.brief.assumed.filter((each) => each !== field.name) }
    })
    return null
  }
  const tools = (
    <SaveAndUndo
      status={readOnly ? { kind: 'read-only', why: 'You read this brief' } : statusOf(save, false)}
      onRetry={document.retry}
      history={readOnly ? null : history}
      onUndo={document.undo}
      onRedo={document.redo}
    />
  )
  return (
    <JobFrame viewer={viewer} job={job} current="brief" tools={tools}>
      <div className="mx-auto grid max-w-6xl gap-x-10 gap-y-6 desk:grid-cols-[minmax(0,1fr)_18rem]">
        <div>
          <h1 className="text-xl font-strong">Brief</h1>
          <p className="mt-0.5 mb-4 text-ink-2">{job.customer || 'No customer named'}</p>
          {save.kind === 'conflict' && (
            <ConflictPanel
              {...changedWords(save.conflict)}
              rows={differing(brief, save.conflict.theirs.body, units, save.conflict.base)}
              onSettle={(taken) => document.settle(merged(brief, save.conflict.theirs.body, taken, units))}
            />
          )}
          {sections.map(({ title, fields }) => (
            <section key={title} className="border-t border-rule pt-3 pb-6">
              <h2 className="text-sm font-strong">{title}</h2>
              <div className="mt-2 grid gap-x-5 gap-y-3.5 tablet:grid-cols-2 wide-tablet:grid-cols-3">
                {fields.map((field) => (
                  <Question
                    key={`${field.name} ${field.show(brief, units)}`}
                    field={field}
                    shown={field.show(brief, units)}
                    units={units}
                    assumed={brief.assumed.includes(field.name)}
                    readOnly={readOnly}
                    onWrite={(text) => write(field, text)}
                    onKnown={(known) => confirm(field.name, known)}
                  />
                ))}
              </div>
            </section>
          ))}
          <section className="border-t border-rule pt-3 pb-6">
            <h2 className="text-sm font-strong">The rules of the place</h2>
            <RuleSetChoice
              chosen={brief.ruleSet ?? null}
              ruleSets={ruleSets}
              readOnly={readOnly}
              onChoose={(ruleSet) => document.change((old) => withRuleSet(old, ruleSet))}
            />
          </section>
        </div>
        <Assumptions brief={brief} units={units} readOnly={readOnly} onConfirm={(name) => confirm(name, true)} />
      </div>
    </JobFrame>
  )
}

const withRuleSet = (brief: Brief, ruleSet: ChosenRuleSet | null): Brief => ({
  ...brief,
  ruleSet: ruleSet ?? undefined,
})

interface QuestionProps {
  field: BriefField
  shown: string
  units: DisplayUnits
  assumed: boolean
  readOnly: boolean
  onWrite: (text: string) => string | null
  onKnown: (known: boolean) => void
}

function Question({ field, shown, units, assumed, readOnly, onWrite, onKnown }: QuestionProps) {
  const [typed, setTyped] = useState(shown)
  const [error, setError] = useState<string | null>(null)
  const commit = (text: string) => setError(text === shown ? null : onWrite(text))
  const was = error && shown ? `${error} Was ${shown}.` : error
  const shared = {
    label: field.label,
    hint: field.hint,
    error: was,
    aside: assumed ? <span className="font-medium text-amber">assumed</span> : undefined,
    disabled: readOnly,
    value: typed,
    onBlur: () => commit(typed),
  }
  return (
    <div className={field.long ? 'tablet:col-span-2' : ''}>
      {field.options ? (
        <SelectField
          {...shared}
          options={shown === '' ? [{ value: '', label: 'Another system' }, ...field.options] : field.options}
          onChange={(event) => {
            setTyped(event.target.value)
            commit(event.target.value)
          }}
        />
      ) : field.long ? (
        <TextAreaField {...shared} onChange={(event) => setTyped(event.target.value)} />
      ) : (
        <TextField
          {...shared}
          unit={field.unit(units)}
          onChange={(event) => setTyped(event.target.value)}
          onKeyDown={(event) => event.key === 'Enter' && commit(typed)}
        />
      )}
      {!readOnly && !field.long && field.name !== 'place' && (
        <CheckField
          className="mt-0.5 text-xs text-ink-2"
          checked={assumed}
          onChange={(event) => onKnown(!event.target.checked)}
          label={
            <>
              Don’t know<span className="sr-only"> {field.label}</span>
            </>
          }
        />
      )}
    </div>
  )
}

interface AssumptionsProps {
  brief: Brief
  units: DisplayUnits
  readOnly: boolean
  onConfirm: (name: string) => void
}

function Assumptions({ brief, units, readOnly, onConfirm }: AssumptionsProps) {
  return (
    <aside aria-labelledby="assumptions" className="desk:sticky desk:top-4 desk:self-start">
      <h2 id="assumptions" className="border-t border-ink pt-2 text-sm font-strong">
        Assumed {brief.assumed.length > 0 && <span className="font-regular text-ink-3">{brief.assumed.length}</span>}
      </h2>
      <p className="mt-0.5 mb-1 text-xs text-ink-2">
        {brief.assumed.length === 0
          ? 'Every answer is known.'
          : 'Nobody knows these yet. They stay on every output until they are confirmed.'}
      </p>
      <ul>
        {brief.assumed.map((name) => (
          <li key={name} className="flex items-center justify-between gap-3 border-t border-rule py-1.5">
            <span>{assumptionOf(brief, name, units)}</span>
            {!readOnly && (
              <Button size="small" onClick={() => onConfirm(name)}>
                Confirm<span className="sr-only"> {assumptionOf(brief, name, units)}</span>
              </Button>
            )}
          </li>
        ))}
      </ul>
    </aside>
  )
}

const differing = (mine: Brief, theirs: Brief, units: DisplayUnits, base: Brief | null = null) => [
  ...differingRuleSet(mine, theirs, base),
  ...briefFields.flatMap((field) => {
    const [left, right] = [field.show(mine, units), field.show(theirs, units)]
    if (left === right) return []
    const unit = field.unit(units)
    const told = (text: string) => `${text} ${unit}`.trim()
    const theirsAlone = base !== null && field.show(base, units) === left
    return [{ key: field.name, label: field.label, mine: told(left), theirs: told(right), theirsAlone }]
  }),
]

const ruleSetWords = ({ ruleSet }: Brief): string =>
  ruleSet ? `${ruleSet.name}, ${ruleSet.edition}, revision ${ruleSet.revision}` : 'No rule set'

function differingRuleSet(mine: Brief, theirs: Brief, base: Brief | null) {
  const [left, right] = [ruleSetWords(mine), ruleSetWords(theirs)]
  if (left === right) return []
  return [
    {
      key: 'ruleSet',
      label: 'Rule set',
      mine: left,
      theirs: right,
      theirsAlone: base !== null && ruleSetWords(base) === left,
    },
  ]
}

/** The server's brief with the answers of this page, but for the fields where the server's is taken. */
function merged(mine: Brief, theirs: Brief, taken: ReadonlySet<string>, units: DisplayUnits): Brief {
  let brief = theirs
  for (const { key } of differing(mine, theirs, units)) {
    if (key === 'ruleSet' && !taken.has(key)) brief = withRuleSet(brief, mine.ruleSet ?? null)
    const field = briefFields.find(({ name }) => name === key)
    if (!field || taken.has(key)) continue
    const written = field.write(brief, field.show(mine, units), units)
    if ('brief' in written) brief = written.brief
  }
  return brief
}
