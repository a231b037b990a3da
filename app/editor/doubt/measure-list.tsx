import { useState } from 'react'
import { measureText, type MeasureLine } from '#app/domain/doubt/in-words.ts'
import { Button } from '#app/components/button.tsx'

interface MeasureListProps {
  readonly lines: readonly MeasureLine[]
  /** Heading of the copied text. */
  readonly title: string
}

/** "Measure these next", for the customer: plain words, to print or to copy. */
export function MeasureList({ lines, title }: MeasureListProps) {
  const [copied, setCopied] = useState<'no' | 'yes' | 'by hand'>('no')
  const text = measureText(lines, title)
  const copy = () =>
    navigator.clipboard.writeText(text).then(
      () => setCopied('yes'),
      () => setCopied('by hand'),
    )
  return (
    <section aria-labelledby="measure-title">
      <header className="mb-1 flex flex-wrap items-center gap-2">
        <h2 id="measure-title" className="flex-1 text-base font-strong">
          For the customer
        </h2>
        {lines.length > 0 && (
          <span className="flex gap-2 print:hidden">
            <Button size="small" onClick={() => void copy()}>
              Copy as text
            </Button>
            <Button size="small" onClick={() => window.print()}>
              Print
            </Button>
          </span>
        )}
      </header>
      <p role="status" className="text-xs text-ink-2 print:hidden">
        {copied === 'yes' && 'Copied.'}
        {copied === 'by hand' && 'This browser does not copy by itself. Choose the text below and copy it.'}
      </p>
      {copied === 'by hand' && (
        <textarea
          readOnly
          aria-label="The list as text"
          rows={8}
          value={text}
          className="mb-2 block w-full rounded-md border border-rule-strong bg-paper-raised p-2 text-xs text-ink"
        />
      )}
      {lines.length === 0 ? (
        <p className="text-ink-2">No stated size changes these figures by as much as 1 % or settles a check.</p>
      ) : (
        <ol className="list-decimal pl-5 text-base">
          {lines.map(({ key, label, now, why }) => (
            <li key={key} className="break-inside-avoid border-t border-rule py-2 first:border-t-0">
              <span className="font-medium">{label}</span>
              <span className="text-ink-2">: {now}</span>
              <span className="block text-sm text-ink-2">{why}</span>
            </li>
          ))}
        </ol>
      )}
    </section>
  )
}
