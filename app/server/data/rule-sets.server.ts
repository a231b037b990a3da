import { and, asc, eq, sql } from 'drizzle-orm'
import { z } from 'zod'
import { ruleSetSchema, type ChosenRuleSet, type RuleSet } from '#app/domain/rules/rule-set.ts'
import type { House } from '#app/domain/rules/house.ts'
import { recordEvent } from '#app/server/audit.server.ts'
import { readHouse } from '#app/server/data/house.server.ts'
import { findName, findNames } from '#app/server/data/people.server.ts'
import { isId } from '#app/server/missing.server.ts'
import { asOrganisation, own, type Transaction } from '#app/server/organisation.server.ts'
import type { Member } from '#app/server/session.server.ts'
import { contentHash } from '#drizzle/content-hash.ts'
import { ruleSetRevisions, ruleSets } from '#drizzle/rules-schema.ts'

const columns = {
  id: ruleSets.id,
  revision: ruleSets.revision,
  name: ruleSets.name,
  place: ruleSets.place,
  edition: ruleSets.edition,
  articles: ruleSets.articles,
}

interface Row extends Omit<ChosenRuleSet, 'articles'> {
  readonly articles: unknown
}

const ruleSetOf = ({ id, revision, ...body }: Row): ChosenRuleSet => ({ id, revision, ...ruleSetSchema.parse(body) })

/** The organisation's rule sets and what it decided for itself. */
export const findRules = (
  member: Member,
): Promise<{ readonly ruleSets: readonly ChosenRuleSet[]; readonly house: House }> =>
  asOrganisation(member.organisationId, async (tx) => ({
    ruleSets: await readRuleSets(tx),
    house: await readHouse(tx),
  }))

/** The organisation's rule sets by name and edition. */
export async function readRuleSets(tx: Transaction): Promise<ChosenRuleSet[]> {
  const order = [asc(ruleSets.name), asc(ruleSets.edition)]
  const rows = await tx
    .select(columns)
    .from(ruleSets)
    .where(own(ruleSets))
    .orderBy(...order)
  return rows.map(ruleSetOf)
}

/** One revision of a rule set: who wrote it, by name while there is one, and when, ISO 8601. */
export interface RuleSetRevision {
  readonly revision: number
  readonly author: string | null
  readonly createdAt: string
  readonly articles: number
}

const revisionsSchema = z.array(
  z.object({ revision: z.number(), authorId: z.string(), createdAt: z.string(), articles: z.number() }),
)

/** A column with the revisions of a rule set, newest first, as a JSON list. */
function revisionList(tx: Transaction) {
  const { revision, authorId, createdAt, body } = ruleSetRevisions
  const entry = sql`json_build_object('revision', ${revision}, 'authorId', ${authorId}, 'createdAt', ${createdAt}, 'articles', jsonb_array_length(${body} -> 'articles'))` // prettier-ignore
  return tx
    .select({ list: sql`json_agg(${entry} order by ${revision} desc)` })
    .from(ruleSetRevisions)
    .where(and(own(ruleSetRevisions), eq(ruleSetRevisions.ruleSetId, ruleSets.id)))
}

/** A rule set with its revisions, newest first; null when the organisation has it not. */
export async function findRuleSet(
  member: Member,
  id: string,
): Promise<{ readonly ruleSet: ChosenRuleSet; readonly revisions: RuleSetRevision[] } | null> {
  if (!isId(id)) return null
  const [row] = await asOrganisation(member.organisationId, (tx) =>
    tx
      .select({ ...columns, revisions: sql`(${revisionList(tx)})` })
      .from(ruleSets)
      .where(and(own(ruleSets), eq(ruleSets.id, id))),
  )
  if (!row) return null
  const { revisions, ...ruleSet } = row
  const listed = revisionsSchema.parse(revisions)
  const names = await findNames(listed.map(({ authorId }) => authorId))
  return {
    ruleSet: ruleSetOf(ruleSet),
    revisions: listed.map(({ authorId, ...rest }) => ({ ...rest, author: names.get(authorId) ?? null })),
  }
}

