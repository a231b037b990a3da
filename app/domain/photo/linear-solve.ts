/** A pivot below this share of the largest entry counts as none. */
const leastPivot = 1e-12

/**
 * Solves a square system by elimination with partial pivoting: the rows hold the coefficients and, last, the right
 * side. Null when the rows depend on each other.
 */
export function solveLinear(rows: readonly (readonly number[])[]): number[] | null {
  const work = rows.map((row) => [...row])
  const largest = Math.max(...work.flatMap((row) => row.slice(0, -1).map(Math.abs)))
  for (let column = 0; column < work.length; column++) {
    let pivot = column
    for (let row = column + 1; row < work.length; row++) {
      if (Math.abs(at(work, row, column)) > Math.abs(at(work, pivot, column))) pivot = row
    }
    const chosen = work[pivot] ?? []
    if (!(Math.abs(chosen[column] ?? 0) > leastPivot * largest)) return null
    work[pivot] = work[column] ?? []
    work[column] = chosen
    for (let row = column + 1; row < work.length; row++) {
      const factor = at(work, row, column) / at(work, column, column)
      work[row] = (work[row] ?? []).map((value, k) => value - factor * (chosen[k] ?? 0))
    }
  }
  const solution = work.map(() => 0)
  for (let row = work.length - 1; row >= 0; row--) {
    let rest = at(work, row, work.length)
    for (let column = row + 1; column < work.length; column++) rest -= at(work, row, column) * (solution[column] ?? 0)
    solution[row] = rest / at(work, row, row)
  }
  return solution
}

const at = (rows: readonly (readonly number[])[], row: number, column: number): number => rows[row]?.[column] ?? 0
