import type { Cells } from '#app/domain/flux/cells.ts'
import type { Element, Emitter } from '#app/domain/flux/emitter.ts'
import { irradianceAt } from '#app/domain/flux/irradiance.ts'
import { acrossEntries, cosineTablesOf, entriesPerUnit, farthest, lastEntry } from '#app/domain/flux/kernel-tables.ts'
import type { CosineTables } from '#app/domain/flux/kernel-tables.ts'
import { cosineStretch } from '#app/domain/flux/lengthwise.ts'
import { spanSize, type Spans } from '#app/domain/flux/spans.ts'
import { addTabulated } from '#app/domain/flux/table-kernel.ts'
import { add, scale, type Vec3 } from '#app/domain/vector.ts'

/**
 * Irradiance of one element over the cells of a horizontal plane. A heater's elements are level, so nothing is cut by
 * the plane and E = S H f(α) / h² · [G(q2) − G(q1)], q = z/h, S = Φ / (Ω L), H the height of the axis over the plane.
 * f and G come from tables: within 0.02 % of the peak for elements at least a tenth as long as they are high. The loops
 * read them in place, and their constants from variables of their own: through a function they take half as long again.
 */
type Setting = Float64Array

const up: Vec3 = [0, 0, 1]
const middle = farthest * entriesPerUnit
const level = 1e-9

/**
 * An element and the cells in numbers, in the order in which the loops below take them apart. `lean` and `down`: the beam
 * axis' part across the element, w · (left of u), and downwards; `strength`: S·H, W/sr. The loops are handed typed arrays
 * alone: objects whose numbers are now whole, now not, make the compiler give up what it has made of a loop.
 */
function settingOf(cells: Cells, emitter: Emitter, solidAngle: number, element: Element): Setting {
  const { x0, y0, cell, columns, rows } = cells
  const [[ux, uy], [wx, wy, wz]] = [emitter.frame.u, emitter.frame.w]
  const [x, y, z] = element.centre
  const height = z - cells.z
  const [lean, down] = [wy * ux - wx * uy, -wz]
  const strength = (element.radiantPower * height) / (solidAngle * element.length)
  return Float64Array.of(x0, y0, cell, columns, rows, ux, uy, lean, down, x, y, height, element.length, strength)
}

/** G(b) − G(a) in closed form; a and b in entries of the table. */
function riseBeyond(exponent: number, a: number, b: number): number {
  return cosineStretch(exponent, 1, (a - middle) / entriesPerUnit, (b - middle) / entriesPerUnit).cosine
}

/** Lines of cells parallel to an element: h and S H f / h² are the same for all cells of one. */
interface Lines {
  readonly inverse: Float64Array
  readonly factor: Float64Array
}

/** So many lines, the first `left` of the element, the next each by `step` more. */
function linesOf(s: Setting, across: Float64Array, count: number, left: number, step: number): Lines {
  const [lean = 0, down = 0, , , height = 0, , strength = 0] = s.subarray(7)
  const inverse = new Float64Array(count)
  const factor = new Float64Array(count)
  for (let line = 0; line < count; line++) {
    const side = left + line * step
    const h = Math.sqrt(side * side + height * height)
    const c = ((side * lean + height * down) / h) * acrossEntries
    if (!(c > 0)) continue
    const ci = Math.min(c | 0, acrossEntries)
    const f = (across[2 * ci] ?? 0) + (c - ci) * (across[2 * ci + 1] ?? 0)
    inverse[line] = 1 / h
    factor[line] = (strength * f) / (h * h)
  }
  return { inverse, factor }
}

/** Rows parallel to the element: along a span only G is read. */
function addAlong(values: Float32Array, s: Setting, spans: Spans, tables: CosineTables, exponent: number): void {
  const [x0 = 0, y0 = 0, cell = 0, columns = 0, rows = 0, ux = 0, , , , x = 0, y = 0, , length = 0] = s
  const { along } = tables
  const { figures } = spans
  const { inverse, factor } = linesOf(s, tables.across, rows, (y0 + 0.5 * cell - y) * ux, cell * ux)
  const start = (x0 + 0.5 * cell - x) * ux
  for (let k = 0; k < spanSize * spans.count; k += spanSize) {
    const row = (figures[k] ?? 0) | 0
    const scale = (inverse[row] ?? 0) * entriesPerUnit
    const step = cell * ux * scale
    const low = (start + (0.5 - (figures[k + 4] ?? 0)) * length) * scale + middle
    const high = (start + (0.5 - (figures[k + 3] ?? 0)) * length) * scale + middle
    const kept = (factor[row] ?? 0) * (figures[k + 5] ?? 0)
    if (kept === 0) continue
    const end = (figures[k + 2] ?? 0) | 0
    for (let i = (figures[k + 1] ?? 0) | 0, at = (row * columns + i) | 0; i < end; i++, at++) {
      const a = low + i * step
      const b = high + i * step
      if (a >= 0 && b < lastEntry) {
        const ai = a | 0
        const bi = b | 0
        const lower = (along[2 * ai] ?? 0) + (a - ai) * (along[2 * ai + 1] ?? 0)
        const upper = (along[2 * bi] ?? 0) + (b - bi) * (along[2 * bi + 1] ?? 0)
        values[at] = (values[at] ?? 0) + kept * (upper - lower)
      } else {
        values[at] = (values[at] ?? 0) + kept * riseBeyond(exponent, a, b)
      }
    }
  }
}

