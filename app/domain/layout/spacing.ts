import type { MountedHeater } from '#app/domain/layout/layout.ts'
import type { Vec2 } from '#app/domain/vector.ts'

/** A place on an axis that keeps a spacing: how far to shift along the axis, why, and from which heaters. */
export interface SpacingSpot {
  readonly shift: number
  readonly reason: string
  readonly from: readonly Vec2[]
}

interface Neighbour {
  readonly id: string
  readonly along: number
  readonly at: Vec2
}

/** Across the row, heaters within this distance count as one row, m. */
const rowWidth = 0.15

/**
 * Places near a point, along a unit axis, that stand in line with another heater, midway between two neighbours of the
 * row, or as far from the neighbour as that one from the next; nearest first, equal spacing before being in line.
 */
export function equalSpacings(
  others: readonly MountedHeater[],
  at: Vec2,
  axis: Vec2,
  { pull, say }: { readonly pull: number; readonly say: (metres: number) => string },
): SpacingSpot[] {
  const [ax, ay] = axis
  const here = at[0] * ax + at[1] * ay
  const neighbours = others.map((heater): Neighbour => ({
    id: heater.id,
    along: heater.x * ax + heater.y * ay,
    at: [heater.x, heater.y],
  }))
  const row = neighbours
    .filter((n) => Math.abs((n.at[0] - at[0]) * -ay + (n.at[1] - at[1]) * ax) <= rowWidth)
    .sort((a, b) => a.along - b.along)
  const spots = [...midways(row, here, say), ...continued(row, say), ...inLine(neighbours, here, pull)]
  return spots
    .map(({ along, ...spot }) => ({ ...spot, shift: along - here }))
    .filter((spot) => Math.abs(spot.shift) <= pull)
    .sort((a, b) => a.rank - b.rank || Math.abs(a.shift) - Math.abs(b.shift))
    .map(({ shift, reason, from }) => ({ shift, reason, from }))
}

interface Spot {
  readonly along: number
  readonly rank: number
  readonly reason: string
  readonly from: readonly Vec2[]
}

type Say = (metres: number) => string

function midways(row: readonly Neighbour[], here: number, say: Say): Spot[] {
  const next = row.findIndex((n) => n.along > here)
  const [before, after] = next > 0 ? [row[next - 1], row[next]] : []
  if (!before || !after || after.along - before.along < 0.2) return []
  const half = (after.along - before.along) / 2
  return [
    {
      along: before.along + half,
      rank: 0,
      reason: `${say(half)} to ${before.id} and to ${after.id}`,
      from: [before.at, after.at],
    },
  ]
}

/** One more step of an existing spacing at either side of each pair of neighbours. */
function continued(row: readonly Neighbour[], say: Say): Spot[] {
  return row.slice(1).flatMap((second, i): Spot[] => {
    const first = row[i]
    if (!first) return []
    const gap = second.along - first.along
    if (gap < 0.1) return []
    const reason = (near: Neighbour) => `${say(gap)} to ${near.id}, as ${first.id} to ${second.id}`
    return [
      { along: second.along + gap, rank: 0, reason: reason(second), from: [second.at, first.at] },
      { along: first.along - gap, rank: 0, reason: reason(first), from: [first.at, second.at] },
    ]
  })
}

function inLine(neighbours: readonly Neighbour[], here: number, pull: number): Spot[] {
  return neighbours
    .filter((n) => Math.abs(n.along - here) <= pull)
    .map((n) => ({ along: n.along, rank: 1, reason: `In line with ${n.id}`, from: [n.at] }))
}
