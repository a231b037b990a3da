import { and, eq, sql } from 'drizzle-orm'
import { z } from 'zod'
import type { Action } from '#app/domain/access/roles.ts'
import {
  heaterModelSchema,
  type BeamData,
  type BeamTableData,
  type HeaterModel,
} from '#app/domain/heaters/heater-model.ts'
import type { Answer, Refusal } from '#app/server/answers.server.ts'
import { recordEvent } from '#app/server/audit.server.ts'
import { modelOf, sameModel } from '#app/server/data/heaters.server.ts'
import { findNames } from '#app/server/data/people.server.ts'
import { missing } from '#app/server/missing.server.ts'
import { asOrganisation, own, type Transaction } from '#app/server/organisation.server.ts'
import { gone, saveRevision, staleness, type Revisioned, type Save } from '#app/server/saving.server.ts'
import { requireMay, type Member } from '#app/server/session.server.ts'
import { heaterBeamRevisions, heaterBeams } from '#drizzle/beam-schema.ts'
import { contentHash } from '#drizzle/content-hash.ts'
import { heaterModels } from '#drizzle/schema.ts'

/** A model of the catalogue that the person who asks may see, and that person. */
export interface OpenHeater {
  readonly code: string
  readonly member: Member
}

/** The beam of a model as a reader gets it: `beam` is what every figure rests on, null when there is none. */
interface ShownBeam {
  readonly code: string
  /** Of the organisation's own beam; 0 while it never had one. */
  readonly revision: number
  /** Whether the organisation measured it; otherwise the data sheet states it. */
  readonly measured: boolean
  readonly beam: BeamData | null
}

/** One time that a model got a beam of the organisation's own, or the data sheet's again (`table` null). */
export interface BeamRevision {
  readonly revision: number
  readonly author: string | null
  /** ISO 8601. */
  readonly createdAt: string
  readonly table: { readonly across: number; readonly along: number; readonly source: string } | null
}

/** A model with the beam that is in use, what its data sheet states, and how it came so, newest first. */
interface HeaterWithBeam {
  readonly model: HeaterModel
  readonly dataSheetBeam: BeamData | null
  readonly revision: number
  readonly measured: boolean
  readonly revisions: readonly BeamRevision[]
}

/** Whether a part of a URL can be the code of a model at all. */
const isCode = (text: string): boolean => /^[\w.-]{1,100}$/.test(text)

const thisModel = (code: string) => and(own(heaterModels), eq(heaterModels.code, code))

const columns = { body: heaterModels.body, beam: heaterBeams.body, revision: heaterBeams.revision }

interface Row {
  readonly body: unknown
  readonly beam: unknown
  readonly revision: number | null
}

const shownOf = (code: string, { body, beam, revision }: Row): ShownBeam => ({
  code,
  revision: revision ?? 0,
  measured: beam !== null,
  beam: modelOf(body, beam).beam,
})

/** The beam of a model of the organisation; null when it has no such model. */
export async function findBeam({ member, code }: OpenHeater): Promise<ShownBeam | null> {
  if (!isCode(code)) return null
  const row = await asOrganisation(member.organisationId, (tx) => readRow(tx, code))
  return row ? shownOf(code, row) : null
}

/** The model that a URL names, for a person who may do that to it. Throws 401, 403, or 404 when it is not theirs. */
export async function requireHeater(request: Request, code: string, action: Action): Promise<OpenHeater> {
  const member = await requireMay(request, action)
  if (!(await findBeam({ member, code }))) throw missing(request, 'heater')
  return { member, code }
}

const revisionsSchema = z.array(
  z.object({
    revision: z.number(),
    authorId: z.string(),
    createdAt: z.string(),
    across: z.number().nullable(),
    along: z.number().nullable(),
    source: z.string().nullable(),
  }),
)

/** A column with the revisions of a model's beam, newest first, as a JSON list. */
function revisionList(tx: Transaction) {
  const { revision, authorId, createdAt, body, code } = heaterBeamRevisions
  const entry = sql`json_build_object('revision', ${revision}, 'authorId', ${authorId}, 'createdAt', ${createdAt},
    'across', jsonb_array_length(${body} -> 'acrossDeg'), 'along', jsonb_array_length(${body} -> 'alongDeg'), 'source', ${body} ->> 'source')`
  return tx
    .select({ list: sql`json_agg(${entry} order by ${revision} desc)` })
    .from(heaterBeamRevisions)
    .where(and(own(heaterBeamRevisions), eq(code, heaterModels.code)))
}

