import { asc } from 'drizzle-orm'
import { heaterModelSchema, type HeaterModel } from '#app/domain/heaters/heater-model.ts'
import { asOrganisation, type Transaction, own } from '#app/server/organisation.server.ts'
import type { Member } from '#app/server/session.server.ts'
import { heaterModels } from '#drizzle/schema.ts'

async function readModels(tx: Transaction): Promise<HeaterModel[]> {
  const rows = await tx
    .select({ body: heaterModels.body })
    .from(heaterModels)
    .where(own(heaterModels))
    .orderBy(asc(heaterModels.code))
  return rows.map(({ body }) => heaterModelSchema.parse(body))
}

/** The organisation's catalogue by code, withdrawn models and those without beam data included. */
export function listModels(member: Member): Promise<HeaterModel[]> {
  return asOrganisation(member.organisationId, readModels)
}

/** The catalogue as the engine asks for it: a model by its code. */
export async function modelsByCode(tx: Transaction): Promise<ReadonlyMap<string, HeaterModel>> {
  return new Map((await readModels(tx)).map((model) => [model.code, model]))
}

/** The organisation's catalogue, a model by its code. */
export function findModels(member: Member): Promise<ReadonlyMap<string, HeaterModel>> {
  return asOrganisation(member.organisationId, modelsByCode)
}
