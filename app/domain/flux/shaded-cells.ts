import type { Cells } from '#app/domain/flux/cells.ts'
import type { Element, Emitter } from '#app/domain/flux/emitter.ts'
import { irradianceAt } from '#app/domain/flux/irradiance.ts'
import { acrossEntries, cosineTablesOf, entriesPerUnit, farthest, lastEntry } from '#app/domain/flux/kernel-tables.ts'
import type { Obstruction } from '#app/domain/flux/shading.ts'
import { casterOf, drawSilhouette, topOf, type Caster, type Silhouette } from '#app/domain/flux/silhouette.ts'
import { add, scale, type Vec3 } from '#app/domain/vector.ts'

/**
 * Shade on a map. An element is taken as six pieces; each obstruction's silhouette from the middle of a piece marks the
 * cells that lose it, and only those are reckoned again: the hidden share of each piece, in closed form, is taken away.
 */
const pieces = 6
const up: Vec3 = [0, 0, 1]

/** Room to work in, kept between calls. All arrays are clear between elements. */
interface Marks {
  /** Hidden share of each piece, 0 … 1, a plane of cells per piece. */
  readonly hidden: Float32Array
  readonly isMarked: Uint8Array
  /** The cells under one thing that lets radiation through, so that its solids count once. */
  readonly under: Uint8Array
  readonly silhouette: Silhouette
}

function emptyMarks(cells: number, rows: number): Marks {
  return {
    hidden: new Float32Array(cells * pieces),
    isMarked: new Uint8Array(cells),
    under: new Uint8Array(cells),
    silhouette: { least: new Float64Array(rows), greatest: new Float64Array(rows) },
  }
}

let room = emptyMarks(0, 0)

function roomFor({ columns, rows }: Cells): Marks {
  if (room.isMarked.length !== columns * rows || room.silhouette.least.length < rows) {
    room = emptyMarks(columns * rows, rows)
  }
  return room
}

/** Sets a value in a plane of cells under the silhouette, row by row. */
function fillUnder(plane: Float32Array | Uint8Array, offset: number, cells: Cells, silhouette: Silhouette): void {
  for (let row = 0; row < cells.rows; row++) {
    const least = silhouette.least[row] ?? Infinity
    const greatest = silhouette.greatest[row] ?? -Infinity
    if (least > greatest) continue
    const first = Math.max(0, Math.ceil((least - cells.x0) / cells.cell - 0.5))
    const last = Math.min(cells.columns - 1, Math.floor((greatest - cells.x0) / cells.cell - 0.5))
    const start = offset + row * cells.columns
    if (last >= first) plane.fill(1, start + first, start + last + 1)
  }
}

/** Hides the cells under the silhouette from pieces from … to. */
function hideWholly(marks: Marks, cells: Cells, from: number, to: number): void {
  const count = cells.columns * cells.rows
  fillUnder(marks.isMarked, 0, cells, marks.silhouette)
  for (let piece = from; piece < to; piece++) fillUnder(marks.hidden, piece * count, cells, marks.silhouette)
}

/** Hides what a thing keeps of pieces from … to from the cells under it, and clears them for the next. */
function hidePartly({ under, hidden, isMarked }: Marks, from: number, to: number, transmittance: number): void {
  for (let at = 0; at < under.length; at++) {
    if (under[at] === 0) continue
    isMarked[at] = 1
    for (let piece = from; piece < to; piece++) {
      const k = piece * under.length + at
      hidden[k] = 1 - (1 - (hidden[k] ?? 0)) * transmittance
    }
  }
  under.fill(0)
}

/** How far a caster's shadow moves on the plane while its source moves along the whole element, m. */
function travelOf(caster: Caster, z: number, height: number, length: number): number {
  const top = topOf(caster)
  return (length * (top - z)) / (height - top)
}

/** Hides the pieces from … to, their middle at `share` of the element, behind all casters of one thing. */
function hidePieces(
  marks: Marks,
  cells: Cells,
  casters: readonly Caster[],
  source: Vec3,
  [from, to]: readonly [number, number],
  transmittance: number,
): void {
  for (const caster of casters) {
    drawSilhouette(marks.silhouette, cells, caster, source)
    if (transmittance === 0) hideWholly(marks, cells, from, to)
    else fillUnder(marks.under, 0, cells, marks.silhouette)
  }
  if (transmittance > 0) hidePartly(marks, from, to, transmittance)
}

function markShadows(marks: Marks, cells: Cells, emitter: Emitter, element: Element, obstruction: Obstruction): void {
  const height = element.centre[2]
  const casters = obstruction.solids.map((solid) => casterOf(solid, cells.z, height)).filter((each) => each !== null)
  if (casters.length === 0) return
  const travel = Math.max(...casters.map((caster) => travelOf(caster, cells.z, height, element.length)))
  if (travel <= cells.cell) {
    hidePieces(marks, cells, casters, element.centre, [0, pieces], obstruction.transmittance)
    return
  }
  for (let piece = 0; piece < pieces; piece++) {
    const place = ((piece + 0.5) / pieces - 0.5) * element.length
    const source = add(element.centre, scale(emitter.frame.u, place))
    hidePieces(marks, cells, casters, source, [piece, piece + 1], obstruction.transmittance)
  }
}

