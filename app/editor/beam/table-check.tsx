import { mostFaults, type BeamTable } from '#app/domain/flux/beam-table.ts'
import { beamInWords } from '#app/domain/heaters/beam-in-words.ts'
import { OutcomeMark } from '#app/components/outcome-mark.tsx'
import { BeamFactsList } from '#app/editor/beam/beam-facts-list.tsx'

/** What is wrong with a typed table place by place, or what it comes to. */
export function TableCheck({ read }: { read: BeamTable }) {
  if ('beam' in read) {
    return (
      <section aria-label="What the table comes to" className="rounded-md border border-rule bg-paper-raised px-4 py-3">
        <h3 className="mb-1.5 font-strong first-letter:uppercase">{beamInWords(read.beam)}</h3>
        <BeamFactsList beam={read.beam} />
      </section>
    )
  }
  const { faults } = read
  return (
    <section aria-label="What is wrong with the table" className="rounded-md border border-clay bg-clay-wash px-4 py-3">
      <h3 className="flex items-center gap-2 font-strong text-clay">
        <OutcomeMark outcome="fails" />
        {faults.length === 1 ? 'One place is not right yet' : `${faults.length} places are not right yet`}
      </h3>
      <ul className="mt-1.5 max-h-64 space-y-0.5 overflow-y-auto" tabIndex={0}>
        {faults.map(({ row, column, error }) => (
          <li key={`${row} ${column} ${error}`}>
            Row {row}, column {column}: {error}
          </li>
        ))}
      </ul>
      {faults.length === mostFaults && <p className="mt-1.5 text-ink-2">The first {mostFaults}; there may be more.</p>}
    </section>
  )
}
