import { data, Form, useNavigation } from 'react-router'
import { can } from '#app/domain/access/roles.ts'
import { hangingSources } from '#app/domain/layout/hanging-data.ts'
import { plainHanging } from '#app/domain/layout/plain-hanging.ts'
import { hangingFields, hangingValues, readHanging } from '#app/domain/layout/hanging-fields.ts'
import { formatLength } from '#app/domain/units.ts'
import { Button, ButtonLink } from '#app/components/button.tsx'
import { ErrorSummary } from '#app/components/error-summary.tsx'
import { TextField } from '#app/components/field.tsx'
import { PageFrame } from '#app/components/page-frame.tsx'
import { findHanging, saveHanging } from '#app/server/data/hanging.server.ts'
import { readFields } from '#app/server/form-fields.server.ts'
import { requireMay } from '#app/server/session.server.ts'
import { viewerOf } from '#app/server/viewer.server.ts'
import type { Route } from './+types/hanging'

export const meta: Route.MetaFunction = () => [{ title: 'Hanging · Rules · Inglefield' }]

export async function loader({ request }: Route.LoaderArgs) {
  const member = await requireMay(request, 'view')
  const { revision, data: kept } = await findHanging(member)
  return {
    viewer: viewerOf(member),
    revision,
    values: hangingValues(kept, 'metric'),
    mayEdit: can(member.role, 'edit-rules'),
  }
}

/** Longest answer that is kept to be shown again. */
const longest = 200

export async function action({ request }: Route.ActionArgs) {
  const member = await requireMay(request, 'edit-rules')
  const typed = await readFields(request)
  const values = Object.fromEntries(
    Object.entries(typed).map(([name, value]) => [name, value.replaceAll('\0', '').slice(0, longest)]),
  )
  const refused = (errors: Record<string, string>, status: number) => data({ errors, values, saved: false }, status)
  const read = readHanging(values, 'metric')
  if ('errors' in read) return refused(read.errors, 400)
  const from = Number(values['revision'])
  if (!Number.isInteger(from) || from < 0)
    return refused({ linkPitch: 'The form is not complete. Open it again.' }, 400)
  const revision = await saveHanging(member, from, read.data)
  if (revision === null) {
    return refused({ linkPitch: 'Somebody changed the hanging data meanwhile. What you typed is still here: open the page again beside it and compare.' }, 409) // prettier-ignore
  }
  return { errors: {}, values: hangingValues(read.data, 'metric'), saved: true }
}

export default function HangingPage({ loaderData, actionData }: Route.ComponentProps) {
  const { viewer, revision, mayEdit } = loaderData
  const sending = useNavigation().state === 'submitting'
  const errors: Record<string, string> = actionData?.errors ?? {}
  const values: Record<string, string> = { ...loaderData.values, ...actionData?.values }
  const labels = new Map<string, string>(hangingFields.map(({ name, label }) => [name, label]))
  const problems = Object.entries(errors).map(([id, error]) => ({ id, error, label: labels.get(id) ?? id }))
  return (
    <PageFrame viewer={viewer}>
      <Form method="post" noValidate className="max-w-3xl pt-1">
        <h1 className="text-xl font-strong">Hanging</h1>
        <p className="mt-0.5 mb-4 max-w-2xl text-ink-2">
          How chain and rods are made here. Every hang schedule goes by these figures, and so do the findings about
          hangers. Links are the whole number nearest to drop less fittings over pitch; the turnbuckle takes up the
          rest.
        </p>
        <ErrorSummary errors={problems} />
        {actionData?.saved && (
          <p role="status" className="mb-3 text-moss">
            Saved. Hang schedules go by it from now on.
          </p>
        )}
        <input type="hidden" name="revision" value={actionData?.saved ? revision : (values['revision'] ?? revision)} />
        <fieldset disabled={!mayEdit} className="m-0 grid gap-x-6 gap-y-3 border-0 p-0 tablet:grid-cols-2">
          <legend className="sr-only">Hanging data</legend>
          {hangingFields.map(({ name, label, meaning }) => (
            <TextField
              key={name}
              id={name}
              name={name}
              label={label}
              defaultValue={values[name] ?? ''}
              error={errors[name]}
              hint={`${meaning} By default ${formatLength(plainHanging[name], 'metric', 'fine')}: ${hangingSources[name]}.`}
            />
          ))}
        </fieldset>
        <p className="mt-6 flex gap-3 border-t border-rule pt-4">
          {mayEdit ? (
            <Button kind="primary" type="submit" disabled={sending}>
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
    </PageFrame>
  )
}
