import { data } from 'react-router'
import { listOutbox } from '#app/server/outbox.server.ts'
import type { Route } from './+types/outbox'

export const meta: Route.MetaFunction = () => [{ title: 'Outbox · Inglefield' }]

/** Letters that the fake post kept; in development only. */
export async function loader() {
  const letters = await listOutbox()
  if (!letters) throw data('Nothing at this address', 404)
  return { letters }
}

/** What would have been mailed, newest first. */
export default function OutboxPage({ loaderData: { letters } }: Route.ComponentProps) {
  return (
    <main id="main" className="mx-auto max-w-3xl px-6 py-10 text-base">
      <h1 className="text-xl font-strong">Outbox</h1>
      <p className="mt-1 text-ink-2">Kept on this computer, not mailed.</p>
      {letters.length === 0 && <p className="mt-6">No letters yet.</p>}
      {letters.map((letter) => (
        <article key={letter.key} className="mt-6 border-t border-rule pt-4">
          <h2 className="text-lg font-medium">{letter.subject}</h2>
          <p className="text-sm text-ink-2">
            To {letter.to}, <time dateTime={letter.postedAt}>{letter.postedAt.slice(0, 16).replace('T', ' ')}</time>
          </p>
          <pre className="mt-2 font-sans whitespace-pre-wrap">{letter.text}</pre>
        </article>
      ))}
    </main>
  )
}
