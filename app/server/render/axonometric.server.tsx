import type { ReactElement } from 'react'
import { z } from 'zod'
import { assumptionsOf } from '#app/domain/brief/assumptions.ts'
import { emitterOf } from '#app/domain/flux/emitter.ts'
import { areaOf } from '#app/domain/site/geometry.ts'
import { planesOf } from '#app/domain/site/planes.ts'
import { AxonometricSheet } from '#app/drawing/axonometric/axonometric-sheet.tsx'
import { corners } from '#app/drawing/axonometric/projection.ts'
import { irradianceScale } from '#app/drawing/heat/quantity.ts'
import { screenPen } from '#app/drawing/pen.ts'
import type { LaidOut } from '#app/server/data/laid-out.server.ts'
import { answerMapOffThread } from '#app/server/flux.server.ts'
import { dayInWords } from '#app/server/render/day-in-words.server.ts'

/** Cells of the map: finer than on the page, for a picture that is looked at closely. */
const cells = 60_000

const lookSchema = z.object({
  corner: z.enum(corners).catch('lower left'),
  theme: z.enum(['dusk', 'day']).catch('day'),
})

/** How a picture is asked for in its address; what is not known is the lower left corner by day. */
export const lookOf = (search: URLSearchParams) => lookSchema.parse(Object.fromEntries(search))

/** The picture of a variant in space; its map is worked out off the event loop. Rejects as `answerMapOffThread` does. */
export async function axonometricSheet(
  laid: LaidOut,
  { corner, theme }: z.infer<typeof lookSchema>,
  { job, organisation, day }: { readonly job: string; readonly organisation: string; readonly day: Date },
): Promise<ReactElement> {
  const { site, brief, variant, models, house } = laid
  const quantity = irradianceScale(theme, brief.target)
  const plane = planesOf(site).body
  const emitters = variant.heaters.flatMap((heater) => {
    const model = models.get(heater.model)
    return (model && emitterOf(heater, model)) ?? []
  })
  const cell = Math.max(0.02, Math.sqrt(Math.abs(areaOf(site.floor)) / cells))
  const { levels, edges } = quantity
  const flux = { kind: 'flux' } as const
  const asked = { emitters, floor: site.floor, z: plane, cell, quantity: flux, levels, edges }
  const map = emitters.length > 0 ? await answerMapOffThread(asked) : null
  return (
    <AxonometricSheet
      {...{ job, variant, organisation, site, models, quantity, corner, plane }}
      layout={variant}
      rules={house.rules}
      picture={map?.picture ?? null}
      pen={screenPen(theme)}
      date={dayInWords(day)}
      assumed={assumptionsOf(brief, site)}
    />
  )
}
