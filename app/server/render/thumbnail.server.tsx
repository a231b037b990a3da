import { emitterOf } from '#app/domain/flux/emitter.ts'
import { planesOf } from '#app/domain/site/planes.ts'
import { irradianceScale } from '#app/drawing/heat/quantity.ts'
import { extentOf } from '#app/drawing/plan/plan-view.ts'
import { PlanThumbnail } from '#app/drawing/plan/plan-thumbnail.tsx'
import type { LaidOut } from '#app/server/data/laid-out.server.ts'
import { answerMapOffThread } from '#app/server/flux.server.ts'
import { svgOf } from '#app/server/render/picture.server.ts'
import { contentHash } from '#drizzle/content-hash.ts'

/** Size of the picture, px, and how many cells of the map lie along its longer side. */
const size = { width: 164, height: 76 } as const
const cellsAlong = 80
/** Pictures that are kept, the one shown last at the end. */
const mostKept = 500
const kept = new Map<string, Promise<string>>()

async function mapOf({ site, variant, models }: LaidOut, scale: ReturnType<typeof irradianceScale>) {
  const emitters = variant.heaters.flatMap((heater) => {
    const model = models.get(heater.model)
    return (model && emitterOf(heater, model)) ?? []
  })
  if (emitters.length === 0) return null
  const { x, y } = extentOf(site.floor)
  const cell = Math.max(x[1] - x[0], y[1] - y[0]) / cellsAlong
  const { levels, edges } = scale
  const quantity = { kind: 'flux' } as const
  return answerMapOffThread({ emitters, floor: site.floor, z: planesOf(site).body, cell, quantity, levels, edges })
}

async function draw(laid: LaidOut): Promise<string> {
  const { site, variant, models, brief } = laid
  const scale = irradianceScale('dusk', brief.target)
  const map = await mapOf(laid, scale)
  const label = `Plan of ${variant.title}: irradiance on the body plane`
  return svgOf(
    <PlanThumbnail
      name="thumbnail"
      {...{ site, models, label, ...size }}
      layout={variant}
      picture={map?.picture ?? null}
      quantity={scale}
    />,
  )
}

/**
 * A variant's small plan as SVG. Kept until the variant, the site, the target or a model that it uses changes. Rejects
 * as `answerMapOffThread` does.
 */
export function thumbnailOf(laid: LaidOut): Promise<string> {
  const { variant, siteRevision, briefRevision, models } = laid
  const used = [...new Set(variant.heaters.map(({ model }) => model))].map((code) => models.get(code) ?? null)
  const key = contentHash([variant.id, variant.revision, siteRevision, briefRevision, used])
  const drawn = kept.get(key) ?? draw(laid)
  kept.delete(key)
  kept.set(key, drawn)
  drawn.catch(() => kept.delete(key))
  for (const oldest of kept.keys()) {
    if (kept.size <= mostKept) break
    kept.delete(oldest)
  }
  return drawn
}
