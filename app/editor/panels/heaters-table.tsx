import { memo } from 'react'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import { shortName } from '#app/domain/heaters/short-name.ts'
import type { HeaterChange } from '#app/domain/layout/edits.ts'
import type { MountedHeater } from '#app/domain/layout/layout.ts'
import type { Site } from '#app/domain/site/site.ts'
import { parseLength } from '#app/domain/length-parser.ts'
import { degreesFigure } from '#app/editor/figures.ts'
import { readAngle } from '#app/editor/panels/angle-field.tsx'
import { CellField, type CellReading } from '#app/editor/panels/cell-field.tsx'
import { alongLabel, fieldLength, fromLabel } from '#app/editor/panels/axis-words.ts'
import { supportsFor, wrongHeight, wrongTilt } from '#app/editor/panels/heater-limits.ts'

interface HeatersTableProps {
  readonly heaters: readonly MountedHeater[]
  readonly models: ReadonlyMap<string, HeaterModel>
  readonly site: Site
  readonly selected: readonly string[]
  readonly readOnly: boolean
  readonly onSelect: (ids: readonly string[]) => void
  readonly onSet: (id: string, change: HeaterChange) => void
  readonly onRemove: (id: string) => void
}

/** The plan as a list: every heater is a row with the values that can be set on the plan, each of them a field. */
export function HeatersTable(props: HeatersTableProps) {
  const { heaters, site, selected } = props
  return (
    <section aria-labelledby="heaters-title" className="border-t border-rule px-4.5 py-3.5">
      <h2 id="heaters-title" className="mb-2 text-sm font-strong">
        Heaters
      </h2>
      <div className="overflow-x-auto">
        <table className="w-full border-collapse">
          <caption className="sr-only">Heaters of this variant; every value can be typed</caption>
          <thead className="text-left text-2xs text-ink-3 [&_th]:pr-1 [&_th]:pb-1.5 [&_th]:font-medium">
            <tr>
              <th scope="col">Heater</th>
              <th scope="col">{alongLabel(site)}</th>
              <th scope="col">{fromLabel(site)}</th>
              <th scope="col">Lowest</th>
              <th scope="col">Turn</th>
              <th scope="col">Tilt</th>
              <th scope="col">Support</th>
              <th scope="col">
                <span className="sr-only">Remove</span>
              </th>
            </tr>
          </thead>
          <tbody>
            {heaters.map((heater) => (
              <HeaterRow
                key={heater.id}
                heater={heater}
                model={props.models.get(heater.model)}
                chosen={selected.includes(heater.id)}
                site={site}
                readOnly={props.readOnly}
                onSelect={props.onSelect}
                onSet={props.onSet}
                onRemove={props.onRemove}
              />
            ))}
          </tbody>
        </table>
      </div>
      {heaters.length === 0 && <p className="py-2 text-ink-3">No heaters yet.</p>}
    </section>
  )
}

interface HeaterRowProps extends Omit<HeatersTableProps, 'heaters' | 'selected' | 'models'> {
  readonly heater: MountedHeater
  readonly model: HeaterModel | undefined
  readonly chosen: boolean
}

const HeaterRow = memo(function HeaterRow(props: HeaterRowProps) {
  const { heater, model, site, chosen, readOnly, onSelect, onSet, onRemove } = props
  const units = site.displayUnits
  const set = (change: HeaterChange) => onSet(heater.id, change)
  const length = (text: string, wrong?: (metres: number) => string | null): CellReading => {
    const reading = parseLength(text, units, { min: -100, max: 100 })
    if ('error' in reading) return reading
    const error = wrong?.(reading.metres)
    return error ? { error } : { value: reading.metres }
  }
  const angle = (text: string, wrong?: (degrees: number) => string | null): CellReading => {
    const degrees = readAngle(text)
    if (degrees === null || Math.abs(degrees) > 360) return { error: 'A number of degrees, such as 22.' }
    const error = wrong?.(degrees)
    return error ? { error } : { value: degrees }
  }
  const height = (metres: number) => (model ? wrongHeight(metres, heater, model, units) : null)
  const tilt = (degrees: number) => (model ? wrongTilt(degrees, model) : null)
  const cell = (label: string, shown: string, read: (text: string) => CellReading, keep: (value: number) => void) => (
    <td className="py-0.5 pr-1">
      <CellField label={`${label} of ${heater.id}`} shown={shown} read={read} onKeep={keep} readOnly={readOnly} />
    </td>
  )
  return (
    <tr className={`border-t border-rule ${chosen ? 'bg-ember-wash' : ''}`}>
      <th scope="row" className="py-0.5 pr-1 text-left font-medium whitespace-nowrap">
        <button
          type="button"
          aria-pressed={chosen}
          onClick={() => onSelect([heater.id])}
          title={model ? shortName(model) : heater.model}
          className="min-h-6 min-w-8 cursor-pointer text-left hover:underline pointer-coarse:min-h-11"
        >
          {heater.id}
        </button>
      </th>
      {cell('Along', fieldLength(heater.x, units), length, (x) => set({ x }))}
      {cell('Across', fieldLength(heater.y, units), length, (y) => set({ y }))}
      {cell(
        'Lowest point',
        fieldLength(heater.lowestPoint, units),
        (text) => length(text, height),
        (lowestPoint) => set({ lowestPoint }),
      )}
      {cell('Turn', degreesFigure(heater.turnDeg), angle, (turnDeg) => set({ turnDeg }))}
      {cell(
        'Tilt',
        degreesFigure(heater.tiltDeg),
        (text) => angle(text, tilt),
        (tiltDeg) => set({ tiltDeg }),
      )}
      <td className="py-0.5 pr-1">
        <select
          aria-label={`Support of ${heater.id}`}
          disabled={readOnly}
          value={heater.memberId ?? ''}
          onChange={(event) => set({ memberId: event.target.value || null })}
          className="h-7 max-w-24 rounded-sm border border-rule bg-paper-raised pointer-coarse:h-11"
        >
          <option value="">None</option>
          {supportsFor(heater.mount, site).map(({ id, name }) => (
            <option key={id} value={id}>
              {name}
            </option>
          ))}
        </select>
      </td>
      <td className="py-0.5 text-right">
        {!readOnly && (
          <button
            type="button"
            aria-label={`Remove ${heater.id}`}
            onClick={() => onRemove(heater.id)}
            className="size-7 cursor-pointer text-ink-2 hover:text-clay pointer-coarse:size-11"
          >
            ×
          </button>
        )}
      </td>
    </tr>
  )
})
