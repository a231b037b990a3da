import {
  useId,
  type InputHTMLAttributes,
  type ReactNode,
  type SelectHTMLAttributes,
  type TextareaHTMLAttributes,
} from 'react'
import { OutcomeMark } from '#app/components/outcome-mark.tsx'

interface FieldText {
  label: string
  /** A word or range at the right of the label: "0–45", "assumed". */
  aside?: ReactNode
  hint?: ReactNode
  /** What is wrong, the limit and the way out, in one sentence. */
  error?: string | null | undefined
}

interface Control {
  id: string
  'aria-invalid': true | undefined
  'aria-describedby': string | undefined
}

interface FieldProps extends FieldText {
  /** Given when an error summary has to link here. */
  id?: string | undefined
  className?: string | undefined
  children: (control: Control) => ReactNode
}

/** A label, its control, and below it the hint or the error, tied together for readers. */
export function Field({ label, aside, hint, error, id, className = '', children }: FieldProps) {
  const own = useId()
  const controlId = id ?? own
  const noteId = `${controlId}-note`
  return (
    <div className={`min-w-0 ${className}`}>
      <label htmlFor={controlId} className="flex justify-between gap-2 text-2xs text-ink-2">
        <span>{label}</span>
        {aside !== undefined && <span className="text-ink-3">{aside}</span>}
      </label>
      {children({
        id: controlId,
        'aria-invalid': error ? true : undefined,
        'aria-describedby': error || hint ? noteId : undefined,
      })}
      <FieldNote id={noteId} error={error} hint={hint} />
    </div>
  )
}

/** The line below a control: the error when there is one, else the hint. */
function FieldNote({ id, error, hint }: { id: string; error?: string | null | undefined; hint?: ReactNode }) {
  if (error)
    return (
      <p id={id} className="mt-0.5 text-2xs font-medium text-clay">
        <span className="mr-1 inline-block align-[-1px]">
          <OutcomeMark outcome="fails" size={10} />
        </span>
        {error}
      </p>
    )
  if (hint)
    return (
      <p id={id} className="mt-0.5 text-2xs text-ink-3">
        {hint}
      </p>
    )
  return null
}

const edge = (error: boolean) =>
  `rounded-md border bg-paper-raised ${error ? 'border-clay shadow-[inset_0_0_0_1px_var(--color-clay)]' : 'border-rule-strong'}`

/** The frame of a one-line control, with its unit at the right end. */
export function FieldBox({
  error,
  unit,
  children,
}: {
  error: boolean
  unit?: string | undefined
  children: ReactNode
}) {
  return (
    <span
      className={`flex h-8 items-center gap-1.5 pr-2 has-[:focus-visible]:outline-2 has-[:focus-visible]:outline-offset-1 has-[:focus-visible]:outline-focus pointer-coarse:h-11 ${edge(error)}`}
    >
      {children}
      {unit && (
        <span aria-hidden="true" className="flex-none text-xs text-ink-3">
          {unit}
        </span>
      )}
    </span>
  )
}

/** The class of an input inside a FieldBox. */
export const inputClass =
  'h-full min-w-0 flex-1 rounded-md bg-transparent pl-2 font-medium text-ink outline-none placeholder:font-regular placeholder:text-ink-3 disabled:text-ink-3'

type TextFieldProps = FieldText &
  Omit<InputHTMLAttributes<HTMLInputElement>, 'children'> & { unit?: string; className?: string }

/** One line of text or a number. The unit is read with the label. */
export function TextField({ label, aside, hint, error, unit, className, id, ...input }: TextFieldProps) {
  return (
    <Field label={label} aside={aside} hint={hint} error={error} id={id} className={className}>
      {(control) => (
        <FieldBox error={Boolean(error)} unit={unit}>
          <input type="text" autoComplete="off" {...input} {...control} className={inputClass} />
        </FieldBox>
      )}
    </Field>
  )
}

type SelectFieldProps = FieldText &
  SelectHTMLAttributes<HTMLSelectElement> & {
    options: readonly { value: string; label: string; disabled?: boolean }[]
  }

/** One of a few named things; the system's own list. */
export function SelectField({ label, aside, hint, error, options, className, id, ...select }: SelectFieldProps) {
  return (
    <Field label={label} aside={aside} hint={hint} error={error} id={id} className={className}>
      {(control) => (
        <FieldBox error={Boolean(error)}>
          <select {...select} {...control} className={`${inputClass} -ml-1 cursor-pointer truncate pr-5`}>
            {options.map((option) => (
              <option key={option.value} value={option.value} disabled={option.disabled}>
                {option.label}
              </option>
            ))}
          </select>
        </FieldBox>
      )}
    </Field>
  )
}

type TextAreaFieldProps = FieldText & TextareaHTMLAttributes<HTMLTextAreaElement>

/** A few lines in the person's own words. */
export function TextAreaField({ label, aside, hint, error, className, id, ...area }: TextAreaFieldProps) {
  return (
    <Field label={label} aside={aside} hint={hint} error={error} id={id} className={className}>
      {(control) => (
        <textarea
          rows={3}
          {...area}
          {...control}
          className={`block w-full px-2 py-1.5 text-ink focus-visible:outline-2 focus-visible:outline-offset-1 focus-visible:outline-focus ${edge(Boolean(error))}`}
        />
      )}
    </Field>
  )
}

type CheckFieldProps = Omit<InputHTMLAttributes<HTMLInputElement>, 'type'> & { label: ReactNode }

/** A tick-box with its words at the right. */
export function CheckField({ label, className = '', ...input }: CheckFieldProps) {
  return (
    <label className={`inline-flex min-h-6 cursor-pointer items-center gap-1.5 pointer-coarse:min-h-11 ${className}`}>
      <input
        type="checkbox"
        className="size-4 flex-none accent-ink focus-visible:outline-2 focus-visible:outline-offset-2 focus-visible:outline-focus"
        {...input}
      />
      <span>{label}</span>
    </label>
  )
}
