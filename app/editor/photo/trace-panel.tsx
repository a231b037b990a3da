import { useState } from 'react'
import type { Site } from '#app/domain/site/site.ts'
import type { DisplayUnits } from '#app/domain/units.ts'
import { Button } from '#app/components/button.tsx'
import { AngleField } from '#app/editor/panels/angle-field.tsx'
import { LengthInput } from '#app/editor/site/length-input.tsx'

/** How a picture is to be laid under the plan, once its two points are marked. */
export interface TraceWish {
  readonly length: number
  readonly origin: readonly [number, number]
  readonly turnDeg: number
}

interface TracePanelProps {
  readonly units: DisplayUnits
  readonly trace: Site['trace']
  readonly photoId: string
  readonly readOnly: boolean
  readonly onMark: (wish: TraceWish) => void
  readonly onRemove: () => void
}

/** A plan or map as a picture under the site's plan, to trace from: scaled by one known length in it. */
export function TracePanel({ units, trace, photoId, readOnly, onMark, onRemove }: TracePanelProps) {
  const [length, setLength] = useState<number | null>(null)
  const [x, setX] = useState(0)
  const [y, setY] = useState(0)
  const [turnDeg, setTurnDeg] = useState(0)
  const [asked, setAsked] = useState(false)
  const here = trace?.photoId === photoId
  return (
    <section aria-labelledby="trace">
      <h2 id="trace" className="text-sm font-strong">
        Trace the site from it
      </h2>
      <p className="mt-0.5 text-xs text-ink-3">
        For a plan seen straight from above. {here && 'It lies under the site’s plan now. '}
        {trace && !here && 'Another picture lies under the site’s plan; this one would take its place.'}
      </p>
      {!readOnly && (
        <div className="mt-1.5 grid auto-rows-[minmax(5.25rem,auto)] grid-cols-2 gap-x-3 pointer-coarse:auto-rows-[minmax(6rem,auto)]">
          <LengthInput
            label="Known length"
            units={units}
            min={0.01}
            max={1000}
            value={length}
            error={asked && length === null ? 'Needed before its ends are marked.' : null}
            onCommit={setLength}
          />
          <LengthInput label="First point, x" units={units} value={x} onCommit={setX} />
          <LengthInput label="First point, y" units={units} value={y} onCommit={setY} />
          <AngleField
            label="Turned by"
            value={turnDeg}
            check={(degrees) => (Math.abs(degrees) <= 360 ? null : 'Between −360 and 360°.')}
            onCommit={setTurnDeg}
          />
        </div>
      )}
      {!readOnly && (
        <p className="flex gap-2">
          <Button onClick={() => (length === null ? setAsked(true) : onMark({ length, origin: [x, y], turnDeg }))}>
            Mark its two ends
          </Button>
          {here && (
            <Button kind="text" onClick={onRemove}>
              Take it from under the plan
            </Button>
          )}
        </p>
      )}
    </section>
  )
}
