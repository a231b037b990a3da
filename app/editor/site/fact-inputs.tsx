import { useState } from 'react'
import { refusalOf } from '#app/domain/site/site-faults.ts'
import { materialSchema, type Material, type Site } from '#app/domain/site/site.ts'
import { SelectField, TextField } from '#app/components/field.tsx'
import { AngleField } from '#app/editor/panels/angle-field.tsx'
import { useSiteEditing } from '#app/editor/site/editing.ts'

interface TextInputProps {
  readonly label: string
  /** null where several differ. */
  readonly value: string | null
  readonly maxLength?: number
  readonly hint?: string
  readonly className?: string
  readonly edit: (site: Site, text: string) => Site
}

/** Words about a thing, kept when the field is left. */
export function TextInput({ label, value, maxLength = 200, hint, className, edit }: TextInputProps) {
  const { readOnly, change } = useSiteEditing()
  const [typed, setTyped] = useState<string | null>(null)
  const commit = () => {
    if (typed !== null && typed.trim() !== value) change((old) => edit(old, typed.trim()))
    setTyped(null)
  }
  return (
    <TextField
      label={label}
      maxLength={maxLength}
      hint={hint}
      {...(className === undefined ? {} : { className })}
      placeholder={value === null ? 'differ' : ''}
      value={typed ?? value ?? ''}
      disabled={readOnly}
      onChange={(event) => setTyped(event.target.value)}
      onBlur={commit}
      onKeyDown={(event) => event.key === 'Enter' && commit()}
    />
  )
}

interface PickInputProps<T extends string> {
  readonly label: string
  /** null where several differ. */
  readonly value: T | null
  readonly options: readonly { readonly value: T; readonly label: string }[]
  readonly hint?: string
  readonly edit: (site: Site, value: T) => Site
}

/** One of a few named things; a choice that would break the site says so and is not taken. */
export function PickInput<T extends string>({ label, value, options, hint, edit }: PickInputProps<T>) {
  const { site, readOnly, change } = useSiteEditing()
  const [error, setError] = useState<string | null>(null)
  const differ = value === null ? [{ value: '', label: 'differ', disabled: true }] : []
  return (
    <SelectField
      label={label}
      value={value ?? ''}
      disabled={readOnly}
      hint={hint}
      error={error}
      options={[...differ, ...options]}
      onChange={(event) => {
        const picked = options.find((option) => option.value === event.target.value)
        if (!picked) return
        const refusal = refusalOf(site, edit(site, picked.value))
        setError(refusal?.message ?? null)
        if (!refusal) change((old) => edit(old, picked.value))
      }}
    />
  )
}

interface MaterialInputProps {
  readonly value: Material
  readonly edit: (site: Site, material: Material) => Site
}

export function MaterialInput({ value, edit }: MaterialInputProps) {
  return (
    <PickInput
      label="Material"
      value={value}
      hint={value === 'unknown' ? 'Judged as combustible' : ''}
      options={materialSchema.options.map((each) => ({ value: each, label: each }))}
      edit={edit}
    />
  )
}

interface DirectionInputProps {
  readonly label: string
  readonly value: number | null
  readonly hint?: string
  readonly edit: (site: Site, degrees: number) => Site
}

/** A direction in plan, degrees counter-clockwise from +x. */
export function DirectionInput({ label, value, hint, edit }: DirectionInputProps) {
  const { readOnly, change } = useSiteEditing()
  return (
    <AngleField
      label={label}
      hint={hint}
      value={value}
      check={(degrees) => (Math.abs(degrees) > 360 ? 'Between −360 and 360°.' : null)}
      disabled={readOnly}
      onCommit={(degrees) => change((old) => edit(old, degrees))}
    />
  )
}
