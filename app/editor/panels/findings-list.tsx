import { useState, type ReactNode } from 'react'
import type { Finding, Outcome } from '#app/domain/rules/finding.ts'
import { formatLength, type DisplayUnits } from '#app/domain/units.ts'
import { OutcomeMark } from '#app/components/outcome-mark.tsx'
import { groupFindings, summaryOf, tightestPasses, type FindingGroup } from '#app/domain/rules/finding-groups.ts'
import { fluxFigure, noFigure, signedFigure } from '#app/editor/figures.ts'
import type { FluxUnit } from '#app/editor/view-choice.ts'

const words: Record<Outcome, string> = {
  fails: 'Fails',
  'cannot tell': 'Cannot tell',
  'measure first': 'Measure first',
  pass: 'Pass',
}
const colours: Record<Outcome, string> = {
  fails: 'text-clay',
  'cannot tell': 'text-slate',
  'measure first': 'text-amber',
  pass: 'text-moss',
}

/** Checks that pass shown before the rest is folded. */
const passesShown = 2

interface FindingsListProps {
  readonly findings: readonly Finding[]
  readonly units: DisplayUnits
  readonly fluxUnit: FluxUnit
  /** Shows on the drawings what a finding is about, its nearest pair with it. */
  readonly onPoint: (finding: Finding) => void
  /** The finding that the drawings show; null: none. */
  readonly chosen: Finding | null
  /** What may be done at once about a finding; null: nothing. */
  readonly actionsFor?: (finding: Finding) => ReactNode
}

/** What was checked: failing first, each rule once with its tightest margin, tolerance, limit and source. */
export function FindingsList({ findings, units, fluxUnit, chosen, onPoint, actionsFor }: FindingsListProps) {
  const [unfolded, setUnfolded] = useState(false)
  const groups = groupFindings(findings)
  const others = groups.filter(({ worst }) => worst.outcome !== 'pass')
  const passes = tightestPasses(groups)
  const isChosen = ({ worst, others: elsewhere }: FindingGroup) =>
    chosen !== null && [worst, ...elsewhere].includes(chosen)
  const shown = [...others, ...passes.filter((group, i) => unfolded || i < passesShown || isChosen(group))]
  const folded = groups.length - shown.length
  return (
    <section aria-labelledby="findings-title" className="border-t border-rule px-4.5 py-3.5">
      <header className="mb-2 flex items-baseline gap-2.5">
        <h2 id="findings-title" tabIndex={-1} className="text-sm font-strong">
          Findings
        </h2>
        <p className="text-ink-2">{summaryOf(groups)}</p>
      </header>
      <ul>
        {shown.map(({ key, worst, others: elsewhere }) => (
          <li key={key} className="border-t border-rule">
            <FindingRow finding={worst} {...{ units, fluxUnit, chosen, onPoint }} />
            {actionsFor?.(worst)}
            {elsewhere.length > 0 && (
              <Others
                others={elsewhere}
                {...{ worst, units, fluxUnit, chosen, onPoint }}
                {...(actionsFor ? { actionsFor } : {})}
              />
            )}
          </li>
        ))}
      </ul>
      {(folded > 0 || unfolded) && (
        <button
          type="button"
          onClick={() => setUnfolded(!unfolded)}
          aria-expanded={unfolded}
          className="min-h-8 w-full border-t border-rule pl-6 text-left text-ink-2 hover:text-ink pointer-coarse:min-h-11"
        >
          {unfolded ? 'Fewer' : `${folded} more pass`}
        </button>
      )}
    </section>
  )
}

interface OthersProps extends FindingsListProps {
  readonly worst: Finding
  readonly others: readonly Finding[]
}

