import type { Layout, MountedHeater } from '#app/domain/layout/layout.ts'
import { roundLength } from '#app/domain/units.ts'

/** A layout after an edit that makes heaters, with the ids of the new ones in order. */
export interface Placed {
  readonly layout: Layout
  readonly ids: readonly string[]
}

/** Everything of a heater but its id: what placing needs. */
export type HeaterPlace = Omit<MountedHeater, 'id'>

/** What may be set on a heater; `null` drops an optional choice, so that the default of the model holds again. */
export type HeaterChange = Partial<Omit<MountedHeater, 'id' | 'ratedVoltage' | 'stage'>> & {
  readonly ratedVoltage?: number | null
  readonly stage?: number | null
}

/** The same direction within −180 to 180°, to 0.01°. */
export function roundTurn(degrees: number): number {
  const turn = ((((degrees + 180) % 360) + 360) % 360) - 180
  const rounded = Math.round(turn * 100) / 100
  return rounded === -180 ? 180 : rounded === 0 ? 0 : rounded
}

const roundTilt = (degrees: number) => {
  const tilt = Math.min(90, Math.max(-90, Math.round(degrees * 100) / 100))
  return tilt === 0 ? 0 : tilt
}
const roundHeight = (metres: number) => Math.min(30, Math.max(0, roundLength(metres)))
const roundPlan = (metres: number) => Math.min(1000, Math.max(-1000, roundLength(metres)))

/** The next free name of the form H12. */
export function nextHeaterId(layout: Layout, taken: readonly string[] = []): string {
  const used = [...layout.heaters.map((heater) => heater.id), ...taken]
  const largest = Math.max(0, ...used.map((id) => Number(/^H(\d{1,6})$/.exec(id)?.[1] ?? 0)))
  return `H${largest + 1}`
}

/** Adds heaters with new names. */
export function placeHeaters(layout: Layout, places: readonly HeaterPlace[]): Placed {
  const ids: string[] = []
  const heaters = places.map((place) => {
    const id = nextHeaterId(layout, ids)
    ids.push(id)
    return rounded({ ...place, id })
  })
  return { layout: { ...layout, heaters: [...layout.heaters, ...heaters] }, ids }
}

/** Adds one heater. */
export const placeHeater = (layout: Layout, place: HeaterPlace): Placed => placeHeaters(layout, [place])

function rounded(heater: MountedHeater): MountedHeater {
  return {
    ...heater,
    x: roundPlan(heater.x),
    y: roundPlan(heater.y),
    lowestPoint: roundHeight(heater.lowestPoint),
    turnDeg: roundTurn(heater.turnDeg),
    tiltDeg: roundTilt(heater.tiltDeg),
  }
}

/** Changes the heaters named; the others stay the same objects. */
function changeHeaters(
  layout: Layout,
  ids: readonly string[],
  change: (heater: MountedHeater) => MountedHeater,
): Layout {
  const named = new Set(ids)
  return {
    ...layout,
    heaters: layout.heaters.map((heater) => (named.has(heater.id) ? rounded(change(heater)) : heater)),
  }
}

/** Moves heaters in plan by (dx, dy), m. */
export const moveHeaters = (layout: Layout, ids: readonly string[], dx: number, dy: number): Layout =>
  changeHeaters(layout, ids, (heater) => ({ ...heater, x: heater.x + dx, y: heater.y + dy }))

/** Turns each heater about its own centre, counter-clockwise, degrees. */
export const turnHeaters = (layout: Layout, ids: readonly string[], byDeg: number): Layout =>
  changeHeaters(layout, ids, (heater) => ({ ...heater, turnDeg: heater.turnDeg + byDeg }))

/** Tilts the beams further to the left of their element axes, degrees. */
export const tiltHeaters = (layout: Layout, ids: readonly string[], byDeg: number): Layout =>
  changeHeaters(layout, ids, (heater) => ({ ...heater, tiltDeg: heater.tiltDeg + byDeg }))

/** Raises the lowest points, m; never under the floor. */
export const raiseHeaters = (layout: Layout, ids: readonly string[], by: number): Layout =>
  changeHeaters(layout, ids, (heater) => ({ ...heater, lowestPoint: heater.lowestPoint + by }))

/** Sets values of one heater. A heater that is not there: the same layout. */
export const setHeater = (layout: Layout, id: string, change: HeaterChange): Layout => setHeaters(layout, [id], change)

/** Sets the same values on several heaters. */
export function setHeaters(layout: Layout, ids: readonly string[], change: HeaterChange): Layout {
  const { ratedVoltage, stage, ...plain } = change
  return changeHeaters(layout, ids, (heater) => {
    const { ratedVoltage: oldVoltage, stage: oldStage, ...rest } = heater
    const voltage = ratedVoltage === undefined ? oldVoltage : ratedVoltage
    const lit = stage === undefined ? oldStage : stage
    return {
      ...rest,
      ...plain,
      ...(voltage === undefined || voltage === null ? {} : { ratedVoltage: voltage }),
      ...(lit === undefined || lit === null ? {} : { stage: lit }),
    }
  })
}

/** Copies heaters, moved by (dx, dy), m. */
export function duplicateHeaters(layout: Layout, ids: readonly string[], dx: number, dy: number): Placed {
  const named = new Set(ids)
  const copies = layout.heaters
    .filter((heater) => named.has(heater.id))
    .map((heater) => ({ ...heater, x: heater.x + dx, y: heater.y + dy }))
  return placeHeaters(layout, copies)
}

/** Puts heaters on one line: the same x or the same y, by default the mean of theirs. */
export function alignHeaters(layout: Layout, ids: readonly string[], along: 'x' | 'y', at?: number): Layout {
  const named = layout.heaters.filter((heater) => ids.includes(heater.id))
  if (named.length === 0) return layout
  const line = at ?? named.reduce((sum, heater) => sum + heater[along], 0) / named.length
  return changeHeaters(layout, ids, (heater) => ({ ...heater, [along]: line }))
}

/** Takes heaters out. */
export function removeHeaters(layout: Layout, ids: readonly string[]): Layout {
  const named = new Set(ids)
  return { ...layout, heaters: layout.heaters.filter((heater) => !named.has(heater.id)) }
}
