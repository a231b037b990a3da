import { requireAnswerable } from '#app/domain/flux/answerable.ts'
import { windowOf, type Extent, type Window } from '#app/domain/flux/cells.ts'
import { cutOffFor, type Area } from '#app/domain/flux/cut-off.ts'
import type { Emitter } from '#app/domain/flux/emitter.ts'
import type { Grid } from '#app/domain/flux/grid.ts'
import { addElement } from '#app/domain/flux/kernel.ts'
import { seenOf } from '#app/domain/flux/shaded-cells.ts'
import type { Obstruction } from '#app/domain/flux/shading.ts'
import { sameData } from '#app/domain/same-data.ts'

/** What one emitter gives the cells of a window of the grid, W/m². */
export interface Layer {
  readonly emitter: Emitter
  /** Null: the emitter reaches no cell. */
  readonly window: Window | null
  readonly values: Float32Array
}

/** Irradiance of a horizontal plane over a floor: a layer per emitter and their sum, row by row as the grid. */
export interface FluxMap {
  readonly grid: Grid
  /** The most that a cell lacks because far heaters are left out, W/m²; 0 when none are. */
  readonly errorBound: number
  readonly obstructions: readonly Obstruction[]
  readonly layers: readonly Layer[]
  readonly total: Float64Array
  /** How many layers were computed for this map; the others were kept. */
  readonly computed: number
}

const everywhere: Extent = { left: -Infinity, right: Infinity, low: -Infinity, high: Infinity }

function layerOf(grid: Grid, emitter: Emitter, area: Area | null, obstructions: readonly Obstruction[]): Layer {
  const window = emitter.elements.length === 0 ? null : windowOf(grid, area ?? everywhere)
  const values = new Float32Array(window ? window.columns * window.rows : 0)
  if (!window) return { emitter, window, values }
  const seen = seenOf(window, emitter, obstructions, area?.outline)
  emitter.elements.forEach((element, i) => {
    const spans = seen[i]
    if (spans) addElement(values, window, emitter, element, spans)
  })
  return { emitter, window, values }
}

/** Adds a layer to the sum, or takes it out again with sign −1: exact but for the last digit of the sum. */
function addLayer(total: Float64Array, columns: number, { window, values }: Layer, sign: 1 | -1): void {
  if (!window) return
  for (let row = 0, from = 0; row < window.rows; row++) {
    const start = (window.firstRow + row) * columns + window.firstColumn
    const end = start + window.columns
    for (let at = start; at < end; at++, from++) total[at] = (total[at] ?? 0) + sign * (values[from] ?? 0)
  }
}

function isSameGrid(a: Grid, b: Grid): boolean {
  return (
    a === b || (sameData({ ...a, inside: 0 }, { ...b, inside: 0 }) && a.inside.every((is, i) => is === b.inside[i]))
  )
}

/**
 * The map of the emitters on a grid. From the map before, the layers of emitters that are the same by value, and the
 * sum as far as it holds, are kept: moving one heater costs one layer. The map before must not be used afterwards.
 * It is computed in a worker; on a page's main thread it throws. A RangeError as
 * `requireAnswerable` gives it.
 */
export function irradianceMap(
  before: FluxMap | null,
  grid: Grid,
  emitters: readonly Emitter[],
  obstructions: readonly Obstruction[] = [],
): FluxMap {
  requireAnswerable(emitters)
  if ('document' in globalThis) throw new Error('the map is computed in a worker')
  const { areas, errorBound } = cutOffFor(emitters, grid)
  const kept =
    before &&
    isSameGrid(before.grid, grid) &&
    before.errorBound > 0 === errorBound > 0 &&
    sameData(before.obstructions, obstructions)
      ? before
      : null
  const unused = new Set(kept?.layers)
  const fresh: Layer[] = []
  const layers = emitters.map((emitter, i) => {
    const known = [...unused].find((layer) => layer.emitter.id === emitter.id && sameData(layer.emitter, emitter))
    if (known) {
      unused.delete(known)
      return known
    }
    const layer = layerOf(grid, emitter, areas[i] ?? null, obstructions)
    fresh.push(layer)
    return layer
  })
  const patched = kept !== null && unused.size + fresh.length < layers.length
  const total = patched ? kept.total : new Float64Array(grid.columns * grid.rows)
  if (patched) for (const layer of unused) addLayer(total, grid.columns, layer, -1)
  for (const layer of patched ? fresh : layers) addLayer(total, grid.columns, layer, 1)
  return { grid: kept?.grid ?? grid, errorBound, obstructions, layers, total, computed: fresh.length }
}
