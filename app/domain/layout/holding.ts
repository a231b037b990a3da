import type { Layout, MountedHeater } from '#app/domain/layout/layout.ts'
import { equalSpacings } from '#app/domain/layout/spacing.ts'
import { nearestOnSegment } from '#app/domain/site/geometry.ts'
import type { Member, Site } from '#app/domain/site/site.ts'
import type { Vec2 } from '#app/domain/vector.ts'

/** A movement after holding: what to move by, the sentence that says why, and the line that holds it. */
export interface Held {
  readonly dx: number
  readonly dy: number
  /** Why it stands where it stands; null when nothing holds it. */
  readonly reason: string | null
  readonly lines: readonly { readonly from: Vec2; readonly to: Vec2 }[]
}

/** A movement to be held: the lead heater is the one under the pointer; the others keep their distance to it. */
export interface Movement {
  readonly site: Site
  /** As it was before the movement. */
  readonly layout: Layout
  readonly ids: readonly string[]
  readonly leadId: string
  readonly dx: number
  readonly dy: number
  /** How near a line must be to hold, m. */
  readonly pull: number
  /** Writes a length in the person's unit. */
  readonly say: (metres: number) => string
}

interface HoldingLine {
  readonly from: Vec2
  readonly to: Vec2
  readonly reason: string
}

/**
 * Holds a movement to the members that the lead heater's mount can be fixed to, then to equal spacing and to the line
 * of other heaters, along what freedom is left. Whole centimetres where nothing holds.
 */
export function holdMovement(movement: Movement): Held {
  const lead = movement.layout.heaters.find((heater) => heater.id === movement.leadId)
  if (!lead) return { dx: movement.dx, dy: movement.dy, reason: null, lines: [] }
  const moving = new Set(movement.ids)
  const others = movement.layout.heaters.filter((heater) => !moving.has(heater.id))
  let at: Vec2 = [wholeCentimetres(lead.x + movement.dx), wholeCentimetres(lead.y + movement.dy)]
  const free: Vec2 = [lead.x + movement.dx, lead.y + movement.dy]
  const reasons: string[] = []
  const lines: { from: Vec2; to: Vec2 }[] = []

  const line = nearestLine(holdingLines(movement.site, lead), free, movement.pull)
  const axes: Vec2[] = line ? [directionOf(line)] : [axisX, axisY]
  if (line) {
    at = footOn(line, at)
    reasons.push(line.reason)
    lines.push({ from: line.from, to: line.to })
  }
  for (const axis of axes) {
    const spot = equalSpacings(others, at, axis, movement)[0]
    if (!spot) continue
    at = [at[0] + axis[0] * spot.shift, at[1] + axis[1] * spot.shift]
    reasons.push(spot.reason)
    lines.push(...spot.from.map((from) => ({ from, to: at })))
  }
  return { dx: at[0] - lead.x, dy: at[1] - lead.y, reason: reasons.length > 0 ? `${reasons.join('. ')}.` : null, lines }
}

const axisX: Vec2 = [1, 0]
const axisY: Vec2 = [0, 1]
const wholeCentimetres = (metres: number) => Math.round(metres * 100) / 100

/** The lines in plan that a heater's mount may hold to: members for what hangs, bays for a recess box, walls. */
function holdingLines(site: Site, heater: MountedHeater): HoldingLine[] {
  switch (heater.mount) {
    case 'recess box':
      return bays(site.members)
    case 'wall bracket':
      return site.walls.map((wall) => alongWall(wall, heater))
    case 'pole clamp':
      return []
    default:
      return site.members.map((member) => ({ from: member.from, to: member.to, reason: `Held to ${member.name}` }))
  }
}

function alongWall(wall: Site['walls'][number], heater: MountedHeater): HoldingLine {
  const [tx, ty] = directionOf(wall)
  const distance = (heater.x - wall.from[0]) * -ty + (heater.y - wall.from[1]) * tx
  const shift: Vec2 = [-ty * distance, tx * distance]
  return {
    from: [wall.from[0] + shift[0], wall.from[1] + shift[1]],
    to: [wall.to[0] + shift[0], wall.to[1] + shift[1]],
    reason: `Held along ${wall.name}`,
  }
}

/** Middle lines between neighbouring parallel members. */
function bays(members: readonly Member[]): HoldingLine[] {
  const lines: HoldingLine[] = []
  for (const member of members) {
    const [tx, ty] = directionOf(member)
    const beside = members
      .filter((other) => other !== member && Math.abs(crossOf(directionOf(other), [tx, ty])) < 0.01)
      .map((other) => ({ other, off: (other.from[0] - member.from[0]) * -ty + (other.from[1] - member.from[1]) * tx }))
      .filter(({ off }) => off > 0.01)
      .sort((a, b) => a.off - b.off)[0]
    if (!beside) continue
    const half: Vec2 = [(-ty * beside.off) / 2, (tx * beside.off) / 2]
    lines.push({
      from: [member.from[0] + half[0], member.from[1] + half[1]],
      to: [member.to[0] + half[0], member.to[1] + half[1]],
      reason: `Middle of the bay between ${member.name} and ${beside.other.name}`,
    })
  }
  return lines
}

function nearestLine(lines: readonly HoldingLine[], at: Vec2, pull: number): HoldingLine | null {
  let best: HoldingLine | null = null
  let least = pull
  for (const line of lines) {
    const distance = nearestOnSegment(line.from, line.to, at[0], at[1]).distance
    if (distance > least) continue
    least = distance
    best = line
  }
  return best
}

const crossOf = (a: Vec2, b: Vec2) => a[0] * b[1] - a[1] * b[0]

function directionOf(line: { readonly from: Vec2; readonly to: Vec2 }): Vec2 {
  const dx = line.to[0] - line.from[0]
  const dy = line.to[1] - line.from[1]
  const length = Math.hypot(dx, dy)
  return length === 0 ? [1, 0] : [dx / length, dy / length]
}

function footOn(line: HoldingLine, at: Vec2): Vec2 {
  const [tx, ty] = directionOf(line)
  const along = (at[0] - line.from[0]) * tx + (at[1] - line.from[1]) * ty
  return [line.from[0] + tx * along, line.from[1] + ty * along]
}
