import { useMemo, useState } from 'react'
import { moveMark } from '#app/domain/photo/mark-places.ts'
import type { PhotoMarks } from '#app/domain/photo/measurements.ts'
import type { MarkedPhoto } from '#app/domain/photo/length-in-plane.ts'
import { isRefused } from '#app/domain/photo/refusal.ts'
import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'
import type { Site } from '#app/domain/site/site.ts'
import { formatLength } from '#app/domain/units.ts'
import { Button } from '#app/components/button.tsx'
import { TextField } from '#app/components/field.tsx'
import { measuredIn } from '#app/editor/photo/measured.ts'
import { MeasurementPanel } from '#app/editor/photo/measurement-panel.tsx'
import { PhotoSurface } from '#app/editor/photo/photo-surface.tsx'
import type { Mark } from '#app/editor/photo/placing.ts'
import { PlanePanel } from '#app/editor/photo/plane-panel.tsx'
import { TracePanel, type TraceWish } from '#app/editor/photo/trace-panel.tsx'
import type { SizeUse } from '#app/editor/photo/use-as-size.tsx'
import { usePlacing } from '#app/editor/photo/use-placing.ts'

interface PhotoEditorProps extends Pick<SizeUse, 'onUse'> {
  readonly photo: { readonly id: string; readonly name: string; readonly width: number; readonly height: number }
  readonly picture: string
  readonly marks: PhotoMarks
  /** The job's other photos, for further readings of the same lengths. */
  readonly others: readonly MarkedPhoto[]
  readonly site: Site
  readonly rules: HouseRules
  readonly readOnly: boolean
  /** Id of the measurement that the page was opened at. */
  readonly opened: string | null
  readonly onChange: (edit: (marks: PhotoMarks) => PhotoMarks) => void
  readonly onUndo: () => void
  readonly onRedo: () => void
  readonly onTrace: (wish: TraceWish, points: readonly Mark[]) => void
  readonly onUntrace: () => void
}

/** A photo to measure in: the picture with its marks, and beside it planes, lengths, heights and what becomes of them. */
export function PhotoEditor(props: PhotoEditorProps) {
  const { photo, marks, others, site, rules, readOnly, onChange } = props
  const units = site.displayUnits
  const [chosen, setChosen] = useState<string | null>(null)
  const [strong, setStrong] = useState(props.opened)
  const [wish, setWish] = useState<TraceWish | null>(null)
  const placing = usePlacing(onChange, (points) => wish && props.onTrace(wish, points))
  const measured = useMemo(() => measuredIn({ id: photo.id, marks }, others, rules), [photo.id, marks, others, rules])
  const figures = useMemo(
    () =>
      new Map(
        measured.map(({ measurement, own }) => [
          measurement.id,
          `${measurement.label} ${isRefused(own) ? '–' : formatLength(own.value, units)}`,
        ]),
      ),
    [measured, units],
  )
  const choose = (path: string | null) => {
    setChosen(path)
    const [list, index] = path?.split('.') ?? []
    const things = list === 'planes' ? marks.planes : marks.measurements
    if (path) setStrong(things[Number(index)]?.id ?? null)
  }
  const panel = { marks, units, rules, readOnly, onChange, onPlacing: placing.start }
  return (
    <div className="grid items-start gap-x-6 gap-y-4 *:min-w-0 wide-tablet:grid-cols-[minmax(0,1fr)_22rem] wide:grid-cols-[minmax(0,1fr)_29rem]">
      <div className="z-10 wide-tablet:sticky wide-tablet:top-3">
        <AskedLine placing={placing} chosen={chosen !== null} readOnly={readOnly} />
        <PhotoSurface
          picture={props.picture}
          name={photo.name}
          width={photo.width}
          height={photo.height}
          {...{ marks, figures, strong, chosen, readOnly }}
          asked={placing.asked}
          onChoose={choose}
          onMove={(path, at) => onChange((old) => moveMark(old, path, at))}
          onPlace={placing.put}
          onUndo={placing.asked ? placing.back : props.onUndo}
          onRedo={props.onRedo}
          onCancel={placing.cancel}
        />
      </div>
      <div className="space-y-5">
        <MeasurementPanel
          {...panel}
          {...{ measured, strong }}
          sizes={site.dimensions}
          onUse={props.onUse}
          onStrong={(id) => setStrong(id)}
        />
        <PlanePanel {...panel} />
        <ClickField
          sigma={marks.clickSigma}
          readOnly={readOnly}
          onCommit={(clickSigma) => onChange((old) => ({ ...old, clickSigma }))}
        />
        <TracePanel
          units={units}
          trace={site.trace}
          photoId={photo.id}
          readOnly={readOnly}
          onRemove={props.onUntrace}
          onMark={(wanted) => {
            setWish(wanted)
            placing.start({ kind: 'trace' })
          }}
        />
      </div>
    </div>
  )
}

interface AskedProps {
  readonly placing: ReturnType<typeof usePlacing>
  readonly chosen: boolean
  readonly readOnly: boolean
}

/** What the next click puts, and the ways out of it. */
function AskedLine({ placing: { asked, back, cancel }, chosen, readOnly }: AskedProps) {
  if (!asked) {
    const words = readOnly
      ? 'You read what is marked in this photo.'
      : chosen
        ? 'Drag the mark, or move it with the arrows: 1 px each, with Shift 10 px.'
        : 'Choose a mark to move it. Wheel, fingers or + and − change the size.'
    return <p className="flex min-h-11 items-center text-ink-2">{words}</p>
  }
  return (
    <p className="flex min-h-11 flex-wrap items-center gap-x-3">
      <span role="status">
        <b className="font-medium">
          Mark {asked.step} of {asked.of}:
        </b>{' '}
        {asked.words}.
      </span>
      <span className="flex gap-1">
        {asked.step > 1 && (
          <Button kind="text" size="small" icon="undo" onClick={back}>
            Last mark again
          </Button>
        )}
        <Button kind="text" size="small" onClick={cancel}>
          Leave it
        </Button>
      </span>
    </p>
  )
}

interface ClickProps {
  readonly sigma: number
  readonly readOnly: boolean
  readonly onCommit: (sigma: number) => void
}

function ClickField({ sigma, readOnly, onCommit }: ClickProps) {
  const [typed, setTyped] = useState<string | null>(null)
  const read = (text: string) => Number(text.trim().replace(',', '.'))
  const fits = (value: number) => value >= 0.1 && value <= 20
  const wrong = typed !== null && !fits(read(typed))
  const commit = () => {
    if (typed === null || wrong) return
    onCommit(read(typed))
    setTyped(null)
  }
  return (
    <TextField
      className="max-w-60"
      label="Standard error of every mark"
      unit="px"
      inputMode="decimal"
      disabled={readOnly}
      hint="1 px for a sharp corner that is marked with the magnifier."
      error={wrong ? 'Between 0.1 and 20 px.' : null}
      value={typed ?? `${sigma}`}
      onChange={(event) => setTyped(event.target.value)}
      onBlur={commit}
      onKeyDown={(event) => event.key === 'Enter' && commit()}
    />
  )
}
