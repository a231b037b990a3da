import { coveredCells } from '#app/domain/comfort/covered-cells.ts'
import { feelsLike, feelsLikePerField } from '#app/domain/comfort/feels-like.ts'
import { requireConditions } from '#app/domain/comfort/map-conditions.ts'
import { effectiveAreaShare, meanProjectedAreaFactor, type Posture } from '#app/domain/comfort/projected-area.ts'
import { requireAnswerable } from '#app/domain/flux/answerable.ts'
import { addDirected } from '#app/domain/flux/directed-map.ts'
import type { Emitter } from '#app/domain/flux/emitter.ts'
import { gridOf, type Grid } from '#app/domain/flux/grid.ts'
import { irradianceMap, type FluxMap, type Layer } from '#app/domain/flux/map.ts'
import type { MapConditions, MapQuantity, MapQuestion } from '#app/domain/flux/map-question.ts'
import { seenOf } from '#app/domain/flux/shaded-cells.ts'
import type { Obstruction } from '#app/domain/flux/shading.ts'
import type { Cover } from '#app/domain/site/site.ts'
import { sameData } from '#app/domain/same-data.ts'
import { contoursOf, type HeatPicture } from '#app/drawing/heat/contours.ts'

/** The answer to a question about the map. */
export interface MapAnswer {
  readonly grid: Grid
  /** The quantity at each cell, row by row; NaN outside the floor. */
  readonly values: Float32Array<ArrayBuffer>
  /** Greatest value on the floor; null when no cell lies on it. */
  readonly peak: number | null
  /** The most that a cell may lack because far heaters are left out on a large site, W/m². */
  readonly errorBound: number
  /** Fills and isolines at the question's levels. */
  readonly picture: HeatPicture
}

/** What one emitter adds to the radiant field on the floor, before absorption, W/m². */
interface FieldLayer {
  readonly emitter: Emitter
  readonly values: Float64Array
}

interface FieldMap {
  readonly grid: Grid
  readonly posture: Posture
  readonly obstructions: readonly Obstruction[]
  readonly layers: readonly FieldLayer[]
}

/** Where a grid lies under the covers of the site: 1, else 0. */
interface CoveredMap {
  readonly grid: Grid
  readonly covers: readonly Cover[]
  readonly cells: Uint8Array
}

/** What is kept between questions; only changed emitters are computed anew. Make one with `emptyMapCache`. */
export interface MapCache {
  asked: Pick<MapQuestion, 'floor' | 'z' | 'cell'> | null
  grid: Grid | null
  map: FluxMap | null
  field: FieldMap | null
  covered: CoveredMap | null
}

export const emptyMapCache = (): MapCache => ({
  ...{ asked: null, grid: null },
  ...{ map: null, field: null, covered: null },
})

/** Altitudes for which the mean projected area is tabulated, by their sine. */
const altitudeSteps = 512

function gridFor(question: MapQuestion, cache: MapCache): Grid {
  const asked = { floor: question.floor, z: question.z, cell: question.cell }
  if (cache.grid && sameData(cache.asked, asked)) return cache.grid
  const grid = gridOf(question.floor, question.z, question.cell)
  cache.asked = asked
  cache.grid = grid
  return grid
}

/** Mean projected area of a body over all facings, by the sine of the altitude of the radiation. */
function meanAreaWeights(posture: Posture): Float64Array {
  return Float64Array.from({ length: altitudeSteps + 1 }, (_, i) =>
    meanProjectedAreaFactor(posture, Math.asin(i / altitudeSteps)),
  )
}

function fieldMap(before: FieldMap | null, grid: Grid, question: MapQuestion, posture: Posture): FieldMap {
  const obstructions = question.obstructions ?? []
  const isKept = before?.grid === grid && before.posture === posture && sameData(before.obstructions, obstructions)
  const known = isKept ? [...before.layers] : []
  const weights = meanAreaWeights(posture)
  const layers = question.emitters.map((emitter): FieldLayer => {
    const same = known.find((layer) => layer.emitter.id === emitter.id && sameData(layer.emitter, emitter))
    if (same) return same
    const values = new Float64Array(grid.columns * grid.rows)
    const seen = seenOf(grid, emitter, obstructions)
    emitter.elements.forEach((element, i) => {
      const spans = seen[i]
      if (spans) addDirected(values, grid, emitter, element, weights, spans)
    })
    return { emitter, values }
  })
  return { grid, posture, obstructions, layers }
}

function coveredFor(grid: Grid, covers: readonly Cover[], before: CoveredMap | null): CoveredMap {
  if (before?.grid === grid && sameData(before.covers, covers)) return before
  return { grid, covers, cells: coveredCells(grid, covers) }
}

/**
 * Feels-like temperature of a cell: linear in the absorbed field, of which each emitter gives its absorptance. What a
 * cell feels like without heaters depends on what surrounds it: a cover or the open sky.
 */
