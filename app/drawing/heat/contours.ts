import { contours, type Contours } from 'd3-contour'
import type { Grid } from '#app/domain/flux/grid.ts'
import type { Vec2 } from '#app/domain/vector.ts'
import { placesOnRing, type LinePlace } from '#app/drawing/heat/line-places.ts'
import { pathOfRings, thinRing, type Ring } from '#app/drawing/heat/rings.ts'
import { neighbours, partAbove, tracedField, type TracedField } from '#app/drawing/heat/traced-field.ts'

/** The part of the floor where the value is at least `from`; painted in order, the next band lies over it. */
interface HeatBand {
  readonly from: number
  /** Lower edge of the next band; the last band is open and repeats its own step. */
  readonly to: number
  /** Closed SVG path in site m, y up, even-odd. */
  readonly path: string
}

/** Where the value is exactly `level`, with the places where its figure may stand, the straightest first. */
interface HeatLine {
  readonly level: number
  readonly path: string
  readonly labels: readonly LinePlace[]
}

/**
 * A map as fills and isolines, in site m, y up. Both run past the floor's edge, at most 0.2 m or two cells, so that a
 * drawing that clips them to the floor is filled to the outline.
 */
export interface HeatPicture {
  readonly bands: readonly HeatBand[]
  readonly lines: readonly HeatLine[]
  /** Highest points above the last band, where the fill no longer tells and the figure is written. */
  readonly peaks: readonly HeatPeak[]
}

/** A point of the floor, m, and the value there. */
interface HeatPeak {
  readonly x: number
  readonly y: number
  readonly value: number
}

/** Lower edges of the fill's bands on the irradiance scale, W/m²: every 25 up to where the scale saturates. */
export const bandEdges: readonly number[] = Array.from({ length: 25 }, (_, i) => i * 25)
/** The same for pictures that a figure is read back from: every 10 W/m². */
export const fineBandEdges: readonly number[] = Array.from({ length: 61 }, (_, i) => i * 10)
/** Isolines of irradiance, W/m². */
export const isolineLevels: readonly number[] = Array.from({ length: 12 }, (_, i) => (i + 1) * 50)

/**
 * Fills and isolines of a grid of values. Cells outside the floor (`inside` 0) and values that are not numbers are never
 * shown: what stands there is continued from the floor so that the fill reaches the outline. Marching squares with
 * linear interpolation by d3-contour over the cells' centres, of a fine grid every second one or, where that misses less
 * than a tenth of the step between levels, every fourth (`tracedField`). `written`: the levels whose figure may be written on
 * the line.
 */
export function contoursOf(
  values: Float32Array,
  grid: Grid,
  levels: readonly number[] = isolineLevels,
  edges: readonly number[] = bandEdges,
  written: readonly number[] = levels,
): HeatPicture {
  const field = tracedField(values, grid, leastStep(levels, edges) / 10)
  const trace = contours().smooth(true)
  const found = new Map<number, Ring[]>()
  const ringsAt = (level: number): Ring[] => {
    const known = found.get(level)
    if (known) return known
    const rings = ringsOf(trace, field, level)
    found.set(level, rings)
    return rings
  }
  const paths = new Map<number, string>()
  const pathAt = (level: number): string => {
    const path = paths.get(level) ?? pathOfRings(ringsAt(level))
    paths.set(level, path)
    return path
  }
  const bands = edges.map((from, i) => ({ from, to: upperEdge(edges, i), path: pathAt(from) }))
  const isInside = insideTest(grid)
  const lines = levels.map((level) => {
    const labels = written.includes(level) ? placesOnRing(ringsAt(level), isInside) : []
    return { level, path: pathAt(level), labels }
  })
  return {
    bands: bands.filter((band) => band.path !== ''),
    lines: lines.filter((line) => line.path !== ''),
    peaks: peaksOf(values, grid, edges.at(-1) ?? Infinity),
  }
}

/** Least difference between neighbours among the levels and edges; 0 with fewer than two. */
function leastStep(levels: readonly number[], edges: readonly number[]): number {
  const sorted = [...new Set([...levels, ...edges])].sort((a, b) => a - b)
  const steps = sorted.slice(1).map((level, i) => level - (sorted[i] ?? level))
  return steps.length === 0 ? 0 : Math.min(...steps)
}

/** How far a ring may be moved where points are left out of it, m. */
const thinnedBy = 0.003

/** Rings of one level: only the part of the field that reaches it, and a rim below it, is gone through. */
function ringsOf(trace: Contours, field: TracedField, level: number): Ring[] {
  const part = partAbove(field, level)
  if (!part) return []
  const { x0, y0, step } = field
  const [left, low] = [x0 + part.firstColumn * step, y0 + part.firstRow * step]
  const toSite = (ring: readonly (readonly number[])[]): Ring =>
    thinRing(
      ring.map((point): Vec2 => [left + (point[0] ?? 0) * step, low + (point[1] ?? 0) * step]),
      thinnedBy,
    )
  return trace.size([part.columns, part.rows]).contour(part.values, level).coordinates.flat().map(toSite)
}

/** Distance between two points that are both called highest, m. */
const peaksApart = 1

/** Cells above a value that none of their neighbours exceeds, the highest first, at least 1 m from each other. */
function peaksOf(values: Float32Array, grid: Grid, above: number): HeatPeak[] {
  const at = (i: number, j: number) => {
    const isOutside = i < 0 || j < 0 || i >= grid.columns || j >= grid.rows
    const k = j * grid.columns + i
    return isOutside || grid.inside[k] !== 1 ? -Infinity : (values[k] ?? -Infinity)
  }
  const found: HeatPeak[] = []
  for (let j = 0; j < grid.rows; j++) {
    for (let i = 0; i < grid.columns; i++) {
      if (!((values[j * grid.columns + i] ?? NaN) > above)) continue
      const value = at(i, j)
      if (value === -Infinity || neighbours.some(([dx, dy]) => at(i + dx, j + dy) > value)) continue
      found.push({ x: grid.x0 + (i + 0.5) * grid.cell, y: grid.y0 + (j + 0.5) * grid.cell, value })
    }
  }
  const chosen: HeatPeak[] = []
  for (const peak of found.sort((a, b) => b.value - a.value)) {
    if (chosen.every((other) => Math.hypot(other.x - peak.x, other.y - peak.y) >= peaksApart)) chosen.push(peak)
  }
  return chosen
}

function upperEdge(edges: readonly number[], i: number): number {
  const from = edges[i] ?? 0
  return edges[i + 1] ?? from + (from - (edges[i - 1] ?? from))
}

function insideTest(grid: Grid): (x: number, y: number) => boolean {
  return (x, y) => {
    const i = Math.floor((x - grid.x0) / grid.cell)
    const j = Math.floor((y - grid.y0) / grid.cell)
    return i >= 0 && j >= 0 && i < grid.columns && j < grid.rows && grid.inside[j * grid.columns + i] === 1
  }
}
