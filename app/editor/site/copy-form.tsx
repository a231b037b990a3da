import { useState } from 'react'
import { copiedParts, copyParts, copyWhole, type CopiedPart } from '#app/domain/site/copy-site.ts'
import { refusalOf } from '#app/domain/site/site-faults.ts'
import type { Site } from '#app/domain/site/site.ts'
import { Button } from '#app/components/button.tsx'
import { Choice } from '#app/components/choice.tsx'
import { CheckField, SelectField } from '#app/components/field.tsx'
import { kindWords } from '#app/editor/site/chosen.ts'
import { useSiteEditing } from '#app/editor/site/editing.ts'

/** Another job of the organisation whose site can be copied. */
export interface OtherJob {
  readonly id: string
  readonly name: string
}

interface CopyFormProps {
  readonly jobs: readonly OtherJob[]
  /** The site of a job; null when it cannot be read now. The page brings it. */
  readonly findSite: (jobId: string) => Promise<Site | null>
  readonly onDone: () => void
}

/** Copies the site of another job, whole or some kinds of things with the sizes that decide them. */
export function CopyForm({ jobs, findSite, onDone }: CopyFormProps) {
  const { site, change } = useSiteEditing()
  const [jobId, setJobId] = useState(jobs[0]?.id ?? '')
  const [how, setHow] = useState<'whole' | 'parts'>('whole')
  const [parts, setParts] = useState<ReadonlySet<CopiedPart>>(new Set(['cover', 'member']))
  const [problem, setProblem] = useState<string | null>(null)
  const [waiting, setWaiting] = useState(false)
  const copy = async () => {
    setWaiting(true)
    const other = await findSite(jobId)
    setWaiting(false)
    if (!other) return setProblem('That site cannot be read now. Nothing was changed.')
    const made = how === 'whole' ? copyWhole(site, other) : copyParts(site, other, parts)
    const refusal = refusalOf(site, made)
    if (refusal) return setProblem(`Not copied. ${refusal.message}`)
    change(() => made)
    onDone()
  }
  const toggle = (part: CopiedPart, on: boolean) =>
    setParts((old) => new Set(on ? [...old, part] : [...old].filter((each) => each !== part)))
  return (
    <section aria-labelledby="copy-title" className="mb-5 rounded-md border border-rule bg-paper-raised px-4 py-3.5">
      <header className="flex items-center justify-between gap-3">
        <h2 id="copy-title" className="text-base font-strong">
          Copy the site of another job
        </h2>
        <Button kind="text" size="small" onClick={onDone}>
          Close
        </Button>
      </header>
      {jobs.length === 0 ? (
        <p className="py-2 text-ink-2">There is no other job yet.</p>
      ) : (
        <>
          <div className="my-2 flex flex-wrap items-end gap-x-4 gap-y-2">
            <div className="w-72 max-w-full">
              <SelectField
                label="Job"
                value={jobId}
                options={jobs.map(({ id, name }) => ({ value: id, label: name }))}
                onChange={(event) => setJobId(event.target.value)}
              />
            </div>
            <Choice
              label="How much"
              value={how}
              options={[
                { value: 'whole', label: 'Whole' },
                { value: 'parts', label: 'Some kinds' },
              ]}
              onChange={setHow}
            />
          </div>
          {how === 'parts' && (
            <fieldset className="flex flex-wrap gap-x-4 gap-y-1 pb-2">
              <legend className="sr-only">Kinds to copy</legend>
              {copiedParts.map((part) => (
                <CheckField
                  key={part}
                  label={part === 'floor' ? 'the floor, in place of this one' : kindWords[part][1]}
                  checked={parts.has(part)}
                  onChange={(event) => toggle(part, event.target.checked)}
                />
              ))}
            </fieldset>
          )}
          {problem && <p className="pb-2 font-medium text-clay">{problem}</p>}
          <p className="flex flex-wrap items-center gap-3">
            <Button
              kind="primary"
              disabled={waiting || (how === 'parts' && parts.size === 0)}
              onClick={() => void copy()}
            >
              {waiting ? 'Reading that site' : 'Copy'}
            </Button>
            <span className="text-xs text-ink-2">
              Sizes come along with their tolerance and source; photos stay. Undo takes it back.
            </span>
          </p>
        </>
      )}
    </section>
  )
}