/** A model of the organisation with its beam and how it came so; null when it has no such model. */
export async function findHeaterWithBeam({ member, code }: OpenHeater): Promise<HeaterWithBeam | null> {
  if (!isCode(code)) return null
  const [row] = await asOrganisation(member.organisationId, (tx) =>
    tx
      .select({ ...columns, revisions: sql`coalesce((${revisionList(tx)}), '[]')` })
      .from(heaterModels)
      .leftJoin(heaterBeams, sameModel)
      .where(thisModel(code)),
  )
  if (!row) return null
  const listed = revisionsSchema.parse(row.revisions)
  const names = await findNames(listed.map(({ authorId }) => authorId))
  return {
    model: modelOf(row.body, row.beam),
    dataSheetBeam: heaterModelSchema.parse(row.body).beam,
    revision: row.revision ?? 0,
    measured: row.beam !== null,
    revisions: listed.map(({ revision, createdAt, authorId, across, along, source }) => ({
      revision,
      createdAt,
      author: names.get(authorId) ?? null,
      table: across === null || along === null ? null : { across, along, source: source ?? '' },
    })),
  }
}

async function readRow(tx: Transaction, code: string) {
  const changed = { updatedBy: heaterBeams.updatedBy, changed: heaterBeams.updatedAt, at: heaterModels.updatedAt }
  const [row] = await tx
    .select({ ...columns, ...changed })
    .from(heaterModels)
    .leftJoin(heaterBeams, sameModel)
    .where(thisModel(code))
  return row ?? null
}

/**
 * Locks the model, so that its first beam is written once too, and only then reads its beam: in one statement the beam
 * would be the one from before the wait. Null when the organisation has no such model.
 */
async function lockBeam(tx: Transaction, code: string) {
  await tx.select({ code: heaterModels.code }).from(heaterModels).where(thisModel(code)).for('update')
  const row = await readRow(tx, code)
  if (!row) return null
  const { updatedBy, changed, at, revision } = row
  return { revision: revision ?? 0, updatedBy, updatedAt: changed ?? at, shown: shownOf(code, row) }
}

/** Writes a new state and its revision, null for the data sheet's beam; gives what a reader gets from now on. */
async function writeBeam(
  tx: Transaction,
  { code, member: { organisationId, userId } }: OpenHeater,
  revision: number,
  body: BeamTableData | null,
): Promise<ShownBeam> {
  const state = { revision, body, updatedAt: new Date(), updatedBy: userId }
  await tx
    .insert(heaterBeams)
    .values({ organisationId, code, ...state })
    .onConflictDoUpdate({ target: [heaterBeams.organisationId, heaterBeams.code], set: state })
  await tx
    .insert(heaterBeamRevisions)
    .values({ organisationId, code, revision, body, contentHash: contentHash(body), authorId: userId })
  const row = await readRow(tx, code)
  if (!row) throw new Error('The model was not returned.')
  return shownOf(code, row)
}

const resourceOf = (code: string) => `heaters/${code}/beam`

const beamOf = (heater: OpenHeater): Revisioned<BeamTableData> => ({
  resource: resourceOf(heater.code),
  saved: 'beam saved',
  lock: (tx) => lockBeam(tx, heater.code),
  write: (tx, revision, body) => writeBeam(tx, heater, revision, body),
})

/** Gives a model a beam that was measured, by the one rule for saving. */
export const saveBeam = (heater: OpenHeater, save: Save<BeamTableData>): Promise<Answer | Refusal> =>
  saveRevision(heater.member, beamOf(heater), save, () => Promise.resolve(save.body))

/** Goes back to the data sheet's beam from the expected revision, as a new revision; nothing where it holds already. */
export function dropBeam({ code, member }: OpenHeater, expected: number | null): Promise<Answer | Refusal> {
  return asOrganisation(member.organisationId, async (tx) => {
    const kept = await lockBeam(tx, code)
    if (!kept) return gone('resource')
    const stale = await staleness(expected, kept)
    if (stale) return stale
    if (!kept.shown.measured) return { status: 200, body: kept.shown, revision: kept.revision }
    const revision = kept.revision + 1
    const body = await writeBeam(tx, { code, member }, revision, null)
    await recordEvent(tx, member, { action: 'beam taken back', subject: resourceOf(code), detail: { revision } })
    return { status: 200, body, revision }
  })
}
