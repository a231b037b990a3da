import { changePole, changeWall } from '#app/domain/site/edits.ts'
import type { Pole, Wall } from '#app/domain/site/site.ts'
import { chosenThing } from '#app/editor/site/choice.ts'
import { MaterialInput, PickInput, TextInput } from '#app/editor/site/fact-inputs.tsx'
import { FieldGrid, FieldsFrame } from '#app/editor/site/fields-frame.tsx'
import { putHandle } from '#app/editor/site/handles.ts'
import { SizeInput } from '#app/editor/site/size-input.tsx'

/** Every fact of a wall: its line, with the floor to its left, its top and what it is made of. */
export function WallFields({ wall, onRemove }: { wall: Wall; onRemove: () => void }) {
  const { id, top } = wall
  const end = (part: 0 | 1, axis: 0 | 1) => {
    const [x, y] = part === 0 ? wall.from : wall.to
    return (
      <SizeInput
        label={`${part === 0 ? 'From' : 'To'} ${axis === 0 ? 'x' : 'y'}`}
        value={axis === 0 ? x : y}
        edit={(old, metres) => putHandle(old, chosenThing('wall', id), part, axis === 0 ? [metres, y] : [x, metres])}
      />
    )
  }
  return (
    <FieldsFrame title={wall.name} note="The floor lies to the left of the way from–to." onRemove={onRemove}>
      <FieldGrid key={id}>
        <TextInput label="Name" value={wall.name} edit={(old, name) => changeWall(old, id, { name })} />
        <PickInput
          label="Top"
          value={top === null ? 'past' : 'own'}
          options={[
            { value: 'past', label: 'past the cover' },
            { value: 'own', label: 'at a height' },
          ]}
          edit={(old, which) => changeWall(old, id, { top: which === 'past' ? null : 3 })}
        />
        {top !== null && (
          <SizeInput
            label="Top at"
            value={top}
            min={-10}
            max={100}
            edit={(old, metres) => changeWall(old, id, { top: metres })}
          />
        )}
        {end(0, 0)}
        {end(0, 1)}
        {end(1, 0)}
        {end(1, 1)}
        <MaterialInput value={wall.material} edit={(old, material) => changeWall(old, id, { material })} />
        <TextInput
          label="What is known of the load"
          value={wall.loadStatus}
          edit={(old, loadStatus) => changeWall(old, id, { loadStatus })}
        />
      </FieldGrid>
    </FieldsFrame>
  )
}

/** Every fact of a post or pole. */
export function PoleFields({ pole, onRemove }: { pole: Pole; onRemove: () => void }) {
  const { id, at } = pole
  return (
    <FieldsFrame title={pole.name} onRemove={onRemove}>
      <FieldGrid key={id}>
        <TextInput label="Name" value={pole.name} edit={(old, name) => changePole(old, id, { name })} />
        <SizeInput label="x" value={at[0]} edit={(old, x) => changePole(old, id, { at: [x, at[1]] })} />
        <SizeInput label="y" value={at[1]} edit={(old, y) => changePole(old, id, { at: [at[0], y] })} />
        <SizeInput label="Top" value={pole.top} min={-10} max={100} edit={(old, top) => changePole(old, id, { top })} />
        <SizeInput
          label="Across"
          value={pole.diameter}
          min={0.001}
          max={2}
          edit={(old, diameter) => changePole(old, id, { diameter })}
        />
        <MaterialInput value={pole.material} edit={(old, material) => changePole(old, id, { material })} />
        <TextInput
          label="What is known of the load"
          value={pole.loadStatus}
          edit={(old, loadStatus) => changePole(old, id, { loadStatus })}
        />
      </FieldGrid>
    </FieldsFrame>
  )
}
