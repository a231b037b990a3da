import { jobRequestSchema, startingSite, type JobRequest } from '#app/domain/job/job-request.ts'
import { isRefusal, type Answer, type Refusal } from '#app/server/answers.server.ts'
import { recordEvent } from '#app/server/audit.server.ts'
import { insertBrief } from '#app/server/data/briefs.server.ts'
import { readHouse } from '#app/server/data/house.server.ts'
import { insertSite } from '#app/server/data/sites.server.ts'
import { insertVariant } from '#app/server/data/variant-creation.server.ts'
import { checked, findFault } from '#app/server/json-body.server.ts'
import { asOrganisation, type Transaction } from '#app/server/organisation.server.ts'
import { answerOnce } from '#app/server/saving.server.ts'
import type { Member } from '#app/server/session.server.ts'
import { contentHash } from '#drizzle/content-hash.ts'
import { jobs } from '#drizzle/schema.ts'

async function insertJob(
  tx: Transaction,
  member: Member,
  asked: JobRequest,
): Promise<{ id: string; variantId: string }> {
  const { name, customer, brief } = asked
  const { rules } = await readHouse(tx)
  const [job] = await tx
    .insert(jobs)
    .values({ organisationId: member.organisationId, name, customer, place: brief.place })
    .returning({ id: jobs.id })
  if (!job) throw new Error('The new job was not returned.')
  await insertSite(tx, member, job.id, startingSite(asked, rules))
  await insertBrief(tx, member, job.id, brief)
  const variant = await insertVariant(tx, member, job.id, { title: 'First layout', heaters: [] })
  const detail = { variantId: variant.id }
  await recordEvent(tx, member, { action: 'job created', subject: `jobs/${job.id}`, detail })
  return { id: job.id, variantId: variant.id }
}

/**
 * Creates a job once per key: a bare floor, the brief, and a first variant without heaters. The answer's body is
 * `{ id, variantId }`, for the same key always the same. Refused with 400 and the field when something cannot be kept.
 */
export async function createJob(member: Member, key: string, asked: JobRequest): Promise<Answer | Refusal> {
  const request = findFault(asked) ?? checked(jobRequestSchema, asked)
  if (isRefusal(request)) return request
  return asOrganisation(member.organisationId, (tx) =>
    answerOnce(tx, { member, resource: 'jobs', key, bodyHash: contentHash(request.value) }, async () => ({
      status: 201,
      body: await insertJob(tx, member, request.value),
      revision: null,
    })),
  )
}
