import { isUnderCover } from '#app/domain/comfort/surroundings.ts'
import type { Grid } from '#app/domain/flux/grid.ts'
import type { Cover } from '#app/domain/site/site.ts'

/** 1 for each cell on the floor where a guest's body at the grid's height lies below a cover, as for a seat; else 0. */
export function coveredCells({ x0, y0, cell, columns, rows, z, inside }: Grid, covers: readonly Cover[]): Uint8Array {
  const covered = new Uint8Array(columns * rows)
  if (covers.length === 0) return covered
  for (let row = 0, at = 0; row < rows; row++) {
    const y = y0 + (row + 0.5) * cell
    for (let column = 0; column < columns; column++, at++) {
      const place = { x: x0 + (column + 0.5) * cell, y, bodyHeight: z }
      if (inside[at] === 1 && isUnderCover(place, covers)) covered[at] = 1
    }
  }
  return covered
}
