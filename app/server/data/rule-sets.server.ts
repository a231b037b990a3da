import { and, asc, desc, eq } from 'drizzle-orm'
import { ruleSetSchema, type ChosenRuleSet, type RuleSet } from '#app/domain/rules/rule-set.ts'
import type { House } from '#app/domain/rules/house.ts'
import { recordEvent } from '#app/server/audit.server.ts'
import { readHouse } from '#app/server/data/house.server.ts'
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

/** One revision of a rule set: who wrote it and when. */
export interface RuleSetRevision {
  readonly revision: number
  readonly author: string
  readonly createdAt: Date
  readonly articles: number
}

/** A rule set with its revisions, newest first; null when the organisation has it not. */
export async function findRuleSet(
  member: Member,
  id: string,
): Promise<{ readonly ruleSet: ChosenRuleSet; readonly revisions: RuleSetRevision[] } | null> {
  if (!isId(id)) return null
  return asOrganisation(member.organisationId, async (tx) => {
    const [row] = await tx
      .select(columns)
      .from(ruleSets)
      .where(and(own(ruleSets), eq(ruleSets.id, id)))
    if (!row) return null
    const rows = await tx
      .select({
        revision: ruleSetRevisions.revision,
        body: ruleSetRevisions.body,
        createdAt: ruleSetRevisions.createdAt,
        authorId: ruleSetRevisions.authorId,
      })
      .from(ruleSetRevisions)
      .where(and(own(ruleSetRevisions), eq(ruleSetRevisions.ruleSetId, id)))
      .orderBy(desc(ruleSetRevisions.revision))
    const revisions = rows.map(({ body, authorId, ...rest }) => ({
      ...rest,
      author: authorId === member.userId ? 'You' : 'A colleague',
      articles: ruleSetSchema.parse(body).articles.length,
    }))
    return { ruleSet: ruleSetOf(row), revisions }
  })
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

/** Keeps a rule set that was changed from a revision; null, and nothing is changed, when somebody kept another meanwhile. */
export function saveRuleSet(member: Member, id: string, from: number, body: RuleSet): Promise<number | null> {
  return asOrganisation(member.organisationId, async (tx) => {
    const revision = from + 1
    const written = await tx
      .update(ruleSets)
      .set({ ...body, revision, updatedAt: new Date(), updatedBy: member.userId })
      .where(and(own(ruleSets), eq(ruleSets.id, id), eq(ruleSets.revision, from)))
      .returning({ id: ruleSets.id })
    if (written.length === 0) return null
    await keepRevision(tx, member, id, revision, body)
    return revision
  })
}

/** Whether a job's copy of a rule set is what the organisation keeps of that revision, to the letter. */
export async function isKeptRuleSet(tx: Transaction, { id, revision, ...body }: ChosenRuleSet): Promise<boolean> {
  const [row] = await tx
    .select({ contentHash: ruleSetRevisions.contentHash })
    .from(ruleSetRevisions)
    .where(and(own(ruleSetRevisions), eq(ruleSetRevisions.ruleSetId, id), eq(ruleSetRevisions.revision, revision)))
  return row?.contentHash === contentHash(body)
}
