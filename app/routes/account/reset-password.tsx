import { data, Form, Link } from 'react-router'
import { z } from 'zod'
import { AccountFrame } from '#app/components/account-frame.tsx'
import { Button } from '#app/components/button.tsx'
import { TextField } from '#app/components/field.tsx'
import { readFields } from '#app/server/form-fields.server.ts'
import { askForNewPassword } from '#app/server/new-password.server.ts'
import type { Route } from './+types/reset-password'

export const meta: Route.MetaFunction = () => [{ title: 'Choose a new password · Inglefield' }]

export function loader() {
  return null
}

const emailSchema = z.string().trim().max(254).pipe(z.email())

/** Sends a link by mail. The answer is the same whether or not the address is known. */
export async function action({ request }: Route.ActionArgs) {
  const { email: typed = '' } = await readFields(request)
  const email = emailSchema.safeParse(typed)
  if (!email.success) {
    return data({ email: typed.slice(0, 254), error: 'An address such as name@example.org.', sent: false }, 400)
  }
  await askForNewPassword(email.data)
  return data({ email: email.data, error: null, sent: true })
}

/** Where a person asks for a link to a new password. */
export default function ResetPasswordPage({ actionData }: Route.ComponentProps) {
  if (actionData?.sent) {
    return (
      <AccountFrame title="Look into your mail">
        <p role="status">If {actionData.email} has an account, a link is on its way. It is good for 30 minutes.</p>
        <p className="mt-5">
          <Link to="/sign-in" className="underline underline-offset-2">
            Back to sign in
          </Link>
        </p>
      </AccountFrame>
    )
  }
  return (
    <AccountFrame title="Choose a new password">
      <Form method="post" noValidate className="flex flex-col gap-4">
        <TextField
          label="E-mail"
          name="email"
          type="email"
          autoComplete="username"
          required
          defaultValue={actionData?.email}
          error={actionData?.error}
        />
        <Button kind="primary" size="large" type="submit" className="mt-1 w-full">
          Send a link
        </Button>
      </Form>
      <p className="mt-5">
        <Link to="/sign-in" className="underline underline-offset-2">
          Back to sign in
        </Link>
      </p>
    </AccountFrame>
  )
}
