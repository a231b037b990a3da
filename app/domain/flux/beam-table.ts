import type { BeamData } from '#app/domain/heaters/heater-model.ts'

/** A beam table as a person gives it, or the first place in it that cannot be read (1-based, as a sheet shows it). */
export type BeamTable =
  | { readonly beam: Extract<BeamData, { kind: 'table' }> }
  | { readonly error: string; readonly row: number; readonly column: number }

/** Most rows and columns of angles: every degree of ±90°. */
const mostAngles = 181

class CellError extends Error {
  constructor(
    message: string,
    readonly row: number,
    readonly column: number,
  ) {
    super(message)
  }
}

function numberIn(cells: readonly string[][], row: number, column: number): number {
  const text = cells[row]?.[column]?.trim() ?? ''
  const value = text === '' ? NaN : Number(text)
  if (!Number.isFinite(value))
    throw new CellError(text === '' ? 'a figure is missing' : `"${text}" is not a figure`, row, column)
  return value
}

function checkedAngle(angle: number, before: number | undefined, row: number, column: number): number {
  if (Math.abs(angle) > 180) throw new CellError('an angle lies between −180 and 180 degrees', row, column)
  if (before !== undefined && angle <= before) throw new CellError('angles must rise', row, column)
  return angle
}

function checkedIntensity(value: number, row: number, column: number): number {
  if (value < 0) throw new CellError('relative intensity is not negative', row, column)
  return value
}

function anglesOf(count: number, read: (i: number) => number, place: (i: number) => [number, number]): number[] {
  return Array.from({ length: count }).reduce<number[]>((angles, _, i) => {
    angles.push(checkedAngle(read(i), angles.at(-1), ...place(i)))
    return angles
  }, [])
}

function tableOf(cells: readonly string[][], source: string): BeamTable {
  const columns = (cells[0]?.length ?? 0) - 1
  const rows = cells.length - 1
  if (rows < 2) throw new CellError('a table has two rows of angles or more', Math.max(0, rows), 0)
  if (columns < 2) throw new CellError('a table has two columns of angles or more', 0, Math.max(0, columns))
  if (rows > mostAngles) throw new CellError(`a table has at most ${mostAngles} rows of angles`, mostAngles + 1, 0)
  if (columns > mostAngles)
    throw new CellError(`a table has at most ${mostAngles} columns of angles`, 0, mostAngles + 1)
  const alongDeg = anglesOf(
    columns,
    (j) => numberIn(cells, 0, j + 1),
    (j) => [0, j + 1],
  )
  const acrossDeg = anglesOf(
    rows,
    (i) => numberIn(cells, i + 1, 0),
    (i) => [i + 1, 0],
  )
  const intensity = acrossDeg.map((_, i) => {
    const extra = cells[i + 1]?.length ?? 0
    if (extra > columns + 1) throw new CellError('this row has more figures than there are angles', i + 1, columns + 1)
    return alongDeg.map((__, j) => checkedIntensity(numberIn(cells, i + 1, j + 1), i + 1, j + 1))
  })
  if (!intensity.flat().some((value) => value > 0)) throw new CellError('every intensity is 0', 1, 1)
  return { beam: { kind: 'table', acrossDeg, alongDeg, intensity, source } }
}

/**
 * Reads a beam table from CSV: the first row holds the longitudinal angles after one cell that is not read, every
 * further row a transverse angle and the relative intensities; degrees, point decimals, comma, semicolon or tab between
 * them. Angles rise; an axis that starts at 0 is symmetric. Errors name the row and column.
 */
export function beamTableOf(csv: string, source: string): BeamTable {
  const lines = csv.replace(/^\uFEFF/, '').split(/\r?\n/)
  while (lines.length > 0 && lines.at(-1)?.trim() === '') lines.pop()
  const separator = ['\t', ';', ','].find((each) => lines[0]?.includes(each)) ?? ','
  try {
    return tableOf(
      lines.map((line) => line.split(separator)),
      source,
    )
  } catch (error) {
    if (!(error instanceof CellError)) throw error
    return { error: error.message, row: error.row + 1, column: error.column + 1 }
  }
}
