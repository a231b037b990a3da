import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { MountedHeater } from '#app/domain/layout/layout.ts'
import type { Repeat } from '#app/domain/layout/repeat.ts'
import { supportOf } from '#app/domain/layout/supports.ts'
import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'
import type { Site } from '#app/domain/site/site.ts'
import { roundLength } from '#app/domain/units.ts'
import { radians, type Vec2 } from '#app/domain/vector.ts'

/** The spacings that members allow about a wanted one, m; null where there is none on that side. */
export interface MemberSpacings {
  readonly below: number | null
  readonly above: number | null
  /** Whether the wanted spacing itself puts every copy under a member. */
  readonly fits: boolean
}

/** Spacings closer together than this are the same one, m. */
const same = 0.0005

/**
 * The nearest spacings below and above the wanted one at which every copy of the heaters hangs from a member, along the
 * direction of the repeat: centre to centre of members that it crosses (common practice, no source). Null where it
 * crosses none, as along a member, and for heaters that do not hang from members.
 */
export function memberSpacings(
  site: Site,
  heaters: readonly MountedHeater[],
  models: ReadonlyMap<string, HeaterModel>,
  repeat: Repeat,
  rules: HouseRules,
): MemberSpacings | null {
  const [lead] = heaters
  if (!lead || heaters.some(({ mount }) => !hangsFromMembers.has(mount))) return null
  const turn = radians(repeat.directionDeg)
  const along: Vec2 = [Math.cos(turn), Math.sin(turn)]
  const crossed = crossings(site, [lead.x, lead.y], along)
  if (crossed.length === 0) return null
  const holds = (spacing: number) =>
    heaters.every((heater) => {
      const model = models.get(heater.model)
      return (
        model &&
        copiesHeld(
          heater,
          along,
          { ...repeat, spacing },
          (copy) => supportOf(site, copy, model, rules).outcome !== 'not held',
        )
      )
    })
  const fitting = crossed.filter(holds)
  return {
    below: fitting.findLast((spacing) => spacing < repeat.spacing - same) ?? null,
    above: fitting.find((spacing) => spacing > repeat.spacing + same) ?? null,
    fits: holds(repeat.spacing),
  }
}

const hangsFromMembers: ReadonlySet<string> = new Set(['chain', 'drop rods', 'ceiling bracket', 'beam clamp'])

/** How far along a direction members are crossed, m, rising. */
function crossings(site: Site, [x, y]: Vec2, [ux, uy]: Vec2): number[] {
  const met = site.members.flatMap(({ from, to }) => {
    const [ex, ey] = [to[0] - from[0], to[1] - from[1]]
    const across = ux * ey - uy * ex
    if (Math.abs(across) < 1e-9 * Math.hypot(ex, ey)) return []
    const [qx, qy] = [from[0] - x, from[1] - y]
    const part = (qx * uy - qy * ux) / across
    const distance = roundLength((qx * ey - qy * ex) / across)
    return part >= -1e-9 && part <= 1 + 1e-9 && distance > same ? [distance] : []
  })
  return met.toSorted((a, b) => a - b)
}

function copiesHeld(
  heater: MountedHeater,
  [ux, uy]: Vec2,
  repeat: Repeat,
  isHeld: (copy: MountedHeater) => boolean,
): boolean {
  for (let step = 1; step <= repeat.count; step += 1) {
    const shift = step * repeat.spacing
    const copy = { ...heater, x: heater.x + ux * shift, y: heater.y + uy * shift, memberId: null }
    if (!isHeld(copy)) return false
  }
  return true
}
