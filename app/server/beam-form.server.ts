import { data } from 'react-router'
import { beamTableOf } from '#app/domain/flux/beam-table.ts'
import { beamInWords } from '#app/domain/heaters/beam-in-words.ts'
import type { BeamTableData } from '#app/domain/heaters/heater-model.ts'
import { isRefusal, type Answer, type Refusal } from '#app/server/answers.server.ts'
import { beamSourceSchema } from '#app/server/beam-body.server.ts'
import { dropBeam, findHeaterWithBeam, saveBeam, type OpenHeater } from '#app/server/data/beams.server.ts'
import { contentHash } from '#drizzle/content-hash.ts'

/** Longest table as text; one of every degree with nine digits a figure is shorter. */
const longest = 1_000_000

interface Sent {
  readonly text: string
  readonly source: string
  readonly key: string
  readonly revision: string
  readonly intent: 'save' | 'back'
}

/** What the form sent; a file counts where there is one, as a browser without scripts sends it. */
async function readSent(request: Request): Promise<Sent> {
  const form = await request.formData().catch(() => new FormData())
  const field = (name: string) => {
    const value = form.get(name)
    return typeof value === 'string' ? value.replaceAll('\0', '') : ''
  }
  const file = form.get('file')
  const text = file instanceof File && file.size > 0 ? (await file.text()).replaceAll('\0', '') : field('csv')
  return {
    text,
    source: field('source').slice(0, 300),
    key: field('key'),
    revision: field('revision').slice(0, 9),
    intent: field('intent') === 'back' ? 'back' : 'save',
  }
}

type Errors = { source?: string; csv?: string; form?: string }

/** The table that was sent, or what is wrong beside which field. */
function readTable({ text, source }: Sent): { readonly beam: BeamTableData } | { readonly errors: Errors } {
  const from = beamSourceSchema.safeParse(source)
  const errors: Errors = from.success ? {} : { source: from.error.issues[0]?.message ?? '' }
  if (text.trim() === '') return { errors: { ...errors, csv: 'Paste a table, or choose a file.' } }
  const read = beamTableOf(text, from.data ?? '')
  if ('faults' in read)
    return { errors: { ...errors, csv: 'The table has places that are not right, named below it.' } }
  return from.success ? read : { errors }
}

/** The beam that was kept meanwhile, in words, by whom and when. */
async function meanwhileOf(heater: OpenHeater) {
  const now = await findHeaterWithBeam(heater)
  const [newest] = now?.revisions ?? []
  if (!now || !newest) return null
  const changed = { by: newest.author, at: newest.createdAt }
  return { revision: now.revision, beam: beamInWords(now.model.beam), changed }
}

/**
 * Keeps what the form of a beam sent: 400 with what is wrong beside each field, 413 when it is too long, 412 with what
 * somebody kept meanwhile. What was typed goes back unless it was kept.
 */
export async function keepBeam(request: Request, heater: OpenHeater) {
  const sent = await readSent(request)
  const { text, source, intent, key, revision } = sent
  const answer = { errors: {}, text, source, intent, revision, saved: false, meanwhile: null }
  if (text.length > longest) {
    return data({ ...answer, text: '', errors: { csv: 'A table is at most 1 MB long.' } }, 413)
  }
  if (!/^\d{1,9}$/.test(revision) || !/^[\w-]{8,100}$/.test(key)) {
    return data({ ...answer, errors: { form: 'The form is not complete. Open it again.' } }, 400)
  }
  const expected = Number(revision)
  let kept: Answer | Refusal
  if (intent === 'back') kept = await dropBeam(heater, expected)
  else {
    const read = readTable(sent)
    if ('errors' in read) return data({ ...answer, errors: read.errors }, 400)
    kept = await saveBeam(heater, { key, expected, body: read.beam, bodyHash: contentHash(['form', read.beam]) })
  }
  if (!isRefusal(kept)) return data({ ...answer, text: '', source: '', saved: true }, 200)
  if (kept.status === 412) return data({ ...answer, meanwhile: await meanwhileOf(heater) }, 412)
  return data({ ...answer, errors: { form: `${kept.error} Open the page again.` } }, kept.status)
}
