import { redirect } from 'react-router'
import { requireMember } from '#app/server/session.server.ts'
import type { Route } from './+types/home'

/** The front door leads to the jobs. */
export async function loader({ request }: Route.LoaderArgs) {
  await requireMember(request)
  return redirect('/jobs')
}
