import { Link } from 'react-router'
import { bearings } from '#app/domain/rules/bearings.ts'
import type { ChosenRuleSet } from '#app/domain/rules/rule-set.ts'
import { fixedRuleRows, houseRuleRows, tradeRules, type RuleRow } from '#app/domain/rules/rules-in-words.ts'
import { can } from '#app/domain/access/roles.ts'
import { ButtonLink } from '#app/components/button.tsx'
import { PageFrame } from '#app/components/page-frame.tsx'
import { DataTable, type Column } from '#app/components/table.tsx'
import { findRules } from '#app/server/data/rule-sets.server.ts'
import { requireMay } from '#app/server/session.server.ts'
import { viewerOf } from '#app/server/viewer.server.ts'
import type { Route } from './+types/list'

export const meta: Route.MetaFunction = () => [{ title: 'Rules · Inglefield' }]

export async function loader({ request }: Route.LoaderArgs) {
  const member = await requireMay(request, 'view')
  return {
    viewer: viewerOf(member),
    ...(await findRules(member)),
    mayEdit: can(member.role, 'edit-rules'),
  }
}

const columns: readonly Column<RuleRow>[] = [
  { key: 'name', heading: 'Rule', names: true, cell: ({ name }) => name },
  { key: 'figure', heading: 'Figure', cell: ({ figure }) => figure },
  { key: 'meaning', heading: 'What it is for', cell: ({ meaning }) => <span className="text-ink-2">{meaning}</span> },
  { key: 'source', heading: 'Source', cell: ({ source }) => <span className="text-ink-2">{source}</span> },
]

const rowProps = () => ({ className: 'border-t border-rule [&>*]:py-2 [&>*]:align-top' })

function Rules({ caption, rows }: { caption: string; rows: readonly RuleRow[] }) {
  return (
    <section className="mt-6 overflow-x-auto" tabIndex={0} aria-label={caption}>
      <DataTable
        caption={caption}
        showCaption
        columns={columns}
        rows={rows}
        rowKey={({ name }) => name}
        rowProps={rowProps}
      />
    </section>
  )
}

const setColumns: readonly Column<ChosenRuleSet>[] = [
  {
    key: 'name',
    heading: 'Rule set',
    names: true,
    cell: ({ id, name }) => (
      <Link
        to={`/rules/sets/${id}`}
        className="inline-flex min-h-6 items-center font-medium underline pointer-coarse:min-h-11"
      >
        {name}
      </Link>
    ),
  },
  { key: 'edition', heading: 'Edition', cell: ({ edition }) => edition },
  { key: 'place', heading: 'Place', cell: ({ place }) => <span className="text-ink-2">{place}</span> },
  {
    key: 'articles',
    heading: 'Bears on',
    cell: ({ articles }) => (
      <span className="text-ink-2">
        {[...new Set(articles.map(({ rule }) => bearings[rule].label))].join(', ') || 'No articles yet'}
      </span>
    ),
  },
  { key: 'revision', heading: 'Revision', cell: ({ revision }) => revision },
]

export default function RulesPage({ loaderData: { viewer, ruleSets, house, mayEdit } }: Route.ComponentProps) {
  return (
    <PageFrame viewer={viewer}>
      <h1 className="pt-1 text-xl font-strong">Rules</h1>
      <p className="mt-0.5 max-w-2xl text-ink-2">
        Clearances, heights and tilt come from the manual of each model and stand in Heaters. A rule set holds the
        articles of a place in one edition; a job chooses one in its brief. House rules hold where no manual and no rule
        set gives the figure. A figure never approves: a licensed electrician, the structure’s engineer and the fire
        authority do.
      </p>
      <section className="mt-6 overflow-x-auto" tabIndex={0} aria-label="Rule sets">
        <div className="mb-1 flex items-baseline justify-between gap-4">
          <h2 className="text-sm font-strong">Rule sets</h2>
          {mayEdit && (
            <ButtonLink to="/rules/sets/new" size="small" icon="plus">
              Rule set
            </ButtonLink>
          )}
        </div>
        {ruleSets.length === 0 ? (
          <p className="border-t border-rule py-2 text-ink-2">
            No rule set yet. Until a job chooses one, what depends on it is not checked.
          </p>
        ) : (
          <DataTable
            caption="Rule sets by place and edition"
            columns={setColumns}
            rows={ruleSets}
            rowKey={({ id }) => id}
            rowProps={rowProps}
          />
        )}
      </section>
      <div className="mt-8 flex flex-wrap items-baseline gap-x-4 gap-y-1">
        <h2 className="flex-1 text-lg font-strong">House rules</h2>
        <ButtonLink to="/rules/house" size="small">
          {mayEdit ? 'Change house rules' : 'Ranges and defaults'}
        </ButtonLink>
        <ButtonLink to="/rules/hanging" size="small">
          Hanging data: chain, rods and fittings
        </ButtonLink>
      </div>
      {houseRuleRows(house.rules).map(({ group, rows }) => (
        <Rules key={group} caption={group} rows={rows} />
      ))}
      <h2 className="mt-8 text-lg font-strong">Fixed</h2>
      <p className="max-w-2xl text-ink-2">
        Published figures, and rules without a figure to choose: no organisation changes these here.
      </p>
      <Rules caption="Not for a house to change" rows={fixedRuleRows} />
      <Rules caption="Practice of the trade" rows={tradeRules} />
    </PageFrame>
  )
}
