import type { Cells } from '#app/domain/flux/cells.ts'
import type { Element, Emitter } from '#app/domain/flux/emitter.ts'
import { emptyPatterns, patternBehind, type ShadePatterns } from '#app/domain/flux/shade-patterns.ts'
import type { Obstruction } from '#app/domain/flux/shading.ts'
import { casterOf, drawSilhouette, emptySilhouette, topOf } from '#app/domain/flux/silhouette.ts'
import type { Caster, Silhouette } from '#app/domain/flux/silhouette.ts'
import { add, scale, type Vec3 } from '#app/domain/vector.ts'

/** Which cells are in shade of one heater, and of which pieces of its elements. */
export interface ShadeMarks {
  /** Number of each cell's pattern; all 0 between heaters. */
  readonly pattern: Uint32Array
  patterns: ShadePatterns
  /** The first and the last column of each row that may hold patterns other than 0; first > last when none does. */
  readonly firstColumn: Int32Array
  readonly lastColumn: Int32Array
  /** The shadows of the thing under way, one or more a caster, each with the pieces it stands for. */
  readonly shadows: Shadow[]
  /** The pieces hidden from each cell of the row under way, and where they change: bits, all 0 between rows. */
  readonly hidden: Uint32Array
  readonly changes: Uint32Array
}

interface Shadow {
  readonly silhouette: Silhouette
  mask: number
}

/** Room to work in for so many cells. */
export function emptyMarks(columns: number, rows: number): ShadeMarks {
  return {
    pattern: new Uint32Array(columns * rows),
    patterns: emptyPatterns(1, 1),
    firstColumn: new Int32Array(rows).fill(columns),
    lastColumn: new Int32Array(rows).fill(-1),
    shadows: [],
    hidden: new Uint32Array(columns),
    changes: new Uint32Array(columns + 1),
  }
}

/** First column of a silhouette in a row of cells. */
function firstIn({ least, firstRow, lastRow }: Silhouette, cells: Cells, row: number): number {
  if (row < firstRow || row > lastRow) return cells.columns
  const place = ((least[row] ?? Infinity) - cells.x0) / cells.cell - 0.5
  return Math.max(0, Math.ceil(Math.min(place, cells.columns)))
}

/** Last column of a silhouette in a row of cells; less than the first when it holds none. */
function lastIn({ greatest, firstRow, lastRow }: Silhouette, cells: Cells, row: number): number {
  if (row < firstRow || row > lastRow) return -1
  const place = ((greatest[row] ?? -Infinity) - cells.x0) / cells.cell - 0.5
  return Math.floor(Math.max(-1, Math.min(place, cells.columns - 1)))
}

/** How far a caster's shadow moves on the plane while its source moves by a length, m. */
function travelOf(caster: Caster, z: number, height: number, length: number): number {
  const top = topOf(caster)
  return (length * (top - z)) / (height - top)
}

/** Distance between the first and the last element's centres, m. */
function widthOf({ elements }: Emitter): number {
  const [first, last] = [elements[0]?.centre, elements.at(-1)?.centre]
  return first && last ? Math.hypot(last[0] - first[0], last[1] - first[1], last[2] - first[2]) : 0
}

/** A shadow that moves by no more than so many cells is taken as standing still. */
const still = 1.5

/** Into how many equal parts an element of so many pieces is cut for a shadow that moves by so many cells along it. */
function partsFor(travel: number, pieces: number): number {
  for (let parts = 1; parts < pieces; parts++) if (pieces % parts === 0 && travel <= parts * still) return parts
  return pieces
}

/** An element halfway between the first and the last. */
function middleOf(elements: readonly Element[]): Element[] {
  const [first, last] = [elements[0], elements.at(-1)]
  return first && last ? [{ ...first, centre: scale(add(first.centre, last.centre), 0.5) }] : []
}

