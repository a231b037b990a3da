import { and, asc, eq } from 'drizzle-orm'
import { beamTableSchema, heaterModelSchema, type HeaterModel } from '#app/domain/heaters/heater-model.ts'
import { asOrganisation, type Transaction, own } from '#app/server/organisation.server.ts'
import type { Member } from '#app/server/session.server.ts'
import { heaterBeams } from '#drizzle/beam-schema.ts'
import { heaterModels } from '#drizzle/schema.ts'

/** A model as the rest of the program knows it: with the organisation's own beam where it has measured one. */
export function modelOf(body: unknown, ownBeam: unknown): HeaterModel {
  const model = heaterModelSchema.parse(body)
  return ownBeam === null ? model : { ...model, beam: beamTableSchema.parse(ownBeam) }
}

/** Joins the organisation's own beam of a model. */
export const sameModel = and(own(heaterBeams), eq(heaterBeams.code, heaterModels.code))

async function readModels(tx: Transaction): Promise<HeaterModel[]> {
  const rows = await tx
    .select({ body: heaterModels.body, beam: heaterBeams.body })
    .from(heaterModels)
    .leftJoin(heaterBeams, sameModel)
    .where(own(heaterModels))
    .orderBy(asc(heaterModels.code))
  return rows.map(({ body, beam }) => modelOf(body, beam))
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
