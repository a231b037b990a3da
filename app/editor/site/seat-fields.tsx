import { changeSeats } from '#app/domain/site/edits.ts'
import { isInside } from '#app/domain/site/geometry.ts'
import { seatSchema, type Seat } from '#app/domain/site/site.ts'
import { useSiteEditing } from '#app/editor/site/editing.ts'
import { DirectionInput, PickInput, TextInput } from '#app/editor/site/fact-inputs.tsx'
import { FieldGrid, FieldsFrame } from '#app/editor/site/fields-frame.tsx'
import { SizeInput } from '#app/editor/site/size-input.tsx'

interface SeatFieldsProps {
  readonly ids: readonly string[]
  readonly onRemove: () => void
}

/** Every fact of the chosen seats; several show what they share and are set together. */
export function SeatFields({ ids, onRemove }: SeatFieldsProps) {
  const { site } = useSiteEditing()
  const chosen = new Set(ids)
  const seats = site.seats.filter(({ id }) => chosen.has(id))
  const shared = <T,>(of: (seat: Seat) => T): T | null => {
    const [first] = seats
    return first && seats.every((seat) => of(seat) === of(first)) ? of(first) : null
  }
  const outside = seats.filter(({ x, y }) => !isInside(site.floor, x, y))
  const length = (label: string, name: 'x' | 'y' | 'bodyHeight' | 'headHeight', limits = {}) => (
    <SizeInput
      label={label}
      value={shared((seat) => seat[name])}
      edit={(old, metres) => changeSeats(old, ids, { [name]: metres })}
      {...limits}
    />
  )
  const heights = { min: 0.05, max: 3 }
  return (
    <FieldsFrame
      title={seats.length === 1 ? `Seat ${seats[0]?.id}` : `${seats.length} seats, set together`}
      note={outsideWords(outside)}
      onRemove={onRemove}
    >
      <FieldGrid key={ids.join()}>
        {length('Along, x', 'x')}
        {length('Away, y', 'y')}
        <DirectionInput
          label="Looks towards"
          hint="0 along x, 90 along y"
          value={shared((seat) => seat.facingDeg)}
          edit={(old, facingDeg) => changeSeats(old, ids, { facingDeg })}
        />
        <TextInput
          label="Table or group"
          maxLength={40}
          value={shared((seat) => seat.group)}
          edit={(old, group) => changeSeats(old, ids, { group })}
        />
        <PickInput
          label="Counts as"
          value={shared((seat) => seat.priority)}
          options={seatSchema.shape.priority.options.map((value) => ({ value, label: value }))}
          edit={(old, priority) => changeSeats(old, ids, { priority })}
        />
        <PickInput
          label="Posture"
          value={shared((seat) => seat.posture)}
          options={seatSchema.shape.posture.options.map((value) => ({ value, label: value }))}
          edit={(old, posture) => changeSeats(old, ids, { posture })}
        />
        {length('Body plane', 'bodyHeight', heights)}
        {length('Head plane', 'headHeight', heights)}
      </FieldGrid>
    </FieldsFrame>
  )
}

function outsideWords(outside: readonly Seat[]): string | undefined {
  const [first] = outside
  if (!first) return undefined
  return outside.length === 1
    ? `Seat ${first.id} is outside the floor. It is not counted until moved.`
    : `${outside.length} seats are outside the floor. They are not counted until moved.`
}
