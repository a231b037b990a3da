import { changeTable } from '#app/domain/site/edits.ts'
import type { Site, Table } from '#app/domain/site/site.ts'
import type { Chosen } from '#app/editor/site/choice.ts'
import { DirectionInput, MaterialInput, PickInput } from '#app/editor/site/fact-inputs.tsx'
import { FieldGrid, FieldsFrame } from '#app/editor/site/fields-frame.tsx'
import { SeatsAtTable } from '#app/editor/site/seats-at-table.tsx'
import { useSiteEditing } from '#app/editor/site/editing.ts'
import { SizeInput } from '#app/editor/site/size-input.tsx'

interface TableFieldsProps {
  readonly table: Table
  readonly onChoose: (chosen: Chosen) => void
  readonly onRemove: () => void
}

/** Every fact of a table or bar, and the way to set seats around it. */
export function TableFields({ table, onChoose, onRemove }: TableFieldsProps) {
  const { readOnly } = useSiteEditing()
  const { id, centre, size } = table
  const round = table.form === 'round'
  const withSize = (old: Site, next: [number, number]) => changeTable(old, id, { size: next })
  return (
    <FieldsFrame title={id.startsWith('table') ? id.replace('-', ' ') : `Table ${id}`} onRemove={onRemove}>
      <div key={id} className="space-y-3">
        <FieldGrid>
          <PickInput
            label="Form"
            value={table.form ?? 'rectangular'}
            options={[
              { value: 'rectangular', label: 'rectangular' },
              { value: 'round', label: 'round' },
            ]}
            edit={(old, form) =>
              changeTable(old, id, { form, size: form === 'round' ? [size[0], size[0]] : [size[0], size[1]] })
            }
          />
          <SizeInput
            label="Middle x"
            value={centre[0]}
            edit={(old, x) => changeTable(old, id, { centre: [x, centre[1]] })}
          />
          <SizeInput
            label="Middle y"
            value={centre[1]}
            edit={(old, y) => changeTable(old, id, { centre: [centre[0], y] })}
          />
          <SizeInput
            label={round ? 'Across' : 'Long'}
            value={size[0]}
            min={0.1}
            max={50}
            edit={(old, long) => withSize(old, [long, round ? long : size[1]])}
          />
          {!round && (
            <SizeInput
              label="Deep"
              value={size[1]}
              min={0.1}
              max={50}
              edit={(old, deep) => withSize(old, [size[0], deep])}
            />
          )}
          <DirectionInput
            label="Turned"
            value={table.turnDeg}
            hint="0: its length along x"
            edit={(old, turnDeg) => changeTable(old, id, { turnDeg })}
          />
          <SizeInput
            label="Top"
            value={table.height}
            min={0.1}
            max={2}
            edit={(old, height) => changeTable(old, id, { height })}
          />
          <MaterialInput value={table.material} edit={(old, material) => changeTable(old, id, { material })} />
        </FieldGrid>
        {!readOnly && <SeatsAtTable table={table} onChoose={onChoose} />}
      </div>
    </FieldsFrame>
  )
}
