import { z } from 'zod'

const length = z.number().min(-1000).max(1000)
const height = z.number().min(-10).max(100)
const id = z.string().min(1).max(40)
const label = z.string().max(200)
const point = z.tuple([length, length])
const range = z.tuple([length, length])

/** An unknown material is judged as combustible. */
export const materialSchema = z.enum(['combustible', 'non-combustible', 'unknown'])
export type Material = z.infer<typeof materialSchema>

export const sizeSourceSchema = z.enum(['laser', 'tape', 'drawing', 'photo', 'told', 'guessed'])
export type SizeSource = z.infer<typeof sizeSourceSchema>

/** A plane over the floor, from the heights of its underside at three or four corners. */
const coverSchema = z.strictObject({
  id,
  name: label,
  corners: z
    .array(z.tuple([length, length, height]))
    .min(3)
    .max(4),
  material: materialSchema,
  /** Blades or a roof that opens: rain comes in. */
  opening: z.boolean(),
  /** How far moving blades reach below the underside, m; 0 when nothing moves. */
  swing: z.number().min(0).max(2),
  /** Clear depth of the void above, m; null when not known or none. */
  voidDepth: z.number().positive().max(5).nullable(),
  note: label.nullable(),
})
export type Cover = z.infer<typeof coverSchema>

/** A beam, rafter, joist or purlin. Its underside follows a cover or runs straight between two heights. */
const memberSchema = z.strictObject({
  id,
  name: label,
  kind: label,
  from: point,
  to: point,
  underside: z.union([z.strictObject({ follows: id }), z.strictObject({ from: height, to: height })]),
  /** Across the member in plan, m. */
  width: z.number().positive().max(2),
  depth: z.number().positive().max(2),
  material: materialSchema,
  /** N per suspension point; null: not known. */
  allowedPointLoad: z.number().positive().nullable(),
  loadStatus: label,
})
export type Member = z.infer<typeof memberSchema>

/** A wall along the line from–to; the floor lies to the left of that direction. */
const wallSchema = z.strictObject({
  id,
  name: label,
  from: point,
  to: point,
  /** Height of its top above finished floor, m; null when it runs past the cover. */
  top: height.nullable(),
  material: materialSchema,
  loadStatus: label,
})
export type Wall = z.infer<typeof wallSchema>

const poleSchema = z.strictObject({
  id,
  name: label,
  at: point,
  top: height,
  diameter: z.number().positive().max(2),
  material: materialSchema,
  loadStatus: label,
})
export type Pole = z.infer<typeof poleSchema>

const shapeSchema = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('box'), x: range, y: range, z: range }),
  z.strictObject({
    kind: z.literal('cylinder'),
    centre: point,
    radius: z.number().positive().max(50),
    z: range,
  }),
  z.strictObject({ kind: z.literal('prism'), outline: z.array(point).min(3).max(200), z: range }),
])
export type Shape = z.infer<typeof shapeSchema>

const obstacleSchema = z.strictObject({
  id,
  name: label,
  kind: z.enum([
    'trim',
    'screen',
    'blind',
    'door',
    'umbrella',
    'fan',
    'lamp',
    'cable',
    'sprinkler',
    'furniture',
    'other',
  ]),
  material: materialSchema,
  /** A movable thing is judged in every state. */
  movable: z.boolean(),
  /** Where it is, or of a movable thing all that it sweeps at its widest. */
  shape: shapeSchema,
  /** The states of a movable thing by name, each with what it fills; none listed: `shape`, and away. */
  states: z
    .array(z.strictObject({ name: label.min(1), shape: shapeSchema.nullable() }))
    .max(8)
    .optional(),
  /** Share of the radiation that passes: 0 opaque, 1 clear. */
  transmittance: z.number().min(0).max(1),
  note: label.nullable(),
})
export type Obstacle = z.infer<typeof obstacleSchema>

const tableSchema = z.strictObject({
  id,
  /** Absent: rectangular. A round one has its diameter as both sizes. */
  form: z.enum(['rectangular', 'round']).optional(),
  centre: point,
  size: z.tuple([z.number().positive(), z.number().positive()]),
  turnDeg: z.number(),
  height: z.number().positive().max(2),
  material: materialSchema,
})
export type Table = z.infer<typeof tableSchema>

export const seatSchema = z.strictObject({
  id,
  group: z.string().max(40),
  priority: z.enum(['primary', 'secondary', 'not heated']),
  posture: z.enum(['seated', 'standing']),
  x: length,
  y: length,
  /** Direction in which the person looks, counter-clockwise from +x. */
  facingDeg: z.number().min(-360).max(360),
  bodyHeight: z.number().positive().max(3),
  headHeight: z.number().positive().max(3),
})
export type Seat = z.infer<typeof seatSchema>

/** One coordinate that a dimension moves, and by how much for each metre of the dimension. */
const moveSchema = z.strictObject({
  of: z.enum(['floor', 'cover', 'member', 'wall', 'pole', 'obstacle', 'table', 'seat']),
  id: z.string(),
  /** Dotted path inside the thing: `corners.0.2`, `from.0`, `shape.z.1`, `x`. */
  coordinate: z.string(),
  by: z.number(),
})

/**
 * A named size of the site with its tolerance and where it came from. Moving it by its tolerance moves every
 * coordinate it decides, so margins and fluxes take their uncertainty from it. A coordinate that no dimension moves
 * has ± 25 mm (house rule).
 */
const dimensionSchema = z.strictObject({
  id,
  label,
  value: z.number(),
  tolerance: z.number().nonnegative(),
  source: sizeSourceSchema,
  note: label.nullable(),
  /** The photo it was measured in, and the marks there. */
  photo: z.strictObject({ photoId: z.uuid(), measurementId: id }).optional(),
  moves: z.array(moveSchema),
})
export type Dimension = z.infer<typeof dimensionSchema>

/** A part of the floor that lies higher or lower than the finished floor that heights are measured from, m. */
const levelSchema = z.strictObject({ id, name: label, outline: z.array(point).min(3).max(200), height: height })
export type Level = z.infer<typeof levelSchema>

/** A picture laid under the plan to trace from: its lower left corner in plan, its scale by one known length. */
const traceSchema = z.strictObject({
  photoId: z.uuid(),
  at: point,
  metresPerPixel: z.number().positive().max(10),
  turnDeg: z.number().min(-360).max(360),
})
export type Trace = z.infer<typeof traceSchema>

/** The place as it is: lengths in m, x and y as `axes` says, z up from the finished floor. Ids are unique in a site. */
export const siteSchema = z.strictObject({
  name: label,
  kind: label,
  axes: z.string().max(400),
  displayUnits: z.enum(['metric', 'imperial']),
  floor: z.array(point).min(3).max(200),
  /** What lies beyond an edge of the floor, by the index of the edge's first corner. */
  beyond: z.array(
    z.strictObject({ edge: z.int().nonnegative(), kind: z.enum(['water', 'garden', 'street', 'drop']), name: label }),
  ),
  levels: z.array(levelSchema).max(20).default([]),
  covers: z.array(coverSchema).max(50),
  members: z.array(memberSchema).max(200),
  walls: z.array(wallSchema).max(100),
  poles: z.array(poleSchema).max(200),
  obstacles: z.array(obstacleSchema).max(200),
  tables: z.array(tableSchema).max(500),
  seats: z.array(seatSchema).max(2000),
  dimensions: z.array(dimensionSchema).max(500),
  trace: traceSchema.nullable().default(null),
})
export type Site = z.infer<typeof siteSchema>
