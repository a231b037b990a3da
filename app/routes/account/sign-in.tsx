import { data, Form, Link, redirect, useNavigation } from 'react-router'
import { z } from 'zod'
import { Button } from '#app/components/button.tsx'
import { TextField } from '#app/components/field.tsx'
import { readFields } from '#app/server/form-fields.server.ts'
import { safePath } from '#app/server/safe-redirect.server.ts'
import { findMember } from '#app/server/session.server.ts'
import { signIn } from '#app/server/sign-in.server.ts'
import { AccountFrame } from '#app/components/account-frame.tsx'
import type { Route } from './+types/sign-in'

export const meta: Route.MetaFunction = () => [{ title: 'Sign in · Inglefield' }]

export async function loader({ request, url }: Route.LoaderArgs) {
  const next = safePath(url.searchParams.get('next'))
  if (await findMember(request)) throw redirect(next)
  return null
}

const formSchema = z.object({
  email: z.string().trim().max(254).default(''),
  password: z.string().max(1000).default(''),
})
const tooMany = 'Too many wrong tries for this address. Wait a quarter of an hour, or ask for a new password.'
const wrong = 'E-mail and password do not belong together.'

function refused(email: string, errors: { email?: string; password?: string }, status: number) {
  return data({ email, errors }, status)
}

/** Signs in and goes on to where the person wanted to go; works without scripts. */
export async function action({ request, url }: Route.ActionArgs) {
  const form = formSchema.safeParse(await readFields(request))
  if (!form.success) return refused('', { email: 'At most 254 characters.' }, 400)
  const { email, password } = form.data
  if (!z.email().safeParse(email).success) return refused(email, { email: 'An address such as name@example.org.' }, 400)
  if (password === '') return refused(email, { password: 'Type the password.' }, 400)
  const result = await signIn(email, password, request.headers)
  if ('problem' in result) {
    return result.problem === 'wrong'
      ? refused(email, { password: wrong }, 401)
      : refused(email, { password: tooMany }, 429)
  }
  const headers = new Headers()
  for (const cookie of result.cookies) headers.append('Set-Cookie', cookie)
  return redirect(safePath(url.searchParams.get('next')), { headers })
}

/** Where a person signs in. Customers need no account: their link opens the offer. */
export default function SignInPage({ actionData }: Route.ComponentProps) {
  const busy = useNavigation().state !== 'idle'
  return (
    <AccountFrame title="Sign in">
      <Form method="post" noValidate className="flex flex-col gap-4">
        <TextField
          label="E-mail"
          name="email"
          type="email"
          autoComplete="username"
          required
          defaultValue={actionData?.email}
          error={actionData?.errors.email}
        />
        <TextField
          label="Password"
          name="password"
          type="password"
          autoComplete="current-password"
          required
          error={actionData?.errors.password}
        />
        <Button kind="primary" size="large" type="submit" disabled={busy} className="mt-1 w-full">
          Sign in
        </Button>
      </Form>
      <p className="mt-5">
        <Link to="/reset-password" className="underline underline-offset-2">
          Choose a new password
        </Link>
      </p>
      <p className="mt-5 text-ink-3">Customers need no password. Open the link in your offer.</p>
    </AccountFrame>
  )
}
