import { randomUUID } from 'node:crypto'
import { useState, type ReactNode } from 'react'
import { data, Form, redirect, useNavigation } from 'react-router'
import { z } from 'zod'
import type { BriefField } from '#app/domain/brief/brief-field.ts'
import { assumedBrief, enquiryFields, fieldAt, isUnknown, readEnquiry, unknownName } from '#app/domain/brief/enquiry.ts'
import { houseFigure } from '#app/domain/rules/house-rules.ts'
import type { DisplayUnits } from '#app/domain/units.ts'
import { Button, ButtonLink } from '#app/components/button.tsx'
import { ErrorSummary } from '#app/components/error-summary.tsx'
import { CheckField, SelectField, TextField } from '#app/components/field.tsx'
import { PageFrame } from '#app/components/page-frame.tsx'
import { isRefusal, type Refusal } from '#app/server/answers.server.ts'
import { findHouse } from '#app/server/data/house.server.ts'
import { createJob } from '#app/server/data/job-creation.server.ts'
import { readFields } from '#app/server/form-fields.server.ts'
import { requireMay } from '#app/server/session.server.ts'
import { viewerOf } from '#app/server/viewer.server.ts'
import type { Route } from './+types/new'

export const meta: Route.MetaFunction = () => [{ title: 'New enquiry · Inglefield' }]

export async function loader({ request }: Route.LoaderArgs) {
  const member = await requireMay(request, 'create-job')
  const { rules } = await findHouse(member)
  return { viewer: viewerOf(member), key: randomUUID(), rules }
}

const createdSchema = z.object({ id: z.string() })

/** Longest answer that is kept to be shown again. */
const longest = 2000

export async function action({ request }: Route.ActionArgs) {
  const member = await requireMay(request, 'create-job')
  const fields = Object.entries(await readFields(request)).map(
    ([name, value]) => [name, value.replaceAll('\0', '')] as const,
  )
  const values = Object.fromEntries(fields.map(([name, value]) => [name, value.slice(0, longest)]))
  const refused = (errors: Record<string, string>) => data({ errors, values }, 400)
  const read = readEnquiry(values, (await findHouse(member)).rules)
  if ('errors' in read) return refused(read.errors)
  const key = values['key'] ?? ''
  if (!/^[\w-]{8,100}$/.test(key)) return refused({ name: 'The form is not complete. Open it again.' })
  const job = await createJob(member, key, read.asked)
  if (isRefusal(job)) return refused(errorsOf(job))
  return redirect(`/jobs/${createdSchema.parse(job.body).id}/site`)
}

/** A refusal beside the field it is about; a key that was used already is no field's fault. */
const errorsOf = ({ status, error, path }: Refusal): Record<string, string> =>
  status === 409
    ? { name: 'This form was already sent with other answers. Open it again.' }
    : { [fieldAt(path)]: error }

const labels: Record<string, string> = {
  name: 'Job',
  customer: 'Customer',
  place: 'Place',
  along: 'Floor along the house',
  deep: 'Floor away from it',
  ...Object.fromEntries(enquiryFields.map(({ name, label }) => [name, label])),
}

/** Before an answer is given a field shows what would be assumed, as a hint; a target and clothing have a usual value. */
const prefilled = new Set(['clothing', 'targetLow', 'targetHigh', 'supply'])

