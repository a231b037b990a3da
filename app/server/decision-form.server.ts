import { data } from 'react-router'
import { findDecided, saveDecided, type Decided, type Decision } from '#app/server/data/decisions.server.ts'
import { readFields } from '#app/server/form-fields.server.ts'
import type { Member } from '#app/server/session.server.ts'

/** Longest answer that is kept to be shown again. */
const longest = 200

/** How a form writes and reads what is decided. */
interface Written<Body> {
  readonly show: (body: Body) => Record<string, string>
  readonly read: (
    values: Readonly<Record<string, string>>,
  ) => { readonly body: Body } | { readonly errors: Record<string, string> }
}

const shown = <Body>({ revision, body, changed }: Decided<Body>, { show }: Written<Body>) => ({
  revision,
  changed,
  values: show(body),
})

/** What the form of a decision opens with. */
export const openDecision = async <Body>(member: Member, decision: Decision<Body>, written: Written<Body>) =>
  shown(await findDecided(member, decision), written)

/**
 * Keeps what a form sent: 400 with what is wrong beside each field, 412 with what somebody kept meanwhile. Whatever it
 * answers, what was typed goes back.
 */
export async function keepDecision<Body extends object>(
  request: Request,
  member: Member,
  decision: Decision<Body>,
  written: Written<Body>,
) {
  const { revision = '', ...typed } = await readFields(request)
  const values = Object.fromEntries(
    Object.entries(typed).map(([name, value]) => [name, value.replaceAll('\0', '').slice(0, longest)]),
  )
  const errors: Record<string, string> = {}
  const answer = { errors, values, revision: revision.slice(0, 9), saved: false, meanwhile: null }
  const read = written.read(values)
  if ('errors' in read) return data({ ...answer, errors: read.errors }, 400)
  const from = /^\d{1,9}$/.test(revision) ? Number(revision) : null
  if (from === null) return data({ ...answer, errors: { form: 'The form is not complete. Open it again.' } }, 400)
  const kept = await saveDecided(member, decision, from, read.body)
  const canonical = { ...answer, values: written.show(read.body) }
  if ('meanwhile' in kept) return data({ ...canonical, meanwhile: shown(kept.meanwhile, written) }, 412)
  return data({ ...canonical, saved: true }, 200)
}
