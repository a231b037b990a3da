import type { Obstacle, Shape, Site } from '#app/domain/site/site.ts'
import { usuallyMovable, usualStates } from '#app/domain/site/usual-states.ts'
import type { Vec2 } from '#app/domain/vector.ts'
import { extentOf } from '#app/drawing/plan/plan-view.ts'

const rounded = (metres: number): number => Math.round(metres * 100) / 100

/** A round thing about a place. */
const round = ([x, y]: Vec2, radius: number, low: number, high: number): Shape => ({
  kind: 'cylinder',
  centre: [rounded(x), rounded(y)],
  radius,
  z: [low, high],
})

/** A box about a place. */
const box = ([x, y]: Vec2, across: number, deep: number, low: number, high: number): Shape => ({
  kind: 'box',
  x: [rounded(x - across / 2), rounded(x + across / 2)],
  y: [rounded(y - deep / 2), rounded(y + deep / 2)],
  z: [low, high],
})

/** A strip along x over the whole floor, its middle at a place on y. */
function strip(site: Site, y: number, deep: number, low: number, high: number): Shape {
  const { x } = extentOf(site.floor)
  return { kind: 'box', x: [x[0], x[1]], y: [rounded(y - deep / 2), rounded(y + deep / 2)], z: [low, high] }
}

/** Sizes to start from, to be measured: what the thing sweeps at its widest. */
function usualShape(site: Site, kind: Obstacle['kind'], at: Vec2): Shape {
  const { y } = extentOf(site.floor)
  switch (kind) {
    case 'trim':
      return strip(site, y[0] + 0.05, 0.1, 2.5, 2.65)
    case 'screen':
    case 'blind':
      return strip(site, y[1] - 0.03, 0.06, 0, 2.5)
    case 'cable':
      return strip(site, at[1], 0.04, 2.5, 2.58)
    case 'door':
      return box(at, 0.9, 0.9, 0, 2.1)
    case 'umbrella':
      return round(at, 1.5, 2.2, 2.8)
    case 'fan':
      return round(at, 0.6, 2.3, 2.4)
    case 'lamp':
      return round(at, 0.2, 1.8, 2.1)
    case 'sprinkler':
      return round(at, 0.03, 2.5, 2.6)
    case 'furniture':
      return box(at, 0.8, 0.5, 0, 0.9)
    case 'other':
      return box(at, 0.5, 0.5, 0, 0.5)
  }
}

/** An obstacle to start from, in its usual states where it moves. */
export function newObstacle(site: Site, kind: Obstacle['kind'], id: string, at: Vec2): Obstacle {
  const shape = usualShape(site, kind, at)
  const movable = usuallyMovable(kind)
  return {
    id,
    name: id.replace('-', ' '),
    kind,
    material: 'unknown',
    movable,
    shape,
    ...(movable && { states: usualStates(kind, shape) }),
    transmittance: 0,
    note: null,
  }
}
