import type { HeaterPlace } from '#app/domain/layout/edits.ts'
import type { Layout } from '#app/domain/layout/layout.ts'
import type { ModelChoice } from '#app/domain/layout/model-choice.ts'
import { supportNear } from '#app/domain/layout/support-near.ts'
import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'
import { coverHeightAt } from '#app/domain/site/cover.ts'
import { nearestMember } from '#app/domain/site/member.ts'
import type { Site } from '#app/domain/site/site.ts'
import { degrees, type Vec2 } from '#app/domain/vector.ts'

/**
 * How a model that can be placed first hangs at a place: as the last heater of that model in the layout does (straight
 * down unless on a wall), else from
 * its first fitting mount, in the middle of the manual's heights but under the cover, along the member it hangs from.
 * A model that cannot be placed: null.
 */
export function firstPlace(
  choice: ModelChoice,
  site: Site,
  layout: Layout,
  [x, y]: Vec2,
  rules: HouseRules,
): HeaterPlace | null {
  const { model, supplyVoltage, mounts } = choice
  const alike = layout.heaters.findLast((heater) => heater.model === model.code)
  if (alike) {
    const tiltDeg = alike.mount === 'wall bracket' ? alike.tiltDeg : 0
    return withSupport({ ...alike, x, y, tiltDeg, memberId: null }, choice, site, rules)
  }
  const mount = preferredMount(mounts, site, [x, y])
  if (choice.whyNot.length > 0 || supplyVoltage === null || !mount) return null
  const place: HeaterPlace = {
    model: model.code,
    supplyVoltage,
    x,
    y,
    lowestPoint: firstHeight(choice, site, [x, y]),
    turnDeg: directionAt(mount, site, [x, y]),
    tiltDeg: mount === 'wall bracket' ? Math.min(30, model.tiltDeg?.max ?? 0) : 0,
    mount,
    memberId: null,
  }
  return withSupport(place, choice, site, rules)
}

const withSupport = (place: HeaterPlace, { model }: ModelChoice, site: Site, rules: HouseRules): HeaterPlace => ({
  ...place,
  memberId: supportNear(site, { ...place, id: 'new' }, model, rules),
})

/** Hanging is the plainest where there is a member; near a wall the bracket. */
function preferredMount(mounts: ModelChoice['mounts'], site: Site, at: Vec2) {
  const hung = mounts.find((mount) => mount === 'chain' || mount === 'drop rods' || mount === 'beam clamp')
  const wall = mounts.includes('wall bracket') && (!hung || distanceToWall(site, at) < 0.4)
  return wall ? ('wall bracket' as const) : (hung ?? mounts[0])
}

const distanceToWall = (site: Site, at: Vec2) =>
  Math.min(...site.walls.map((wall) => Math.abs(offWall(wall, at))), Infinity)

function offWall(wall: Site['walls'][number], at: Vec2): number {
  const [dx, dy] = [wall.to[0] - wall.from[0], wall.to[1] - wall.from[1]]
  return ((at[1] - wall.from[1]) * dx - (at[0] - wall.from[0]) * dy) / Math.max(1e-9, Math.hypot(dx, dy))
}

function firstHeight({ model }: ModelChoice, site: Site, [x, y]: Vec2): number {
  const least = model.mountingHeight.min ?? 2
  const most = model.mountingHeight.recommendedMax ?? least + 0.6
  const covers = site.covers.map((cover) => coverHeightAt(cover, x, y)).filter((height) => height !== null)
  const under = Math.min(...covers, Infinity)
  if (model.mounts.includes('recess box') && Number.isFinite(under)) return under
  const above = model.clearanceToNoncombustible?.above ?? model.clearanceToCombustible?.above ?? 0.3
  const wanted = Math.min((least + most) / 2, under - model.body.depth - above)
  return Math.round(Math.max(least, wanted) * 20) / 20
}

/** Along the member or the wall, so that a positive tilt looks away from the wall. */
function directionAt(mount: HeaterPlace['mount'], site: Site, [x, y]: Vec2): number {
  const wall = mount === 'wall bracket' ? site.walls[0] : undefined
  const line = wall ?? nearestMember(site, x, y)?.member
  if (!line) return 0
  const turn = degrees(Math.atan2(line.to[1] - line.from[1], line.to[0] - line.from[0]))
  return Math.round(turn * 100) / 100
}
