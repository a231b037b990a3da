import { z } from 'zod'
import { briefSchema } from '#app/domain/brief/brief.ts'
import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'
import { usualTolerance } from '#app/domain/site/size-source.ts'
import type { Dimension, Site } from '#app/domain/site/site.ts'

/** The floor assumed until a size is known, m. */
const assumedFloor = { length: 6, depth: 4 } as const

/** What starts a job: what it is called, for whom, the brief, and the floor's size when the customer gave one, m. */
export const jobRequestSchema = z.strictObject({
  name: z.string().trim().min(1).max(120),
  customer: z.string().trim().max(120),
  displayUnits: z.enum(['metric', 'imperial']),
  floor: z
    .strictObject({
      length: z.number().min(0.5).max(100),
      depth: z.number().min(0.5).max(60),
    })
    .nullable(),
  brief: briefSchema,
})
export type JobRequest = z.infer<typeof jobRequestSchema>

/** A length or depth of the floor that moves the two corners on its far side. */
function floorSize(
  label: string,
  value: number,
  axis: 0 | 1,
  source: 'told' | 'guessed',
  rules: HouseRules,
): Dimension {
  const corners = axis === 0 ? [1, 2] : [2, 3]
  return {
    id: axis === 0 ? 'size-length' : 'size-depth',
    label,
    value,
    tolerance: usualTolerance(source, value, rules),
    source,
    note: source === 'told' ? null : 'assumed until measured',
    moves: corners.map((corner) => ({ of: 'floor', id: 'floor', coordinate: `${corner}.${axis}`, by: 1 })),
  }
}

/** The site of a new job: a bare rectangular floor under open sky. Sizes nobody gave are guesses. */
export function startingSite({ name, displayUnits, floor }: JobRequest, rules: HouseRules): Site {
  const source = floor ? 'told' : 'guessed'
  const { length, depth } = floor ?? assumedFloor
  return {
    name,
    kind: 'terrace',
    axes: 'x along the front edge, y away from it, z up from the finished floor',
    displayUnits,
    floor: [
      [0, 0],
      [length, 0],
      [length, depth],
      [0, depth],
    ],
    beyond: [],
    levels: [],
    covers: [],
    members: [],
    walls: [],
    poles: [],
    obstacles: [],
    tables: [],
    seats: [],
    dimensions: [
      floorSize('floor length, x', length, 0, source, rules),
      floorSize('floor depth, y', depth, 1, source, rules),
    ],
    trace: null,
  }
}
