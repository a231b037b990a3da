import { and, eq } from 'drizzle-orm'
import type { z } from 'zod'
import { isRefusal, type Answer, type Refusal } from '#app/server/answers.server.ts'
import { recordEvent, type AuditedAction } from '#app/server/audit.server.ts'
import { contentHash } from '#drizzle/content-hash.ts'
import { findName } from '#app/server/data/people.server.ts'
import { readBody } from '#app/server/json-body.server.ts'
import { asOrganisation, type Transaction } from '#app/server/organisation.server.ts'
import { readExpected, readKey } from '#app/server/preconditions.server.ts'
import type { Member } from '#app/server/session.server.ts'
import { savedAnswers } from '#drizzle/schema.ts'

/** Somebody's request to do something to one resource once, whatever number of times it arrives. */
export interface Asked {
  readonly member: Member
  readonly resource: string
  readonly key: string
  /** Hash of the method and the body: the same key with another hash is another request. */
  readonly bodyHash: string
}

/** A request with a key, a checked body and the revision it expects, null when it named none. */
export interface Save<Body> {
  readonly key: string
  readonly expected: number | null
  readonly body: Body
  readonly bodyHash: string
}

/** The newest revision of something: what a reader gets, and who wrote it when. */
export interface Locked {
  readonly revision: number
  readonly shown: object
  /** Null while nobody has written a revision of their own. */
  readonly updatedBy: string | null
  readonly updatedAt: Date
}

/** Something kept in revisions: how it is locked and shown, and how a new revision of it is written. */
export interface Revisioned<Body> {
  readonly resource: string
  /** What the audit calls a new revision. */
  readonly saved: AuditedAction
  /** Locks it until the transaction ends; null when it is gone. */
  readonly lock: (tx: Transaction) => Promise<Locked | null>
  /** Writes the new state and its immutable revision row; gives what a reader gets from now on. */
  readonly write: (tx: Transaction, revision: number, body: Body, hash: string) => Promise<object>
}

/** Key, If-Match and body of a request, or the first thing wrong with them (400, 413). */
export async function readSave<Body>(request: Request, schema: z.ZodType<Body>): Promise<Save<Body> | Refusal> {
  const key = readKey(request)
  if (isRefusal(key)) return key
  const expected = readExpected(request)
  if (isRefusal(expected)) return expected
  const body = await readBody(request, schema)
  if (isRefusal(body)) return body
  return { ...key, ...expected, body: body.value, bodyHash: contentHash([request.method, body.value]) }
}

const rowOf = ({ member, resource, key }: Asked) => ({
  organisationId: member.organisationId,
  personId: member.userId,
  resource,
  key,
})

const whereRow = (asked: Asked) => {
  const row = rowOf(asked)
  return and(
    eq(savedAnswers.organisationId, row.organisationId),
    eq(savedAnswers.personId, row.personId),
    eq(savedAnswers.resource, row.resource),
    eq(savedAnswers.key, row.key),
  )
}

async function earlierAnswer(tx: Transaction, asked: Asked): Promise<Answer | Refusal> {
  const [earlier] = await tx
    .select({
      bodyHash: savedAnswers.bodyHash,
      status: savedAnswers.status,
      answer: savedAnswers.answer,
      etag: savedAnswers.etag,
    })
    .from(savedAnswers)
    .where(whereRow(asked))
  if (earlier?.bodyHash !== asked.bodyHash || earlier.status === null) {
    return { status: 409, error: 'This key was used for another request.', path: 'Idempotency-Key' }
  }
  return {
    status: earlier.status === 201 ? 201 : 200,
    body: earlier.answer,
    revision: earlier.etag === null ? null : Number(earlier.etag),
  }
}

/**
 * Carries out work once per key. The key's row is inserted first, so a second request with the key waits here until
 * the first is done and then gets its answer. Only an accepted request keeps its key: a refused one may be sent again.
 */
export async function answerOnce(
  tx: Transaction,
  asked: Asked,
  work: () => Promise<Answer | Refusal>,
): Promise<Answer | Refusal> {
  const mine = await tx
    .insert(savedAnswers)
    .values({ ...rowOf(asked), bodyHash: asked.bodyHash })
    .onConflictDoNothing()
    .returning({ key: savedAnswers.key })
  if (mine.length === 0) return earlierAnswer(tx, asked)
  const result = await work()
  if (isRefusal(result)) {
    await tx.delete(savedAnswers).where(whereRow(asked))
    return result
  }
  const etag = result.revision === null ? null : String(result.revision)
  await tx.update(savedAnswers).set({ status: result.status, answer: result.body, etag }).where(whereRow(asked))
  return result
}

/** Why a change is refused that does not stand on the newest revision: 428 without If-Match, 412 with the copy kept. */
export async function staleness(expected: number | null, kept: Locked): Promise<Refusal | null> {
  if (expected === null)
    return { status: 428, error: 'If-Match is needed: the revision you changed.', path: 'If-Match' }
  if (expected === kept.revision) return null
  const error = `Somebody saved revision ${kept.revision} meanwhile.`
  const changed = { by: kept.updatedBy && (await findName(kept.updatedBy)), at: kept.updatedAt.toISOString() }
  return { status: 412, error, path: 'If-Match', current: kept.shown, changed }
}

/** The answer to something that is not there, the same for what never was and what is another organisation's. */
export const gone = (what: string): Refusal => ({ status: 404, error: `No such ${what}.`, path: what })

/**
 * The one rule for saving: a known key gives its first answer again (another body under it: 409); then 428 without
 * If-Match, 412 with the server's copy when it is stale; else the next revision, whose row is never changed.
 */
export function saveRevision<Body>(
  member: Member,
  thing: Revisioned<Body>,
  save: Save<unknown>,
  bodyOf: (tx: Transaction) => Promise<Body | Refusal>,
): Promise<Answer | Refusal> {
  return asOrganisation(member.organisationId, (tx) =>
    answerOnce(tx, { member, resource: thing.resource, key: save.key, bodyHash: save.bodyHash }, async () => {
      const kept = await thing.lock(tx)
      if (!kept) return gone('resource')
      const stale = await staleness(save.expected, kept)
      if (stale) return stale
      const body = await bodyOf(tx)
      if (typeof body === 'object' && body !== null && isRefusal(body)) return body
      const revision = kept.revision + 1
      const shown = await thing.write(tx, revision, body, contentHash(body))
      await recordEvent(tx, member, { action: thing.saved, subject: thing.resource, detail: { revision } })
      return { status: 200, body: shown, revision }
    }),
  )
}
