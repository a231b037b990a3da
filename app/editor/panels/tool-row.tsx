import { memo, useState } from 'react'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { Layout } from '#app/domain/layout/layout.ts'
import { planesOf } from '#app/domain/site/planes.ts'
import type { Site } from '#app/domain/site/site.ts'
import { parseLength } from '#app/domain/length-parser.ts'
import { formatLength, type DisplayUnits } from '#app/domain/units.ts'
import { LegendDrawing } from '#app/drawing/heat/legend.tsx'
import type { QuantityScale } from '#app/drawing/heat/quantity.ts'
import { screenPen } from '#app/drawing/pen.ts'
import { Button } from '#app/components/button.tsx'
import { Choice } from '#app/components/choice.tsx'
import type { Efficiency, Emitter } from '#app/domain/flux/emitter.ts'
import type { MapAnswer } from '#app/drawing/heat/map-picture.ts'
import { usePointed, type PointedStore } from '#app/editor/pointed.ts'
import { mapValueAt, readingAt } from '#app/editor/read-out.tsx'
import {
  hasEfficiencyRange,
  planeHeight,
  type FluxUnit,
  type MapChoice,
  type ViewChoice,
} from '#app/editor/view-choice.ts'

interface ToolRowProps {
  readonly site: Site
  readonly layout: Layout
  readonly models: ReadonlyMap<string, HeaterModel>
  readonly selected: readonly string[]
  readonly choice: ViewChoice
  /** Threshold of overlap, W/m². */
  readonly threshold: number
  readonly onChoice: (choice: ViewChoice) => void
  readonly placing: boolean
  readonly onPlacing: () => void
  readonly readOnly: boolean
  readonly legend: LegendReading
  /** What stands beside the scale. */
  readonly notes: readonly string[]
  /** In a sheet: without its own scale and without placing. */
  readonly bare?: boolean
}

/** What the row above the plan holds: placing, what the map shows, the plane, the scale. */
export function ToolRow(props: ToolRowProps) {
  const { site, choice, onChoice, placing, onPlacing, readOnly, legend, notes, bare = false } = props
  return (
    <div
      className={`flex min-h-10.5 flex-none flex-wrap items-center gap-x-2.5 gap-y-1 ${bare ? 'py-3' : 'border-b border-rule'} px-3.5`}
    >
      {!readOnly && !bare && (
        <Button size="small" icon="plus" aria-pressed={placing} onClick={onPlacing}>
          Heater
        </Button>
      )}
      <MapSelect {...props} />
      <PlaneChooser {...{ site, choice, onChoice }} />
      <span className="flex-1" />
      <span className="flex min-w-0 flex-wrap items-center gap-1 max-tablet:contents">
        {!bare && <MapLegend {...legend} />}
        <UnitChooser choice={choice} onChoice={onChoice} scale={legend.scale} />
      </span>
      {!bare && <MapNotes notes={notes} />}
    </div>
  )
}

const selectClass =
  'h-7 max-w-40 rounded-md border border-rule-strong bg-paper-raised px-1.5 text-ink focus-visible:outline-2 focus-visible:outline-offset-1 focus-visible:outline-focus pointer-coarse:h-11'

const mapChoices = {
  flux: 'Irradiance',
  share: 'One heater’s share',
  overlap: 'Overlap',
  calm: 'Feels like, calm',
  design: 'Feels like, design wind',
  gust: 'Feels like, gust',
} as const
type MapName = keyof typeof mapChoices

/** What the map shows; one heater's share follows the chosen heater. */
function MapSelect({ layout, models, selected, choice, threshold, onChoice }: ToolRowProps) {
  const { map } = choice
  const value: MapName = map.kind === 'feels-like' ? map.wind : map.kind
  const heaterId = selected[0] ?? layout.heaters[0]?.id ?? ''
  const choose = (name: string) => {
    const next = mapOf(name, heaterId, threshold)
    if (next) onChoice({ ...choice, map: next })
  }
  return (
    <span className="flex flex-wrap items-center gap-1.5">
      <select
        aria-label="The map shows"
        value={value}
        onChange={(event) => choose(event.target.value)}
        className={`${selectClass} ${map.kind === 'feels-like' ? 'max-w-44!' : ''}`}
      >
        {Object.entries(mapChoices).map(([name, label]) => (
          <option key={name} value={name}>
            {label}
          </option>
        ))}
      </select>
      {map.kind === 'share' && (
        <select
          aria-label="Heater whose share is shown"
          value={map.heaterId}
          onChange={(event) => onChoice({ ...choice, map: { kind: 'share', heaterId: event.target.value } })}
          className={selectClass}
        >
          {layout.heaters.map(({ id }) => (
            <option key={id}>{id}</option>
          ))}
        </select>
      )}
      <label className="inline-flex min-h-7 items-center gap-1.5 pointer-coarse:min-h-11">
        <input
          type="checkbox"
          className="size-4 accent-ink"
          checked={choice.shade}
          onChange={(event) => onChoice({ ...choice, shade: event.target.checked })}
        />
        Shade
      </label>
      {hasEfficiencyRange(layout, models) && <EfficiencySelect choice={choice} onChoice={onChoice} />}
    </span>
  )
}

const efficiencies = {
  low: 'Low efficiency',
  nominal: 'Nominal efficiency',
  high: 'High efficiency',
} as const satisfies Record<Efficiency, string>
const isEfficiency = (text: string): text is Efficiency => text in efficiencies

