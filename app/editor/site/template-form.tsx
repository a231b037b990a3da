import { useState } from 'react'
import { sizeSourceSchema, type SizeSource } from '#app/domain/site/site.ts'
import { siteTemplates } from '#app/domain/site/templates/site-templates.ts'
import { formatLength } from '#app/domain/units.ts'
import { Button } from '#app/components/button.tsx'
import { SelectField } from '#app/components/field.tsx'
import { useSiteEditing } from '#app/editor/site/editing.ts'
import { LengthInput } from '#app/editor/site/length-input.tsx'

/** Starts the site from a kind of place, with the sizes that are known; the others count as guessed. */
export function TemplateForm({ onDone }: { onDone: () => void }) {
  const { site, rules, change } = useSiteEditing()
  const [key, setKey] = useState(siteTemplates[0]?.key ?? '')
  const [source, setSource] = useState<SizeSource>('tape')
  const [given, setGiven] = useState<ReadonlyMap<string, number>>(new Map())
  const template = siteTemplates.find((each) => each.key === key)
  if (!template) return null
  const made = template.start(given, source, site, rules)
  const refused = 'error' in made ? made.error : null
  return (
    <section
      aria-labelledby="template-title"
      className="mb-5 rounded-md border border-rule bg-paper-raised px-4 py-3.5"
    >
      <header className="flex items-center justify-between gap-3">
        <h2 id="template-title" className="text-base font-strong">
          Start from a kind of place
        </h2>
        <Button kind="text" size="small" onClick={onDone}>
          Close
        </Button>
      </header>
      <fieldset className="my-2 grid gap-x-4 gap-y-1 tablet:grid-cols-2">
        <legend className="sr-only">Kind of place</legend>
        {siteTemplates.map((each) => (
          <label
            key={each.key}
            className="flex min-h-8 cursor-pointer items-baseline gap-2 py-0.5 pointer-coarse:min-h-12 pointer-coarse:items-center"
          >
            <input
              type="radio"
              name="template"
              checked={each.key === key}
              onChange={() => {
                setKey(each.key)
                setGiven(new Map())
              }}
              className="size-4 flex-none self-center accent-ink"
            />
            <span>
              <span className="font-medium">{each.name}.</span> <span className="text-ink-2">{each.says}</span>
            </span>
          </label>
        ))}
      </fieldset>
      <div className="grid grid-cols-2 items-start gap-x-3 gap-y-2.5 tablet:grid-cols-4">
        {template.sizes.map((size) => (
          <LengthInput
            key={`${key} ${size.key}`}
            label={sentence(size.label)}
            units={site.displayUnits}
            value={given.get(size.key) ?? null}
            min={size.min}
            max={size.max}
            hint={given.has(size.key) ? '' : `Else ${formatLength(size.usual, site.displayUnits)}, guessed`}
            onCommit={(metres) => setGiven((old) => new Map(old).set(size.key, metres))}
          />
        ))}
        <SelectField
          label="These sizes are from"
          value={source}
          options={sizeSourceSchema.options.map((value) => ({ value, label: value }))}
          onChange={(event) => {
            const read = sizeSourceSchema.safeParse(event.target.value)
            if (read.success) setSource(read.data)
          }}
        />
      </div>
      {refused && <p className="mt-2 font-medium text-clay">{refused}</p>}
      <p className="mt-3 flex flex-wrap items-center gap-3">
        <Button
          kind="primary"
          disabled={refused !== null}
          onClick={() => {
            if ('error' in made) return
            change(() => made)
            onDone()
          }}
        >
          Start the site
        </Button>
        <span className="text-xs text-ink-2">It takes the place of what is drawn now; undo brings that back.</span>
      </p>
    </section>
  )
}

const sentence = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1)
