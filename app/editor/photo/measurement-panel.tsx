import { useState } from 'react'
import { changeMeasurement, removeMeasurement } from '#app/domain/photo/edits.ts'
import { mostMeasurements, type Measurement, type PhotoPlane } from '#app/domain/photo/measurements.ts'
import { isRefused } from '#app/domain/photo/refusal.ts'
import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'
import type { DisplayUnits } from '#app/domain/units.ts'
import { Button } from '#app/components/button.tsx'
import { SelectField, TextField } from '#app/components/field.tsx'
import { OutcomeMark } from '#app/components/outcome-mark.tsx'
import { errorWords, figureWords, type Figure, type Measured } from '#app/editor/photo/measured.ts'
import { Refused, type PhotoPanelProps } from '#app/editor/photo/plane-panel.tsx'
import { UseAsSize, type SizeUse } from '#app/editor/photo/use-as-size.tsx'

interface MeasurementPanelProps extends PhotoPanelProps, SizeUse {
  readonly measured: readonly Measured[]
  readonly strong: string | null
  readonly onStrong: (id: string) => void
}

/** What is measured in a photo: each figure with its tolerance and errors, and the way into the site. */
export function MeasurementPanel({ measured, strong, onStrong, sizes, onUse, ...props }: MeasurementPanelProps) {
  const { marks, readOnly } = props
  return (
    <section aria-labelledby="measurements">
      <h2 id="measurements" className="text-sm font-strong">
        Lengths and heights
      </h2>
      {measured.length === 0 && (
        <p className="mt-0.5 text-xs text-ink-3">
          {marks.planes.length === 0 ? 'Nothing can be measured before a plane is marked.' : 'Nothing is measured yet.'}
        </p>
      )}
      <ul>
        {measured.map((each) => (
          <Result
            key={each.measurement.id}
            each={each}
            here={strong === each.measurement.id}
            onStrong={onStrong}
            {...{ sizes, onUse, ...props }}
          />
        ))}
      </ul>
      {!readOnly && marks.planes.length > 0 && marks.measurements.length < mostMeasurements && (
        <NewMeasurement planes={marks.planes} onPlacing={props.onPlacing} />
      )}
    </section>
  )
}

interface ResultProps extends PhotoPanelProps, SizeUse {
  readonly each: Measured
  readonly here: boolean
  readonly onStrong: (id: string) => void
}

function Result({ each, here, onStrong, marks, units, rules, readOnly, onChange, sizes, onUse }: ResultProps) {
  const { measurement, own, mean, photos } = each
  const { id, label, kind } = measurement
  return (
    <li className="border-t border-rule py-2.5 first:mt-2" id={`measurement-${id}`}>
      <p className="flex flex-wrap items-baseline justify-between gap-x-3">
        <button
          type="button"
          aria-pressed={here}
          className="min-h-6 text-left font-medium underline decoration-rule-strong underline-offset-2 hover:decoration-ink aria-pressed:decoration-ember aria-pressed:decoration-2 pointer-coarse:min-h-11"
          onClick={() => onStrong(id)}
        >
          {label}
          <span className="font-regular text-ink-2">, {kind}</span>
        </button>
        {!isRefused(own) && <b className="text-base font-strong">{figureWords(own, units)}</b>}
      </p>
      {isRefused(own) ? (
        <Refused words={own.words} />
      ) : (
        <p className="text-xs text-ink-3">{errorWords(own, units, rules)}</p>
      )}
      {mean && <Mean figure={mean} {...{ photos, units, rules }} />}
      <Planes
        {...{ measurement, readOnly }}
        planes={marks.planes}
        onChange={(next) => onChange((old) => changeMeasurement(old, next))}
      />
      {!readOnly && (
        <div className="mt-1.5 flex flex-wrap items-end gap-2">
          {!isRefused(own) && <UseAsSize {...{ label, measurementId: id, sizes, onUse, units }} figure={mean ?? own} />}
          <Button
            kind="text"
            size="small"
            icon="remove"
            aria-label={`Remove ${label}`}
            onClick={() => onChange((old) => removeMeasurement(old, id))}
          >
            Remove
          </Button>
        </div>
      )}
    </li>
  )
}

