import { z } from 'zod'

/** Ways of fixing a heater that the trade offers. */
const mounts = [
  'chain',
  'drop rods',
  'wall bracket',
  'ceiling bracket',
  'beam clamp',
  'pole clamp',
  'recess box',
] as const
export const mountSchema = z.enum(mounts)
export type Mount = z.infer<typeof mountSchema>

const positive = z.number().positive()
const clearanceSchema = z.object({
  above: positive,
  side: positive,
  end: positive,
  frontOfBeam: positive.nullable(),
  below: positive.nullable(),
})

/** Relative intensity over across × along angles, degrees. */
export const beamTableSchema = z.strictObject({
  kind: z.literal('table'),
  acrossDeg: z.array(z.number()).min(2),
  alongDeg: z.array(z.number()).min(2),
  /** One row per across angle, one column per along angle. */
  intensity: z.array(z.array(z.number().nonnegative())),
  source: z.string(),
})

/**
 * Relative radiant intensity as a data sheet gives it. `angles`: full angles between the directions of half the peak
 * intensity, fitted by a power of the cosine. `table`: as it was measured.
 */
const beamDataSchema = z.discriminatedUnion('kind', [
  z.object({
    kind: z.literal('angles'),
    acrossFullAngleDeg: z.number().positive().lt(180),
    alongFullAngleDeg: z.number().positive().lt(180),
    source: z.string(),
  }),
  beamTableSchema,
])
/** A beam given as a table. */
export type BeamTableData = z.infer<typeof beamTableSchema>
export type BeamData = z.infer<typeof beamDataSchema>

/** A heater model as its manual and data sheet state it. Lengths m, power W, temperatures °C, angles degrees. */
export const heaterModelSchema = z.object({
  code: z.string(),
  range: z.string(),
  name: z.string(),
  wave: z.enum(['short-wave', 'medium-wave', 'long-wave']),
  elementType: z.string(),
  elementCount: z.int().positive(),
  /** Power at each stage at rated voltage, W, rising; the last is full power. */
  stages: z.array(positive).min(1),
  supplyOptions: z
    .array(
      z.object({
        voltage: positive,
        phases: z.union([z.literal(1), z.literal(3)]),
        ratedPower: positive,
        ratedCurrent: positive,
      }),
    )
    .min(1),
  /** Power goes with (supply voltage / rated voltage) to this exponent. */
  powerVoltageExponent: positive,
  elementTemperature: z.number().nullable(),
  radiantEfficiency: z.number().positive().max(1),
  /** The data sheet's range; null when it states a single figure. */
  radiantEfficiencyRange: z.object({ low: positive, high: positive.max(1) }).nullable(),
  beam: beamDataSchema.nullable(),
  elementLength: positive,
  /** Distance of the element axes from the open face of the body, along the beam axis, at any tilt. */
  elementAboveLowest: z.number().nonnegative(),
  /** Distance between element axes across the heater. */
  elementPitch: z.number().nonnegative(),
  body: z.object({ length: positive, width: positive, depth: positive, mass: positive }),
  suspensionEyePitch: positive.nullable(),
  ingressProtection: z.string().nullable(),
  locationNote: z.string().nullable(),
  /** Finished floor to the lowest point of the heater. */
  mountingHeight: z.object({ min: positive.nullable(), recommendedMax: positive.nullable() }),
  tiltDeg: z.object({ min: z.number(), max: z.number() }).nullable(),
  elementAxisLevelWithinDeg: positive.nullable(),
  clearanceToCombustible: clearanceSchema.nullable(),
  clearanceToNoncombustible: clearanceSchema.partial().nullable(),
  elementLifeHours: positive.nullable(),
  secondsTo90Percent: positive.nullable(),
  visibleGlow: z.string(),
  regulation: z.string(),
  mounts: z.array(mountSchema).min(1),
  mountsThatHoldTilt: z.array(mountSchema),
  /** How far from its support a mount may hold the heater, in plan, m; a mount not named has no stated reach. */
  mountReach: z.partialRecord(mountSchema, positive),
  connection: z.string(),
  listPrice: z.partialRecord(z.enum(['EUR', 'USD']), positive),
  leadTimeDays: z.number().nonnegative(),
  stockOnHand: z.number(),
  status: z.enum(['current', 'withdrawn']),
  note: z.string().nullable(),
  /** Clear depth of the void a recess box needs, m; null for other models. */
  voidDepth: positive.nullable(),
})
export type HeaterModel = z.infer<typeof heaterModelSchema>
