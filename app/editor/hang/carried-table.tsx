import type { CarriedBy } from '#app/domain/layout/hang-sheet.ts'
import type { Site } from '#app/domain/site/site.ts'
import { OutcomeMark, type OutcomeWord } from '#app/components/outcome-mark.tsx'
import { DataTable, type Column } from '#app/components/table.tsx'
import { forceText, nameOf } from '#app/editor/hang/hang-words.ts'

const marks: Record<CarriedBy['outcome'], { mark: OutcomeWord; words: string }> = {
  allowed: { mark: 'pass', words: 'allowed' },
  over: { mark: 'fails', words: 'over what is allowed' },
  'not known': { mark: 'cannot tell', words: 'not known' },
}

function Outcome({ carried }: { carried: CarriedBy }) {
  const { mark, words } = marks[carried.outcome]
  return (
    <>
      <span className="mr-1.5 inline-block align-[-2px]">
        <OutcomeMark outcome={mark} />
      </span>
      {words}
      {carried.holdsAlone === false && ', but not all of a heater at one point'}
    </>
  )
}

/** What each member, wall and pole carries, against what it allows. */
export function CarriedTable({ carried, site }: { carried: readonly CarriedBy[]; site: Site }) {
  const units = site.displayUnits
  const force = (newtons: number) => forceText(newtons, units)
  const columns: readonly Column<CarriedBy>[] = [
    {
      key: 'name',
      heading: 'Support',
      names: true,
      cell: ({ name, kind }) => (name === kind ? name : `${name}, ${kind}`),
    },
    { key: 'heaters', heading: 'Heaters', cell: ({ heaterIds }) => heaterIds.join(', ') },
    { key: 'points', heading: 'Points', numeric: true, cell: ({ points }) => points },
    { key: 'largest', heading: 'Largest at a point', numeric: true, cell: ({ largest }) => force(largest) },
    { key: 'alone', heading: 'Should one let go', numeric: true, cell: ({ alone }) => force(alone) },
    { key: 'total', heading: 'Together', numeric: true, cell: ({ total }) => force(total) },
    {
      key: 'allowed',
      heading: 'Allowed per point',
      numeric: true,
      cell: ({ allowed }) => (allowed === null ? '–' : force(allowed)),
    },
    { key: 'outcome', heading: 'Outcome', cell: (row) => <Outcome carried={row} /> },
    { key: 'status', heading: 'Load status', cell: ({ status }) => <span className="text-ink-2">{status}</span> },
  ]
  const rails = carried.filter(({ passesOn }) => passesOn.length > 0)
  const moments = carried.filter(({ moment }) => moment > 0)
  return (
    <>
      <div className="overflow-x-auto print:overflow-visible" tabIndex={0} role="region" aria-label="Loads">
        <DataTable
          caption="Loads on supports"
          columns={columns}
          rows={carried}
          rowKey={({ id }) => id}
          empty="Nothing is hung yet."
        />
      </div>
      {rails.map(({ id, name, passesOn }) => (
        <p key={id} className="mt-1.5 text-ink-2">
          {name} passes on{' '}
          {passesOn
            .map(({ onId, load }) => `${force(load)} to ${onId ? nameOf(site, onId) : 'an end that rests on nothing'}`)
            .join(' and ')}
          , without its own weight. Its span and load are to be confirmed.
        </p>
      ))}
      {moments.length > 0 && (
        <p className="mt-1.5 text-ink-2">
          Standing off adds a moment: {moments.map(({ name, moment }) => `${name} ${moment.toFixed(1)} N·m`).join(', ')}{' '}
          for the heater that stands off the most, weight times distance, without wind.
        </p>
      )}
      <p className="mt-1.5 text-ink-2">
        By statics from the mass of each heater, without chains, cables and wind. A point is meant to hold a whole
        heater should the other let go (house rule; common practice, no source).
      </p>
    </>
  )
}
