import { z } from 'zod'
import { mountSchema } from '#app/domain/heaters/heater-model.ts'
import demo from '#drizzle/seed/demo.json'

const range = z.tuple([z.number(), z.number()])
const clearance = z.object({
  above: z.number(),
  side: z.number(),
  end: z.number(),
  frontOfBeam: z.number().optional(),
  below: z.number().optional(),
})

const catalogueEntrySchema = z.object({
  code: z.string(),
  range: z.string(),
  name: z.string(),
  wave: z.enum(['short-wave', 'medium-wave', 'long-wave']),
  elementType: z.string(),
  elementCount: z.number(),
  stagesW: z.array(z.number()),
  supplyOptions: z.array(
    z.object({
      voltageV: z.number(),
      phases: z.union([z.literal(1), z.literal(3)]),
      ratedPowerW: z.number(),
      ratedCurrentA: z.number(),
    }),
  ),
  powerVoltageExponent: z.number(),
  elementTempC: z.number().nullable(),
  radiantEfficiency: z.number(),
  beam: z.object({ acrossFullAngleDeg: z.number(), alongFullAngleDeg: z.number(), source: z.string() }).nullable(),
  elementLengthMm: z.number(),
  elementAboveLowestMm: z.number(),
  elementPitchMm: z.number(),
  body: z.object({ length: z.number(), width: z.number(), depth: z.number(), massKg: z.number() }),
  suspensionEyePitch: z.number().nullable(),
  ip: z.string().nullable(),
  locationNote: z.string().nullable(),
  mountingHeight: z.object({ min: z.number(), recommendedMax: z.number() }),
  tiltDeg: z.object({ min: z.number(), max: z.number() }),
  elementAxisMustBeLevelWithinDeg: z.number(),
  clearanceToCombustible: clearance,
  clearanceToNoncombustible: clearance,
  elementLifeH: z.number(),
  secondsTo90Percent: z.number(),
  visibleGlow: z.string(),
  regulation: z.string(),
  mounts: z.array(mountSchema),
  mountsThatHoldTilt: z.array(mountSchema),
  rodHeadReachMm: z.number().nullable(),
  wallBracketReachMm: z.number().nullable(),
  poleClampReachMm: z.number().nullable(),
  connection: z.string(),
  listPrice: z.object({ EUR: z.number(), USD: z.number() }),
  leadTimeDays: z.number(),
  stockOnHand: z.number(),
  status: z.enum(['current', 'withdrawn']),
  note: z.string().optional(),
  recessVoidMm: z.number().optional(),
})
/** A heater model as the demo file states it; lengths mm. */
export type CatalogueEntry = z.infer<typeof catalogueEntrySchema>

const supportSchema = z.object({
  id: z.string(),
  kind: z.string(),
  fromXY: range.optional(),
  toXY: range.optional(),
  atXY: range.optional(),
  plane: z.literal('y=0').optional(),
  topZ: z.number().optional(),
  diameterMm: z.number().optional(),
  allowedPointLoadN: z.number().nullable().optional(),
  loadStatus: z.string(),
})
/** A beam, joist, wall or pole as the demo file states it; lengths mm. */
export type DemoSupport = z.infer<typeof supportSchema>

const obstacleSchema = z.object({
  id: z.string(),
  kind: z.string(),
  combustible: z.boolean(),
  movable: z.boolean().optional(),
  box: z.object({ x: range, y: range, z: range }).optional(),
  cylinder: z.object({ centre: range, radius: z.number(), z: range }).optional(),
  note: z.string().optional(),
})
/** An obstacle as the demo file states it; lengths mm. */
export type DemoObstacle = z.infer<typeof obstacleSchema>

const dimensionSchema = z.object({ label: z.string(), mm: z.number(), toleranceMm: z.number(), source: z.string() })
/** A size with its tolerance and where it came from, mm. */
export type DemoDimension = z.infer<typeof dimensionSchema>

const variantSchema = z.object({
  number: z.number(),
  title: z.string(),
  heaters: z.array(
    z.object({
      id: z.string(),
      code: z.string(),
      supplyVoltageV: z.number(),
      ratedVoltageV: z.number().optional(),
      x: z.number(),
      y: z.number(),
      lowestPoint: z.number(),
      turnDeg: z.number(),
      tiltDeg: z.number(),
      mount: mountSchema,
      supportId: z.string().nullable(),
    }),
  ),
})
/** A numbered variant of a demo site; lengths mm. */
export type DemoVariant = z.infer<typeof variantSchema>

const placeSchema = z.object({
  id: z.enum(['A', 'B', 'C']),
  name: z.string(),
  kind: z.string(),
  displayUnits: z.enum(['metric', 'imperial']),
  story: z.string(),
  axes: z.string(),
  dims: z.array(dimensionSchema),
  roof: z
    .object({
      undersideAtY0: z.number(),
      undersideAtYmax: z.number(),
      material: z.string(),
      combustible: z.boolean(),
      note: z.string().optional(),
    })
    .nullable(),
  supports: z.array(supportSchema),
  obstacles: z.array(obstacleSchema),
  tables: z.array(
    z.object({ id: z.string(), centre: range, size: range, height: z.number(), combustible: z.boolean() }),
  ),
  seats: z.array(
    z.object({
      id: z.string(),
      group: z.string(),
      priority: z.enum(['primary', 'secondary', 'not heated']),
      x: z.number(),
      y: z.number(),
      bodyHeight: z.number(),
      headHeight: z.number(),
      facingDeg: z.number(),
    }),
  ),
  design: z.object({
    airTempC: z.number(),
    airSpeedAtSeatsMs: z.number(),
    windNote: z.string(),
    relativeHumidityPct: z.number(),
    clothingClo: z.number(),
    activityMet: z.number(),
    stayMinutes: z.number(),
    season: z.string(),
  }),
  supply: z.object({
    system: z.string(),
    boardSparePerPhaseA: z.array(z.number()),
    distanceM: z.number(),
    rcd: z.string().optional(),
    note: z.string(),
    phases: z.union([z.literal(1), z.literal(3)]),
    lineVoltageV: z.number().nullable(),
    phaseVoltageV: z.number(),
  }),
  energy: z.object({
    pricePerKwh: z.number(),
    currency: z.enum(['EUR', 'USD']),
    hoursPerEvening: z.number(),
    dutyFraction: z.number(),
    eveningsPerYear: z.number(),
  }),
  target: z.object({ lowWm2: z.number(), highWm2: z.number(), source: z.string() }),
  variants: z.array(variantSchema),
})
/** A place of the demo file with its sizes, people, brief and variants; lengths mm. */
export type DemoPlace = z.infer<typeof placeSchema>

/** The demo file, checked: an invented catalogue and three invented sites. Throws when the file is damaged. */
export const demoFile = z
  .object({
    catalogue: z.array(catalogueEntrySchema),
    hanging: z.object({
      chainLinkPitchMm: z.number(),
      hardwareAllowanceMm: z.number(),
      turnbuckleTakeUpMm: range,
      chainSidewaysLimitMm: z.number(),
    }),
    sites: z.array(placeSchema),
  })
  .parse(demo)