function feelsLikeValues(field: FieldMap, conditions: MapConditions, covered: Uint8Array): (at: number) => number {
  const openSky = feelsLike(0, conditions)
  const underCover = feelsLike(0, { ...conditions, surroundingsTemperature: conditions.airTemperature })
  const perField = feelsLikePerField(conditions) * effectiveAreaShare[conditions.posture]
  const shares = field.layers.map(({ values }, i) => ({ values, absorptance: conditions.absorptance[i] ?? 0 }))
  return (at) =>
    (covered[at] === 1 ? underCover : openSky) +
    perField * shares.reduce((sum, { values, absorptance }) => sum + absorptance * (values[at] ?? 0), 0)
}

/** Value of a layer at a cell of the whole grid; 0 outside the layer's window. */
function layerValue(grid: Grid, { window, values }: Layer, at: number): number {
  if (!window) return 0
  const row = Math.floor(at / grid.columns) - window.firstRow
  const column = (at % grid.columns) - window.firstColumn
  if (row < 0 || column < 0 || row >= window.rows || column >= window.columns) return 0
  return values[row * window.columns + column] ?? 0
}

/** Writes a quantity into the cells on the floor, NaN elsewhere; the greatest of them, −∞ when no cell lies on it. */
function writeCells(values: Float32Array, { inside }: Grid, valueAt: (at: number) => number): number {
  let peak = -Infinity
  for (let at = 0; at < values.length; at++) {
    values[at] = inside[at] === 1 ? valueAt(at) : NaN
    const value = values[at] ?? NaN
    if (value > peak) peak = value
  }
  return peak
}

/** The same for the sum of the layers, without a call per cell: a drag asks for it again and again. */
function writeSum(values: Float32Array, { inside }: Grid, total: Float64Array): number {
  let peak = -Infinity
  for (let at = 0; at < values.length; at++) {
    if (inside[at] !== 1) {
      values[at] = NaN
      continue
    }
    const sum = total[at] ?? 0
    const value = Math.fround(sum > 0 ? sum : 0)
    values[at] = value
    if (value > peak) peak = value
  }
  return peak
}

/** Writes the question's quantity from the maps in the cache; its greatest value on the floor. */
function writeQuantity(values: Float32Array, question: MapQuestion, grid: Grid, cache: MapCache): number {
  const { quantity, emitters } = question
  if (quantity.kind === 'feels-like') {
    const field = fieldMap(cache.field, grid, question, quantity.conditions.posture)
    cache.field = field
    cache.covered = coveredFor(grid, quantity.conditions.covers ?? [], cache.covered)
    return writeCells(values, grid, feelsLikeValues(field, quantity.conditions, cache.covered.cells))
  }
  const { total, layers } = fluxMapFor(question, grid, cache)
  if (quantity.kind === 'flux') return writeSum(values, grid, total)
  if (quantity.kind === 'share') {
    const own = layers.filter((_, i) => emitters[i]?.id === quantity.emitterId)
    return writeCells(values, grid, (at) => own.reduce((sum, layer) => sum + layerValue(grid, layer, at), 0))
  }
  const { threshold } = quantity
  const hasEnough = (layer: Layer, at: number) => layerValue(grid, layer, at) >= threshold
  return writeCells(values, grid, (at) => layers.reduce((count, layer) => count + (hasEnough(layer, at) ? 1 : 0), 0))
}

function fluxMapFor(question: MapQuestion, grid: Grid, cache: MapCache): FluxMap {
  cache.map = irradianceMap(cache.map, grid, question.emitters, question.obstructions)
  return cache.map
}

function requireQuantity(quantity: MapQuantity, emitters: number): void {
  if (quantity.kind === 'feels-like') requireConditions(quantity.conditions, emitters)
  if (quantity.kind === 'overlap' && !Number.isFinite(quantity.threshold))
    throw new RangeError('the threshold of overlap must be finite')
}

/**
 * Answers a question about the map: values on a grid over the floor, NaN outside it, and their fills and isolines (none
 * are traced when neither levels nor edges are asked for). The
 * cache is kept by the asker's worker and changed in place. Throws a RangeError for a floor, height, cell size,
 * emitter, threshold or conditions without meaning, and on a page's main thread.
 */
export function answerMap(question: MapQuestion, cache: MapCache): MapAnswer {
  if ('document' in globalThis) throw new Error('the map is computed in a worker')
  requireAnswerable(question.emitters)
  requireQuantity(question.quantity, question.emitters.length)
  const grid = gridFor(question, cache)
  const values = new Float32Array(grid.columns * grid.rows)
  const peak = writeQuantity(values, question, grid, cache)
  const errorBound = question.quantity.kind === 'feels-like' ? 0 : (cache.map?.errorBound ?? 0)
  const isPlain = question.levels.length === 0 && question.edges?.length === 0
  const picture = isPlain
    ? { bands: [], lines: [], peaks: [] }
    : contoursOf(values, grid, question.levels, question.edges, question.written)
  return { grid, values, peak: peak === -Infinity ? null : peak, errorBound, picture }
}