async function keepRevision(tx: Transaction, member: Member, id: string, revision: number, body: RuleSet) {
  const { organisationId, userId } = member
  await tx
    .insert(ruleSetRevisions)
    .values({ organisationId, ruleSetId: id, revision, body, contentHash: contentHash(body), authorId: userId })
  const detail = { revision, name: body.name, edition: body.edition, articles: body.articles.length }
  await recordEvent(tx, member, { action: 'rule set saved', subject: `rules/sets/${id}`, detail })
}

/** Keeps a new rule set as revision 1; gives its id. */
export function createRuleSet(member: Member, body: RuleSet): Promise<string> {
  return asOrganisation(member.organisationId, async (tx) => {
    const row = { organisationId: member.organisationId, ...body, revision: 1, updatedBy: member.userId }
    const [made] = await tx.insert(ruleSets).values(row).returning({ id: ruleSets.id })
    if (!made) throw new Error('The rule set was not made.')
    await keepRevision(tx, member, made.id, 1, body)
    return made.id
  })
}

/** What somebody kept while a rule set was being changed: theirs, who and when, and what both came from. */
export interface RuleSetMeanwhile {
  readonly revision: number
  readonly theirs: RuleSet
  readonly base: RuleSet | null
  readonly changed: { readonly by: string | null; readonly at: string }
}

/**
 * Keeps a rule set that was changed from a revision and gives the new one; or, and then nothing is changed, what somebody
 * kept meanwhile. Null when the organisation has it not.
 */
export function saveRuleSet(
  member: Member,
  id: string,
  from: number,
  body: RuleSet,
): Promise<{ readonly revision: number } | { readonly meanwhile: RuleSetMeanwhile } | null> {
  return asOrganisation(member.organisationId, async (tx) => {
    const revision = from + 1
    const written = await tx
      .update(ruleSets)
      .set({ ...body, revision, updatedAt: new Date(), updatedBy: member.userId })
      .where(and(own(ruleSets), eq(ruleSets.id, id), eq(ruleSets.revision, from)))
      .returning({ id: ruleSets.id })
    if (written.length === 0) return readMeanwhile(tx, id, from)
    await keepRevision(tx, member, id, revision, body)
    return { revision }
  })
}

async function readMeanwhile(
  tx: Transaction,
  id: string,
  from: number,
): Promise<{ meanwhile: RuleSetMeanwhile } | null> {
  const { updatedAt, updatedBy } = ruleSets
  const before = and(own(ruleSetRevisions), eq(ruleSetRevisions.ruleSetId, id), eq(ruleSetRevisions.revision, from))
  const [kept] = await tx
    .select({ ...columns, updatedAt, updatedBy })
    .from(ruleSets)
    .where(and(own(ruleSets), eq(ruleSets.id, id)))
  if (!kept) return null
  const [base] = await tx.select({ body: ruleSetRevisions.body }).from(ruleSetRevisions).where(before)
  const { name, place, edition, articles, revision } = kept
  const changed = { by: await findName(kept.updatedBy), at: kept.updatedAt.toISOString() }
  const theirs = ruleSetSchema.parse({ name, place, edition, articles })
  return { meanwhile: { revision, theirs, base: base ? ruleSetSchema.parse(base.body) : null, changed } }
}

/** Whether a job's copy of a rule set is what the organisation keeps of that revision, to the letter. */
export async function isKeptRuleSet(tx: Transaction, { id, revision, ...body }: ChosenRuleSet): Promise<boolean> {
  const [row] = await tx
    .select({ contentHash: ruleSetRevisions.contentHash })
    .from(ruleSetRevisions)
    .where(and(own(ruleSetRevisions), eq(ruleSetRevisions.ruleSetId, id), eq(ruleSetRevisions.revision, revision)))
  return row?.contentHash === contentHash(body)
}