interface MeanProps {
  readonly figure: Figure & { readonly count: number; readonly warning: string | null }
  readonly photos: number
  readonly units: DisplayUnits
  readonly rules: HouseRules
}

function Mean({ figure, photos, units, rules }: MeanProps) {
  const { count, warning } = figure
  return (
    <p className="mt-1 text-xs">
      Mean of {count} readings in {photos} {photos === 1 ? 'photo' : 'photos'}, weighed by 1/σ²:{' '}
      <b className="font-medium">{figureWords(figure, units)}</b>{' '}
      <span className="text-ink-3">{errorWords(figure, units, rules)}</span>
      {warning && (
        <span role="status" className="mt-0.5 block text-amber">
          <span className="mr-1.5 inline-block align-[-1px]">
            <OutcomeMark outcome="measure first" size={10} />
          </span>
          {warning}
        </span>
      )}
    </p>
  )
}

const optionsOf = (planes: readonly PhotoPlane[]) => planes.map(({ id, name }) => ({ value: id, label: name }))

interface PlanesProps {
  readonly measurement: Measurement
  readonly planes: readonly PhotoPlane[]
  readonly readOnly: boolean
  readonly onChange: (measurement: Measurement) => void
}

/** In which plane each end lies; a height's foot. */
function Planes({ measurement, planes, readOnly, onChange }: PlanesProps) {
  if (planes.length < 2) return null
  const select = (label: string, value: string, set: (plane: string) => Measurement) => (
    <SelectField
      label={label}
      value={value}
      disabled={readOnly}
      options={optionsOf(planes)}
      onChange={(event) => onChange(set(event.target.value))}
    />
  )
  return (
    <details className="mt-1">
      <summary className="inline-flex min-h-6 items-center text-xs text-ink-2 underline pointer-coarse:min-h-11">
        In which plane
      </summary>
      <div className="mt-1 grid max-w-sm grid-cols-2 gap-3">
        {measurement.kind === 'length' ? (
          <>
            {select('One end', measurement.from.plane, (plane) => ({
              ...measurement,
              from: { ...measurement.from, plane },
            }))}
            {select('Other end', measurement.to.plane, (plane) => ({
              ...measurement,
              to: { ...measurement.to, plane },
            }))}
          </>
        ) : (
          select('Its foot', measurement.foot.plane, (plane) => ({
            ...measurement,
            foot: { ...measurement.foot, plane },
          }))
        )}
      </div>
    </details>
  )
}

function NewMeasurement({ planes, onPlacing }: { planes: readonly PhotoPlane[] } & Pick<PhotoPanelProps, 'onPlacing'>) {
  const [label, setLabel] = useState('')
  const [plane, setPlane] = useState('')
  const [problem, setProblem] = useState<string | null>(null)
  const within = planes.find(({ id }) => id === plane) ?? planes[0]
  const start = (kind: 'length' | 'height') => {
    const name = label.trim()
    if (!name) return setProblem('Needed before it is marked, such as beam spacing.')
    if (!within) return
    setProblem(null)
    setLabel('')
    const { id } = within
    onPlacing(kind === 'length' ? { kind, label: name, from: id, to: id } : { kind, label: name, plane: id })
  }
  return (
    <div className="mt-2 border-t border-rule pt-2.5">
      <h3 className="mb-1 font-medium">New measurement</h3>
      <div className="grid grid-cols-2 gap-x-3 gap-y-2">
        <TextField
          label="What it is"
          placeholder="beam spacing"
          maxLength={80}
          value={label}
          error={problem}
          hint="The same name in another photo is another reading of it."
          onChange={(event) => setLabel(event.target.value)}
        />
        <SelectField
          label="In the plane, or over it"
          value={within?.id ?? ''}
          options={optionsOf(planes)}
          onChange={(event) => setPlane(event.target.value)}
        />
      </div>
      <p className="mt-2 flex flex-wrap gap-2">
        <Button icon="plus" onClick={() => start('length')}>
          Mark a length
        </Button>
        <Button icon="plus" onClick={() => start('height')}>
          Mark a height
        </Button>
      </p>
    </div>
  )
}
