import { useEffect, useRef } from 'react'
import { OutcomeMark } from '#app/components/outcome-mark.tsx'

/** What is wrong with a form, on top of it, each linked to its field; takes the focus when it appears. */
export function ErrorSummary({ errors }: { errors: readonly { id: string; label: string; error: string }[] }) {
  const ref = useRef<HTMLDivElement>(null)
  useEffect(() => ref.current?.focus(), [errors])
  if (errors.length === 0) return null
  return (
    <div
      ref={ref}
      tabIndex={-1}
      role="alert"
      className="mb-6 rounded-md border border-clay bg-clay-wash px-4 py-3"
      aria-labelledby="error-summary"
    >
      <h2 id="error-summary" className="flex items-center gap-2 font-strong text-clay">
        <OutcomeMark outcome="fails" />
        {errors.length === 1 ? 'One answer is not right yet' : `${errors.length} answers are not right yet`}
      </h2>
      <ul className="mt-1.5 space-y-0.5">
        {errors.map(({ id, label, error }) => (
          <li key={id}>
            <a href={`#${id}`} className="inline-block py-0.5 underline">
              {label}
            </a>
            {': '}
            {error}
          </li>
        ))}
      </ul>
    </div>
  )
}
