import type { Cells } from '#app/domain/flux/cells.ts'
import type { Element, Emitter } from '#app/domain/flux/emitter.ts'
import { irradianceAt } from '#app/domain/flux/irradiance.ts'
import { acrossEntries, cosineTablesOf, entriesPerUnit, farthest, lastEntry } from '#app/domain/flux/kernel-tables.ts'
import { emptyMarks, markShadow, pieces, type ShadeMarks } from '#app/domain/flux/shade-marks.ts'
import type { Obstruction } from '#app/domain/flux/shading.ts'
import { add, scale, type Vec3 } from '#app/domain/vector.ts'

/**
 * Shade on a map. Each obstruction's silhouette from an element marks the cells in its shade. Where the shadow moves
 * along the element it is taken as six pieces: cells behind the thing from all of them lose their share of the whole, those
 * at the rim the hidden pieces, in closed form.
 */
const up: Vec3 = [0, 0, 1]

let room = emptyMarks(0, 0)

function roomFor({ columns, rows }: Cells): ShadeMarks {
  const isFit = room.isMarked.length === columns * rows && (room.silhouettes[0]?.least.length ?? 0) >= rows
  if (!isFit) room = emptyMarks(columns * rows, rows)
  return room
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

function takeExactlyAway(own: Float32Array, marks: ShadeMarks, cells: Cells, emitter: Emitter, element: Element): void {
  const count = marks.isMarked.length
  for (let at = 0; at < count; at++) {
    if (marks.isMarked[at] === 0) continue
    const row = Math.floor(at / cells.columns)
    const x = cells.x0 + (at - row * cells.columns + 0.5) * cells.cell
    const point: Vec3 = [x, cells.y0 + (row + 0.5) * cells.cell, cells.z]
    const loss = hiddenExactly(emitter, element, point, (piece) => marks.hidden[piece * count + at] ?? 0)
    own[at] = Math.max(0, (own[at] ?? 0) - loss)
  }
}

/** The same from the kernel's tables, for level elements with a beam of cosines. */
function takeHiddenAway(own: Float32Array, marks: ShadeMarks, cells: Cells, emitter: Emitter, element: Element): void {
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
    const top = (dx * ux + dy * uy + element.length / 2) * scaled + middle
    const sum = hiddenRise(hidden, at, count, along, top, (element.length / pieces) * scaled)
    own[at] = Math.max(0, (own[at] ?? 0) - strength * f * inverse * inverse * sum)
  }
}

/** Rise of G over the pieces, each by its hidden share; neighbours that are hidden alike in one. */
function hiddenRise(
  hidden: Float32Array,
  at: number,
  count: number,
  along: Float64Array,
  top: number,
  step: number,
): number {
  let sum = 0
  let share = hidden[at] ?? 0
  for (let from = 0, piece = 1; piece <= pieces; piece++) {
    const next = piece < pieces ? (hidden[piece * count + at] ?? 0) : -1
    if (next === share) continue
    if (share > 0) sum += share * (readAt(along, top - from * step) - readAt(along, top - piece * step))
    share = next
    from = piece
  }
  return sum
}

function readAt(along: Float64Array, place: number): number {
  const within = Math.min(Math.max(place, 0), lastEntry)
  const i = within | 0
  return (along[2 * i] ?? 0) + (within - i) * (along[2 * i + 1] ?? 0)
}

/** Takes from the cells what the obstructions keep of one element; `own` must hold that element's irradiance alone. */
export function shadeElement(
  own: Float32Array,
  cells: Cells,
  emitter: Emitter,
  element: Element,
  obstructions: readonly Obstruction[],
): void {
  if (!(element.centre[2] > cells.z)) return
  const marks = roomFor(cells)
  for (const obstruction of obstructions) {
    if (obstruction.heaterId !== emitter.id && obstruction.transmittance < 1) {
      markShadow(marks, cells, emitter, element, obstruction)
    }
  }
  if (marks.hasMarked) {
    const isQuick = emitter.beam.kind === 'cosine' && Math.abs(emitter.frame.u[2]) < 1e-9
    if (isQuick) takeHiddenAway(own, marks, cells, emitter, element)
    else takeExactlyAway(own, marks, cells, emitter, element)
    marks.isMarked.fill(0)
    marks.hidden.fill(0)
    marks.hasMarked = false
  }
  const { even } = marks
  for (let at = 0; at < own.length; at++) {
    const share = even[at] ?? 0
    if (share > 0) own[at] = (own[at] ?? 0) * (1 - share)
  }
  even.fill(0)
}
