import { useState } from 'react'
import { changePlane, removePlane } from '#app/domain/photo/edits.ts'
import { mostPlanes, type PhotoMarks, type PhotoPlane } from '#app/domain/photo/measurements.ts'
import { refusePlane } from '#app/domain/photo/plane-inputs.ts'
import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'
import type { DisplayUnits } from '#app/domain/units.ts'
import { Button } from '#app/components/button.tsx'
import { TextField } from '#app/components/field.tsx'
import { OutcomeMark } from '#app/components/outcome-mark.tsx'
import type { Placing } from '#app/editor/photo/placing.ts'
import { LengthInput } from '#app/editor/site/length-input.tsx'

export interface PhotoPanelProps {
  readonly marks: PhotoMarks
  readonly units: DisplayUnits
  readonly rules: HouseRules
  readonly readOnly: boolean
  readonly onChange: (edit: (marks: PhotoMarks) => PhotoMarks) => void
  readonly onPlacing: (placing: Placing) => void
}

const smallest = 0.01
const largest = 100

/** The planes of a photo: each by a rectangle of known size, and what heights over it need. */
export function PlanePanel({ marks, ...props }: PhotoPanelProps) {
  return (
    <section aria-labelledby="planes">
      <h2 id="planes" className="text-sm font-strong">
        Planes
      </h2>
      <p className="mt-0.5 text-xs text-ink-3">
        A photo does not show in which plane a point lies: each is said. A floor mat, a door, a window or a table top of
        known size makes one.
      </p>
      <ul>
        {marks.planes.map((plane) => (
          <Plane key={plane.id} plane={plane} marks={marks} {...props} />
        ))}
      </ul>
      {!props.readOnly && marks.planes.length < mostPlanes && <NewPlane {...props} />}
      {marks.planes.length >= mostPlanes && (
        <p className="mt-2 text-xs text-ink-3">A photo has at most {mostPlanes} planes.</p>
      )}
    </section>
  )
}

function Plane({ plane, units, rules, readOnly, onChange, onPlacing }: PhotoPanelProps & { plane: PhotoPlane }) {
  const { id, name, vertical } = plane
  const refused = refusePlane(plane)
  const set = (facts: Partial<Omit<PhotoPlane, 'id'>>) => onChange((old) => changePlane(old, id, facts))
  const shared = { units, disabled: readOnly, max: largest }
  return (
    <li className="border-t border-rule py-2.5 first:mt-2">
      <p className="mb-1 flex items-center justify-between gap-2">
        <b className="font-medium">{name}</b>
        {!readOnly && (
          <Button
            kind="text"
            size="small"
            icon="remove"
            aria-label={`Remove ${name}`}
            onClick={() => onChange((old) => removePlane(old, id))}
          >
            Remove
          </Button>
        )}
      </p>
      <div className="grid grid-cols-3 gap-x-3 gap-y-2">
        <LengthInput
          {...shared}
          label="First side"
          min={smallest}
          value={plane.width}
          onCommit={(width) => set({ width })}
        />
        <LengthInput
          {...shared}
          label="Second side"
          min={smallest}
          value={plane.depth}
          onCommit={(depth) => set({ depth })}
        />
        <LengthInput
          {...shared}
          label="± of both"
          min={0}
          max={10}
          value={plane.tolerance}
          onCommit={(tolerance) => set({ tolerance })}
        />
        {vertical && (
          <>
            <LengthInput
              {...shared}
              label="Known height"
              min={smallest}
              value={vertical.height}
              onCommit={(height) => set({ vertical: { ...vertical, height } })}
            />
            <LengthInput
              {...shared}
              label="± of it"
              min={0}
              max={10}
              value={vertical.tolerance}
              onCommit={(tolerance) => set({ vertical: { ...vertical, tolerance } })}
            />
          </>
        )}
      </div>
      {refused && <Refused words={refused.words} />}
      {!readOnly && !vertical && (
        <NewUprights
          units={units}
          onStart={(height) => onPlacing({ kind: 'uprights', planeId: id, height, tolerance: rules.toleranceTape })}
        />
      )}
      {!readOnly && vertical && (
        <Button kind="text" size="small" className="mt-1 -ml-2.5" onClick={() => set({ vertical: null })}>
          Take the uprights away
        </Button>
      )}
    </li>
  )
}

/** Why nothing is measured, beside what it is about. */
export const Refused = ({ words }: { words: string }) => (
  <p role="status" className="mt-1 text-xs text-clay">
    <span className="mr-1.5 inline-block align-[-1px]">
      <OutcomeMark outcome="cannot tell" size={10} />
    </span>
    {words}
  </p>
)

/** Sizes of a reference are taped unless something else is said. */
function NewPlane({ units, rules, onPlacing }: Pick<PhotoPanelProps, 'units' | 'rules' | 'onPlacing'>) {
  const [name, setName] = useState('')
  const [width, setWidth] = useState<number | null>(null)
  const [depth, setDepth] = useState<number | null>(null)
  const [tolerance, setTolerance] = useState(rules.toleranceTape)
  const [asked, setAsked] = useState(false)
  const missing = (value: unknown) => (asked && !value ? 'Needed before the corners are marked.' : null)
  const start = () => {
    setAsked(true)
    if (!name.trim() || width === null || depth === null) return
    onPlacing({ kind: 'plane', name: name.trim(), width, depth, tolerance })
    setAsked(false)
    setName('')
    setWidth(null)
    setDepth(null)
  }
  const shared = { units, min: smallest, max: largest }
  return (
    <div className="mt-2 border-t border-rule pt-2.5">
      <h3 className="mb-1 font-medium">New plane</h3>
      {/* Room for what a field says of its reading, so that the button below stays where it is when the field is left. */}
      <div className="grid auto-rows-[minmax(5.25rem,auto)] grid-cols-2 gap-x-3 pointer-coarse:auto-rows-[minmax(6rem,auto)]">
        <TextField
          label="Name"
          placeholder="Floor"
          maxLength={80}
          value={name}
          error={missing(name.trim())}
          onChange={(event) => setName(event.target.value)}
        />
        <LengthInput {...shared} label="First side" value={width} error={missing(width)} onCommit={setWidth} />
        <LengthInput {...shared} label="Second side" value={depth} error={missing(depth)} onCommit={setDepth} />
        <LengthInput units={units} label="± of both" min={0} max={10} value={tolerance} onCommit={setTolerance} />
      </div>
      <Button icon="plus" onClick={start}>
        Mark its four corners
      </Button>
    </div>
  )
}

function NewUprights({ units, onStart }: { units: DisplayUnits; onStart: (height: number) => void }) {
  const [height, setHeight] = useState<number | null>(null)
  const [asked, setAsked] = useState(false)
  return (
    <details className="mt-1.5">
      <summary className="inline-flex min-h-6 items-center text-ink-2 underline pointer-coarse:min-h-11">
        Heights over this plane
      </summary>
      <p className="mt-1 text-xs text-ink-3">
        Something plumb of known height that stands on the plane, and a second plumb edge well to the side of it.
      </p>
      <div className="mt-1.5 flex items-start gap-3">
        <LengthInput
          label="Known height"
          units={units}
          min={smallest}
          max={largest}
          value={height}
          error={asked && height === null ? 'Needed before its ends are marked.' : null}
          onCommit={setHeight}
        />
        <Button className="mt-4" onClick={() => (height === null ? setAsked(true) : onStart(height))}>
          Mark foot and top
        </Button>
      </div>
    </details>
  )
}
