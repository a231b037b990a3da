import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import { bodyOf } from '#app/domain/layout/body.ts'
import { chainToOrder, hangScheduleOf, type HangSchedule } from '#app/domain/layout/hanging.ts'
import type { MountedHeater } from '#app/domain/layout/layout.ts'
import { pointLoads, railKind, railReactions, railRests, type PointLoad } from '#app/domain/layout/support-loads.ts'
import { supportOf, type Support } from '#app/domain/layout/supports.ts'
import type { House } from '#app/domain/rules/house.ts'
import type { Member, Site } from '#app/domain/site/site.ts'

/** One heater as it is hung; without a model in the catalogue nothing of it can be told. */
export interface HungHeater {
  readonly heater: MountedHeater
  readonly model: HeaterModel | null
  readonly support: Support | null
  readonly schedule: HangSchedule | null
  readonly loads: readonly PointLoad[]
}

/** What one support carries. Loads N, without the weight of hangers, cables and rails. */
export interface CarriedBy {
  readonly id: string
  readonly name: string
  readonly kind: string
  readonly heaterIds: readonly string[]
  readonly points: number
  /** The largest load at one point, and what that point carries should the other hanger let go. */
  readonly largest: number
  readonly alone: number
  /** The largest moment of a mount that stands off, N·m. */
  readonly moment: number
  readonly total: number
  /** N per point; null: not known. */
  readonly allowed: number | null
  readonly status: string
  readonly outcome: 'allowed' | 'over' | 'not known'
  /** Whether one point alone would hold a whole heater; null while that is not known. */
  readonly holdsAlone: boolean | null
  /** What a rail passes on at its ends. */
  readonly passesOn: readonly { readonly onId: string | null; readonly load: number }[]
}

/** The hang schedule of a layout: heater by heater, what is to be ordered, and what each support carries. */
export interface HangSheet {
  readonly heaters: readonly HungHeater[]
  readonly carried: readonly CarriedBy[]
  readonly order: {
    /** Chain, m, in whole order lengths. */
    readonly chain: number
    /** Rods as cut, m, the longest first. */
    readonly rods: readonly number[]
    readonly turnbuckles: number
    readonly safetyLines: number
  }
}

/** The hang schedule of a layout on its site. */
export function hangSheet(
  site: Site,
  heaters: readonly MountedHeater[],
  models: ReadonlyMap<string, HeaterModel>,
  house: House,
): HangSheet {
  const hung = heaters.map((heater) => hungHeater(site, heater, models.get(heater.model) ?? null, house))
  const schedules = hung.flatMap(({ schedule }) => schedule ?? [])
  const hangers = schedules.flatMap((schedule) => schedule.hangers)
  const rods = hangers.filter(({ links }) => links === null).map(({ cutLength }) => cutLength)
  return {
    heaters: hung,
    carried: carriedBy(site, hung),
    order: {
      chain: chainToOrder(schedules, house.hanging),
      rods: rods.toSorted((a, b) => b - a),
      turnbuckles: hangers.length,
      safetyLines: schedules.length,
    },
  }
}

function hungHeater(site: Site, heater: MountedHeater, model: HeaterModel | null, house: House): HungHeater {
  if (!model) return { heater, model, support: null, schedule: null, loads: [] }
  const support = supportOf(site, heater, model, house.rules)
  const held = support.outcome === 'held'
  return {
    heater,
    model,
    support,
    schedule: held ? hangScheduleOf(site, heater, model, house) : null,
    loads: pointLoads(site, model, bodyOf(heater, model), support),
  }
}

interface Carrier {
  readonly id: string
  readonly name: string
  readonly kind: string
  readonly allowed: number | null
  readonly status: string
  readonly rail: Member | null
}

const carriersOf = (site: Site): Carrier[] => [
  ...site.members.map((member) => {
    const { id, name, kind, allowedPointLoad, loadStatus } = member
    const rail = kind === railKind ? member : null
    return { id, name, kind, allowed: allowedPointLoad, status: loadStatus, rail }
  }),
  ...site.walls.map(({ id, name, loadStatus }) => ({ id, name, kind: 'wall', allowed: null, status: loadStatus, rail: null })), // prettier-ignore
  ...site.poles.map(({ id, name, loadStatus }) => ({ id, name, kind: 'pole', allowed: null, status: loadStatus, rail: null })), // prettier-ignore
]

function carriedBy(site: Site, hung: readonly HungHeater[]): CarriedBy[] {
  return carriersOf(site).flatMap((carrier): CarriedBy[] => {
    const loads = hung.flatMap(({ heater, loads: each }) =>
      each.filter(({ supportId }) => supportId === carrier.id).map((load) => ({ ...load, heaterId: heater.id })),
    )
    if (loads.length === 0) return []
    const [largest, alone, moment] = [
      Math.max(...loads.map(({ load }) => load)),
      Math.max(...loads.map((load) => load.alone)),
      Math.max(...loads.map((load) => load.moment)),
    ]
    const { id, name, kind, allowed, status, rail } = carrier
    return [
      {
        ...{ id, name, kind, allowed, status, largest, alone, moment },
        heaterIds: [...new Set(loads.map(({ heaterId }) => heaterId))],
        points: loads.length,
        total: loads.reduce((sum, { load }) => sum + load, 0),
        outcome: allowed === null ? 'not known' : largest > allowed + 1e-9 ? 'over' : 'allowed',
        holdsAlone: allowed === null ? null : alone <= allowed + 1e-9,
        passesOn: rail ? passedOn(site, rail, loads) : [],
      },
    ]
  })
}

function passedOn(site: Site, rail: Member, loads: readonly PointLoad[]): CarriedBy['passesOn'] {
  const reactions = railReactions(rail, loads)
  return railRests(site, rail).map(({ onId }, i) => ({ onId, load: reactions[i === 0 ? 0 : 1] }))
}
