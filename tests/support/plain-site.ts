import type { Brief } from '#app/domain/brief/brief.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { MountedHeater } from '#app/domain/layout/layout.ts'
import { plainHanging } from '#app/domain/layout/plain-hanging.ts'
import type { House } from '#app/domain/rules/house.ts'
import { plainHouseRules } from '#app/domain/rules/house-rules.ts'
import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'
import type { Site } from '#app/domain/site/site.ts'
import { demoModels, demoSites } from '#drizzle/seed/demo-sites.ts'

/** A terrace of 6 × 4 m under a level non-combustible cover at 3 m, one beam along x at y = 2, one seat. */
export function plainSite(changes: Partial<Site> = {}): Site {
  return {
    name: 'Plain terrace',
    kind: 'test',
    axes: 'x, y from a corner',
    displayUnits: 'metric',
    floor: [[0, 0], [6, 0], [6, 4], [0, 4]], // prettier-ignore
    beyond: [],
    levels: [],
    covers: [
      {
        id: 'roof',
        name: 'roof',
        corners: [[0, 0, 3], [6, 0, 3], [6, 4, 3], [0, 4, 3]], // prettier-ignore
        material: 'non-combustible',
        opening: false,
        swing: 0,
        voidDepth: null,
        note: null,
      },
    ],
    members: [
      {
        id: 'beam',
        name: 'beam',
        kind: 'steel beam',
        from: [0, 2],
        to: [6, 2],
        underside: { follows: 'roof' },
        width: 0.06,
        depth: 0.12,
        material: 'non-combustible',
        allowedPointLoad: 400,
        loadStatus: 'drawing',
      },
    ],
    walls: [],
    poles: [],
    obstacles: [],
    tables: [],
    seats: [
      {
        id: 'S1',
        group: 'S',
        priority: 'primary',
        posture: 'seated',
        x: 3,
        y: 1.2,
        facingDeg: 90,
        bodyHeight: 0.6,
        headHeight: 1.1,
      },
    ],
    dimensions: [],
    trace: null,
    ...changes,
  }
}

/** A 2 kW short-wave heater on chain under the beam of the plain site, at 2.3 m. */
export const plainHeater = (changes: Partial<MountedHeater> = {}): MountedHeater => ({
  id: 'H1',
  model: 'betony-2-0',
  supplyVoltage: 230,
  x: 3,
  y: 2,
  lowestPoint: 2.3,
  turnDeg: 0,
  tiltDeg: 0,
  mount: 'chain',
  memberId: 'beam',
  ...changes,
})

/** A house that has decided nothing itself but these rules. */
export const plainHouse = (rules: Partial<HouseRules> = {}): House => ({
  rules: { ...plainHouseRules, ...rules },
  hanging: plainHanging,
})

/** The demo catalogue's model of that heater, with some facts replaced. */
export function plainModel(changes: Partial<HeaterModel> = {}): HeaterModel {
  const found = demoModels().find(({ code }) => code === 'betony-2-0')
  if (!found) throw new Error('The demo catalogue has no betony-2-0')
  return { ...found, ...changes }
}

/** The brief of demo site C: single-phase, 230 V. */
export function plainBrief(changes: Partial<Brief> = {}): Brief {
  const demo = demoSites().find(({ key }) => key === 'C')
  if (!demo) throw new Error('No demo site C')
  return { ...demo.brief, ...changes }
}
