import type { Cells } from '#app/domain/flux/cells.ts'
import type { Element, Emitter } from '#app/domain/flux/emitter.ts'
import { irradianceAt } from '#app/domain/flux/irradiance.ts'
import { acrossEntries, cosineTablesOf, entriesPerUnit, farthest, lastEntry } from '#app/domain/flux/kernel-tables.ts'
import { emptyMarks, markShadow, type ShadeMarks } from '#app/domain/flux/shade-marks.ts'
import { emptyPatterns, type ShadePattern } from '#app/domain/flux/shade-patterns.ts'
import type { Obstruction } from '#app/domain/flux/shading.ts'
import { add, scale, type Vec3 } from '#app/domain/vector.ts'

/**
 * Shade on a map. Each obstruction's silhouettes from a heater mark the cells in its shade. Where the shadow moves along
 * the elements these are taken in pieces, six for a heater of up to three elements: cells behind the thing from all
 * of them lose their share of the whole, those at the rim the hidden pieces, in closed form.
 */
const up: Vec3 = [0, 0, 1]

/** Pieces of each element, by how many there are. */
const piecesOf = (elements: number): number => [6, 3, 2][elements - 1] ?? 2

/** Patterns above which they are begun anew. */
const mostPatterns = 4096

let room = emptyMarks(0, 0)

function roomFor({ columns, rows }: Cells, elements: number): ShadeMarks {
  if (room.hidden.length !== columns || room.pattern.length !== columns * rows) room = emptyMarks(columns, rows)
  const perElement = piecesOf(elements)
  const { patterns } = room
  const isFit = patterns.perElement === perElement && patterns.list[0]?.shares.length === elements * perElement
  if (!isFit || patterns.list.length > mostPatterns) room.patterns = emptyPatterns(elements, perElement)
  return room
}

/** Takes from neighbouring cells of one row what a pattern hides; `first` and `count` are in columns. */
type TakeAway = (pattern: ShadePattern, row: number, first: number, count: number) => void

/** Piece by piece in closed form. */
function exactly(values: Float32Array, cells: Cells, emitter: Emitter, pieces: number): TakeAway {
  const parts = emitter.elements.flatMap((element) => {
    const length = element.length / pieces
    return Array.from({ length: pieces }, (_, piece) => {
      const centre = add(element.centre, scale(emitter.frame.u, (piece + 0.5) * length - element.length / 2))
      return { ...emitter, elements: [{ centre, length, radiantPower: element.radiantPower / pieces }] }
    })
  })
  return ({ shares }, row, first, count) => {
    for (let column = first; column < first + count; column++) {
      const point: Vec3 = [cells.x0 + (column + 0.5) * cells.cell, cells.y0 + (row + 0.5) * cells.cell, cells.z]
      const hidden = parts.reduce((sum, part, i) => {
        const share = shares[i] ?? 0
        return share === 0 ? sum : sum + share * irradianceAt(part, point, up)
      }, 0)
      const at = row * cells.columns + column
      values[at] = Math.max(0, (values[at] ?? 0) - hidden)
    }
  }
}

/** The same from the kernel's tables, for level elements with a beam of cosines. */
function quickly(values: Float32Array, cells: Cells, emitter: Emitter, pieces: number): TakeAway {
  const takers = emitter.elements.map((element) => runTaker(values, cells, emitter, element, pieces))
  return ({ runs }, row, first, count) => {
    for (let k = 0; k < runs.length; k += 4) {
      const [element = 0, from = 0, end = 0, share = 0] = [runs[k], runs[k + 1], runs[k + 2], runs[k + 3]]
      takers[element]?.(row, first, count, from, end, share)
    }
  }
}

/** Takes a share of the pieces `from` to `end` of an element away from neighbouring cells of a row. */
type RunTaker = (row: number, first: number, count: number, from: number, end: number, share: number) => void

