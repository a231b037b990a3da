import { briefSchema, type Brief } from '#app/domain/brief/brief.ts'
import { layoutSchema, type Layout } from '#app/domain/layout/layout.ts'
import {
  siteSchema,
  type Cover,
  type Member,
  type Obstacle,
  type Pole,
  type Site,
  type Wall,
} from '#app/domain/site/site.ts'
import type { Vec2 } from '#app/domain/vector.ts'
import { dimensionOf } from '#drizzle/seed/demo-dimensions.ts'
import {
  demoFile,
  type DemoObstacle,
  type DemoPlace,
  type DemoSupport,
  type DemoVariant,
} from '#drizzle/seed/demo-file.ts'

export { demoModels } from '#drizzle/seed/demo-models.ts'

const metres = (mm: number): number => mm / 1000
const pair = ([a, b]: readonly [number, number]): [number, number] => [metres(a), metres(b)]

/** One of the three invented jobs: what it is called, its site and brief, and its numbered variants. */
export interface DemoSite {
  readonly key: 'A' | 'B' | 'C'
  readonly job: { readonly name: string; readonly customer: string }
  readonly site: Site
  readonly brief: Brief
  readonly variants: { readonly number: number; readonly title: string; readonly layout: Layout }[]
}

/** What lies beyond the far edge (corner 2 to corner 3) of each floor. */
const beyondFarEdge = {
  A: { kind: 'water', name: 'the weir' },
  B: { kind: 'drop', name: 'glass parapet, then the street nine floors below' },
  C: { kind: 'garden', name: 'the garden' },
} as const

/** Who asked for the layout and where it is, as the list of jobs shows them. */
const enquiries = {
  A: { customer: 'The Tansy Weir', place: 'River terrace, Tansy Weir' },
  B: { customer: 'Hotel Quillfinch', place: 'Roof bar, ninth floor' },
  C: { customer: 'Family at Sallow Lane', place: 'Veranda, Sallow Lane' },
} as const

const obstacleKinds: readonly (readonly [RegExp, Obstacle['kind']])[] = [
  [/trim/, 'trim'],
  [/screen/, 'screen'],
  [/cable/, 'cable'],
  [/umbrella/, 'umbrella'],
  [/fan/, 'fan'],
  [/pendant/, 'lamp'],
  [/blind/, 'blind'],
  [/door/, 'door'],
]

function sizeCalled(place: DemoPlace, ending: string): number {
  const size = place.dims.find(({ label }) => label.endsWith(ending))
  if (!size) throw new Error(`The demo site ${place.id} has no size for ${ending}.`)
  return metres(size.mm)
}

function coversOf(place: DemoPlace, length: number, depth: number): Cover[] {
  const { roof } = place
  if (!roof) return []
  const [wallSide, farSide] = [metres(roof.undersideAtY0), metres(roof.undersideAtYmax)]
  const opening = /opening/.test(roof.material)
  const swing = /up to (\d+) mm/.exec(roof.note ?? '')?.[1]
  return [
    {
      id: 'cover',
      name: roof.material,
      corners: [
        [0, 0, wallSide],
        [length, 0, wallSide],
        [length, depth, farSide],
        [0, depth, farSide],
      ],
      material: roof.combustible ? 'combustible' : 'non-combustible',
      opening,
      swing: opening && swing ? metres(Number(swing)) : 0,
      voidDepth: place.dims.some(({ label }) => label === 'ceiling void') ? sizeCalled(place, 'ceiling void') : null,
      note: roof.note ?? null,
    },
  ]
}

/** "aluminium box beam 120 x 60" stands on its narrow side; so does "timber joist 45 x 195". */
function memberOf({ id, kind, fromXY, toXY, loadStatus, allowedPointLoadN }: DemoSupport): Member[] {
  if (!fromXY || !toXY) return []
  const section = /(\d+) x (\d+)/.exec(kind)
  const sides = [Number(section?.[1]), Number(section?.[2])].map(metres)
  return [
    {
      id,
      name: id.replace('-', ' '),
      kind,
      from: pair(fromXY),
      to: pair(toXY),
      underside: { follows: 'cover' },
      width: Math.min(...sides),
      depth: Math.max(...sides),
      material: /timber/.test(kind) ? 'combustible' : 'non-combustible',
      allowedPointLoad: allowedPointLoadN ?? null,
      loadStatus,
    },
  ]
}

function wallOf({ id, kind, plane, topZ, loadStatus }: DemoSupport, length: number): Wall[] {
  if (!plane) return []
  const top = topZ === undefined ? null : metres(topZ)
  return [{ id, name: kind, from: [0, 0], to: [length, 0], top, material: 'non-combustible', loadStatus }]
}

