import { Form, useNavigation, useSubmit } from 'react-router'
import { Button, ButtonLink } from '#app/components/button.tsx'
import { ErrorSummary } from '#app/components/error-summary.tsx'
import { TextField } from '#app/components/field.tsx'
import { When } from '#app/components/when.tsx'
import { Meanwhile } from '#app/editor/rules/meanwhile.tsx'

/** One figure that is asked for. */
interface AskedFigure {
  readonly name: string
  readonly label: string
  readonly hint: string
  readonly unit: string
}

type Values = Readonly<Record<string, string>>

/** What is kept: its revision, 0 while the defaults hold, who changed it when, and its figures as fields show them. */
interface KeptFigures {
  readonly revision: number
  readonly changed: { readonly by: string | null; readonly at: string } | null
  readonly values: Values
}

interface DecisionFormProps {
  readonly title: string
  readonly lead: string
  /** What the figures do once they are kept. */
  readonly savedWords: string
  readonly groups: Readonly<Record<string, readonly AskedFigure[]>>
  readonly kept: KeptFigures
  readonly mayEdit: boolean
  readonly answer:
    | {
        readonly errors: Values
        readonly values: Values
        /** That the form was sent from. */
        readonly revision: string
        readonly saved: boolean
        readonly meanwhile: KeptFigures | null
      }
    | undefined
}

/** Figures that an organisation decides: what was typed stays when it is refused or somebody was quicker. */
export function DecisionForm({ title, lead, savedWords, groups, kept, mayEdit, answer }: DecisionFormProps) {
  const sending = useNavigation().state === 'submitting'
  const errors = answer?.errors ?? {}
  const values = { ...kept.values, ...answer?.values }
  const from = answer && !answer.saved ? answer.revision : String(kept.revision)
  const labels = new Map(
    Object.values(groups)
      .flat()
      .map(({ name, label }) => [name, label]),
  )
  const problems = Object.entries(errors).map(([id, error]) => ({ id, error, label: labels.get(id) ?? 'Form' }))
  return (
    <div className="max-w-3xl pt-1">
      <h1 className="text-xl font-strong">{title}</h1>
      <p className="mt-0.5 max-w-2xl text-ink-2">{lead}</p>
      <p className="mt-0.5 mb-4 text-ink-2">
        <LastChange {...kept} />
      </p>
      {answer?.meanwhile && (
        <Overlaid
          key={answer.meanwhile.revision}
          mine={values}
          base={kept.values}
          theirs={answer.meanwhile}
          labels={labels}
        />
      )}
      <Form id="form" method="post" noValidate key={from}>
        <ErrorSummary errors={problems} />
        {answer?.saved && (
          <p role="status" className="mb-3 text-moss">
            Saved. {savedWords}
          </p>
        )}
        <input type="hidden" name="revision" value={from} />
        <fieldset disabled={!mayEdit || Boolean(answer?.meanwhile)} className="m-0 border-0 p-0">
          <legend className="sr-only">{title}</legend>
          {Object.entries(groups).map(([group, figures]) => (
            <section key={group} aria-label={group} className="mb-5">
              {group !== title && <h2 className="mb-1.5 text-sm font-strong">{group}</h2>}
              <div className="grid gap-x-6 gap-y-3 tablet:grid-cols-2">
                {figures.map(({ name, label, hint, unit }) => (
                  <TextField
                    key={name}
                    id={name}
                    {...{ name, label, hint, unit }}
                    defaultValue={values[name] ?? ''}
                    error={errors[name]}
                  />
                ))}
              </div>
            </section>
          ))}
        </fieldset>
        <p className="flex gap-3 border-t border-rule pt-4">
          {mayEdit ? (
            <Button kind="primary" type="submit" disabled={sending || Boolean(answer?.meanwhile)}>
              {sending ? 'Saving' : 'Save'}
            </Button>
          ) : (
            <span className="self-center text-ink-2">An engineer or the owner changes them.</span>
          )}
          <ButtonLink to="/rules" kind="text">
            Rules
          </ButtonLink>
        </p>
      </Form>
    </div>
  )
}

function LastChange({ revision, changed }: Pick<KeptFigures, 'revision' | 'changed'>) {
  if (!changed) return 'As by default: nobody here has changed them.'
  return (
    <>
      Revision {revision}
      {changed.by && `, by ${changed.by}`}, <When at={changed.at} />.
    </>
  )
}

interface OverlaidProps {
  readonly mine: Values
  readonly base: Values
  readonly theirs: KeptFigures
  readonly labels: ReadonlyMap<string, string>
}

/** Figures that somebody kept meanwhile beside those that were typed; the choice is sent on from their revision. */
function Overlaid({ mine, base, theirs, labels }: OverlaidProps) {
  const submit = useSubmit()
  const rows = [...labels].flatMap(([key, label]) => {
    const [own, other] = [mine[key] ?? '', theirs.values[key] ?? '']
    return own === other ? [] : [{ key, label, mine: own, theirs: other, theirsAlone: own === base[key] }]
  })
  const settle = (taken: ReadonlySet<string>) => {
    const chosen = [...labels.keys()].map((key) => [key, (taken.has(key) ? theirs.values : mine)[key] ?? ''])
    void submit({ ...Object.fromEntries(chosen), revision: String(theirs.revision) }, { method: 'post' })
  }
  return <Meanwhile changed={theirs.changed} {...{ rows }} onSettle={settle} />
}
