import { useRef } from 'react'
import { largestError, nearestError, type TurningCheck, type TurningPoints } from '#app/domain/doubt/turning-points.ts'
import { OutcomeMark } from '#app/components/outcome-mark.tsx'
import { DataTable, type Column } from '#app/components/table.tsx'
import { ErrorStrip } from '#app/drawing/plot/error-strip.tsx'
import type { Outcome } from '#app/domain/rules/finding.ts'
import { pageInk } from '#app/editor/doubt/effects-list.tsx'
import { useSize } from '#app/editor/use-size.ts'
import { checkAt } from '#app/editor/doubt/wrong-by.tsx'

const order: readonly Outcome[] = ['fails', 'cannot tell', 'measure first', 'pass']
const isBetter = (from: Outcome, to: Outcome) => order.indexOf(to) > order.indexOf(from)

/** The turning points along all errors, with the present one. */
export function TurningStrip({ points, error }: { points: TurningPoints | null; error: number }) {
  const marks = (points?.checks ?? []).flatMap(({ check, from, shorter, longer, toShorter, toLonger }) =>
    [
      { key: `${check} shorter`, error: shorter, to: toShorter },
      { key: `${check} longer`, error: longer, to: toLonger },
    ].flatMap(({ key, error: at, to }) => (at === null || to === null ? [] : [{ key, error: at, good: isBetter(from, to) }])),
  ) // prettier-ignore
  const box = useRef<HTMLDivElement>(null)
  const { width } = useSize(box, { width: 600, height: 62 })
  return (
    <div ref={box} className="h-[62px] overflow-hidden">
      <ErrorStrip marks={marks} most={largestError} at={error} width={width} ink={pageInk} />
    </div>
  )
}

/** At which error each check turns, and the coldest seat; the soonest first. */
export function TurningTable({ points }: { points: TurningPoints }) {
  const columns: Column<TurningCheck>[] = [
    { key: 'check', heading: 'Check', names: true, cell: ({ finding }) => checkAt(finding), sortBy: ({ check }) => check }, // prettier-ignore
    { key: 'now', heading: 'Now', cell: ({ from }) => <Outcomes outcome={from} />, className: 'max-tablet:hidden' },
    {
      key: 'shorter',
      heading: 'If shorter',
      cell: ({ shorter, toShorter }) => <Turn error={shorter} to={toShorter} />,
      sortBy: ({ shorter }) => (shorter === null ? null : -shorter),
    },
    {
      key: 'longer',
      heading: 'If longer',
      cell: ({ longer, toLonger }) => <Turn error={longer} to={toLonger} />,
      sortBy: ({ longer }) => longer,
    },
  ]
  const { shorter, longer } = points.coldestTarget
  const leaves = [shorter, longer].flatMap((error) => (error === null ? [] : errorText(error)))
  return (
    <>
      <p className="mb-2">
        <span className="font-medium">Coldest seat: </span>
        {leaves.length === 0
          ? 'its place to the target band stays within ±15 %.'
          : `its place to the target band turns at ${leaves.join(' and ')}.`}
      </p>
      {points.checks.length > 0 && nearestError(points.checks[0] ?? points.coldestTarget) < Infinity ? (
        <DataTable
          caption="At which error each check turns"
          columns={columns}
          rows={points.checks}
          rowKey={({ check }) => check}
        />
      ) : (
        <p className="text-ink-2">No check turns within ±15 %.</p>
      )}
    </>
  )
}

const Outcomes = ({ outcome }: { outcome: Outcome }) => (
  <span className="inline-flex items-center gap-1.5 whitespace-nowrap">
    <OutcomeMark outcome={outcome} />
    {outcome}
  </span>
)

function Turn({ error, to }: { error: number | null; to: Outcome | null }) {
  if (error === null || to === null) return <span className="text-ink-3">–</span>
  return (
    <span className="inline-flex flex-wrap items-center gap-x-2">
      <span className="font-medium whitespace-nowrap">{errorText(error)}</span>
      <Outcomes outcome={to} />
    </span>
  )
}

const errorText = (error: number): string => `${error < 0 ? '−' : '+'}${(Math.abs(error) * 100).toFixed(1)} %`
