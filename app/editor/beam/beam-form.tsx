import { useDeferredValue, useMemo, useState, type ChangeEvent } from 'react'
import { Form, useNavigate, useNavigation, useSubmit } from 'react-router'
import { beamTableOf } from '#app/domain/flux/beam-table.ts'
import { beamInWords } from '#app/domain/heaters/beam-in-words.ts'
import { Button } from '#app/components/button.tsx'
import { ErrorSummary } from '#app/components/error-summary.tsx'
import { Field, TextAreaField, TextField } from '#app/components/field.tsx'
import { TableCheck } from '#app/editor/beam/table-check.tsx'
import { Meanwhile } from '#app/editor/rules/meanwhile.tsx'

/** What somebody else kept meanwhile: its revision, its beam in words, who and when. */
interface BeamMeanwhile {
  readonly revision: number
  readonly beam: string
  readonly changed: { readonly by: string | null; readonly at: string }
}

/** What came of sending the form: what was typed stays unless it was kept. */
export interface BeamAnswer {
  readonly errors: { readonly source?: string; readonly csv?: string; readonly form?: string }
  readonly text: string
  readonly source: string
  readonly intent: 'save' | 'back'
  /** That the form was sent from. */
  readonly revision: string
  readonly saved: boolean
  readonly meanwhile: BeamMeanwhile | null
}

interface BeamFormProps {
  readonly revision: string
  readonly sendingKey: string
  /** The organisation has a beam of its own, so that it can go back to the data sheet's. */
  readonly measured: boolean
  readonly answer: BeamAnswer | undefined
}

const labels = { source: 'Where it comes from', csv: 'Table', form: 'Form' }

const example = 'across \\ along,-60,0,60\n-30,0.2,0.5,0.2\n30,0.2,0.5,0.2'

const problemsOf = (answer: BeamAnswer | undefined) =>
  (['source', 'csv', 'form'] as const).flatMap((id) => {
    const error = answer?.errors[id]
    return error ? [{ id, label: labels[id], error }] : []
  })

/** A measured beam: its table pasted or from a file, what is wrong with it, and what it comes to before it is kept. */
export function BeamForm({ revision, sendingKey, measured, answer }: BeamFormProps) {
  const sending = useNavigation().state === 'submitting'
  const [text, setText] = useState(answer?.text ?? '')
  const [source, setSource] = useState(answer?.source ?? '')
  const settled = useDeferredValue(text)
  const read = useMemo(() => (settled.trim() === '' ? null : beamTableOf(settled, '')), [settled])
  // The same list until it is sent again: a new one would take the focus from who is typing.
  const problems = useMemo(() => problemsOf(answer), [answer])
  const mine = read && 'beam' in read ? beamInWords(read.beam) : 'the table as typed'
  const fields = { csv: text, source, key: sendingKey }
  return (
    <>
      {answer?.meanwhile && <Overtaken key={answer.meanwhile.revision} {...{ answer, mine, fields }} />}
      <Form id="form" method="post" encType="multipart/form-data" noValidate>
        <ErrorSummary errors={problems} />
        <fieldset disabled={Boolean(answer?.meanwhile)} className="m-0 min-w-0 space-y-4 border-0 p-0">
          <legend className="sr-only">Measured beam</legend>
          <input type="hidden" name="revision" value={revision} />
          <input type="hidden" name="key" value={sendingKey} />
          <TextField
            id="source"
            name="source"
            label={labels.source}
            hint="The report and its number. It stays with the beam."
            value={source}
            onChange={(event) => setSource(event.target.value)}
            error={source === answer?.source ? answer.errors.source : null}
            maxLength={200}
          />
          <TableFields text={text} onText={setText} error={text === answer?.text ? answer.errors.csv : null} />
          {read && <TableCheck read={read} />}
          <p className="flex flex-wrap gap-3 border-t border-rule pt-4">
            <Button kind="primary" type="submit" name="intent" value="save" disabled={sending}>
              {sending ? 'Saving' : 'Save the measured beam'}
            </Button>
            {measured && (
              <Button type="submit" name="intent" value="back" disabled={sending}>
                Go back to the data sheet’s beam
              </Button>
            )}
          </p>
        </fieldset>
      </Form>
    </>
  )
}

interface TableFieldsProps {
  readonly text: string
  readonly onText: (text: string) => void
  readonly error: string | null | undefined
}

/** The table as text, and a file that fills it. */
function TableFields({ text, onText, error }: TableFieldsProps) {
  const [fileName, setFileName] = useState('')
  const take = async ({ target }: ChangeEvent<HTMLInputElement>) => {
    const file = target.files?.[0]
    if (!file) return
    onText(await file.text())
    setFileName(file.name)
    // What is sent is the text, which may be put right by hand.
    target.value = ''
  }
  return (
    <div className="grid gap-x-6 gap-y-3 desk:grid-cols-[minmax(0,1fr)_18rem]">
      <div className="text-2xs text-ink-2 desk:order-last">
        <p>
          First row: angles along the element. First column: angles across it. Degrees, rising; the cell in the corner
          is not read. All other cells: relative intensity, on any scale.
        </p>
        <pre className="my-2 overflow-x-auto rounded-md border border-rule bg-paper-sunk px-2 py-1.5 text-ink">
          {example}
        </pre>
        <p>
          Comma, semicolon or tab between the cells, a point in the figures. An axis that starts at 0 is the same to
          both sides. Nothing is radiated beyond ±90°, nor where the table is silent.
        </p>
      </div>
      <div className="space-y-3">
        <Field label="CSV file" hint={fileName ? `${fileName} is in the table below.` : 'Or paste the table below.'}>
          {(control) => (
            <input
              {...control}
              type="file"
              name="file"
              accept=".csv,.txt,.tsv,text/csv,text/plain"
              className="block h-8 w-full rounded-md border border-rule-strong bg-paper-raised pr-2 text-ink-2 file:mr-2.5 file:h-full file:border-0 file:border-r file:border-rule-strong file:bg-paper-sunk file:px-3 file:font-medium file:text-ink pointer-coarse:h-11"
              onChange={(event) => void take(event)}
            />
          )}
        </Field>
        <TextAreaField
          id="csv"
          name="csv"
          label={labels.csv}
          rows={10}
          spellCheck={false}
          wrap="off"
          className="[&_textarea]:font-mono"
          value={text}
          onChange={(event) => onText(event.target.value)}
          error={error}
        />
      </div>
    </div>
  )
}

interface OvertakenProps {
  readonly answer: BeamAnswer
  /** What was typed, in words. */
  readonly mine: string
  readonly fields: { readonly csv: string; readonly source: string; readonly key: string }
}

/** The beam that somebody kept meanwhile beside what was sent; the choice is sent on from their revision. */
function Overtaken({ answer: { meanwhile, intent }, mine, fields }: OvertakenProps) {
  const submit = useSubmit()
  const navigate = useNavigate()
  if (!meanwhile) return null
  const { revision, beam, changed } = meanwhile
  const settle = (theirs: ReadonlySet<string>) => {
    if (theirs.size > 0) return void navigate('.', { replace: true })
    const again = { ...fields, intent, revision: String(revision) }
    void submit(again, { method: 'post', encType: 'multipart/form-data' })
  }
  const own = intent === 'back' ? 'the data sheet’s beam' : mine
  return (
    <Meanwhile changed={changed} rows={[{ key: 'beam', label: 'Beam', mine: own, theirs: beam }]} onSettle={settle} />
  )
}
