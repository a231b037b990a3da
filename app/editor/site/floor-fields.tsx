import { changeLevel } from '#app/domain/site/edits.ts'
import { replaceFloor, setBeyond } from '#app/domain/site/floor-edits.ts'
import { areaOf } from '#app/domain/site/geometry.ts'
import type { Level, Site } from '#app/domain/site/site.ts'
import { formatQuantity } from '#app/domain/units.ts'
import type { Chosen } from '#app/editor/site/choice.ts'
import { useSiteEditing } from '#app/editor/site/editing.ts'
import { PickInput, TextInput } from '#app/editor/site/fact-inputs.tsx'
import { FieldGrid, FieldsFrame } from '#app/editor/site/fields-frame.tsx'
import { OutlineFields } from '#app/editor/site/outline-fields.tsx'
import { SizeInput } from '#app/editor/site/size-input.tsx'

interface FloorFieldsProps {
  readonly chosen: Chosen
  readonly onChoose: (chosen: Chosen) => void
}

/** The floor: its outline, and what lies beyond the edge that starts at the chosen corner. */
export function FloorFields({ chosen, onChoose }: FloorFieldsProps) {
  const { site } = useSiteEditing()
  return (
    <FieldsFrame
      title={chosen.part === null ? 'Floor' : `Floor, corner ${chosen.part + 1}`}
      note={`${site.floor.length} corners, ${formatQuantity(Math.abs(areaOf(site.floor)), 'area', site.displayUnits)}. Drag a corner or the middle of an edge; the arrows move the chosen corner.`}
    >
      <OutlineFields {...{ chosen, onChoose }} replace={withFloor} />
      {chosen.part !== null && <BeyondFields key={chosen.part} edge={chosen.part} />}
    </FieldsFrame>
  )
}

/** The floor with as many corners keeps what lies beyond its edges and what sizes decide. */
const withFloor = (site: Site, outline: Parameters<typeof replaceFloor>[1]): Site =>
  outline.length === site.floor.length
    ? { ...site, floor: outline.map(([x, y]): [number, number] => [x, y]) }
    : replaceFloor(site, outline)

const kinds = ['', 'water', 'garden', 'street', 'drop'] as const
const kindWords = { '': 'nothing said', water: 'water', garden: 'a garden', street: 'a street', drop: 'a drop' }

function BeyondFields({ edge }: { edge: number }) {
  const { site } = useSiteEditing()
  const place = site.beyond.find((each) => each.edge === edge)
  const next = ((edge + 1) % site.floor.length) + 1
  return (
    <div className="mt-3">
      <FieldGrid>
        <PickInput
          label={`Beyond edge ${edge + 1} to ${next}`}
          value={place?.kind ?? ''}
          options={kinds.map((value) => ({ value, label: kindWords[value] }))}
          edit={(old, kind) =>
            setBeyond(old, edge, kind === '' ? null : { kind, name: place?.name ?? kindWords[kind] })
          }
        />
        {place && (
          <TextInput
            label="Its name"
            value={place.name}
            edit={(old, name) => setBeyond(old, edge, { kind: place.kind, name })}
          />
        )}
      </FieldGrid>
    </div>
  )
}

interface LevelFieldsProps extends FloorFieldsProps {
  readonly level: Level
  readonly onRemove: () => void
}

/** A part of the floor that lies higher or lower than the finished floor. */
export function LevelFields({ level, chosen, onChoose, onRemove }: LevelFieldsProps) {
  const { id } = level
  return (
    <FieldsFrame title={level.name} note="Heights everywhere are from the finished floor." onRemove={onRemove}>
      <div key={id} className="space-y-3">
        <FieldGrid>
          <TextInput label="Name" value={level.name} edit={(old, name) => changeLevel(old, id, { name })} />
          <SizeInput
            label="Above the finished floor"
            value={level.height}
            min={-10}
            max={100}
            hint="Below it with a minus"
            edit={(old, height) => changeLevel(old, id, { height })}
          />
        </FieldGrid>
        <OutlineFields
          {...{ chosen, onChoose }}
          replace={(old, outline) =>
            changeLevel(old, id, { outline: outline.map(([x, y]): [number, number] => [x, y]) })
          }
        />
      </div>
    </FieldsFrame>
  )
}
