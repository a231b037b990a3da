import type { Cells } from '#app/domain/flux/cells.ts'
import type { Element } from '#app/domain/flux/emitter.ts'
import type { Obstruction } from '#app/domain/flux/shading.ts'
import { casterOf, drawSilhouette, emptySilhouette, endIn, firstIn, topOf } from '#app/domain/flux/silhouette.ts'
import type { Caster, Silhouette } from '#app/domain/flux/silhouette.ts'
import type { Solid } from '#app/domain/flux/solid.ts'
import { add, lengthOf, scale, subtract, type Vec3 } from '#app/domain/vector.ts'

/** Where the shadows from a heater's elements begin and end in each row of cells. Room for as much as ever was asked. */
export interface ShadeMarks {
  /** For each element its rows. */
  readonly elements: RowMarks[][]
  readonly shadows: Shadow[]
  silhouette: Silhouette
}

/** Columns where a shadow begins or is no more, in order, and the number of the shadow at each. */
export interface RowMarks {
  count: number
  columns: Int32Array
  shadows: Int32Array
}

/** A solid of a thing that hides pieces of an element from cells. */
export interface Hider {
  readonly thing: number
  readonly transmittance: number
  /** The pieces that it hides from the cell that a sweep along a row has come to, a bit each. */
  hidden: number
}

/** The shadow of a solid from a place on an element, which stands for the pieces of `mask`: no other one's of the solid. */
export interface Shadow {
  readonly hider: Hider
  readonly mask: number
}

/** Marks of nothing, without room yet. */
export const emptyMarks = (): ShadeMarks => ({ elements: [], shadows: [], silhouette: emptySilhouette(0) })

const emptyRow = (): RowMarks => ({ count: 0, columns: new Int32Array(32), shadows: new Int32Array(32) })

/** Takes all shadows away and makes room for the rows of so many elements. */
export function clearMarks(marks: ShadeMarks, elements: number, rows: number): void {
  while (marks.elements.length < elements) marks.elements.push([])
  for (const own of marks.elements) {
    for (const row of own) row.count = 0
    while (own.length < rows) own.push(emptyRow())
  }
  if (marks.silhouette.least.length < rows) marks.silhouette = emptySilhouette(rows)
  marks.shadows.length = 0
}

/** How far a caster's shadow moves on the plane at z when a source at `height` moves by 1 m, m. */
function travelOf(caster: Caster, z: number, height: number): number {
  const top = topOf(caster)
  return (top - z) / (height - top)
}

/** Distance between the first and the last element's centres, m. */
function widthOf(elements: readonly Element[]): number {
  return lengthOf(subtract(elements.at(-1)?.centre ?? none, elements[0]?.centre ?? none))
}

/** A shadow that moves by no more than so many cells is taken as standing still. */
const still = 1.5

/** From piece `first` on as many as together are no longer than `most`, at least one; the piece after them. */
function endOfPart(cuts: readonly number[], first: number, most: number): number {
  let end = first + 1
  while (end < cuts.length - 1 && (cuts[end + 1] ?? 1) - (cuts[first] ?? 0) <= most) end++
  return end
}

/** Halfway between the first and the last element's centres. */
function middleOf(elements: readonly Element[]): Vec3 {
  const [first, last] = [elements[0]?.centre ?? none, elements.at(-1)?.centre ?? none]
  return scale(add(first, last), 0.5)
}

const none: Vec3 = [0, 0, 0]

/** The same figures with as much room again. */
function twice(figures: Int32Array): Int32Array {
  const more = new Int32Array(2 * figures.length)
  more.set(figures)
  return more
}

/** Puts a place of a shadow among those of a row, which are in order. */
function insert(row: RowMarks, column: number, shadow: number): void {
  if (row.count === row.columns.length) {
    row.columns = twice(row.columns)
    row.shadows = twice(row.shadows)
  }
  const { columns, shadows } = row
  let i = row.count++
  for (; i > 0 && (columns[i - 1] ?? 0) > column; i--) {
    columns[i] = columns[i - 1] ?? 0
    shadows[i] = shadows[i - 1] ?? 0
  }
  columns[i] = column
  shadows[i] = shadow
}

/** Marks the cells whose centres lie in the silhouette as hidden, by a solid, from the pieces of an element. */
function markCells(marks: ShadeMarks, element: number, cells: Cells, shadow: Shadow): void {
  const { silhouette, shadows } = marks
  const rows = marks.elements[element]
  for (let row = silhouette.firstRow; row <= silhouette.lastRow; row++) {
    const first = firstIn(silhouette, cells, row)
    const end = endIn(silhouette, cells, row)
    const places = rows?.[row]
    if (!places || end <= first) continue
    insert(places, first, shadows.length)
    insert(places, end, shadows.length)
  }
  shadows.push(shadow)
}

/** Whether a solid throws the same shadow from all places on the elements, to the cell. */
function standsStill(solid: Solid, cells: Cells, elements: readonly Element[]): boolean {
  const lowest = Math.min(...elements.map(({ centre }) => centre[2]))
  const longest = Math.max(...elements.map(({ length }) => length))
  const caster = casterOf(solid, cells.z, lowest)
  return !caster || travelOf(caster, cells.z, lowest) * Math.max(longest, widthOf(elements)) <= still * cells.cell
}

/** Marks the shadow that a solid throws from all elements as from the middle between them. */
function markStanding(marks: ShadeMarks, cells: Cells, { elements, cuts }: Source, solid: Solid, hider: Hider): void {
  const middle = middleOf(elements)
  const caster = casterOf(solid, cells.z, middle[2])
  if (!caster) return
  drawSilhouette(marks.silhouette, cells, caster, middle)
  cuts.forEach((own, i) => markCells(marks, i, cells, { hider, mask: (1 << (own.length - 1)) - 1 }))
}

/** Marks a solid's shadows from each element, from parts of it at a time from which they stand still. */
function markMoving(marks: ShadeMarks, cells: Cells, { elements, cuts, u }: Source, solid: Solid, hider: Hider): void {
  elements.forEach(({ centre, length }, i) => {
    const caster = casterOf(solid, cells.z, centre[2])
    if (!caster) return
    const own = cuts[i] ?? []
    const most = (still * cells.cell) / (travelOf(caster, cells.z, centre[2]) * length)
    for (let first = 0, end = 0; first < own.length - 1; first = end) {
      end = endOfPart(own, first, most)
      const along = ((own[first] ?? 0) + (own[end] ?? 1)) / 2 - 0.5
      drawSilhouette(marks.silhouette, cells, caster, add(centre, scale(u, along * length)))
      markCells(marks, i, cells, { hider, mask: (1 << end) - (1 << first) })
    }
  })
}

/** A heater's elements, all over the plane of the cells, along u; each is cut into pieces: shares of its length, 0 … 1. */
export interface Source {
  readonly elements: readonly Element[]
  readonly cuts: readonly (readonly number[])[]
  readonly u: Vec3
}

/** Marks the cells that one thing shades from a source. Things are marked in the order of their numbers. */
export function markShadow(
  marks: ShadeMarks,
  cells: Cells,
  source: Source,
  { solids, transmittance }: Obstruction,
  thing: number,
): void {
  if (source.elements.length === 0) return
  for (const solid of solids) {
    const mark = standsStill(solid, cells, source.elements) ? markStanding : markMoving
    mark(marks, cells, source, solid, { thing, transmittance, hidden: 0 })
  }
}
