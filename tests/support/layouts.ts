import type { Layout, MountedHeater } from '#app/domain/layout/layout.ts'
import type { Site } from '#app/domain/site/site.ts'

/** A heater on chains, 2.35 m up, straight down, along x. */
export const heaterAt = (id: string, x: number, y: number, change: Partial<MountedHeater> = {}): MountedHeater => ({
  id,
  model: 'betony-2-0',
  supplyVoltage: 230,
  x,
  y,
  lowestPoint: 2.35,
  turnDeg: 0,
  tiltDeg: 0,
  mount: 'chain',
  memberId: 'beam-1',
  ...change,
})

/** A layout of these heaters. */
export const layoutOf = (...heaters: MountedHeater[]): Layout => ({ title: 'As drawn', heaters })

/** A floor of 12 × 6 m with beams across it at x = 0, 3, 6, 9 and 12, a house wall along y = 0 and a pole. */
export const beamedSite: Site = {
  name: 'Beamed terrace',
  kind: 'terrace',
  axes: 'x along the wall, y away from it',
  displayUnits: 'metric',
  floor: [
    [0, 0],
    [12, 0],
    [12, 6],
    [0, 6],
  ],
  beyond: [],
  levels: [],
  covers: [],
  members: [0, 3, 6, 9, 12].map((x, i) => ({
    id: `beam-${i}`,
    name: `Beam ${i}`,
    kind: 'beam',
    from: [x, 0] as [number, number],
    to: [x, 6] as [number, number],
    underside: { from: 3, to: 3 },
    width: 0.06,
    depth: 0.12,
    material: 'non-combustible' as const,
    allowedPointLoad: null,
    loadStatus: 'not known',
  })),
  walls: [
    {
      id: 'wall',
      name: 'House wall',
      from: [0, 0],
      to: [12, 0],
      top: 3.3,
      material: 'non-combustible',
      loadStatus: '',
    },
  ],
  poles: [
    { id: 'pole-1', name: 'Pole 1', at: [4, 5], top: 3, diameter: 0.06, material: 'non-combustible', loadStatus: '' },
  ],
  obstacles: [],
  tables: [],
  seats: [],
  dimensions: [],
  trace: null,
}
