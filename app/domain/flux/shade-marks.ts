import type { Cells } from '#app/domain/flux/cells.ts'
import type { Element, Emitter } from '#app/domain/flux/emitter.ts'
import type { Obstruction } from '#app/domain/flux/shading.ts'
import { casterOf, drawSilhouette, emptySilhouette, topOf } from '#app/domain/flux/silhouette.ts'
import type { Caster, Silhouette } from '#app/domain/flux/silhouette.ts'
import { add, scale } from '#app/domain/vector.ts'

/** How many pieces an element is taken as where shadows move along it. */
export const pieces = 6

/** Which cells are in shade of one element. All arrays are clear between elements. */
export interface ShadeMarks {
  /** Hidden share of the whole element, 0 … 1. */
  readonly even: Float32Array
  /** Hidden share of each piece besides, a plane of cells per piece, and the cells where there is one. */
  readonly hidden: Float32Array
  readonly isMarked: Uint8Array
  /** Whether any cell is marked. */
  hasMarked: boolean
  /** The cells under one thing of several solids, so that they count once. */
  readonly under: Uint8Array
  /** One per piece, and the columns that each holds in the row under way. */
  readonly silhouettes: readonly Silhouette[]
  readonly first: Int32Array
  readonly last: Int32Array
}

/** Room to work in for so many cells. */
export function emptyMarks(cells: number, rows: number): ShadeMarks {
  return {
    even: new Float32Array(cells),
    hidden: new Float32Array(cells * pieces),
    isMarked: new Uint8Array(cells),
    hasMarked: false,
    under: new Uint8Array(cells),
    silhouettes: Array.from({ length: pieces }, () => emptySilhouette(rows)),
    first: new Int32Array(pieces),
    last: new Int32Array(pieces),
  }
}

/** Shorter runs of cells than this are filled one by one: quicker than the call. */
const shortRun = 24

function fillRun(plane: Float32Array | Uint8Array, from: number, to: number): void {
  if (to - from > shortRun) plane.fill(1, from, to)
  else for (let at = from; at < to; at++) plane[at] = 1
}

/** Adds to the hidden shares of a run of cells in one plane. */
function hideRun(plane: Float32Array, from: number, to: number, transmittance: number): void {
  if (transmittance === 0) fillRun(plane, from, to)
  else for (let at = from; at < to; at++) plane[at] = 1 - (1 - (plane[at] ?? 0)) * transmittance
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

/** Hides the cells of one row: those behind the thing from every piece in one, those at its rim piece by piece. */
function hideRow(marks: ShadeMarks, cells: Cells, row: number, transmittance: number): void {
  const { silhouettes, even, hidden, isMarked, first, last } = marks
  const count = isMarked.length
  const start = row * cells.columns
  let coreFirst = 0
  let coreLast = cells.columns - 1
  for (let piece = 0; piece < pieces; piece++) {
    const silhouette = silhouettes[piece]
    if (!silhouette) continue
    const from = firstIn(silhouette, cells, row)
    const to = lastIn(silhouette, cells, row)
    first[piece] = from
    last[piece] = to
    coreFirst = Math.max(coreFirst, from)
    coreLast = Math.min(coreLast, to)
  }
  const hasCore = coreFirst <= coreLast
  if (hasCore) hideRun(even, start + coreFirst, start + coreLast + 1, transmittance)
  for (let piece = 0; piece < pieces; piece++) {
    const from = start + (first[piece] ?? 0)
    const end = start + (last[piece] ?? -1) + 1
    const leftEnd = hasCore ? start + coreFirst : end
    const rightStart = hasCore ? start + coreLast + 1 : end
    const plane = piece * count
    fillRun(isMarked, from, leftEnd)
    hideRun(hidden, plane + from, plane + leftEnd, transmittance)
    fillRun(isMarked, rightStart, end)
    hideRun(hidden, plane + rightStart, plane + end, transmittance)
  }
}

/** Hides the cells behind a thing whose shadow does not move along the element. */
function hideStill({ even }: ShadeMarks, cells: Cells, silhouette: Silhouette, transmittance: number): void {
  for (let row = silhouette.firstRow; row <= silhouette.lastRow; row++) {
    const start = row * cells.columns
    hideRun(even, start + firstIn(silhouette, cells, row), start + lastIn(silhouette, cells, row) + 1, transmittance)
  }
}

/** Hides, piece by piece and each cell once, what lies behind any of several casters of one thing. */
function hideUnion(
  { under, hidden, isMarked }: ShadeMarks,
  transmittance: number,
  gather: (piece: number) => void,
): void {
  for (let piece = 0; piece < pieces; piece++) {
    gather(piece)
    for (let at = 0; at < under.length; at++) {
      if (under[at] === 0) continue
      isMarked[at] = 1
      hideRun(hidden, piece * under.length + at, piece * under.length + at + 1, transmittance)
    }
    under.fill(0)
  }
}

/** Sets `under` for the cells of a silhouette. */
function gatherUnder({ under }: ShadeMarks, cells: Cells, silhouette: Silhouette): void {
  for (let row = silhouette.firstRow; row <= silhouette.lastRow; row++) {
    const start = row * cells.columns
    fillRun(under, start + firstIn(silhouette, cells, row), start + lastIn(silhouette, cells, row) + 1)
  }
}

/** How far a caster's shadow moves on the plane while its source moves along the whole element, m. */
function travelOf(caster: Caster, z: number, height: number, length: number): number {
  const top = topOf(caster)
  return (length * (top - z)) / (height - top)
}

/** Marks the cells that one thing shades from one element. */
export function markShadow(
  marks: ShadeMarks,
  cells: Cells,
  emitter: Emitter,
  element: Element,
  { solids, transmittance }: Obstruction,
): void {
  const height = element.centre[2]
  const casters = solids.map((solid) => casterOf(solid, cells.z, height)).filter((each) => each !== null)
  const [only] = casters
  const [silhouette] = marks.silhouettes
  if (!only || !silhouette) return
  const sourceOf = (piece: number) =>
    add(element.centre, scale(emitter.frame.u, ((piece + 0.5) / pieces - 0.5) * element.length))
  if (casters.length > 1) {
    marks.hasMarked = true
    hideUnion(marks, transmittance, (piece) => {
      for (const caster of casters) {
        drawSilhouette(silhouette, cells, caster, sourceOf(piece))
        gatherUnder(marks, cells, silhouette)
      }
    })
    return
  }
  if (travelOf(only, cells.z, height, element.length) <= cells.cell) {
    drawSilhouette(silhouette, cells, only, element.centre)
    hideStill(marks, cells, silhouette, transmittance)
    return
  }
  marks.silhouettes.forEach((each, piece) => drawSilhouette(each, cells, only, sourceOf(piece)))
  const firstRow = Math.min(...marks.silhouettes.map((each) => each.firstRow))
  const lastRow = Math.max(...marks.silhouettes.map((each) => each.lastRow))
  if (lastRow >= firstRow) marks.hasMarked = true
  for (let row = firstRow; row <= lastRow; row++) hideRow(marks, cells, row, transmittance)
}
