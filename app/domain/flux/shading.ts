import type { Element, Emitter } from '#app/domain/flux/emitter.ts'
import { hiddenStretch, type Stretch } from '#app/domain/flux/shadow.ts'
import { boxSolid, cylinderSolid, slabSolid, solidsOf, type Solid } from '#app/domain/flux/solid.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import { bodyOf } from '#app/domain/layout/body.ts'
import type { Layout } from '#app/domain/layout/layout.ts'
import type { Obstacle, Shape, Site } from '#app/domain/site/site.ts'
import { subtract, type Vec3 } from '#app/domain/vector.ts'

/** A thing between heater and guest. Its solids count as one: transmittance is 0 opaque … 1 clear. Plain data. */
export interface Obstruction {
  readonly id: string
  /** The heater whose own body it is; a body does not shade its own elements. */
  readonly heaterId: string | null
  readonly transmittance: number
  readonly solids: readonly Solid[]
}

/**
 * Where the movable things of a site are for this computation. 'in place': each fills all that it sweeps at its widest,
 * the darkest that it can be. `states` names the state that some of them are in instead, by their ids.
 */
export interface ShadeState {
  readonly movable: 'in place' | 'away'
  readonly states?: ReadonlyMap<string, string>
}

/** What an obstacle fills in the state stated for it; null when it is away. A state that it has not counts as unstated. */
function shapeIn(obstacle: Obstacle, { movable, states }: ShadeState): Shape | null {
  if (!obstacle.movable) return obstacle.shape
  const stated = obstacle.states?.find(({ name }) => name === states?.get(obstacle.id))
  if (stated) return stated.shape
  return movable === 'in place' ? obstacle.shape : null
}

/** Thickness taken for a table top, m (house rule, no source). */
const tableThickness = 0.04

/**
 * Everything that can shade: obstacles (movable ones in the state stated; at their widest unless one is), table tops,
 * poles and heaters' bodies. Walls and covers bound the site and are left out.
 */
export function obstructionsOf(
  site: Site,
  layout: Layout,
  models: ReadonlyMap<string, HeaterModel>,
  state: ShadeState = { movable: 'in place' },
): Obstruction[] {
  const opaque = { heaterId: null, transmittance: 0 }
  const obstacles = site.obstacles.flatMap((obstacle) => {
    const shape = shapeIn(obstacle, state)
    const { id, transmittance } = obstacle
    return shape ? [{ id, heaterId: null, transmittance, solids: solidsOf(shape) }] : []
  })
  const tables = site.tables.map(({ id, form, centre, size, turnDeg, height }) => {
    const under = height - tableThickness
    const round = form === 'round'
    const top = round
      ? cylinderSolid(centre, size[0] / 2, under, height)
      : slabSolid(centre, size, turnDeg, under, height)
    return { ...opaque, id, solids: [top] }
  })
  const poles = site.poles.map(({ id, at, diameter, top }) => ({
    ...opaque,
    id,
    solids: [cylinderSolid(at, diameter / 2, 0, top)],
  }))
  const bodies = layout.heaters.flatMap((heater) => {
    const model = models.get(heater.model)
    return model ? [{ ...opaque, id: heater.id, heaterId: heater.id, solids: [boxSolid(bodyOf(heater, model))] }] : []
  })
  return [...obstacles, ...tables, ...poles, ...bodies]
}

/** A stretch of an element and the share of its radiation that reaches the point. */
export interface ClearStretch extends Stretch {
  readonly transmittance: number
}

/** The stretches of an element, end to end, with what is let through on the way to a point. */
export function clearStretches(
  obstructions: readonly Obstruction[],
  emitter: Emitter,
  element: Element,
  point: Vec3,
): ClearStretch[] {
  const half = Math.max(element.length, 1e-6) / 2
  const rays = { point, toCentre: subtract(element.centre, point), u: emitter.frame.u, half }
  const shadows = obstructions
    .filter(({ heaterId }) => heaterId !== emitter.id)
    .map(({ transmittance, solids }) => ({
      transmittance,
      stretches: solids.map((solid) => hiddenStretch(solid, rays)).filter((stretch) => stretch !== null),
    }))
    .filter(({ stretches }) => stretches.length > 0)
  if (shadows.length === 0) return [{ from: -half, to: half, transmittance: 1 }]
  const inner = shadows.flatMap(({ stretches }) => stretches.flatMap(({ from, to }) => [from, to]))
  const ends = [...new Set([-half, half, ...inner])].sort((a, b) => a - b)
  return ends.slice(1).map((to, i) => {
    const from = ends[i] ?? -half
    const middle = (from + to) / 2
    const covering = shadows.filter(({ stretches }) => stretches.some((s) => s.from <= middle && middle <= s.to))
    return { from, to, transmittance: covering.reduce((share, shadow) => share * shadow.transmittance, 1) }
  })
}

/** Share of a heater's elements, by length, that a point sees past the obstructions: 1 all, 0 none. */
export function seenShare(emitter: Emitter, point: Vec3, obstructions: readonly Obstruction[]): number {
  const lengths = emitter.elements.map((element) => ({
    whole: element.length,
    clear: clearStretches(obstructions, emitter, element, point).reduce(
      (sum, { from, to, transmittance }) => sum + (to - from) * transmittance,
      0,
    ),
  }))
  const whole = lengths.reduce((sum, length) => sum + length.whole, 0)
  return whole === 0 ? 1 : lengths.reduce((sum, length) => sum + length.clear, 0) / whole
}
