import type { Explanation } from '#app/domain/comfort/explain.ts'
import type { ExplainedInput } from '#app/domain/comfort/explained-inputs.ts'
import type { Site } from '#app/domain/site/site.ts'
import { formatLength, formatQuantity, type DisplayUnits } from '#app/domain/units.ts'
import { ExplainedRows } from '#app/editor/panels/explained-rows.tsx'
import { SeenHeaters } from '#app/editor/panels/seen-heaters.tsx'
import { fluxText, noFigure, signedFigure } from '#app/editor/figures.ts'
import type { FluxUnit } from '#app/editor/view-choice.ts'

interface ExplainedFigureProps {
  readonly explained: Explanation
  readonly site: Site
  readonly units: DisplayUnits
  readonly fluxUnit: FluxUnit
}

/** One figure taken apart: its value and tolerance, each heater's share, what is seen of it, inputs, formula, source. */
export function ExplainedFigure({ explained, site, units, fluxUnit }: ExplainedFigureProps) {
  const difference = (value: number) => inUnit(value, explained.unit, 'temperature difference', units, fluxUnit)
  return (
    <>
      <Value {...{ explained, units, fluxUnit }} />
      <ExplainedRows
        caption="Share of each heater"
        rows={explained.byHeater
          .filter(({ share }) => share >= 0.0005)
          .toSorted((a, b) => b.share - a.share)
          .map(({ heaterId, value, share }) => [heaterId, `${(share * 100).toFixed(1)} %`, difference(value)])}
      />
      <SeenHeaters {...explained} site={site} />
      {explained.tolerance && (
        <ExplainedRows
          caption="What its tolerance rests on"
          rows={explained.tolerance.shares
            .slice(0, 6)
            .map(({ of, tolerance: size, unit, change }) => [
              of,
              unit === 'm' ? `± ${formatLength(size, units)}` : `± ${(size * 100).toFixed(0)} %`,
              difference(Math.abs(change)),
            ])}
        />
      )}
      <details className="mt-2 border-t border-rule">
        <summary className="min-h-8 cursor-pointer py-1.5 text-ink-2 pointer-coarse:min-h-11">
          {explained.inputs.length} inputs
        </summary>
        <ExplainedRows
          caption="Inputs"
          rows={explained.inputs.map((input) => [
            input.name,
            inputText(input, units),
            input.assumed ? `${input.source} (assumed)` : input.source,
          ])}
        />
      </details>
      <p className="mt-2 border-t border-rule pt-2 text-2xs break-words text-ink-2">{explained.formula}</p>
      <p className="mt-1 text-2xs text-ink-3">
        {explained.source} {explained.notModelled}
      </p>
    </>
  )
}

/** The figure with its tolerance, what it is with the heaters off, and what it is judged by. */
function Value({ explained, units, fluxUnit }: Omit<ExplainedFigureProps, 'site'>) {
  const { value, base, unit, tolerance, words, whyNone, indoors, limits, cannotTell } = explained
  const text = (figure: number | null) =>
    figure === null ? noFigure : inUnit(figure, unit, 'temperature', units, fluxUnit)
  const difference = (figure: number) => inUnit(figure, unit, 'temperature difference', units, fluxUnit)
  return (
    <>
      <p className="mt-2 text-lg font-medium">
        {words?.after && `${words.after}${value === null ? '' : ', vote '}`}
        {(value !== null || !words?.after) && text(value)}
        {tolerance && <small className="ml-2 text-xs font-regular text-ink-2">± {difference(tolerance.total)}</small>}
      </p>
      {whyNone && <p className="text-slate">{whyNone}</p>}
      {unit === '°C' && <p className="text-ink-2">With the heaters off, {text(base)} at the same wind.</p>}
      {words && <p className="text-ink-2">With the heaters off, {words.before} at the same wind.</p>}
      {limits.map(({ name, value: limit, source }) => (
        <p key={name} className="text-ink-2">
          {name === 'caution' ? 'Caution' : 'Stop line'} at {fluxText(limit, fluxUnit)}.{' '}
          <span className="text-2xs text-ink-3">{source}.</span>
        </p>
      ))}
      {indoors && <p className="text-ink-2">{indoors}</p>}
      {cannotTell.length > 0 && <p className="text-slate">Without {cannotTell.join(', ')}: no beam data.</p>}
    </>
  )
}

function inUnit(
  value: number,
  unit: Explanation['unit'],
  degrees: 'temperature' | 'temperature difference',
  units: DisplayUnits,
  fluxUnit: FluxUnit,
): string {
  if (unit === 'none') return signedFigure(value, 2)
  return unit === 'W/m²' ? fluxText(value, fluxUnit) : formatQuantity(value, degrees, units)
}

function inputText({ value, unit }: ExplainedInput, units: DisplayUnits): string {
  switch (unit) {
    case 'm':
      return formatLength(value, units)
    case '°C':
      return formatQuantity(value, 'temperature', units)
    case 'm/s':
      return formatQuantity(value, 'speed', units)
    case '°':
      return `${Math.round(value * 10) / 10}°`
    case 'none':
      return `${Math.round(value * 1000) / 1000}`
    default:
      return `${Math.round(value * 100) / 100} ${unit}`
  }
}
