import { contours } from 'd3-contour'
import type { Grid } from '#app/domain/flux/grid.ts'
import { placesOnRing, type LinePlace } from '#app/drawing/heat/line-places.ts'
import { pathOfRings, thinRing, type Ring } from '#app/drawing/heat/rings.ts'

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
 * A map as fills and isolines, in site m, y up. Both run up to two cells past the floor's edge so that a drawing that
 * clips them to the floor is filled to the outline.
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

/** Cells added around the grid: two rings of continued values and one that closes the contours. */
const pad = 3

/**
 * Fills and isolines of a grid of values. Cells outside the floor (`inside` 0) and values that are not numbers are never
 * shown: what stands there is continued from the floor so that the fill reaches the outline. Marching squares with
 * linear interpolation by d3-contour: on a smooth field a line is right to the second order of the cell. `written`: the
 * levels whose figure may be written on the line.
 */
export function contoursOf(
  values: Float32Array,
  grid: Grid,
  levels: readonly number[] = isolineLevels,
  edges: readonly number[] = bandEdges,
  written: readonly number[] = levels,
): HeatPicture {
  const field = continuedField(values, grid)
  const peak = field.values.reduce((most, value) => (value > most ? value : most), -Infinity)
  const trace = contours().size([field.columns, field.rows]).smooth(true)
  const found = new Map<number, Ring[]>()
  const ringsAt = (level: number): Ring[] => {
    const known = found.get(level)
    if (known) return known
    const rings = level > peak ? [] : trace.contour(field.values, level).coordinates.flat().map(toSiteRing(grid))
    found.set(level, rings)
    return rings
  }
  const bands = edges.map((from, i) => ({ from, to: upperEdge(edges, i), path: pathOfRings(ringsAt(from)) }))
  const isInside = insideTest(grid)
  const lines = levels.map((level) => {
    const rings = ringsAt(level)
    return { level, path: pathOfRings(rings), labels: written.includes(level) ? placesOnRing(rings, isInside) : [] }
  })
  return {
    bands: bands.filter((band) => band.path !== ''),
    lines: lines.filter((line) => line.path !== ''),
    peaks: peaksOf(values, grid, edges.at(-1) ?? Infinity),
  }
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
      const value = at(i, j)
      if (!(value > above) || neighbours.some(([dx, dy]) => at(i + dx, j + dy) > value)) continue
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

const toSiteRing = (grid: Grid) => (ring: number[][]) =>
  thinRing(
    ring.map(([x = 0, y = 0]) => [grid.x0 + (x - pad) * grid.cell, grid.y0 + (y - pad) * grid.cell] as const),
    grid.cell * 0.03,
  )

function insideTest(grid: Grid): (x: number, y: number) => boolean {
  return (x, y) => {
    const i = Math.floor((x - grid.x0) / grid.cell)
    const j = Math.floor((y - grid.y0) / grid.cell)
    return i >= 0 && j >= 0 && i < grid.columns && j < grid.rows && grid.inside[j * grid.columns + i] === 1
  }
}

interface Field {
  readonly values: number[]
  readonly columns: number
  readonly rows: number
}

/** The grid with a rim, values outside the floor continued over two cells and not numbers beyond. */
function continuedField(values: Float32Array, grid: Grid): Field {
  const columns = grid.columns + 2 * pad
  const rows = grid.rows + 2 * pad
  const field = new Array<number>(columns * rows).fill(NaN)
  for (let j = 0; j < grid.rows; j++) {
    for (let i = 0; i < grid.columns; i++) {
      const k = j * grid.columns + i
      if (grid.inside[k] === 1) field[(j + pad) * columns + i + pad] = values[k] ?? NaN
    }
  }
  for (let pass = 0; pass < 2; pass++) continueOneCell(field, columns, rows)
  return { values: field, columns, rows }
}

const neighbours = [-1, 0, 1].flatMap((dy) => [-1, 0, 1].map((dx) => [dx, dy] as const)).filter(([x, y]) => x || y)

/** Gives each empty cell beside a filled one the mean of the straight lines that lead to it. */
function continueOneCell(field: number[], columns: number, rows: number): void {
  const added: [number, number][] = []
  const at = (i: number, j: number) =>
    i < 0 || j < 0 || i >= columns || j >= rows ? NaN : (field[j * columns + i] ?? NaN)
  for (let j = 0; j < rows; j++) {
    for (let i = 0; i < columns; i++) {
      if (!Number.isNaN(field[j * columns + i])) continue
      let sum = 0
      let count = 0
      for (const [dx, dy] of neighbours) {
        const near = at(i + dx, j + dy)
        if (Number.isNaN(near)) continue
        const far = at(i + 2 * dx, j + 2 * dy)
        sum += Number.isNaN(far) ? near : 2 * near - far
        count++
      }
      if (count > 0) added.push([j * columns + i, sum / count])
    }
  }
  for (const [k, value] of added) field[k] = value
}