/** Irradiance of the hidden shares at a cell, W/m², in closed form piece by piece. */
function hiddenExactly(emitter: Emitter, element: Element, point: Vec3, shareOf: (piece: number) => number): number {
  const length = element.length / pieces
  let sum = 0
  for (let piece = 0; piece < pieces; piece++) {
    const share = shareOf(piece)
    if (share === 0) continue
    const centre = add(element.centre, scale(emitter.frame.u, (piece + 0.5) * length - element.length / 2))
    const part = { centre, length, radiantPower: element.radiantPower / pieces }
    sum += share * irradianceAt({ ...emitter, elements: [part] }, point, up)
  }
  return sum
}

function takeExactlyAway(values: Float32Array, marks: Marks, cells: Cells, emitter: Emitter, element: Element): void {
  const count = marks.isMarked.length
  for (let at = 0; at < count; at++) {
    if (marks.isMarked[at] === 0) continue
    const row = Math.floor(at / cells.columns)
    const x = cells.x0 + (at - row * cells.columns + 0.5) * cells.cell
    const point: Vec3 = [x, cells.y0 + (row + 0.5) * cells.cell, cells.z]
    const loss = hiddenExactly(emitter, element, point, (piece) => marks.hidden[piece * count + at] ?? 0)
    values[at] = Math.max(0, (values[at] ?? 0) - loss)
  }
}

/** The same from the kernel's tables, for level elements with a beam of cosines. */
function takeHiddenAway(values: Float32Array, marks: Marks, cells: Cells, emitter: Emitter, element: Element): void {
  const { beam, frame } = emitter
  if (beam.kind !== 'cosine') return
  const { across, along, solidAngle } = cosineTablesOf(beam)
  const { hidden, isMarked } = marks
  const count = isMarked.length
  const [ux, uy] = frame.u
  const lean = frame.w[1] * ux - frame.w[0] * uy
  const height = element.centre[2] - cells.z
  const strength = (element.radiantPower * height) / (solidAngle * element.length)
  const middle = farthest * entriesPerUnit
  const { columns, cell } = cells
  for (let at = 0; at < count; at++) {
    if (isMarked[at] === 0) continue
    const row = (at / columns) | 0
    const dx = cells.x0 + (at - row * columns + 0.5) * cell - element.centre[0]
    const dy = cells.y0 + (row + 0.5) * cell - element.centre[1]
    const side = dy * ux - dx * uy
    const inverse = 1 / Math.sqrt(side * side + height * height)
    const c = (side * lean - height * frame.w[2]) * inverse * acrossEntries
    if (!(c > 0)) continue
    const ci = Math.min(c | 0, acrossEntries)
    const f = (across[2 * ci] ?? 0) + (c - ci) * (across[2 * ci + 1] ?? 0)
    const scaled = inverse * entriesPerUnit
    // z, from the element's point to the cell, falls as the piece moves along u.
    let place = (dx * ux + dy * uy + element.length / 2) * scaled + middle
    const step = (element.length / pieces) * scaled
    let sum = 0
    let upper = readAt(along, place)
    for (let piece = 0; piece < pieces; piece++) {
      place -= step
      const lower = readAt(along, place)
      sum += (hidden[piece * count + at] ?? 0) * (upper - lower)
      upper = lower
    }
    values[at] = Math.max(0, (values[at] ?? 0) - strength * f * inverse * inverse * sum)
  }
}

function readAt(along: Float64Array, place: number): number {
  const within = Math.min(Math.max(place, 0), lastEntry)
  const i = within | 0
  return (along[2 * i] ?? 0) + (within - i) * (along[2 * i + 1] ?? 0)
}

/**
 * Takes from the cells what the obstructions keep of one element; `values` must hold that element unshaded.
 */
export function shadeElement(
  values: Float32Array,
  cells: Cells,
  emitter: Emitter,
  element: Element,
  obstructions: readonly Obstruction[],
): void {
  if (!(element.centre[2] > cells.z)) return
  const marks = roomFor(cells)
  for (const obstruction of obstructions) {
    if (obstruction.heaterId !== emitter.id && obstruction.transmittance < 1) {
      markShadows(marks, cells, emitter, element, obstruction)
    }
  }
  const isQuick = emitter.beam.kind === 'cosine' && Math.abs(emitter.frame.u[2]) < 1e-9
  if (isQuick) takeHiddenAway(values, marks, cells, emitter, element)
  else takeExactlyAway(values, marks, cells, emitter, element)
  marks.isMarked.fill(0)
  marks.hidden.fill(0)
}
