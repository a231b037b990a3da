import type { Grid } from '#app/domain/flux/grid.ts'

/** A grid's values as lines are traced through them, with a rim around: row by row, NaN where nothing is known. */
export interface TracedField {
  readonly values: Float64Array
  readonly columns: number
  readonly rows: number
  /** Site place of the field's corner and distance of its points, m: point (i, j) is at x0 + (i + ½)·step. */
  readonly x0: number
  readonly y0: number
  readonly step: number
  /** Greatest value of each row and column; −∞ without one. */
  readonly rowPeaks: Float64Array
  readonly columnPeaks: Float64Array
}

/** Points added around the grid: up to two rings of continued values and one that closes the lines. */
const pad = 3

/** Up to this cell size, m, every second cell is a point of the field. */
const fine = 0.1

/** Greatest distance of the field's points, m. */
const farthestApart = 0.2

/**
 * The field of a grid. Of cells up to 0.1 m every second one is taken: between points h apart a line that turns with
 * radius R lies within h²/4R of its place, 5 mm at h = 0.1 m and R = 0.5 m. Every fourth one is taken, not over 0.2 m
 * apart, where straight lines between those taken miss the cells halfway by no more than `mayMiss`, in the values' unit.
 * Outside the floor values are continued over one point, of coarse grids over two.
 */
export function tracedField(values: Float32Array, grid: Grid, mayMiss: number): TracedField {
  const stride = strideOf(values, grid, mayMiss)
  const inner = { columns: Math.ceil(grid.columns / stride), rows: Math.ceil(grid.rows / stride) }
  const columns = inner.columns + 2 * pad
  const rows = inner.rows + 2 * pad
  const field = new Float64Array(columns * rows).fill(NaN)
  for (let j = 0; j < inner.rows; j++) {
    const from = j * stride * grid.columns
    const to = (j + pad) * columns + pad
    for (let i = 0; i < inner.columns; i++) {
      const k = from + i * stride
      if (grid.inside[k] === 1) field[to + i] = values[k] ?? NaN
    }
  }
  for (let pass = 0; pass < (stride === 1 ? 2 : 1); pass++) continueOnePoint(field, columns, rows)
  const step = grid.cell * stride
  const corner = (start: number) => start + grid.cell / 2 - (pad + 0.5) * step
  return { values: field, columns, rows, x0: corner(grid.x0), y0: corner(grid.y0), step, ...peaksOf(field, columns) }
}

/** Which cells are taken: every one, every second or every fourth. */
function strideOf(values: Float32Array, grid: Grid, mayMiss: number): 1 | 2 | 4 {
  if (grid.cell > fine) return 1
  return grid.cell * 4 <= farthestApart && missBetween(values, grid, 4) <= mayMiss ? 4 : 2
}

/** The most that a cell halfway between two of the taken ones, along a row or a column, differs from their mean. */
function missBetween(values: Float32Array, { columns, rows, inside }: Grid, stride: number): number {
  const half = stride / 2
  const missAt = (from: number, step: number) => {
    const to = from + stride * step
    if (inside[from] !== 1 || inside[to] !== 1) return 0
    const [start, middle, end] = [values[from] ?? 0, values[from + half * step] ?? 0, values[to] ?? 0]
    return Math.abs(middle - (start + end) / 2)
  }
  let worst = 0
  for (let j = 0; j < rows; j += stride) {
    for (let i = 0; i < columns; i += stride) {
      const at = j * columns + i
      if (i + stride < columns) worst = Math.max(worst, missAt(at, 1))
      if (j + stride < rows) worst = Math.max(worst, missAt(at, columns))
    }
  }
  return worst
}

function peaksOf(field: Float64Array, columns: number): Pick<TracedField, 'rowPeaks' | 'columnPeaks'> {
  const rowPeaks = new Float64Array(field.length / columns).fill(-Infinity)
  const columnPeaks = new Float64Array(columns).fill(-Infinity)
  for (let j = 0, k = 0; j < rowPeaks.length; j++) {
    for (let i = 0; i < columns; i++, k++) {
      const value = field[k] ?? NaN
      if (value > (rowPeaks[j] ?? NaN)) rowPeaks[j] = value
      if (value > (columnPeaks[i] ?? NaN)) columnPeaks[i] = value
    }
  }
  return { rowPeaks, columnPeaks }
}

/** A rectangle of the field. */
interface FieldPart {
  readonly values: number[]
  readonly firstColumn: number
  readonly firstRow: number
  readonly columns: number
  readonly rows: number
}

/** The least rectangle that holds every value of at least `level` and a rim of one point; null where there is none. */
export function partAbove(field: TracedField, level: number): FieldPart | null {
  const rows = reaching(field.rowPeaks, level)
  const columns = reaching(field.columnPeaks, level)
  if (!rows || !columns) return null
  const [firstRow, rowCount] = rows
  const [firstColumn, columnCount] = columns
  const values = new Array<number>(rowCount * columnCount)
  for (let j = 0, to = 0; j < rowCount; j++) {
    const from = (firstRow + j) * field.columns + firstColumn
    for (let i = 0; i < columnCount; i++, to++) values[to] = field.values[from + i] ?? NaN
  }
  return { values, firstColumn, firstRow, columns: columnCount, rows: rowCount }
}

/** First index and count of the stretch whose peaks reach the level, one wider at either end; null where none does. */
function reaching(peaks: Float64Array, level: number): [first: number, count: number] | null {
  const first = peaks.findIndex((peak) => peak >= level)
  if (first < 0) return null
  const last = peaks.findLastIndex((peak) => peak >= level)
  const from = Math.max(0, first - 1)
  return [from, Math.min(peaks.length - 1, last + 1) - from + 1]
}

/** Steps to the eight neighbours of a cell. */
export const neighbours = [-1, 0, 1]
  .flatMap((dy) => [-1, 0, 1].map((dx) => [dx, dy] as const))
  .filter(([x, y]) => x || y)

/** Gives each empty point beside a filled one the mean of the straight lines that lead to it. */
function continueOnePoint(field: Float64Array, columns: number, rows: number): void {
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
