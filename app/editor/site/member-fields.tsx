import { useState } from 'react'
import { changeMember, moveMemberEnd, repeatMember } from '#app/domain/site/edits.ts'
import { materialSchema, type Member, type Site } from '#app/domain/site/site.ts'
import { Button } from '#app/components/button.tsx'
import { SelectField, TextField } from '#app/components/field.tsx'
import { LengthInput } from '#app/editor/site/length-input.tsx'

interface MemberFieldsProps {
  readonly site: Site
  readonly member: Member
  readonly readOnly: boolean
  readonly onChange: (edit: (site: Site) => Site) => void
  readonly onRemove: () => void
}

/** Every fact of one beam, rafter, joist or purlin. */
export function MemberFields({ site, member, readOnly, onChange, onRemove }: MemberFieldsProps) {
  const units = site.displayUnits
  const { id } = member
  const set = (facts: Partial<Omit<Member, 'id'>>) => onChange((old) => changeMember(old, id, facts))
  const end = (which: 'from' | 'to', axis: 0 | 1) => (
    <LengthInput
      label={`${which === 'from' ? 'From' : 'To'} ${axis === 0 ? 'x' : 'y'}`}
      units={units}
      value={member[which][axis]}
      disabled={readOnly}
      onCommit={(metres) => {
        const [x, y] = member[which]
        onChange((old) => moveMemberEnd(old, id, which, axis === 0 ? [metres, y] : [x, metres]))
      }}
    />
  )
  const size = (label: string, name: 'width' | 'depth') => (
    <LengthInput
      label={label}
      units={units}
      value={member[name]}
      min={0.001}
      max={2}
      disabled={readOnly}
      onCommit={(metres) => set({ [name]: metres })}
    />
  )
  return (
    <section aria-labelledby="chosen-title" className="border-b border-rule pb-4">
      <header className="mb-2 flex items-center justify-between">
        <h2 id="chosen-title" className="text-sm font-strong">
          {member.name}
        </h2>
        {!readOnly && (
          <Button kind="danger" size="small" icon="remove" onClick={onRemove}>
            Remove
          </Button>
        )}
      </header>
      <div key={id} className="grid grid-cols-2 gap-x-3 gap-y-2.5 tablet:grid-cols-4">
        {end('from', 0)}
        {end('from', 1)}
        {end('to', 0)}
        {end('to', 1)}
        <Underside site={site} member={member} readOnly={readOnly} onSet={(underside) => set({ underside })} />
        {size('Wide', 'width')}
        {size('Deep', 'depth')}
        <SelectField
          label="Material"
          value={member.material}
          disabled={readOnly}
          hint={member.material === 'unknown' ? 'Judged as combustible' : ''}
          options={materialSchema.options.map((value) => ({ value, label: value }))}
          onChange={(event) => {
            const read = materialSchema.safeParse(event.target.value)
            if (read.success) set({ material: read.data })
          }}
        />
      </div>
      {!readOnly && (
        <Repeat site={site} onRepeat={(dx, count) => onChange((old) => repeatMember(old, id, dx, 0, count))} />
      )}
    </section>
  )
}

interface UndersideProps {
  site: Site
  member: Member
  readOnly: boolean
  onSet: (underside: Member['underside']) => void
}

function Underside({ site, member: { underside }, readOnly, onSet }: UndersideProps) {
  const heights = 'follows' in underside ? null : underside
  const options = [
    { value: '', label: 'its own heights' },
    ...site.covers.map(({ id, name }) => ({ value: id, label: `under ${name}` })),
  ]
  const height = (label: string, name: 'from' | 'to') =>
    heights && (
      <LengthInput
        label={label}
        units={site.displayUnits}
        value={heights[name]}
        min={-10}
        max={100}
        disabled={readOnly}
        onCommit={(metres) => onSet({ ...heights, [name]: metres })}
      />
    )
  return (
    <>
      <SelectField
        label="Underside"
        value={'follows' in underside ? underside.follows : ''}
        disabled={readOnly}
        options={options}
        onChange={(event) =>
          onSet(event.target.value === '' ? { from: 2.6, to: 2.6 } : { follows: event.target.value })
        }
      />
      {height('Underside at from', 'from')}
      {height('Underside at to', 'to')}
    </>
  )
}

function Repeat({ site, onRepeat }: { site: Site; onRepeat: (dx: number, count: number) => void }) {
  const [spacing, setSpacing] = useState<number | null>(null)
  const [count, setCount] = useState('1')
  const many = Number(count)
  const ready = spacing !== null && spacing !== 0 && Number.isInteger(many) && many >= 1 && many <= 50
  return (
    <div className="mt-3 grid grid-cols-2 items-start gap-x-3 gap-y-2 tablet:grid-cols-4">
      <LengthInput
        label="Repeat along x every"
        units={site.displayUnits}
        value={spacing}
        min={-100}
        max={100}
        onCommit={setSpacing}
      />
      <TextField
        label="Times"
        inputMode="numeric"
        value={count}
        error={Number.isInteger(many) && many >= 1 && many <= 50 ? null : 'Between 1 and 50.'}
        onChange={(event) => setCount(event.target.value)}
      />
      <p className="pt-4">
        <Button disabled={!ready} onClick={() => spacing !== null && onRepeat(spacing, many)}>
          Repeat
        </Button>
      </p>
    </div>
  )
}
