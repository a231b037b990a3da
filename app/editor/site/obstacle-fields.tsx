import { useState } from 'react'
import { changeObstacle } from '#app/domain/site/edits.ts'
import type { Obstacle } from '#app/domain/site/site.ts'
import { usualStates } from '#app/domain/site/usual-states.ts'
import { CheckField, TextField } from '#app/components/field.tsx'
import type { Chosen } from '#app/editor/site/choice.ts'
import { useSiteEditing } from '#app/editor/site/editing.ts'
import { MaterialInput, PickInput, TextInput } from '#app/editor/site/fact-inputs.tsx'
import { FieldGrid, FieldsFrame } from '#app/editor/site/fields-frame.tsx'
import { changeShape } from '#app/editor/site/handles.ts'
import { obstacleKinds } from '#app/editor/site/obstacle-kinds.ts'
import { OutlineFields } from '#app/editor/site/outline-fields.tsx'
import { ShapeFields } from '#app/editor/site/shape-fields.tsx'
import { StateFields } from '#app/editor/site/state-fields.tsx'

interface ObstacleFieldsProps {
  readonly obstacle: Obstacle
  readonly chosen: Chosen
  readonly onChoose: (chosen: Chosen) => void
  readonly onRemove: () => void
}

/** Every fact of a thing that stands in the way, and the states of one that moves. */
export function ObstacleFields({ obstacle, chosen, onChoose, onRemove }: ObstacleFieldsProps) {
  const { readOnly, change } = useSiteEditing()
  const { id, shape, kind, movable } = obstacle
  const setMovable = (moves: boolean) =>
    change((old) =>
      changeObstacle(old, id, (before) =>
        moves ? { movable: true, states: before.states ?? usualStates(before.kind, before.shape) } : { movable: false },
      ),
    )
  return (
    <FieldsFrame
      title={obstacle.name}
      note={movable ? 'The shape is all that it sweeps; it is judged in every state.' : undefined}
      onRemove={onRemove}
    >
      <div key={id} className="space-y-3">
        <FieldGrid>
          <TextInput label="Name" value={obstacle.name} edit={(old, name) => changeObstacle(old, id, { name })} />
          <PickInput
            label="Kind"
            value={kind}
            options={obstacleKinds.map((value) => ({ value, label: value }))}
            edit={(old, next) => changeObstacle(old, id, { kind: next })}
          />
          <MaterialInput value={obstacle.material} edit={(old, material) => changeObstacle(old, id, { material })} />
          <ShapeFields shape={shape} edit={(old, next) => changeShape(old, id, () => next)} />
          <Transmittance obstacle={obstacle} />
          <TextInput
            label="Note"
            value={obstacle.note ?? ''}
            edit={(old, note) => changeObstacle(old, id, { note: note || null })}
          />
          <CheckField
            label="It moves"
            checked={movable}
            disabled={readOnly}
            onChange={(event) => setMovable(event.target.checked)}
          />
        </FieldGrid>
        {shape.kind === 'prism' && (
          <OutlineFields
            {...{ chosen, onChoose }}
            replace={(old, outline) =>
              changeShape(old, id, (before) => ({
                kind: 'prism',
                outline: outline.map(([x, y]): [number, number] => [x, y]),
                z: before.z,
              }))
            }
          />
        )}
        {movable && <StateFields obstacle={obstacle} />}
      </div>
    </FieldsFrame>
  )
}

/** Share of the radiation that passes, in per cent. */
function Transmittance({ obstacle: { id, transmittance } }: { obstacle: Obstacle }) {
  const { readOnly, change } = useSiteEditing()
  const [typed, setTyped] = useState<string | null>(null)
  const kept = String(Math.round(transmittance * 1000) / 10)
  const value = Number((typed ?? kept).replace(',', '.').replace(/ ?%$/, ''))
  const wrong = !(value >= 0 && value <= 100) || typed === ''
  const commit = () => {
    if (typed === null || wrong) return
    change((old) => changeObstacle(old, id, { transmittance: value / 100 }))
    setTyped(null)
  }
  return (
    <TextField
      label="Radiation that passes"
      unit="%"
      inputMode="decimal"
      value={typed ?? kept}
      disabled={readOnly}
      error={wrong ? 'Between 0, nothing, and 100, all of it.' : null}
      onChange={(event) => setTyped(event.target.value)}
      onBlur={commit}
      onKeyDown={(event) => event.key === 'Enter' && commit()}
    />
  )
}
