import { useState } from 'react'
import { changeMember, repeatMember } from '#app/domain/site/edits.ts'
import { memberLength } from '#app/domain/site/member.ts'
import { refusalOf } from '#app/domain/site/site-faults.ts'
import type { Member } from '#app/domain/site/site.ts'
import { formatLength } from '#app/domain/units.ts'
import { Button } from '#app/components/button.tsx'
import { TextField } from '#app/components/field.tsx'
import { chosenThing } from '#app/editor/site/choice.ts'
import { useSiteEditing } from '#app/editor/site/editing.ts'
import { MaterialInput, PickInput, TextInput } from '#app/editor/site/fact-inputs.tsx'
import { FieldGrid, FieldsFrame } from '#app/editor/site/fields-frame.tsx'
import { putHandle } from '#app/editor/site/handles.ts'
import { LengthInput } from '#app/editor/site/length-input.tsx'
import { LoadInput } from '#app/editor/site/load-input.tsx'
import { SizeInput } from '#app/editor/site/size-input.tsx'

interface MemberFieldsProps {
  readonly member: Member
  readonly onRemove: () => void
}

/** Every fact of one beam, rafter, joist or purlin. */
export function MemberFields({ member, onRemove }: MemberFieldsProps) {
  const { site, readOnly } = useSiteEditing()
  const { id } = member
  const end = (part: 0 | 1, axis: 0 | 1) => {
    const [x, y] = part === 0 ? member.from : member.to
    return (
      <SizeInput
        label={`${part === 0 ? 'From' : 'To'} ${axis === 0 ? 'x' : 'y'}`}
        value={axis === 0 ? x : y}
        edit={(old, metres) => putHandle(old, chosenThing('member', id), part, axis === 0 ? [metres, y] : [x, metres])}
      />
    )
  }
  const section = (label: string, name: 'width' | 'depth') => (
    <SizeInput
      label={label}
      value={member[name]}
      min={0.001}
      max={2}
      edit={(old, metres) => changeMember(old, id, { [name]: metres })}
    />
  )
  return (
    <FieldsFrame
      title={member.name}
      note={`${formatLength(memberLength(member), site.displayUnits)} long in plan`}
      onRemove={onRemove}
    >
      <FieldGrid key={id}>
        <TextInput label="Name" value={member.name} edit={(old, name) => changeMember(old, id, { name })} />
        <TextInput label="Kind and section" value={member.kind} edit={(old, kind) => changeMember(old, id, { kind })} />
        <MaterialInput value={member.material} edit={(old, material) => changeMember(old, id, { material })} />
        {end(0, 0)}
        {end(0, 1)}
        {end(1, 0)}
        {end(1, 1)}
        {section('Wide', 'width')}
        {section('Deep', 'depth')}
        <Underside member={member} />
        <LoadInput
          value={member.allowedPointLoad}
          edit={(old, allowedPointLoad) => changeMember(old, id, { allowedPointLoad })}
        />
        <TextInput
          label="What is known of the load"
          value={member.loadStatus}
          edit={(old, loadStatus) => changeMember(old, id, { loadStatus })}
        />
      </FieldGrid>
      {!readOnly && <Repeat member={member} />}
    </FieldsFrame>
  )
}

function Underside({ member: { id, underside } }: { member: Member }) {
  const { site } = useSiteEditing()
  const follows = 'follows' in underside ? underside.follows : ''
  const heights = 'follows' in underside ? null : underside
  const height = (label: string, name: 'from' | 'to') =>
    heights && (
      <SizeInput
        label={label}
        value={heights[name]}
        min={-10}
        max={100}
        edit={(old, metres) => changeMember(old, id, { underside: { ...heights, [name]: metres } })}
      />
    )
  return (
    <>
      <PickInput
        label="Underside"
        value={follows}
        options={[
          { value: '', label: 'its own heights' },
          ...site.covers.map((cover) => ({ value: cover.id, label: `under ${cover.name}` })),
        ]}
        edit={(old, cover) =>
          changeMember(old, id, { underside: cover === '' ? { from: 2.6, to: 2.6 } : { follows: cover } })
        }
      />
      {height('Underside at from', 'from')}
      {height('Underside at to', 'to')}
    </>
  )
}

/** Copies at a spacing square to the member: along x for one that runs away from the wall, along y for one beside it. */
function Repeat({ member }: { member: Member }) {
  const { site, change } = useSiteEditing()
  const [spacing, setSpacing] = useState<number | null>(null)
  const [count, setCount] = useState('1')
  const many = Number(count)
  const counts = Number.isInteger(many) && many >= 1 && many <= 50
  const alongX = Math.abs(member.to[1] - member.from[1]) >= Math.abs(member.to[0] - member.from[0])
  const by = (metres: number) => repeatMember(site, member.id, alongX ? metres : 0, alongX ? 0 : metres, many)
  const refusal = spacing !== null && spacing !== 0 && counts ? refusalOf(site, by(spacing)) : null
  return (
    <div className="mt-3 grid grid-cols-2 items-start gap-x-3 gap-y-2 tablet:grid-cols-4 wide:grid-cols-3">
      <LengthInput
        label={`Repeat along ${alongX ? 'x' : 'y'} every`}
        units={site.displayUnits}
        value={spacing}
        min={-100}
        max={100}
        error={refusal?.message ?? null}
        onCommit={setSpacing}
      />
      <TextField
        label="Times"
        inputMode="numeric"
        value={count}
        error={counts ? null : 'Between 1 and 50.'}
        onChange={(event) => setCount(event.target.value)}
      />
      <p className="pt-4">
        <Button
          disabled={spacing === null || spacing === 0 || !counts || refusal !== null}
          onClick={() => spacing !== null && change(() => by(spacing))}
        >
          Repeat
        </Button>
      </p>
    </div>
  )
}
