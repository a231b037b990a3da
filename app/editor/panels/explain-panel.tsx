import { useMemo, useState } from 'react'
import { explainSeat, type ExplainedInput, type Explanation } from '#app/domain/comfort/explain.ts'
import type { WarmthInput } from '#app/domain/comfort/seat-warmth.ts'
import type { SeatFigure } from '#app/domain/comfort/uncertainty.ts'
import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'
import { formatLength, formatQuantity, type DisplayUnits } from '#app/domain/units.ts'
import { Button } from '#app/components/button.tsx'
import { SelectField } from '#app/components/field.tsx'
import { fluxText, noFigure } from '#app/editor/figures.ts'
import type { FluxUnit } from '#app/editor/view-choice.ts'

const figures = {
  body: { label: 'Irradiance on the body plane', of: { quantity: 'body' } },
  head: { label: 'Largest irradiance at the head', of: { quantity: 'head' } },
  calm: { label: 'Feels like, calm', of: { quantity: 'feels-like', wind: 'calm' } },
  design: { label: 'Feels like, design wind', of: { quantity: 'feels-like', wind: 'design' } },
  gust: { label: 'Feels like, gust', of: { quantity: 'feels-like', wind: 'gust' } },
} satisfies Record<string, { label: string; of: SeatFigure }>
type FigureName = keyof typeof figures
const isFigure = (name: string): name is FigureName => name in figures

interface ExplainPanelProps {
  readonly input: WarmthInput
  readonly rules: HouseRules
  readonly seatId: string
  readonly units: DisplayUnits
  readonly fluxUnit: FluxUnit
  readonly onClose: () => void
}

/** Any figure of a seat taken apart: what went in, the formula, each heater's share, the tolerance, the sources. */
export function ExplainPanel({ input, rules, seatId, units, fluxUnit, onClose }: ExplainPanelProps) {
  const [name, setName] = useState<FigureName>('body')
  const explained = useMemo(() => explainSeat(input, seatId, figures[name].of, rules), [input, seatId, name, rules])
  return (
    <section aria-labelledby="explain-title" className="px-4.5 py-3.5">
      <header className="mb-2 flex items-baseline justify-between gap-2">
        <h2 id="explain-title" className="text-sm font-strong">
          Seat {seatId}
        </h2>
        <Button kind="text" size="small" onClick={onClose}>
          Close
        </Button>
      </header>
      <SelectField
        label="Figure"
        value={name}
        onChange={(event) => isFigure(event.target.value) && setName(event.target.value)}
        options={Object.entries(figures).map(([value, { label }]) => ({ value, label }))}
      />
      {explained && <Explained {...{ explained, units, fluxUnit }} />}
    </section>
  )
}

interface ExplainedProps {
  readonly explained: Explanation
  readonly units: DisplayUnits
  readonly fluxUnit: FluxUnit
}

function Explained({ explained, units, fluxUnit }: ExplainedProps) {
  const text = (value: number | null) => {
    if (value === null) return noFigure
    return explained.unit === 'W/m²' ? fluxText(value, fluxUnit) : formatQuantity(value, 'temperature', units)
  }
  const difference = (value: number) =>
    explained.unit === 'W/m²' ? fluxText(value, fluxUnit) : formatQuantity(value, 'temperature difference', units)
  const { tolerance, byHeater, base } = explained
  return (
    <>
      <p className="mt-2 text-lg font-medium">
        {text(explained.value)}
        {tolerance && <small className="ml-2 text-xs font-regular text-ink-2">± {difference(tolerance.total)}</small>}
      </p>
      {explained.unit === '°C' && <p className="text-ink-2">With the heaters off, {text(base)} at the same wind.</p>}
      {explained.indoors && <p className="text-ink-2">{explained.indoors}</p>}
      {explained.cannotTell.length > 0 && (
        <p className="text-slate">Without {explained.cannotTell.join(', ')}: no beam data.</p>
      )}
      <Rows
        caption="Share of each heater"
        rows={byHeater
          .filter(({ share }) => share >= 0.0005)
          .toSorted((a, b) => b.share - a.share)
          .map(({ heaterId, value, share }) => [heaterId, `${(share * 100).toFixed(1)} %`, difference(value)])}
      />
      {tolerance && (
        <Rows
          caption="What its tolerance rests on"
          rows={tolerance.shares
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
        <Rows
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

function Rows({ caption, rows }: { caption: string; rows: readonly (readonly [string, string, string])[] }) {
  if (rows.length === 0) return null
  return (
    <table className="mt-2 w-full border-collapse">
      <caption className="pb-1 text-left text-2xs text-ink-3">{caption}</caption>
      <tbody>
        {rows.map(([name, middle, last]) => (
          <tr key={name} className="border-t border-rule">
            <th scope="row" className="py-0.5 pr-2 text-left font-medium">
              {name}
            </th>
            <td className="py-0.5 pr-2 text-right whitespace-nowrap">{middle}</td>
            <td className={`py-0.5 text-right text-ink-2 ${last.length < 16 ? 'whitespace-nowrap' : ''}`}>{last}</td>
          </tr>
        ))}
      </tbody>
    </table>
  )
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
