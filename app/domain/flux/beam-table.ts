import { beamOf, solidAngleOf } from '#app/domain/flux/beam.ts'
import type { BeamTableData } from '#app/domain/heaters/heater-model.ts'

/** A place in a table that is not right: 1-based, as a sheet shows it. */
export interface CellFault {
  readonly row: number
  readonly column: number
  readonly error: string
}

/** A beam table as a person gives it, or what is wrong with it, at most `mostFaults` of that. */
export type BeamTable = { readonly beam: BeamTableData } | { readonly faults: readonly CellFault[] }

/** After so many places the rest is not looked at. */
export const mostFaults = 50
/** Most rows and columns of angles: every degree of ±90°. */
const mostAngles = 181
/** Angles nearer to each other than this are one angle, degrees. */
const leastStep = 0.01
/** Relative intensity has any scale between these. */
const intensityScale = { least: 1e-6, most: 1e6 }
const plainFigure = /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d{1,3})?$/i

const isBlank = (cells: readonly string[]): boolean => cells.every((cell) => cell.trim() === '')

/** Cells as they were written, and what was found wrong with them; rows and columns count from 0 here. */
class Sheet {
  readonly faults: CellFault[] = []
  readonly rows: number
  readonly columns: number

  constructor(private readonly cells: readonly (readonly string[])[]) {
    this.rows = cells.length - 1
    this.columns = (cells[0]?.length ?? 0) - 1
  }

  refuse(row: number, column: number, error: string): void {
    if (this.faults.length < mostFaults) this.faults.push({ row: row + 1, column: column + 1, error })
  }

  isEmpty(row: number): boolean {
    return isBlank(this.cells[row] ?? [])
  }

  widthOf(row: number): number {
    return this.cells[row]?.length ?? 0
  }

  /** The figure of a cell; NaN, and a fault, where there is none. */
  figureAt(row: number, column: number): number {
    const text = this.cells[row]?.[column]?.trim().replace('\u2212', '-') ?? ''
    if (plainFigure.test(text) && Number.isFinite(Number(text))) return Number(text)
    const written = text.length > 20 ? `${text.slice(0, 20)}…` : text
    this.refuse(row, column, text === '' ? 'a figure is missing' : `“${written}” is not a figure such as 0.5`)
    return NaN
  }
}

function checkSize(sheet: Sheet): void {
  const { rows, columns } = sheet
  if (rows < 2) sheet.refuse(Math.max(0, rows), 0, 'a table has two rows of angles or more')
  else if (columns < 2) sheet.refuse(0, Math.max(0, columns), 'a table has two columns of angles or more')
  if (rows > mostAngles) sheet.refuse(mostAngles + 1, 0, `a table has at most ${mostAngles} rows of angles`)
  if (columns > mostAngles) sheet.refuse(0, mostAngles + 1, `a table has at most ${mostAngles} columns of angles`)
}

/** Angles at these places in order; one that is no figure is named and left out of the comparison. */
function readAngles(sheet: Sheet, places: readonly (readonly [row: number, column: number])[]): number[] {
  let before = -Infinity
  return places.map(([row, column]) => {
    const angle = sheet.figureAt(row, column)
    if (Math.abs(angle) > 180) sheet.refuse(row, column, 'an angle lies between −180 and 180 degrees')
    else if (angle - before < leastStep - 1e-9) {
      sheet.refuse(row, column, `angles rise, by ${leastStep} degrees or more`)
    }
    if (!Number.isNaN(angle)) before = angle
    return angle
  })
}

function readIntensity(sheet: Sheet, row: number): number[] {
  if (sheet.widthOf(row) > sheet.columns + 1) {
    sheet.refuse(row, sheet.columns + 1, 'this row has more figures than there are angles')
  }
  return Array.from({ length: sheet.columns }, (_, j) => {
    const value = sheet.figureAt(row, j + 1)
    if (value < 0) sheet.refuse(row, j + 1, 'relative intensity is not negative')
    if (value > intensityScale.most) sheet.refuse(row, j + 1, `relative intensity is at most ${intensityScale.most}`)
    return value
  })
}

const reachesFront = (anglesDeg: readonly number[]): boolean =>
  (anglesDeg[0] ?? 90) < 90 && (anglesDeg.at(-1) ?? -90) > -90

/** Whether anything is radiated to the front, where alone an element of a heater radiates. */
function checkLight(sheet: Sheet, beam: BeamTableData): void {
  if (!reachesFront(beam.alongDeg)) {
    sheet.refuse(0, 1, 'no longitudinal angle lies in front, within ±90 degrees')
  } else if (!reachesFront(beam.acrossDeg)) {
    sheet.refuse(1, 0, 'no transverse angle lies in front, within ±90 degrees')
  } else if (Math.max(...beam.intensity.flat()) < intensityScale.least) {
    sheet.refuse(1, 1, `every intensity is 0 or less than ${intensityScale.least.toFixed(6)}`)
  } else if (!(solidAngleOf(beamOf(beam)) > 0)) {
    sheet.refuse(1, 1, 'every intensity in front, within ±90 degrees, is 0')
  }
}

function readSheet(sheet: Sheet, source: string): BeamTable {
  checkSize(sheet)
  if (sheet.faults.length > 0) return { faults: sheet.faults }
  const { rows, columns } = sheet
  const alongDeg = readAngles(
    sheet,
    Array.from({ length: columns }, (_, j) => [0, j + 1]),
  )
  const written = Array.from({ length: rows }, (_, i) => i + 1).filter((row) => {
    if (sheet.isEmpty(row)) sheet.refuse(row, 0, 'this line is empty')
    return !sheet.isEmpty(row)
  })
  const acrossDeg = readAngles(
    sheet,
    written.map((row) => [row, 0]),
  )
  const intensity = written.map((row) => readIntensity(sheet, row))
  const beam: BeamTableData = { kind: 'table', acrossDeg, alongDeg, intensity, source }
  if (sheet.faults.length === 0) checkLight(sheet, beam)
  return sheet.faults.length === 0 ? { beam } : { faults: sheet.faults }
}

/**
 * Reads a beam table from CSV: the first row holds the longitudinal angles after one cell that is not read, every
 * further row a transverse angle and the relative intensities; degrees, point decimals, comma, semicolon or tab between
 * them. Angles rise; an axis that starts at 0 is symmetric; something is radiated within ±90°, to the front. Faults name
 * the row and column.
 */
export function beamTableOf(csv: string, source: string): BeamTable {
  const lines = csv.replace(/^\uFEFF/, '').split(/\r\n|\r|\n/)
  const separator = ['\t', ';', ','].find((each) => lines[0]?.includes(each)) ?? ','
  const cells = lines.map((line) => line.split(separator))
  const last = cells.findLastIndex((row) => !isBlank(row))
  return readSheet(new Sheet(cells.slice(0, last + 1)), source)
}

/** A table as CSV that `beamTableOf` reads again: figures as they are, also those of rows that are too long or missing. */
export function beamCsv({ acrossDeg, alongDeg, intensity }: Omit<BeamTableData, 'kind' | 'source'>): string {
  const rows = Array.from({ length: Math.max(acrossDeg.length, intensity.length) }, (_, i) => [
    acrossDeg[i] ?? '',
    ...(intensity[i] ?? []),
  ])
  return [['across \\ along', ...alongDeg], ...rows].map((cells) => `${cells.join(',')}\r\n`).join('')
}