function runTaker(values: Float32Array, cells: Cells, emitter: Emitter, element: Element, pieces: number): RunTaker {
  const { beam, frame } = emitter
  if (beam.kind !== 'cosine') throw new RangeError('the tables hold beams of cosines')
  const { across, along, solidAngle } = cosineTablesOf(beam)
  const [ux, uy] = frame.u
  const lean = (frame.w[1] * ux - frame.w[0] * uy) * acrossEntries
  const height = element.centre[2] - cells.z
  const below = -height * frame.w[2] * acrossEntries
  const strength = (element.radiantPower * height) / (solidAngle * element.length)
  const middle = farthest * entriesPerUnit
  return (row, first, count, from, end, share) => {
    const dy = cells.y0 + (row + 0.5) * cells.cell - element.centre[1]
    // z, from the element's point to the cell, falls as the piece moves along u.
    const high = element.length * (0.5 - from / pieces)
    const low = element.length * (0.5 - end / pieces)
    let at = row * cells.columns + first
    for (let column = first; column < first + count; column++, at++) {
      const dx = cells.x0 + (column + 0.5) * cells.cell - element.centre[0]
      const side = dy * ux - dx * uy
      const inverse = 1 / Math.sqrt(side * side + height * height)
      const c = (side * lean + below) * inverse
      if (!(c > 0)) continue
      const ci = Math.min(c | 0, acrossEntries)
      const f = (across[2 * ci] ?? 0) + (c - ci) * (across[2 * ci + 1] ?? 0)
      const place = dx * ux + dy * uy
      const scaled = inverse * entriesPerUnit
      const rise = readAt(along, (place + high) * scaled + middle) - readAt(along, (place + low) * scaled + middle)
      values[at] = Math.max(0, (values[at] ?? 0) - strength * share * f * inverse * inverse * rise)
    }
  }
}

function readAt(along: Float64Array, place: number): number {
  const within = Math.min(Math.max(place, 0), lastEntry)
  const i = within | 0
  return (along[2 * i] ?? 0) + (within - i) * (along[2 * i + 1] ?? 0)
}

/** Takes from the cells what the obstructions keep of an emitter; `values` must hold its irradiance alone. */
export function shadeEmitter(
  values: Float32Array,
  cells: Cells,
  emitter: Emitter,
  obstructions: readonly Obstruction[],
): void {
  const over = { ...emitter, elements: emitter.elements.filter(({ centre }) => centre[2] > cells.z) }
  if (over.elements.length === 0) return
  const marks = roomFor(cells, over.elements.length)
  for (const obstruction of obstructions) {
    const isOther = obstruction.heaterId !== emitter.id && obstruction.transmittance < 1
    if (isOther) markShadow(marks, cells, over, obstruction)
  }
  const isQuick = Math.abs(emitter.frame.u[2]) < 1e-9 && emitter.beam.kind === 'cosine'
  const takeAway = (isQuick ? quickly : exactly)(values, cells, over, marks.patterns.perElement)
  for (let row = 0; row < cells.rows; row++) takeFromRow(values, cells, row, marks, takeAway)
}

/** Takes the hidden shares from a row's cells, those of the same pattern together, and clears the row's marks. */
function takeFromRow(
  values: Float32Array,
  { columns }: Cells,
  row: number,
  { pattern, patterns, firstColumn, lastColumn }: ShadeMarks,
  takeAway: TakeAway,
): void {
  const start = row * columns
  const [from, end] = [firstColumn[row] ?? 0, (lastColumn[row] ?? -1) + 1]
  for (let column = from; column < end;) {
    const first = column
    const number = pattern[start + first] ?? 0
    while (column < end && pattern[start + column] === number) column++
    const alike = patterns.list[number]
    if (number === 0 || !alike) continue
    if (alike.whole >= 0) dim(values, start + first, start + column, 1 - alike.whole)
    else takeAway(alike, row, first, column - first)
  }
  pattern.fill(0, start + from, start + Math.max(from, end))
  firstColumn[row] = columns
  lastColumn[row] = -1
}

function dim(values: Float32Array, from: number, to: number, share: number): void {
  for (let at = from; at < to; at++) values[at] = (values[at] ?? 0) * share
}
