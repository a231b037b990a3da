import type { ReactElement } from 'react'
import { recordAnswer, type AuditedEvent } from '#app/server/audit.server.ts'
import { refuseComputation } from '#app/server/computation-refusal.server.ts'
import { findCompared } from '#app/server/data/compared.server.ts'
import type { OpenJob } from '#app/server/data/jobs.server.ts'
import { requireLaidOut } from '#app/server/data/laid-out.server.ts'
import { attachment } from '#app/server/file-name.server.ts'
import { missing } from '#app/server/missing.server.ts'
import { axonometricSheet, lookOf } from '#app/server/render/axonometric.server.tsx'
import { comparisonSheet } from '#app/server/render/comparison.server.tsx'
import type { PictureFile } from '#app/server/render/picture-file.server.ts'

/** A drawing as a download, written down before it is handed out; 422 or 503 where its figures cannot be had. */
async function download(
  job: OpenJob,
  { format, headers, write }: PictureFile,
  drawn: () => Promise<ReactElement>,
  { name, ...event }: AuditedEvent & { readonly name: readonly string[] },
): Promise<Response> {
  try {
    const body = await write(await drawn())
    await recordAnswer(job.member, { ...event, detail: { format, ...event.detail } })
    return new Response(body, { headers: { ...headers, 'Content-Disposition': attachment(name, format) } })
  } catch (problem) {
    return refuseComputation(problem)
  }
}

/** A variant in space, in the look that the address asks for. Throws 404 for one that is not the job's. */
export async function downloadPicture(
  job: OpenJob,
  variantId: string,
  search: URLSearchParams,
  file: PictureFile,
): Promise<Response> {
  const laid = await requireLaidOut(job, variantId)
  const { number, revision, title } = laid.variant
  const about = { job: job.name, organisation: job.member.organisationName, day: new Date() }
  return download(job, file, () => axonometricSheet(laid, lookOf(search), about), {
    action: 'picture exported',
    subject: `variants/${variantId}`,
    detail: { number, revision },
    name: [job.name, String(number), title],
  })
}

/** The customer's sheet of the variants that the address asks for. Throws 404 where there are too few. */
export async function downloadComparison(
  request: Request,
  job: OpenJob,
  search: URLSearchParams,
  file: PictureFile,
): Promise<Response> {
  const compared = await findCompared(job, search.get('variants'))
  if (compared.chosen.length === 0) throw missing(request, 'variant')
  const variants = compared.chosen.map(({ number, revision }) => ({ number, revision }))
  return download(job, file, () => comparisonSheet(compared, job.member.organisationName, new Date()), {
    action: 'comparison exported',
    subject: `jobs/${job.id}`,
    detail: { variants },
    name: [job.name, 'variants', ...variants.map(({ number }) => String(number))],
  })
}
