import { obstructionsOf, type Obstruction } from '#app/domain/flux/shading.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { Layout } from '#app/domain/layout/layout.ts'
import type { Site } from '#app/domain/site/site.ts'

/** Whether figures take shade into account, and where movable things are then. */
export const shades = ['none', 'in-place', 'away'] as const
export type Shade = (typeof shades)[number]

/** What stands in the way; nothing without shade. */
export function obstructionsUnder(
  shade: Shade,
  site: Site,
  layout: Layout,
  models: ReadonlyMap<string, HeaterModel>,
): Obstruction[] {
  if (shade === 'none') return []
  return obstructionsOf(site, layout, models, { movable: shade === 'away' ? 'away' : 'in place' })
}
