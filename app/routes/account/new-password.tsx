import { data, Form, Link } from 'react-router'
import { AccountFrame } from '#app/components/account-frame.tsx'
import { Button, ButtonLink } from '#app/components/button.tsx'
import { TextField } from '#app/components/field.tsx'
import { readFields } from '#app/server/form-fields.server.ts'
import { setNewPassword } from '#app/server/new-password.server.ts'
import { passwordLimits } from '#app/server/password-limits.server.ts'
import type { Route } from './+types/new-password'

export const meta: Route.MetaFunction = () => [{ title: 'Choose a new password · Inglefield' }]

export function loader() {
  return passwordLimits
}

const said = {
  short: `At least ${passwordLimits.least} characters.`,
  long: `At most ${passwordLimits.most} characters.`,
} as const

/** Sets the password and ends every session of the account. */
export async function action({ request, params }: Route.ActionArgs) {
  const { password = '' } = await readFields(request)
  const outcome = await setNewPassword(params.token, password)
  if (outcome === 'done') return data({ done: true, error: null, ended: false })
  if (outcome === 'ended') return data({ done: false, error: null, ended: true }, 400)
  return data({ done: false, error: said[outcome], ended: false }, 400)
}

/** Where the link in the letter leads. */
export default function NewPasswordPage({ loaderData: limits, actionData }: Route.ComponentProps) {
  if (actionData?.done) {
    return (
      <AccountFrame title="The password is changed">
        <p role="status">Every device that was signed in is signed out.</p>
        <p className="mt-5">
          <ButtonLink kind="primary" size="large" to="/sign-in">
            Sign in
          </ButtonLink>
        </p>
      </AccountFrame>
    )
  }
  if (actionData?.ended) {
    return (
      <AccountFrame title="This link has ended">
        <p role="alert">It was used already, or it is older than 30 minutes. The password is as it was.</p>
        <p className="mt-5">
          <Link to="/reset-password" className="underline underline-offset-2">
            Ask for a new link
          </Link>
        </p>
      </AccountFrame>
    )
  }
  return (
    <AccountFrame title="Choose a new password">
      <Form method="post" noValidate className="flex flex-col gap-4">
        <TextField
          label="New password"
          name="password"
          type="password"
          autoComplete="new-password"
          required
          hint={`${limits.least} to ${limits.most} characters. A few words together are good.`}
          error={actionData?.error}
        />
        <Button kind="primary" size="large" type="submit" className="mt-1 w-full">
          Change the password
        </Button>
      </Form>
    </AccountFrame>
  )
}