/** The same finding elsewhere, folded. */
function Others({ worst, others, units, fluxUnit, chosen, onPoint, actionsFor }: Omit<OthersProps, 'findings'>) {
  const kind = worst.subject.kind === 'seat' ? 'seat' : 'heater'
  return (
    <details className="pb-1 pl-6" open={chosen !== null && others.includes(chosen) ? true : undefined}>
      <summary className="min-h-6 cursor-pointer text-2xs text-ink-2 hover:text-ink pointer-coarse:min-h-11">
        {others.length} more {others.length === 1 ? kind : `${kind}s`}
      </summary>
      <ul className="flex flex-wrap gap-x-3">
        {others.map((finding, i) => (
          <li key={`${finding.subject.id} ${i}`} className={actionsFor?.(finding) ? 'w-full' : ''}>
            <button
              type="button"
              ref={finding === chosen ? showRow : undefined}
              onClick={() => onPoint(finding)}
              aria-pressed={finding === chosen}
              title={finding.title}
              className={`min-h-6 cursor-pointer text-2xs hover:underline pointer-coarse:min-h-11 ${finding === chosen ? 'font-strong text-ink underline' : 'text-ink-2'}`}
            >
              {finding.subject.id} {finding.margin === null ? '' : marginText(finding, units, fluxUnit)}
            </button>
            {actionsFor?.(finding)}
          </li>
        ))}
      </ul>
    </details>
  )
}

interface FindingRowProps extends Omit<FindingsListProps, 'findings' | 'actionsFor'> {
  readonly finding: Finding
}

/** A row that has just been chosen comes into view, wherever it was chosen. */
const showRow = (row: HTMLElement | null) => row?.scrollIntoView({ block: 'nearest' })

function FindingRow({ finding, units, fluxUnit, chosen, onPoint }: FindingRowProps) {
  const figure = (value: number | null) => findingFigure(value, finding.unit, units, fluxUnit)
  const limits =
    finding.value === null || finding.limit === null
      ? figure(finding.value)
      : `${figure(finding.value)} of ${figure(finding.limit)}`
  const tolerance = finding.tolerance ? `, ± ${figure(finding.tolerance)}` : ''
  return (
    <button
      type="button"
      ref={finding === chosen ? showRow : undefined}
      onClick={() => onPoint(finding)}
      aria-pressed={finding === chosen}
      className={`grid w-full cursor-pointer grid-cols-[14px_1fr_auto] gap-x-2 py-1.5 text-left hover:bg-paper-sunk ${finding === chosen ? 'bg-paper-sunk' : ''}`}
    >
      <span className="pt-0.5">
        <OutcomeMark outcome={finding.outcome} />
      </span>
      <span>
        <span className={`mr-2 text-2xs font-strong ${colours[finding.outcome]}`}>{words[finding.outcome]}</span>
        {finding.title}
      </span>
      <span className="text-right font-medium whitespace-nowrap">{marginText(finding, units, fluxUnit)}</span>
      <span className="col-span-2 col-start-2 flex justify-between gap-2.5 text-2xs text-ink-3">
        <span className="line-clamp-2">
          {finding.source}
          {finding.condition ? `. When ${finding.condition}` : ''}
        </span>
        <span className="text-right whitespace-nowrap">
          {limits}
          {tolerance}
        </span>
      </span>
      {finding.remedy && finding.outcome !== 'pass' && (
        <span className="col-span-2 col-start-2 text-2xs text-ink-2">{finding.remedy}</span>
      )}
    </button>
  )
}

function marginText(finding: Finding, units: DisplayUnits, fluxUnit: FluxUnit): string {
  if (finding.margin === null) return noFigure
  const figure = findingFigure(finding.margin, finding.unit, units, fluxUnit)
  const unit =
    finding.unit === 'W/m²'
      ? ` ${fluxUnit}`
      : finding.unit === 'V' || finding.unit === 'N' || finding.unit === 'N·m'
        ? ` ${finding.unit}`
        : ''
  return `${figure}${unit}`
}

/** A figure of a finding in the person's unit; lengths say their unit themselves. */
function findingFigure(value: number | null, unit: Finding['unit'], units: DisplayUnits, fluxUnit: FluxUnit): string {
  if (value === null) return noFigure
  switch (unit) {
    case 'm':
      return units === 'metric' ? `${signedFigure(value * 1000, 0)} mm` : formatLength(value, units)
    case 'W/m²':
      return fluxFigure(value, fluxUnit).replace('-', '−')
    case '°':
      return `${signedFigure(value, 1)}°`
    case 'V':
    case 'N':
    case 'N·m':
      return signedFigure(value, 0)
    case 'none':
      return signedFigure(value, 0)
  }
}
