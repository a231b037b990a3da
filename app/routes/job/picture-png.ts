import { data } from 'react-router'
import { refuseComputation } from '#app/server/computation-refusal.server.ts'
import { recordAnswer } from '#app/server/audit.server.ts'
import { requireJob } from '#app/server/data/jobs.server.ts'
import { findLaidOut } from '#app/server/data/laid-out.server.ts'
import { attachment } from '#app/server/file-name.server.ts'
import { isId } from '#app/server/missing.server.ts'
import { axonometricSheet, lookOf } from '#app/server/render/axonometric.server.tsx'
import { pngOf, svgOf } from '#app/server/render/picture.server.ts'
import type { Route } from './+types/picture-png'

/** GET /jobs/:jobId/variants/:variantId/picture.png?corner=lower+left&theme=day: the variant in space, a download. */
export async function loader({ request, params, url }: Route.LoaderArgs) {
  const job = await requireJob(request, params.jobId, 'export')
  const { variantId } = params
  const laid = isId(variantId) ? await findLaidOut({ id: variantId, member: job.member }) : null
  if (laid?.variant.jobId !== job.id) throw data('No such variant', 404)
  const { number, revision, title } = laid.variant
  try {
    const about = { job: job.name, organisation: job.member.organisationName, day: new Date() }
    const sheet = await axonometricSheet(laid, lookOf(url.searchParams), about)
    const png = await pngOf(svgOf(sheet), 2)
    await recordAnswer(job.member, {
      action: 'picture exported',
      subject: `variants/${variantId}`,
      detail: { format: 'png', number, revision },
    })
    return new Response(new Uint8Array(png), {
      headers: {
        'Content-Type': 'image/png',
        'Content-Disposition': attachment([job.name, String(number), title], 'png'),
      },
    })
  } catch (problem) {
    return refuseComputation(problem)
  }
}
