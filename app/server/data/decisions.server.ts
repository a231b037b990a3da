import { and, eq } from 'drizzle-orm'
import type { z } from 'zod'
import { hangingDataSchema, type HangingData } from '#app/domain/layout/hanging-data.ts'
import { plainHanging } from '#app/domain/layout/plain-hanging.ts'
import { plainHouseRules } from '#app/domain/rules/house-rules.ts'
import { houseRulesSchema, type HouseRules } from '#app/domain/rules/house-rules-schema.ts'
import { recordEvent, type AuditedAction } from '#app/server/audit.server.ts'
import { findName } from '#app/server/data/people.server.ts'
import { asOrganisation, own, type Transaction } from '#app/server/organisation.server.ts'
import type { Member } from '#app/server/session.server.ts'
import { hangingData, houseRules } from '#drizzle/house-schema.ts'

/** Something that an organisation decides once for all of its jobs: where it is kept and what holds until it does. */
export interface Decision<Body> {
  readonly table: typeof hangingData | typeof houseRules
  readonly schema: z.ZodType<Body>
  readonly plain: Body
  readonly saved: AuditedAction
  readonly subject: string
}

/** How an organisation makes its hangers. */
export const hangingDecision: Decision<HangingData> = {
  table: hangingData,
  schema: hangingDataSchema,
  plain: plainHanging,
  saved: 'hanging data saved',
  subject: 'rules/hanging',
}

/** The figures that no manual and no published source gives. */
export const rulesDecision: Decision<HouseRules> = {
  table: houseRules,
  schema: houseRulesSchema,
  plain: plainHouseRules,
  saved: 'house rules saved',
  subject: 'rules/house',
}

/** What was decided, its revision, and who decided it when; revision 0 while the defaults hold. */
export interface Decided<Body> {
  readonly revision: number
  readonly body: Body
  readonly changed: { readonly by: string | null; readonly at: string } | null
}

/** What the member's organisation decided. */
export const findDecided = <Body>(member: Member, decision: Decision<Body>): Promise<Decided<Body>> =>
  asOrganisation(member.organisationId, (tx) => readDecided(tx, decision))

async function readDecided<Body>(tx: Transaction, { table, schema, plain }: Decision<Body>): Promise<Decided<Body>> {
  const { revision, body, updatedAt, updatedBy } = table
  const [row] = await tx.select({ revision, body, updatedAt, updatedBy }).from(table).where(own(table))
  if (!row) return { revision: 0, body: plain, changed: null }
  const changed = { by: await findName(row.updatedBy), at: row.updatedAt.toISOString() }
  return { revision: row.revision, body: schema.parse(row.body), changed }
}

/**
 * Keeps a decision that was changed from a revision, and writes it down for good with every figure. Gives the new
 * revision, or, and then nothing is changed, what somebody decided meanwhile.
 */
export function saveDecided<Body extends object>(
  member: Member,
  decision: Decision<Body>,
  from: number,
  body: Body,
): Promise<{ readonly revision: number } | { readonly meanwhile: Decided<Body> }> {
  const { table, saved, subject } = decision
  return asOrganisation(member.organisationId, async (tx) => {
    const revision = from + 1
    const row = { revision, body, updatedAt: new Date(), updatedBy: member.userId }
    const written =
      from === 0
        ? await tx
            .insert(table)
            .values({ organisationId: member.organisationId, ...row })
            .onConflictDoNothing()
            .returning({ revision: table.revision })
        : await tx
            .update(table)
            .set(row)
            .where(and(own(table), eq(table.revision, from)))
            .returning({ revision: table.revision })
    if (written.length === 0) return { meanwhile: await readDecided(tx, decision) }
    await recordEvent(tx, member, { action: saved, subject, detail: { revision, ...body } })
    return { revision }
  })
}