/** Draws the shadows of a thing's casters into the first of `shadows`; how many there are. */
function drawShadows(marks: ShadeMarks, cells: Cells, emitter: Emitter, casters: readonly Caster[]): number {
  const { elements, frame } = emitter
  const pieces = marks.patterns.perElement
  let count = 0
  const draw = (caster: Caster, source: Vec3, mask: number) => {
    const shadow = (marks.shadows[count++] ??= { silhouette: emptySilhouette(cells.rows), mask })
    shadow.mask = mask
    drawSilhouette(shadow.silhouette, cells, caster, source)
  }
  const [width, length] = [widthOf(emitter), Math.max(...elements.map((element) => element.length))]
  const height = Math.min(...elements.map(({ centre }) => centre[2]))
  for (const caster of casters) {
    const travel = travelOf(caster, cells.z, height, length) / cells.cell
    const parts = partsFor(travel, pieces)
    const isOne = parts === 1 && travelOf(caster, cells.z, height, width) <= still * cells.cell
    const drawn = isOne ? middleOf(elements) : elements
    const mask = isOne ? (1 << (pieces * elements.length)) - 1 : (1 << (pieces / parts)) - 1
    drawn.forEach(({ centre, length: long }, i) => {
      for (let part = 0; part < parts; part++) {
        const along = ((part + 0.5) / parts - 0.5) * long
        draw(caster, add(centre, scale(frame.u, along)), mask << (i * pieces + part * (pieces / parts)))
      }
    })
  }
  return count
}

/** Sets, in `hidden`, the pieces that the shadows hide from each cell of a row; its first and last such cell. */
function gatherRow(marks: ShadeMarks, cells: Cells, row: number, count: number): readonly [number, number] {
  const { shadows, hidden, changes } = marks
  let [least, greatest] = [cells.columns, -1]
  for (let k = 0; k < count;) {
    let [first, last, seen] = [cells.columns, -1, 0]
    // Shadows of the same pieces may overlap, so one bit is switched on and off at most once before the sweep.
    for (let shadow = shadows[k]; k < count && shadow && (seen & shadow.mask) === 0; shadow = shadows[++k]) {
      seen |= shadow.mask
      const from = firstIn(shadow.silhouette, cells, row)
      const to = lastIn(shadow.silhouette, cells, row)
      if (to < from) continue
      changes[from] = (changes[from] ?? 0) ^ shadow.mask
      changes[to + 1] = (changes[to + 1] ?? 0) ^ shadow.mask
      if (from < first) first = from
      if (to > last) last = to
    }
    for (let i = first, mask = 0; i <= last; i++) {
      mask ^= changes[i] ?? 0
      changes[i] = 0
      hidden[i] = (hidden[i] ?? 0) | mask
    }
    changes[last + 1] = 0
    least = Math.min(least, first)
    greatest = Math.max(greatest, last)
  }
  return [least, greatest]
}

/** Turns the patterns of a row's cells into those behind the thing whose shade is in `hidden`. */
function hideRow(marks: ShadeMarks, start: number, first: number, last: number, transmittance: number): void {
  const { pattern, patterns, hidden } = marks
  let [number, mask, behind] = [-1, 0, 0]
  for (let i = first; i <= last; i++) {
    const here = hidden[i] ?? 0
    hidden[i] = 0
    if (here === 0) continue
    const before = pattern[start + i] ?? 0
    if (before !== number || here !== mask) {
      number = before
      mask = here
      behind = patternBehind(patterns, number, mask, transmittance)
    }
    pattern[start + i] = behind
  }
}

/** Marks the cells that one thing shades from the elements of an emitter, all of which are over the plane. */
export function markShadow(
  marks: ShadeMarks,
  cells: Cells,
  emitter: Emitter,
  { solids, transmittance }: Obstruction,
): void {
  const height = Math.min(...emitter.elements.map(({ centre }) => centre[2]))
  const casters = solids.map((solid) => casterOf(solid, cells.z, height)).filter((each) => each !== null)
  const count = drawShadows(marks, cells, emitter, casters)
  let [firstRow, lastRow] = [cells.rows, -1]
  for (let k = 0; k < count; k++) {
    const silhouette = marks.shadows[k]?.silhouette
    if (!silhouette) continue
    firstRow = Math.min(firstRow, silhouette.firstRow)
    lastRow = Math.max(lastRow, silhouette.lastRow)
  }
  for (let row = firstRow; row <= lastRow; row++) {
    const [first, last] = gatherRow(marks, cells, row, count)
    hideRow(marks, row * cells.columns, first, last, transmittance)
    marks.firstColumn[row] = Math.min(marks.firstColumn[row] ?? first, first)
    marks.lastColumn[row] = Math.max(marks.lastColumn[row] ?? last, last)
  }
}
