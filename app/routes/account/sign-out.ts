import { redirect } from 'react-router'
import { signOut } from '#app/server/sign-in.server.ts'
import type { Route } from './+types/sign-out'

/** A link cannot sign anybody out. */
export function loader() {
  return redirect('/jobs')
}

/** Ends the session and goes back to the sign-in page. */
export async function action({ request }: Route.ActionArgs) {
  const headers = new Headers()
  for (const cookie of await signOut(request)) headers.append('Set-Cookie', cookie)
  return redirect('/sign-in', { headers })
}
