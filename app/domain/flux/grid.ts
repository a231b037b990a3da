import type { Vec2 } from '#app/domain/vector.ts'

/**
 * Square cells over a floor at one height. The centre of cell (i, j) is (x0 + (i + ½)·cell, y0 + (j + ½)·cell); cells are
 * stored row by row from y0 up. `inside` is 1 where the centre lies on the floor.
 */
export interface Grid {
  readonly x0: number
  readonly y0: number
  readonly cell: number
  readonly columns: number
  readonly rows: number
  readonly z: number
  readonly inside: Uint8Array
}

/** Most cells a grid may have: 100 × 60 m at 0.1 m, with room to spare. */
export const mostCells = 1_000_000

/** Crossings of a floor outline with the horizontal line at y, ascending; the even-odd rule makes spans of them. */
function crossings(floor: readonly Vec2[], y: number): number[] {
  const found: number[] = []
  floor.forEach(([x1, y1], i) => {
    const [x2, y2] = floor[(i + 1) % floor.length] ?? [x1, y1]
    if (y1 <= y !== y2 <= y) found.push(x1 + ((y - y1) / (y2 - y1)) * (x2 - x1))
  })
  return found.sort((a, b) => a - b)
}

/**
 * The grid of a floor outline of any shape, m. Throws a RangeError for an outline without area, a cell size that is not
 * positive, figures that are not finite, or more than `mostCells` cells.
 */
export function gridOf(floor: readonly Vec2[], z: number, cell: number): Grid {
  const xs = floor.map(([x]) => x)
  const ys = floor.map(([, y]) => y)
  const x0 = Math.min(...xs)
  const y0 = Math.min(...ys)
  const columns = Math.max(1, Math.ceil((Math.max(...xs) - x0) / cell - 1e-9))
  const rows = Math.max(1, Math.ceil((Math.max(...ys) - y0) / cell - 1e-9))
  if (floor.length < 3 || !(cell > 0) || ![x0, y0, z, columns, rows].every(Number.isFinite)) {
    throw new RangeError('a grid needs a floor of three corners or more, a height and a positive cell size')
  }
  if (columns * rows > mostCells) throw new RangeError(`a grid has at most ${mostCells} cells`)
  const inside = new Uint8Array(columns * rows)
  for (let row = 0; row < rows; row++) {
    const ends = crossings(floor, y0 + (row + 0.5) * cell)
    for (let k = 0; k + 1 < ends.length; k += 2) {
      const first = Math.max(0, Math.ceil(((ends[k] ?? 0) - x0) / cell - 0.5))
      const last = Math.min(columns - 1, Math.floor(((ends[k + 1] ?? 0) - x0) / cell - 0.5))
      inside.fill(1, row * columns + first, row * columns + last + 1)
    }
  }
  return { x0, y0, cell, columns, rows, z, inside }
}
