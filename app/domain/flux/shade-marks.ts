import type { Cells } from '#app/domain/flux/cells.ts'
import type { Element, Emitter } from '#app/domain/flux/emitter.ts'
import type { Obstruction } from '#app/domain/flux/shading.ts'
import { casterOf, drawSilhouette, emptySilhouette, endIn, firstIn, topOf } from '#app/domain/flux/silhouette.ts'
import type { Caster, Silhouette } from '#app/domain/flux/silhouette.ts'
import { add, scale } from '#app/domain/vector.ts'

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

/** How far a caster's shadow moves on the plane while its source moves by a length, m. */
function travelOf(caster: Caster, z: number, height: number, length: number): number {
  const top = topOf(caster)
  return (length * (top - z)) / (height - top)
}

/** Distance between the first and the last element's centres, m. */
function widthOf(elements: readonly Element[]): number {
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

/** Marks the cells whose centres lie in a silhouette as those of a shadow. */
function markCells(rows: RowMarks[], silhouette: Silhouette, cells: Cells, shadow: number): void {
  for (let row = silhouette.firstRow; row <= silhouette.lastRow; row++) {
    const first = firstIn(silhouette, cells, row)
    const end = endIn(silhouette, cells, row)
    const marks = rows[row]
    if (!marks || end <= first) continue
    insert(marks, first, shadow)
    insert(marks, end, shadow)
  }
}

/**
 * Marks the cells that one thing shades from the elements of an emitter, all of which are over the plane and are taken as
 * so many pieces each. Things are marked in the order of their numbers.
 */
export function markShadow(
  marks: ShadeMarks,
  cells: Cells,
  { elements, frame }: Emitter,
  pieces: number,
  { solids, transmittance }: Obstruction,
  thing: number,
): void {
  if (elements.length === 0) return
  const [width, length] = [widthOf(elements), Math.max(...elements.map((element) => element.length))]
  const height = Math.min(...elements.map(({ centre }) => centre[2]))
  const { silhouette, shadows } = marks
  for (const solid of solids) {
    const caster = casterOf(solid, cells.z, height)
    if (!caster) continue
    const hider: Hider = { thing, transmittance, hidden: 0 }
    const parts = partsFor(travelOf(caster, cells.z, height, length) / cells.cell, pieces)
    const isOne = parts === 1 && travelOf(caster, cells.z, height, width) <= still * cells.cell
    const drawn = isOne ? middleOf(elements) : elements
    drawn.forEach(({ centre, length: long }, i) => {
      const rows = isOne ? marks.elements : marks.elements.slice(i, i + 1)
      for (let part = 0; part < parts; part++) {
        drawSilhouette(silhouette, cells, caster, add(centre, scale(frame.u, ((part + 0.5) / parts - 0.5) * long)))
        for (const own of rows) markCells(own, silhouette, cells, shadows.length)
        shadows.push({ hider, mask: ((1 << (pieces / parts)) - 1) << (part * (pieces / parts)) })
      }
    })
  }
}