export default function NewEnquiryPage({ loaderData, actionData }: Route.ComponentProps) {
  const sending = useNavigation().state === 'submitting'
  const errors: Record<string, string> = actionData?.errors ?? {}
  const values: Record<string, string> = actionData?.values ?? {}
  const [units, setUnits] = useState<DisplayUnits>(values['units'] === 'imperial' ? 'imperial' : 'metric')
  const { rules } = loaderData
  const assumed = { ...assumedBrief(rules), place: '' }
  const problems = Object.entries(errors).map(([id, error]) => ({ id, error, label: labels[id] ?? id }))
  const text = (name: string) => ({
    id: name,
    name,
    label: labels[name] ?? name,
    defaultValue: values[name] ?? '',
    error: errors[name],
  })
  const question = (field: BriefField) => (
    <Question
      key={field.name}
      field={field}
      usual={field.show(assumed, units)}
      units={units}
      typed={values[field.name]}
      unknown={isUnknown(values, field.name)}
      error={errors[field.name]}
    />
  )
  const fields = (...names: string[]) => enquiryFields.filter(({ name }) => names.includes(name)).map(question)
  return (
    <PageFrame viewer={loaderData.viewer}>
      <Form method="post" noValidate className="max-w-3xl pt-1">
        <h1 className="text-xl font-strong">New enquiry</h1>
        <p className="mt-1 mb-5 max-w-xl text-base text-ink-2">
          What is not known is assumed, and stays visible as an assumption until it is confirmed.
        </p>
        <ErrorSummary errors={problems} />
        <input type="hidden" name="key" value={values['key'] ?? loaderData.key} />
        <Group title="The place">
          <TextField {...text('name')} hint="As it will be called on drawings" required />
          <TextField {...text('place')} hint="Town or address" required />
          <TextField {...text('customer')} aside="may stay open" />
          <SelectField
            id="units"
            name="units"
            label="Lengths and temperatures in"
            value={units}
            onChange={(event) => setUnits(event.target.value === 'imperial' ? 'imperial' : 'metric')}
            options={[
              { value: 'metric', label: 'Metres and °C' },
              { value: 'imperial', label: 'Feet and °F' },
            ]}
          />
        </Group>
        <Group title="The floor" note="A rectangle to begin with; its outline is refined on the site.">
          <TextField {...text('along')} hint="Such as 13.20 m or 43 ft 4 in" />
          <TextField {...text('deep')} hint="Such as 5.4 m or 17' 9&quot;" />
          <CheckField
            className="self-start tablet:pt-4.5"
            name={unknownName('floor')}
            defaultChecked={isUnknown(values, 'floor')}
            label="Don’t know: 6 × 4 m is assumed"
          />
        </Group>
        <Group title="The evening">{fields('airTemperature', 'windDesign', 'clothing')}</Group>
        <Group title="The supply">{fields('supply', 'sparePerPhase')}</Group>
        <Group
          title="The target"
          note={`Irradiance on the body plane. ${rules.targetLow} to ${rules.targetHigh} W/m²: ${houseFigure(rules, 'targetLow').source}.`}
        >
          {fields('targetLow', 'targetHigh')}
        </Group>
        <p className="mt-6 flex gap-3 border-t border-rule pt-4">
          <Button kind="primary" size="large" type="submit" disabled={sending}>
            {sending ? 'Opening the job' : 'Open the job'}
          </Button>
          <ButtonLink to="/jobs" kind="text" size="large">
            Leave
          </ButtonLink>
        </p>
      </Form>
    </PageFrame>
  )
}

function Group({ title, note, children }: { title: string; note?: string; children: ReactNode }) {
  return (
    <section className="border-t border-rule pt-3 pb-5">
      <h2 className="text-sm font-strong">{title}</h2>
      {note && <p className="text-xs text-ink-3">{note}</p>}
      <div className="mt-2 grid gap-x-5 gap-y-3 tablet:grid-cols-3">{children}</div>
    </section>
  )
}

interface QuestionProps {
  field: BriefField
  /** What would be assumed, as it would be typed. */
  usual: string
  units: DisplayUnits
  typed: string | undefined
  unknown: boolean
  error: string | undefined
}

function Question({ field, usual, units, typed, unknown, error }: QuestionProps) {
  const shared = { id: field.name, name: field.name, label: field.label, hint: field.hint, error }
  const [text, setText] = useState(typed ?? null)
  const value = text ?? (prefilled.has(field.name) ? usual : '')
  const assumed = usual === '' ? 'left open' : `${usual} ${field.unit(units)}`.trim()
  return (
    <div>
      {field.options ? (
        <SelectField
          {...shared}
          options={field.options}
          value={value}
          onChange={(event) => setText(event.target.value)}
        />
      ) : (
        <TextField
          {...shared}
          unit={field.unit(units)}
          value={value}
          onChange={(event) => setText(event.target.value)}
        />
      )}
      <CheckField
        className="mt-1 text-xs text-ink-2"
        name={unknownName(field.name)}
        defaultChecked={unknown}
        label={
          <>
            Don’t know<span className="sr-only"> {field.label}</span>: {field.options ? 'assumed' : assumed}
          </>
        }
      />
    </div>
  )
}
