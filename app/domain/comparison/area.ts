/** A grid's cells as far as an area needs them: edge of a cell, m, and which of them lie on the floor. */
interface Cells {
  readonly cell: number
  readonly inside: Uint8Array
}

/** Area of the floor where the value is at least `least`, m², by whole cells; values that are not numbers count not. */
export function areaAtLeast(values: Float32Array, { cell, inside }: Cells, least: number): number {
  let count = 0
  values.forEach((value, i) => {
    if (inside[i] && value >= least) count += 1
  })
  return count * cell * cell
}

/** Value of one variant less that of another, cell by cell; both must be of one grid. */
export function differenceOf(values: Float32Array, less: Float32Array): Float32Array<ArrayBuffer> {
  if (values.length !== less.length) throw new Error('A difference needs two maps of one grid')
  return Float32Array.from(values, (value, i) => value - (less[i] ?? NaN))
}
