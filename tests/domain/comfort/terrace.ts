import type { Brief } from '#app/domain/brief/brief.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { MountedHeater } from '#app/domain/layout/layout.ts'
import type { Seat, Site } from '#app/domain/site/site.ts'

/** A heater of round figures: 2,000 W at 230 V, half of it radiated, one element of 0.6 m, 90° across and lengthwise. */
export const model = (change: Partial<HeaterModel> = {}): HeaterModel => ({
  code: 'plain-2-0',
  range: 'Plain',
  name: 'Plain 2.0',
  wave: 'medium-wave',
  elementType: 'quartz tube',
  elementCount: 1,
  stages: [1000, 2000],
  supplyOptions: [{ voltage: 230, phases: 1, ratedPower: 2000, ratedCurrent: 8.7 }],
  powerVoltageExponent: 2,
  elementTemperature: 900,
  radiantEfficiency: 0.5,
  radiantEfficiencyRange: null,
  beam: { kind: 'angles', acrossFullAngleDeg: 90, alongFullAngleDeg: 90, source: 'test' },
  elementLength: 0.6,
  elementAboveLowest: 0.05,
  elementPitch: 0.08,
  body: { length: 0.7, width: 0.2, depth: 0.1, mass: 5 },
  suspensionEyePitch: null,
  ingressProtection: 'IP55',
  locationNote: null,
  mountingHeight: { min: 1.8, recommendedMax: 3 },
  tiltDeg: { min: 0, max: 45 },
  elementAxisLevelWithinDeg: null,
  clearanceToCombustible: null,
  clearanceToNoncombustible: null,
  elementLifeHours: null,
  secondsTo90Percent: null,
  visibleGlow: 'red',
  regulation: 'stages',
  mounts: ['chain', 'wall bracket'],
  mountsThatHoldTilt: ['wall bracket'],
  mountReach: {},
  connection: 'tail',
  listPrice: { EUR: 100 },
  leadTimeDays: 1,
  stockOnHand: 1,
  status: 'current',
  note: null,
  voidDepth: null,
  ...change,
})

export const modelsOf = (...models: HeaterModel[]): ReadonlyMap<string, HeaterModel> =>
  new Map(models.map((each) => [each.code, each]))

export const heater = (id: string, change: Partial<MountedHeater> = {}): MountedHeater => ({
  id,
  model: 'plain-2-0',
  supplyVoltage: 230,
  x: 0,
  y: 0,
  lowestPoint: 2.4,
  turnDeg: 0,
  tiltDeg: 0,
  mount: 'chain',
  memberId: null,
  ...change,
})

export const seat = (id: string, change: Partial<Seat> = {}): Seat => ({
  id,
  group: 'T',
  priority: 'primary',
  posture: 'seated',
  x: 0,
  y: 0,
  facingDeg: 0,
  bodyHeight: 0.6,
  headHeight: 1.1,
  ...change,
})

/** A floor of 10 × 10 m about the origin under open sky. */
export const site = (seats: Seat[], change: Partial<Site> = {}): Site => ({
  name: 'Test terrace',
  kind: 'terrace',
  axes: 'x east, y north',
  displayUnits: 'metric',
  floor: [
    [-5, -5],
    [5, -5],
    [5, 5],
    [-5, 5],
  ],
  beyond: [],
  levels: [],
  covers: [],
  members: [],
  walls: [],
  poles: [],
  obstacles: [],
  tables: [],
  seats,
  dimensions: [],
  trace: null,
  ...change,
})

export const brief = (change: Partial<Brief> = {}): Brief => ({
  place: 'Test',
  story: '',
  season: '',
  airTemperature: 10,
  windDesign: 1,
  windGust: 3,
  windNote: '',
  relativeHumidity: 60,
  surroundingsTemperature: null,
  clothing: 1.3,
  activity: 1.2,
  stayMinutes: 90,
  supply: {
    system: '',
    phases: 1,
    phaseVoltage: 230,
    lineVoltage: null,
    sparePerPhase: [],
    distance: null,
    note: '',
  },
  energy: { pricePerKwh: 0.3, currency: 'EUR', hoursPerEvening: 4, dutyFraction: 0.75, eveningsPerYear: 90 },
  target: { low: 150, high: 350, source: 'house rule' },
  assumed: [],
  ...change,
})