/** Which end of the data sheets' range of radiant efficiency the heat is drawn with. */
function EfficiencySelect({ choice, onChoice }: Pick<ToolRowProps, 'choice' | 'onChoice'>) {
  return (
    <select
      aria-label="Radiant efficiency of the heat shown"
      value={choice.efficiency}
      onChange={({ target: { value } }) => isEfficiency(value) && onChoice({ ...choice, efficiency: value })}
      className={selectClass}
    >
      {Object.entries(efficiencies).map(([name, label]) => (
        <option key={name} value={name}>
          {label}
        </option>
      ))}
    </select>
  )
}

function mapOf(name: string, heaterId: string, threshold: number): MapChoice | null {
  switch (name) {
    case 'flux':
      return { kind: 'flux' }
    case 'share':
      return heaterId ? { kind: 'share', heaterId } : null
    case 'overlap':
      return { kind: 'overlap', threshold }
    case 'calm':
    case 'design':
    case 'gust':
      return { kind: 'feels-like', wind: name }
    default:
      return null
  }
}

/** Short, because the row is crowded: metres to the centimetre without a unit, or whole inches. */
const planeText = (metres: number, units: DisplayUnits): string =>
  units === 'metric' ? metres.toFixed(2) : `${Math.round(metres / 0.0254)}″`

/** Body plane, head plane, or a height that is typed. */
function PlaneChooser({ site, choice, onChoice }: Pick<ToolRowProps, 'site' | 'choice' | 'onChoice'>) {
  const planes = planesOf(site)
  const { plane } = choice
  const figure = (metres: number) => planeText(metres, site.displayUnits)
  const [typed, setTyped] = useState<string | null>(null)
  const reading = typed === null ? null : parseLength(typed, site.displayUnits, { min: 0, max: 6 })
  const wrong = reading && 'error' in reading ? reading.error : null
  const commit = () => {
    if (reading && !('error' in reading)) {
      onChoice({ ...choice, plane: { kind: 'height', height: reading.metres } })
      setTyped(null)
    }
  }
  return (
    <span className="flex items-center gap-1.5">
      <Choice
        label="Plane"
        options={[
          { value: 'body', label: `Body ${figure(planes.body)}` },
          { value: 'head', label: `Head ${figure(planes.head)}` },
          { value: 'height', label: 'Other' },
        ]}
        value={plane.kind}
        onChange={(kind) =>
          onChoice({
            ...choice,
            plane: kind === 'height' ? { kind, height: planeHeight(plane, site) } : { kind },
          })
        }
      />
      {plane.kind === 'height' && (
        <input
          aria-label="Height of the plane"
          aria-invalid={wrong ? true : undefined}
          title={wrong ?? 'Above the finished floor'}
          value={typed ?? formatLength(plane.height, site.displayUnits)}
          onChange={(event) => setTyped(event.target.value)}
          onBlur={commit}
          onKeyDown={(event) => event.key === 'Enter' && commit()}
          className={`${selectClass} w-24 aria-invalid:border-clay`}
        />
      )}
      {wrong && <span className="text-2xs text-clay">{wrong}</span>}
    </span>
  )
}

function UnitChooser({
  choice,
  onChoice,
  scale,
}: Pick<ToolRowProps, 'choice' | 'onChoice'> & { scale: QuantityScale }) {
  if (choice.map.kind === 'feels-like' || choice.map.kind === 'overlap')
    return <span className="text-ink-2">{scale.unit}</span>
  const units: readonly FluxUnit[] = ['W/m²', 'W/ft²']
  return (
    <select
      aria-label="Unit of irradiance"
      value={choice.fluxUnit}
      onChange={(event) =>
        onChoice({ ...choice, fluxUnit: units.find((unit) => unit === event.target.value) ?? 'W/m²' })
      }
      className={selectClass}
    >
      {units.map((unit) => (
        <option key={unit}>{unit}</option>
      ))}
    </select>
  )
}

/** What the legend shows and reads. */
export interface LegendReading {
  readonly scale: QuantityScale
  readonly store: PointedStore
  readonly site: Site
  readonly emitters: readonly Emitter[]
  readonly plane: number
  readonly answer: MapAnswer | null
  readonly isFlux: boolean
}

const pen = screenPen('dusk')

/** Drawn again only when the scale or the figure changes. */
const StillLegend = memo(LegendDrawing)

/** The one scale with a tick at the figure that is pointed at. */
export function MapLegend({ scale, store, site, emitters, plane, answer, isFlux }: LegendReading) {
  const pointed = usePointed(store)
  const flux = pointed && isFlux ? (readingAt(site, emitters, plane, pointed.at)?.irradiance ?? null) : null
  const reading = pointed && !isFlux && answer ? mapValueAt(answer, pointed.at) : flux
  return (
    <span className="inline-block h-10 w-78 flex-none overflow-hidden max-tablet:order-last">
      <StillLegend
        name="scale"
        quantity={scale}
        pen={pen}
        width={312}
        ink="var(--color-ink)"
        zoneWords={false}
        reading={reading}
      />
    </span>
  )
}

/** What is to be known of a map that is not plain, beside its scale. */
export function MapNotes({ notes }: { notes: readonly string[] }) {
  if (notes.length === 0) return null
  return <p className="py-1 text-xs text-ink-2 max-tablet:order-last">{notes.join(' ')}</p>
}
