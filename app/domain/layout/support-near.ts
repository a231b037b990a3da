import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { Layout, MountedHeater } from '#app/domain/layout/layout.ts'
import { closeEnough, reachOf, supportPlaces } from '#app/domain/layout/supports.ts'
import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'
import type { Site } from '#app/domain/site/site.ts'

/**
 * The support a heater would be fixed to where it is: its own while that is in reach, else the nearest in reach, else
 * null. Where no reach is stated, or no model is known, the nearest. Whether it may hang there is for the rules.
 */
export function supportNear(
  site: Site,
  heater: MountedHeater,
  model: HeaterModel | undefined,
  rules: HouseRules,
): string | null {
  const reach = (model && reachOf(model, heater.mount, rules)) ?? null
  const places = supportPlaces(site, heater.mount, [heater.x, heater.y])
  if (reach === null) return places[0]?.id ?? null
  const within = places.filter((support) => support.distance <= reach + closeEnough)
  const own = within.find((support) => support.id === heater.memberId)
  return own?.id ?? within[0]?.id ?? null
}

/** Finds the supports of the heaters named anew, after they moved or changed their mount. */
export function findSupports(
  layout: Layout,
  ids: readonly string[],
  site: Site,
  models: ReadonlyMap<string, HeaterModel>,
  rules: HouseRules,
): Layout {
  const named = new Set(ids)
  return {
    ...layout,
    heaters: layout.heaters.map((heater) => {
      if (!named.has(heater.id)) return heater
      const memberId = supportNear(site, heater, models.get(heater.model), rules)
      return memberId === heater.memberId ? heater : { ...heater, memberId }
    }),
  }
}
