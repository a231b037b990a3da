import type { HeaterModel, Mount } from '#app/domain/heaters/heater-model.ts'
import type { Layout, MountedHeater } from '#app/domain/layout/layout.ts'
import { nearestOnSegment } from '#app/domain/site/geometry.ts'
import type { Site } from '#app/domain/site/site.ts'
import type { Vec2 } from '#app/domain/vector.ts'

/** Plan distance within which a mount without a stated reach takes a support, m (house rule). */
const plainReach: Record<Mount, number> = {
  chain: 0.1,
  'drop rods': 0.1,
  'ceiling bracket': 0.1,
  'beam clamp': 0.1,
  'wall bracket': 0.25,
  'pole clamp': 0.25,
  'recess box': 0.5,
}

/** Things of the site that a mount can be fixed to, with how far each is from a place in plan, m. */
function supportsOf(site: Site, mount: Mount, at: Vec2): { id: string; distance: number }[] {
  switch (mount) {
    case 'wall bracket':
      return site.walls.map((wall) => ({
        id: wall.id,
        distance: nearestOnSegment(wall.from, wall.to, at[0], at[1]).distance,
      }))
    case 'pole clamp':
      return site.poles.map((pole) => ({
        id: pole.id,
        distance: Math.max(0, Math.hypot(at[0] - pole.at[0], at[1] - pole.at[1]) - pole.diameter / 2),
      }))
    default:
      return site.members.map((member) => ({
        id: member.id,
        distance: nearestOnSegment(member.from, member.to, at[0], at[1]).distance,
      }))
  }
}

/**
 * The support a heater would be fixed to where it is: its own while that is in reach, else the nearest in reach, else
 * null. Whether it may hang there is for the rules.
 */
export function supportNear(site: Site, heater: MountedHeater, model: HeaterModel | undefined): string | null {
  const reach = model?.mountReach[heater.mount] ?? plainReach[heater.mount]
  const within = supportsOf(site, heater.mount, [heater.x, heater.y])
    .filter((support) => support.distance <= reach + 1e-9)
    .sort((a, b) => a.distance - b.distance)
  const own = within.find((support) => support.id === heater.memberId)
  return own?.id ?? within[0]?.id ?? null
}

/** Finds the supports of the heaters named anew, after they moved or changed their mount. */
export function findSupports(
  layout: Layout,
  ids: readonly string[],
  site: Site,
  models: ReadonlyMap<string, HeaterModel>,
): Layout {
  const named = new Set(ids)
  return {
    ...layout,
    heaters: layout.heaters.map((heater) => {
      if (!named.has(heater.id)) return heater
      const memberId = supportNear(site, heater, models.get(heater.model))
      return memberId === heater.memberId ? heater : { ...heater, memberId }
    }),
  }
}
