import { data, redirect, useNavigation } from 'react-router'
import { can } from '#app/domain/access/roles.ts'
import { readRuleSet, typedRuleSet } from '#app/domain/rules/read-rule-set.ts'
import { bearings } from '#app/domain/rules/bearings.ts'
import type { Article } from '#app/domain/rules/rule-set.ts'
import { formatLength } from '#app/domain/units.ts'
import { ButtonLink } from '#app/components/button.tsx'
import { PageFrame } from '#app/components/page-frame.tsx'
import { DataTable, type Column } from '#app/components/table.tsx'
import { When } from '#app/components/when.tsx'
import { RuleSetConflict } from '#app/editor/rules/rule-set-conflict.tsx'
import { RuleSetForm } from '#app/editor/rules/rule-set-form.tsx'
import { findRuleSet, saveRuleSet, type RuleSetRevision } from '#app/server/data/rule-sets.server.ts'
import { readFields } from '#app/server/form-fields.server.ts'
import { isId, missing } from '#app/server/missing.server.ts'
import { typedFromFields } from '#app/server/rule-set-form.server.ts'
import { requireMay } from '#app/server/session.server.ts'
import { viewerOf } from '#app/server/viewer.server.ts'
import type { Route } from './+types/set'

export const meta: Route.MetaFunction = ({ loaderData }) => [
  { title: `${loaderData?.ruleSet.name ?? 'Rule set'} · Rules · Inglefield` },
]

export async function loader({ request, params }: Route.LoaderArgs) {
  const member = await requireMay(request, 'view')
  const found = await findRuleSet(member, params.setId)
  if (!found) throw missing(request, 'rule set')
  return { viewer: viewerOf(member), ...found, mayEdit: can(member.role, 'edit-rules') }
}

export async function action({ request, params }: Route.ActionArgs) {
  const member = await requireMay(request, 'edit-rules')
  const { revision = '', ...fields } = await readFields(request)
  const typed = typedFromFields(fields)
  const answer = { errors: {}, typed, revision: revision.slice(0, 9), meanwhile: null }
  const read = readRuleSet(typed)
  if ('errors' in read) return data({ ...answer, errors: read.errors }, 400)
  const kept = isId(params.setId) && (await saveRuleSet(member, params.setId, revisionOf(revision), read.ruleSet))
  if (!kept) throw missing(request, 'rule set')
  if (!('meanwhile' in kept)) return redirect(`/rules/sets/${params.setId}`)
  const { theirs, base, ...meanwhile } = kept.meanwhile
  const shown = { ...meanwhile, theirs: typedRuleSet(theirs), base: base && typedRuleSet(base) }
  return data({ ...answer, typed: typedRuleSet(read.ruleSet), meanwhile: shown }, 412)
}

/** The revision that a form was sent from; what is none is older than any. */
const revisionOf = (text: string): number => (/^\d{1,9}$/.test(text) ? Number(text) : 0)

const articleColumns: readonly Column<Article>[] = [
  { key: 'article', heading: 'Article', names: true, cell: ({ article }) => article },
  { key: 'rule', heading: 'Bears on', cell: ({ rule }) => bearings[rule].label },
  {
    key: 'figure',
    heading: 'Figure',
    cell: ({ figure, unit }) => (unit === 'm' ? formatLength(figure, 'metric', 'fine') : `${figure} ${unit}`),
  },
  { key: 'note', heading: 'Note', cell: ({ note }) => <span className="text-ink-2">{note}</span> },
  { key: 'source', heading: 'Its text was', cell: ({ source }) => <span className="text-ink-2">{source}</span> },
]

const revisionColumns: readonly Column<RuleSetRevision>[] = [
  { key: 'revision', heading: 'Revision', names: true, cell: ({ revision }) => revision },
  { key: 'when', heading: 'Kept', cell: ({ createdAt }) => <When at={createdAt} /> },
  { key: 'who', heading: 'By', cell: ({ author }) => author ?? 'An account that is gone' },
  { key: 'articles', heading: 'Articles', cell: ({ articles }) => articles },
]

const rowProps = () => ({ className: 'border-t border-rule [&>*]:py-2 [&>*]:align-top' })

export default function RuleSetPage({ loaderData, actionData }: Route.ComponentProps) {
  const { viewer, ruleSet, revisions, mayEdit } = loaderData
  const sending = useNavigation().state === 'submitting'
  const from = actionData?.revision ?? String(ruleSet.revision)
  return (
    <PageFrame viewer={viewer}>
      <div className="flex flex-wrap items-baseline gap-x-4 gap-y-1 pt-1">
        <h1 className="text-xl font-strong">
          {ruleSet.name}, {ruleSet.edition}
        </h1>
        {mayEdit && (
          <ButtonLink to={`/rules/sets/new?copy=${ruleSet.id}`} size="small">
            Duplicate
          </ButtonLink>
        )}
      </div>
      <p className="mt-0.5 mb-4 text-ink-2">
        Holds in {ruleSet.place}. Revision {ruleSet.revision}. A job keeps the revision that it chose until it chooses
        again.
      </p>
      {mayEdit ? (
        <>
          {actionData?.meanwhile && (
            <RuleSetConflict
              key={actionData.meanwhile.revision}
              mine={actionData.typed}
              meanwhile={actionData.meanwhile}
            />
          )}
          <fieldset disabled={Boolean(actionData?.meanwhile)} className="m-0 min-w-0 border-0 p-0">
            <RuleSetForm
              key={from}
              typed={actionData?.typed ?? typedRuleSet(ruleSet)}
              revision={from}
              errors={actionData?.errors ?? {}}
              sending={sending}
            />
          </fieldset>
        </>
      ) : (
        <section className="overflow-x-auto" tabIndex={0} aria-label="Articles">
          <DataTable
            caption="Articles"
            showCaption
            columns={articleColumns}
            rows={ruleSet.articles}
            rowKey={({ article, rule }) => `${article} ${rule}`}
            rowProps={rowProps}
          />
        </section>
      )}
      <section className="mt-8 overflow-x-auto" tabIndex={0} aria-label="Revisions">
        <DataTable
          caption="Revisions"
          showCaption
          columns={revisionColumns}
          rows={revisions}
          rowKey={({ revision }) => String(revision)}
          rowProps={rowProps}
        />
      </section>
    </PageFrame>
  )
}