function poleOf({ id, kind, atXY, topZ, diameterMm, loadStatus }: DemoSupport): Pole[] {
  if (!atXY || topZ === undefined || diameterMm === undefined) return []
  const name = `${id.replace('-', ' ')}, ${kind}`
  const [at, top, diameter] = [pair(atXY), metres(topZ), metres(diameterMm)]
  return [{ id, name, at, top, diameter, material: 'non-combustible', loadStatus }]
}

function obstacleOf({ id, kind, combustible, movable, box, cylinder, note }: DemoObstacle): Obstacle[] {
  const shape = box
    ? { kind: 'box' as const, x: pair(box.x), y: pair(box.y), z: pair(box.z) }
    : cylinder && {
        kind: 'cylinder' as const,
        centre: pair(cylinder.centre),
        radius: metres(cylinder.radius),
        z: pair(cylinder.z),
      }
  if (!shape) return []
  return [
    {
      id,
      name: kind,
      kind: obstacleKinds.find(([pattern]) => pattern.test(kind))?.[1] ?? 'other',
      material: combustible ? 'combustible' : 'non-combustible',
      movable: movable ?? false,
      shape,
      transmittance: 0,
      note: note ?? null,
    },
  ]
}

function siteOf(place: DemoPlace): Site {
  const [length, depth] = [sizeCalled(place, ', x'), sizeCalled(place, ', y')]
  const floor: Vec2[] = [
    [0, 0],
    [length, 0],
    [length, depth],
    [0, depth],
  ]
  const site = siteSchema.parse({
    name: place.name,
    kind: place.kind,
    axes: place.axes,
    displayUnits: place.displayUnits,
    floor,
    beyond: [{ edge: 2, ...beyondFarEdge[place.id] }],
    levels: [],
    covers: coversOf(place, length, depth),
    members: place.supports.flatMap(memberOf),
    walls: place.supports.flatMap((support) => wallOf(support, length)),
    poles: place.supports.flatMap(poleOf),
    obstacles: place.obstacles.flatMap(obstacleOf),
    tables: place.tables.map(({ id, centre, size, height, combustible }) => ({
      id,
      centre: pair(centre),
      size: pair(size),
      turnDeg: 0,
      height: metres(height),
      material: combustible ? 'combustible' : 'non-combustible',
    })),
    seats: place.seats.map((seat) => ({
      ...seat,
      posture: 'seated',
      x: metres(seat.x),
      y: metres(seat.y),
      bodyHeight: metres(seat.bodyHeight),
      headHeight: metres(seat.headHeight),
    })),
    dimensions: [],
    trace: null,
  })
  return siteSchema.parse({ ...site, dimensions: place.dims.map((given, i) => dimensionOf(given, i, site)) })
}

function briefOf({ id, story, design, supply, energy, target }: DemoPlace): Brief {
  return briefSchema.parse({
    place: enquiries[id].place,
    story,
    season: design.season,
    airTemperature: design.airTempC,
    windDesign: design.airSpeedAtSeatsMs,
    windGust: 3,
    windNote: design.windNote,
    relativeHumidity: design.relativeHumidityPct,
    surroundingsTemperature: null,
    clothing: design.clothingClo,
    activity: design.activityMet,
    stayMinutes: design.stayMinutes,
    supply: {
      system: supply.system,
      phases: supply.phases,
      phaseVoltage: supply.phaseVoltageV,
      lineVoltage: supply.lineVoltageV,
      sparePerPhase: supply.boardSparePerPhaseA,
      distance: supply.distanceM,
      note: supply.rcd ? `${supply.note}; residual-current protection ${supply.rcd}` : supply.note,
    },
    energy,
    target: { low: target.lowWm2, high: target.highWm2, source: target.source },
    assumed: ['windGust', 'surroundingsTemperature'],
  })
}

function layoutOf({ title, heaters }: DemoVariant): Layout {
  return layoutSchema.parse({
    title,
    heaters: heaters.map(({ id, code, supplyVoltageV, ratedVoltageV, supportId, x, y, lowestPoint, ...aim }) => ({
      ...aim,
      id,
      model: code,
      supplyVoltage: supplyVoltageV,
      ...(ratedVoltageV === undefined ? {} : { ratedVoltage: ratedVoltageV }),
      x: metres(x),
      y: metres(y),
      lowestPoint: metres(lowestPoint),
      memberId: supportId,
    })),
  })
}

/** The three invented sites with their briefs and numbered variants, in the shapes of the domain. */
export function demoSites(): DemoSite[] {
  return demoFile.sites.map((place) => ({
    key: place.id,
    job: { name: place.name, customer: enquiries[place.id].customer },
    site: siteOf(place),
    brief: briefOf(place),
    variants: place.variants.map((variant) => ({
      number: variant.number,
      title: variant.title,
      layout: layoutOf(variant),
    })),
  }))
}
