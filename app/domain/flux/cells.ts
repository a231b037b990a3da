import type { Grid } from '#app/domain/flux/grid.ts'

/** A rectangle in plan, m. */
export interface Extent {
  readonly left: number
  readonly right: number
  readonly low: number
  readonly high: number
}

/** A rectangle of cells at one height: a grid without its floor. */
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

/** The cells of a grid whose centres lie in a rectangle; null when none do. */
export function windowOf(grid: Grid, extent: Extent): Window | null {
  const span = (from: number, to: number, start: number, count: number) => {
    const first = Math.max(0, Math.ceil((from - start) / grid.cell - 0.5))
    const last = Math.min(count - 1, Math.floor((to - start) / grid.cell - 0.5))
    return { first, count: last - first + 1 }
  }
  const across = span(extent.left, extent.right, grid.x0, grid.columns)
  const up = span(extent.low, extent.high, grid.y0, grid.rows)
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
