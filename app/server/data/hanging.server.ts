import { and, eq } from 'drizzle-orm'
import { hangingDataSchema, type HangingData } from '#app/domain/layout/hanging-data.ts'
import { plainHanging } from '#app/domain/layout/plain-hanging.ts'
import { recordEvent } from '#app/server/audit.server.ts'
import { asOrganisation, own } from '#app/server/organisation.server.ts'
import type { Member } from '#app/server/session.server.ts'
import { hangingData } from '#drizzle/hanging-schema.ts'

/** An organisation's hanging data and their revision; 0 while the defaults hold. */
export interface KeptHanging {
  readonly revision: number
  readonly data: HangingData
}

/** A row as it is kept; without one the defaults. */
export const hangingOf = (
  row: { readonly revision: number; readonly body: unknown } | null | undefined,
): KeptHanging =>
  row ? { revision: row.revision, data: hangingDataSchema.parse(row.body) } : { revision: 0, data: plainHanging }

/** How an organisation makes its hangers. */
export const findHanging = (member: Member): Promise<KeptHanging> =>
  asOrganisation(member.organisationId, async (tx) => {
    const [row] = await tx
      .select({ revision: hangingData.revision, body: hangingData.body })
      .from(hangingData)
      .where(own(hangingData))
    return hangingOf(row)
  })

/**
 * Keeps hanging data that were changed from a revision. Null when somebody kept others meanwhile: nothing is changed
 * then. Gives the new revision.
 */
export function saveHanging(member: Member, from: number, body: HangingData): Promise<number | null> {
  return asOrganisation(member.organisationId, async (tx) => {
    const revision = from + 1
    const row = { revision, body, updatedAt: new Date(), updatedBy: member.userId }
    const written =
      from === 0
        ? await tx
            .insert(hangingData)
            .values({ organisationId: member.organisationId, ...row })
            .onConflictDoNothing()
            .returning({ revision: hangingData.revision })
        : await tx
            .update(hangingData)
            .set(row)
            .where(and(own(hangingData), eq(hangingData.revision, from)))
            .returning({ revision: hangingData.revision })
    if (written.length === 0) return null
    await recordEvent(tx, member, {
      action: 'hanging data saved',
      subject: 'rules/hanging',
      detail: { revision, ...body },
    })
    return revision
  })
}
