import { z } from 'zod'
import { windNames } from '#app/domain/comfort/seat-warmth.ts'
import { shades } from '#app/domain/comfort/shade.ts'
import { isRefusal, respond } from '#app/server/answers.server.ts'
import { refuseComputation } from '#app/server/computation-refusal.server.ts'
import { findLaidOut } from '#app/server/data/laid-out.server.ts'
import { requireVariant } from '#app/server/data/variants.server.ts'
import { explainSeatOffThread } from '#app/server/flux.server.ts'
import { checked } from '#app/server/json-body.server.ts'
import { missing } from '#app/server/missing.server.ts'
import type { Route } from './+types/seat-explanation'

export { readOnly as action } from '#app/server/other-methods.server.ts'

const wind = z.enum(windNames)
const figureSchema = z.discriminatedUnion('quantity', [
  z.strictObject({ quantity: z.literal('body') }),
  z.strictObject({ quantity: z.literal('body-largest') }),
  z.strictObject({ quantity: z.literal('head') }),
  z.strictObject({ quantity: z.literal('near-infrared') }),
  z.strictObject({ quantity: z.literal('head-to-body') }),
  z.strictObject({ quantity: z.literal('feels-like'), wind }),
  z.strictObject({ quantity: z.literal('sensation'), wind }),
])
const shadeSchema = z.strictObject({ shade: z.enum(shades) })

/**
 * GET /api/variants/:variantId/seats/:seatId/explain?quantity=…&wind=…&shade=…: one figure of a seat with its inputs,
 * formula, source, tolerance and the share of every element; with shade, what the seat sees of each heater too.
 */
export async function loader({ request, params }: Route.LoaderArgs) {
  const open = await requireVariant(request, params.variantId, 'view')
  const { quantity = 'body', shade = 'none', ...rest } = Object.fromEntries(new URL(request.url).searchParams)
  const figure = checked(figureSchema, { quantity, ...rest })
  if (isRefusal(figure)) return respond(figure)
  const shaded = checked(shadeSchema, { shade })
  if (isRefusal(shaded)) return respond(shaded)
  const laid = await findLaidOut(open)
  if (!laid) throw missing(request, 'variant')
  const { site, brief, models, variant, house } = laid
  const explanation = await explainSeatOffThread(
    { site, brief, models, layout: variant, ...shaded.value },
    params.seatId,
    figure.value,
    house.rules,
  ).catch(refuseComputation)
  if (explanation instanceof Response) return explanation
  if (!explanation) throw missing(request, 'seat')
  return Response.json(explanation)
}