/** Columns parallel to the element: along a span h and α change, and not the place along the element. */
function addAcross(values: Float32Array, s: Setting, spans: Spans, tables: CosineTables, exponent: number): void {
  const [x0 = 0, y0 = 0, cell = 0, columns = 0, , , uy = 0, , , x = 0, y = 0, , length = 0] = s
  const { along } = tables
  const { figures } = spans
  const { inverse, factor } = linesOf(s, tables.across, columns, (x - x0 - 0.5 * cell) * uy, -cell * uy)
  for (let k = 0; k < spanSize * spans.count; k += spanSize) {
    const row = (figures[k] ?? 0) | 0
    const place = (y0 + (row + 0.5) * cell - y) * uy
    const low = (place + (0.5 - (figures[k + 4] ?? 0)) * length) * entriesPerUnit
    const high = (place + (0.5 - (figures[k + 3] ?? 0)) * length) * entriesPerUnit
    const share = figures[k + 5] ?? 0
    const end = (figures[k + 2] ?? 0) | 0
    for (let i = (figures[k + 1] ?? 0) | 0, at = (row * columns + i) | 0; i < end; i++, at++) {
      const scale = inverse[i] ?? 0
      const a = low * scale + middle
      const b = high * scale + middle
      const kept = (factor[i] ?? 0) * share
      if (a >= 0 && b < lastEntry) {
        const ai = a | 0
        const bi = b | 0
        const lower = (along[2 * ai] ?? 0) + (a - ai) * (along[2 * ai + 1] ?? 0)
        const upper = (along[2 * bi] ?? 0) + (b - bi) * (along[2 * bi + 1] ?? 0)
        values[at] = (values[at] ?? 0) + kept * (upper - lower)
      } else {
        values[at] = (values[at] ?? 0) + kept * riseBeyond(exponent, a, b)
      }
    }
  }
}

/** Any turn: h, α and q anew for each cell. */
function addTurned(values: Float32Array, s: Setting, spans: Spans, tables: CosineTables, exponent: number): void {
  const [x0 = 0, y0 = 0, cell = 0, columns = 0, , ux = 0, uy = 0] = s
  const [leaning = 0, down = 0, x = 0, y = 0, height = 0, length = 0, strength = 0] = s.subarray(7)
  const { across, along } = tables
  const { figures } = spans
  const square = height * height
  const start = x0 + 0.5 * cell - x
  const lean = leaning * acrossEntries
  const below = height * down * acrossEntries
  for (let k = 0; k < spanSize * spans.count; k += spanSize) {
    const row = (figures[k] ?? 0) | 0
    const low = (0.5 - (figures[k + 4] ?? 0)) * length * entriesPerUnit
    const high = (0.5 - (figures[k + 3] ?? 0)) * length * entriesPerUnit
    const kept = strength * (figures[k + 5] ?? 0)
    const end = (figures[k + 2] ?? 0) | 0
    const dy = y0 + (row + 0.5) * cell - y
    for (let i = (figures[k + 1] ?? 0) | 0, at = (row * columns + i) | 0; i < end; i++, at++) {
      const dx = start + i * cell
      const side = dy * ux - dx * uy
      const inverse = 1 / Math.sqrt(side * side + square)
      const c = (side * lean + below) * inverse
      if (!(c > 0)) continue
      const place = (dx * ux + dy * uy) * entriesPerUnit
      const a = (place + low) * inverse + middle
      const b = (place + high) * inverse + middle
      const ci = c | 0
      const f = (across[2 * ci] ?? 0) + (c - ci) * (across[2 * ci + 1] ?? 0)
      const factor = kept * f * inverse * inverse
      if (a >= 0 && b < lastEntry) {
        const ai = a | 0
        const bi = b | 0
        const lower = (along[2 * ai] ?? 0) + (a - ai) * (along[2 * ai + 1] ?? 0)
        const upper = (along[2 * bi] ?? 0) + (b - bi) * (along[2 * bi + 1] ?? 0)
        values[at] = (values[at] ?? 0) + factor * (upper - lower)
      } else {
        values[at] = (values[at] ?? 0) + factor * riseBeyond(exponent, a, b)
      }
    }
  }
}

/** Cell by cell in closed form: elements out of level or very short for their height. */
function addExactly(values: Float32Array, cells: Cells, emitter: Emitter, element: Element, spans: Spans): void {
  const { figures } = spans
  for (let k = 0; k < spanSize * spans.count; k += spanSize) {
    const [row = 0, first = 0, end = 0, from = 0, to = 1, share = 1] = figures.subarray(k, k + spanSize)
    const part = to - from
    const centre = add(element.centre, scale(emitter.frame.u, ((from + to) / 2 - 0.5) * element.length))
    const stretch = { centre, length: element.length * part, radiantPower: element.radiantPower * part * share }
    const alone = { ...emitter, elements: [stretch] }
    const y = cells.y0 + (row + 0.5) * cells.cell
    for (let column = first, at = row * cells.columns + first; column < end; column++, at++) {
      const x = cells.x0 + (column + 0.5) * cells.cell
      values[at] = (values[at] ?? 0) + irradianceAt(alone, [x, y, cells.z], up)
    }
  }
}

/** Adds to the cells of each span the irradiance, W/m², of their horizontal plane (facing up) from what they see of an element. */
export function addElement(values: Float32Array, cells: Cells, emitter: Emitter, element: Element, spans: Spans): void {
  const height = element.centre[2] - cells.z
  if (!(height > 0)) return
  const { beam, frame } = emitter
  if (Math.abs(frame.u[2]) > level || element.length < height / 10) {
    addExactly(values, cells, emitter, element, spans)
  } else if (beam.kind === 'table') {
    addTabulated(values, cells, emitter, beam, element, spans)
  } else {
    const tables = cosineTablesOf(beam)
    const setting = settingOf(cells, emitter, tables.solidAngle, element)
    const [ux, uy] = frame.u
    const fill = Math.abs(uy) < level ? addAlong : Math.abs(ux) < level ? addAcross : addTurned
    fill(values, setting, spans, tables, beam.along)
  }
}
