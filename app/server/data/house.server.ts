import { sql } from 'drizzle-orm'
import { z } from 'zod'
import type { House } from '#app/domain/rules/house.ts'
import { hangingDecision, rulesDecision } from '#app/server/data/decisions.server.ts'
import { asOrganisation, own, type Transaction } from '#app/server/organisation.server.ts'
import type { Member } from '#app/server/session.server.ts'

/** All that the organisation decided, as one column of a statement that asks for other things too. */
export function houseColumn(tx: Transaction) {
  const [hanging, rules] = [hangingDecision, rulesDecision].map(({ table }) =>
    tx.select({ body: table.body }).from(table).where(own(table)),
  )
  return sql`json_build_object('hanging', (${hanging}), 'rules', (${rules}))`
}

const columnSchema = z.object({
  hanging: hangingDecision.schema.nullable(),
  rules: rulesDecision.schema.nullable(),
})

/** That column as the rest of the program knows it. */
export function houseOf(column: unknown): House {
  const { hanging, rules } = columnSchema.parse(column)
  return { hanging: hanging ?? hangingDecision.plain, rules: rules ?? rulesDecision.plain }
}

/** The same within a transaction. */
export async function readHouse(tx: Transaction): Promise<House> {
  const [row] = await tx.select({ house: houseColumn(tx) }).from(sql`(select 1) as one`)
  return houseOf(row?.house)
}

/** What the member's organisation decided for itself. */
export const findHouse = (member: Member): Promise<House> => asOrganisation(member.organisationId, readHouse)
