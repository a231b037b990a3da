import type { Grid } from '#app/domain/flux/grid.ts'

/** A rectangle of cells at one height, as a grid without its floor; and how far from a heater they are worth filling. */
export interface Cells {
  readonly x0: number
  readonly y0: number
  readonly cell: number
  readonly columns: number
  readonly rows: number
  readonly z: number
}

/** A rectangle of a grid's cells: its first column and row in the grid, and the cells themselves. */
export interface Window extends Cells {
  readonly firstColumn: number
  readonly firstRow: number
}

/** The cells of a grid whose centres lie within a radius of a place, as the rectangle round them; null when none do. */
export function windowAround(grid: Grid, x: number, y: number, radius: number): Window | null {
  const span = (centre: number, start: number, count: number) => {
    const first = Math.max(0, Math.ceil((centre - radius - start) / grid.cell - 0.5))
    const last = Math.min(count - 1, Math.floor((centre + radius - start) / grid.cell - 0.5))
    return { first, count: last - first + 1 }
  }
  const across = span(x, grid.x0, grid.columns)
  const up = span(y, grid.y0, grid.rows)
  if (across.count <= 0 || up.count <= 0) return null
  return {
    x0: grid.x0 + across.first * grid.cell,
    y0: grid.y0 + up.first * grid.cell,
    cell: grid.cell,
    columns: across.count,
    rows: up.count,
    z: grid.z,
    firstColumn: across.first,
    firstRow: up.first,
  }
}
