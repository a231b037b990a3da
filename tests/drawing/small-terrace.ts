import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { Layout, MountedHeater } from '#app/domain/layout/layout.ts'
import { siteSchema, type Seat, type Site } from '#app/domain/site/site.ts'

const seat = (id: string, x: number, y: number, facingDeg: number): Seat => ({
  id,
  group: 'T1',
  priority: 'primary',
  posture: 'seated',
  x,
  y,
  facingDeg,
  bodyHeight: 0.6,
  headHeight: 1.1,
})

/** A terrace of 4 × 3 m with one beam, a wall, a table and two guests: small enough that its drawing can be read. */
export const smallTerrace: Site = siteSchema.parse({
  name: 'Small terrace, by the pond',
  kind: 'terrace',
  axes: 'x along the wall, y from the wall',
  displayUnits: 'metric',
  floor: [
    [0, 0],
    [4, 0],
    [4, 3],
    [0, 3],
  ],
  beyond: [{ edge: 2, kind: 'water', name: 'pond' }],
  levels: [],
  covers: [
    {
      id: 'cover',
      name: 'blades',
      corners: [
        [0, 0, 3],
        [4, 0, 3],
        [4, 3, 2.6],
        [0, 3, 2.6],
      ],
      material: 'non-combustible',
      opening: false,
      swing: 0,
      voidDepth: null,
      note: null,
    },
  ],
  members: [
    {
      id: 'beam-1',
      name: 'beam 1',
      kind: 'box beam',
      from: [2, 0],
      to: [2, 3],
      underside: { follows: 'cover' },
      width: 0.06,
      depth: 0.12,
      material: 'non-combustible',
      allowedPointLoad: null,
      loadStatus: 'not known',
    },
  ],
  walls: [
    {
      id: 'wall',
      name: 'house wall',
      from: [0, 0],
      to: [4, 0],
      top: null,
      material: 'non-combustible',
      loadStatus: 'sound',
    },
  ],
  poles: [],
  obstacles: [
    {
      id: 'trim',
      name: 'timber trim',
      kind: 'trim',
      material: 'combustible',
      movable: false,
      shape: { kind: 'box', x: [0, 4], y: [0, 0.1], z: [2.5, 2.6] },
      transmittance: 0,
      note: null,
    },
  ],
  tables: [{ id: 'T1', centre: [2, 1.5], size: [0.8, 0.8], turnDeg: 0, height: 0.74, material: 'combustible' }],
  seats: [seat('T1-1', 1.35, 1.5, 0), seat('T1-2', 2.65, 1.5, 180)],
  dimensions: [],
  trace: null,
})

/** A short-wave heater of round figures. */
export const smallModel: HeaterModel = {
  code: 'small-2',
  range: 'Small',
  name: 'Small 2.0',
  wave: 'short-wave',
  elementType: 'lamp',
  elementCount: 1,
  stages: [2000],
  supplyOptions: [{ voltage: 230, phases: 1, ratedPower: 2000, ratedCurrent: 8.7 }],
  powerVoltageExponent: 1.54,
  elementTemperature: 2100,
  radiantEfficiency: 0.9,
  radiantEfficiencyRange: null,
  beam: { kind: 'angles', acrossFullAngleDeg: 75, alongFullAngleDeg: 100, source: 'test' },
  elementLength: 0.4,
  elementAboveLowest: 0.03,
  elementPitch: 0,
  body: { length: 0.5, width: 0.16, depth: 0.1, mass: 3 },
  suspensionEyePitch: 0.4,
  ingressProtection: 'IP65',
  locationNote: null,
  mountingHeight: { min: 1.8, recommendedMax: 2.5 },
  tiltDeg: { min: 0, max: 45 },
  elementAxisLevelWithinDeg: 4,
  clearanceToCombustible: null,
  clearanceToNoncombustible: null,
  elementLifeHours: null,
  secondsTo90Percent: null,
  visibleGlow: 'amber',
  regulation: 'stage only',
  mounts: ['chain', 'drop rods'],
  mountsThatHoldTilt: ['drop rods'],
  mountReach: { 'drop rods': 0.25 },
  connection: 'tail',
  listPrice: {},
  leadTimeDays: 0,
  stockOnHand: 0,
  status: 'current',
  note: null,
  voidDepth: null,
}

export const smallModels: ReadonlyMap<string, HeaterModel> = new Map([[smallModel.code, smallModel]])

/** A heater along the beam, 2.2 m up; facts as given. */
export const smallHeater = (facts: Partial<MountedHeater> = {}): MountedHeater => ({
  id: 'H1',
  model: smallModel.code,
  supplyVoltage: 230,
  x: 2,
  y: 1.5,
  lowestPoint: 2.2,
  turnDeg: 90,
  tiltDeg: 0,
  mount: 'chain',
  memberId: 'beam-1',
  ...facts,
})

export const smallLayout = (facts: Partial<MountedHeater> = {}): Layout => ({
  title: 'One heater',
  heaters: [smallHeater(facts)],
})
