import { useState } from 'react'
import type { Finding, Outcome } from '#app/domain/rules/finding.ts'
import { formatLength, type DisplayUnits } from '#app/domain/units.ts'
import { OutcomeMark } from '#app/components/outcome-mark.tsx'
import { fluxFigure, noFigure, signedFigure } from '#app/editor/figures.ts'
import type { FluxUnit } from '#app/editor/view-choice.ts'

const order: readonly Outcome[] = ['fails', 'cannot tell', 'measure first', 'pass']
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

/** Passing findings shown before the rest is folded. */
const passesShown = 2
/** Findings that do not pass shown before the rest is folded. */
const othersShown = 8

interface FindingsListProps {
  readonly findings: readonly Finding[]
  readonly units: DisplayUnits
  readonly fluxUnit: FluxUnit
  /** Shows on the plan what a finding is about. */
  readonly onPoint: (subject: Finding['subject']) => void
}

/** What was checked: failing first, each with its margin, tolerance, limit and source. */
export function FindingsList({ findings, units, fluxUnit, onPoint }: FindingsListProps) {
  const [unfolded, setUnfolded] = useState(false)
  const sorted = [...findings].sort((a, b) => rank(a) - rank(b))
  const others = sorted.filter((finding) => finding.outcome !== 'pass')
  const passes = sorted.filter((finding) => finding.outcome === 'pass')
  const shown = unfolded ? sorted : [...others.slice(0, othersShown), ...passes.slice(0, passesShown)]
  const folded = sorted.length - shown.length
  const foldedPasses = passes.length - Math.min(passesShown, passes.length)
  return (
    <section aria-labelledby="findings-title" className="border-t border-rule px-4.5 py-3.5">
      <header className="mb-2 flex items-baseline gap-2.5">
        <h2 id="findings-title" className="text-sm font-strong">
          Findings
        </h2>
        <p className="text-ink-2">{summaryOf(findings)}</p>
      </header>
      <ul>
        {shown.map((finding) => (
          <li key={keyOf(finding)} className="border-t border-rule">
            <FindingRow finding={finding} units={units} fluxUnit={fluxUnit} onPoint={onPoint} />
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
          {unfolded ? 'Fewer' : folded === foldedPasses ? `${folded} more pass` : `${folded} more`}
        </button>
      )}
    </section>
  )
}

const rank = (finding: Finding) =>
  order.indexOf(finding.outcome) * 10 + (finding.weight === 'hard stop' ? 0 : finding.weight === 'soft' ? 1 : 2)

const keyOf = ({ rule, subject, title, condition }: Finding) =>
  `${rule} ${subject.kind} ${subject.id} ${title} ${condition ?? ''}`

/** "1 fails, 1 cannot tell, 1 to measure first, 9 pass". */
export function summaryOf(findings: readonly Finding[]): string {
  const count = (outcome: Outcome) => findings.filter((finding) => finding.outcome === outcome).length
  const parts: [number, string][] = [
    [count('fails'), count('fails') === 1 ? 'fails' : 'fail'],
    [count('cannot tell'), 'cannot tell'],
    [count('measure first'), 'to measure first'],
    [count('pass'), count('pass') === 1 ? 'passes' : 'pass'],
  ]
  const said = parts.filter(([n]) => n > 0).map(([n, word]) => `${n} ${word}`)
  return said.length > 0 ? said.join(', ') : 'Nothing to check yet'
}

interface FindingRowProps extends Omit<FindingsListProps, 'findings'> {
  readonly finding: Finding
}

function FindingRow({ finding, units, fluxUnit, onPoint }: FindingRowProps) {
  const figure = (value: number | null) => findingFigure(value, finding.unit, units, fluxUnit)
  const limits =
    finding.value === null || finding.limit === null
      ? figure(finding.value)
      : `${figure(finding.value)} of ${figure(finding.limit)}`
  const tolerance = finding.tolerance ? `, ± ${figure(finding.tolerance)}` : ''
  return (
    <button
      type="button"
      onClick={() => onPoint(finding.subject)}
      className="grid w-full cursor-pointer grid-cols-[14px_1fr_auto] gap-x-2 py-1.5 text-left hover:bg-paper-sunk"
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
        <span>
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
    finding.unit === 'W/m²' ? ` ${fluxUnit}` : finding.unit === 'V' || finding.unit === 'N' ? ` ${finding.unit}` : ''
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
      return signedFigure(value, 0)
    case 'none':
      return signedFigure(value, 0)
  }
}
