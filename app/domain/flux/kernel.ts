import type { Cells } from '#app/domain/flux/cells.ts'
import type { Element, Emitter } from '#app/domain/flux/emitter.ts'
import { irradianceAt } from '#app/domain/flux/irradiance.ts'
import { acrossEntries, cosineTablesOf, entriesPerUnit, farthest, lastEntry } from '#app/domain/flux/kernel-tables.ts'
import { cosineStretch } from '#app/domain/flux/lengthwise.ts'
import { addTabulated } from '#app/domain/flux/table-kernel.ts'
import type { Vec3 } from '#app/domain/vector.ts'

/**
 * Irradiance of one element over the cells of a horizontal plane. A heater's elements are level, so nothing is cut by
 * the plane and E = S H f(α) / h² · [G(q2) − G(q1)], q = z/h, S = Φ / (Ω L), H the height of the axis over the plane.
 * f and G come from tables: within 0.02 % of the peak for elements at least a tenth as long as they are high.
 */
interface Line {
  /** First cell and distance between cells in `values`, and the number of cells. */
  readonly first: number
  readonly stride: number
  readonly count: number
  /** Place along the element, from its centre, of the first cell, and the step per cell. */
  readonly start: number
  readonly step: number
}

const up: Vec3 = [0, 0, 1]
const middle = farthest * entriesPerUnit
const level = 1e-9

/** Along a line of cells parallel to the element h and α are the same for all: only G is read. */
function addLine(
  values: Float32Array,
  line: Line,
  halfLength: number,
  h: number,
  factor: number,
  along: Float64Array,
  exponent: number,
): void {
  const scale = entriesPerUnit / h
  const half = halfLength * scale
  const start = line.start * scale + middle
  const step = line.step * scale
  for (let i = 0, at = line.first; i < line.count; i++, at += line.stride) {
    const place = start + i * step
    const a = place - half
    const b = place + half
    if (a >= 0 && b < lastEntry) {
      const ai = a | 0
      const bi = b | 0
      const low = (along[2 * ai] ?? 0) + (a - ai) * (along[2 * ai + 1] ?? 0)
      const high = (along[2 * bi] ?? 0) + (b - bi) * (along[2 * bi + 1] ?? 0)
      values[at] = (values[at] ?? 0) + factor * (high - low)
    } else {
      const q = (place - middle) / entriesPerUnit
      const reach = halfLength / h
      values[at] = (values[at] ?? 0) + factor * cosineStretch(exponent, 1, q - reach, q + reach).cosine
    }
  }
}

/** An element and the cells in numbers, for the loops below. */
interface Setting {
  readonly cells: Cells
  readonly ux: number
  readonly uy: number
  /** Horizontal part of the beam axis, across the element: w · (left of u). */
  readonly lean: number
  readonly down: number
  readonly x: number
  readonly y: number
  readonly height: number
  readonly halfLength: number
  /** S·H, W/sr. */
  readonly strength: number
}

function settingOf(cells: Cells, emitter: Emitter, solidAngle: number, element: Element): Setting {
  const { frame } = emitter
  const [ux, uy] = frame.u
  const height = element.centre[2] - cells.z
  return {
    cells,
    ux,
    uy,
    lean: frame.w[1] * ux - frame.w[0] * uy,
    down: -frame.w[2],
    x: element.centre[0],
    y: element.centre[1],
    height,
    halfLength: element.length / 2,
    strength: (element.radiantPower * height) / (solidAngle * element.length),
  }
}

/** Lines parallel to the element: rows of cells when it lies along x, columns when along y. */
function addAligned(values: Float32Array, s: Setting, across: Float64Array, along: Float64Array, b: number): void {
  const { cells } = s
  const rows = Math.abs(s.uy) < level
  const lines = rows ? cells.rows : cells.columns
  const count = rows ? cells.columns : cells.rows
  const [lineOrigin, lineCentre] = rows ? [cells.y0, s.y] : [cells.x0, s.x]
  const [origin, centre] = rows ? [cells.x0, s.x] : [cells.y0, s.y]
  const forward = rows ? s.ux : s.uy
  for (let line = 0; line < lines; line++) {
    const off = lineOrigin + (line + 0.5) * cells.cell - lineCentre
    const side = rows ? off * s.ux : -off * s.uy
    const h = Math.sqrt(side * side + s.height * s.height)
    const c = ((side * s.lean + s.height * s.down) / h) * acrossEntries
    if (!(c > 0)) continue
    const ci = Math.min(c | 0, acrossEntries)
    const f = (across[2 * ci] ?? 0) + (c - ci) * (across[2 * ci + 1] ?? 0)
    const stride = rows ? 1 : cells.columns
    const first = rows ? line * cells.columns : line
    const start = (origin + 0.5 * cells.cell - centre) * forward
    const run = { first, stride, count, start, step: cells.cell * forward }
    addLine(values, run, s.halfLength, h, (s.strength * f) / (h * h), along, b)
  }
}

/** Any turn: h, α and q anew for each cell. */
function addTurned(values: Float32Array, s: Setting, across: Float64Array, along: Float64Array, b: number): void {
  const { cells, ux, uy, strength, halfLength } = s
  const square = s.height * s.height
  const half = halfLength * entriesPerUnit
  const lean = s.lean * acrossEntries
  const below = s.height * s.down * acrossEntries
  for (let row = 0; row < cells.rows; row++) {
    const dy = cells.y0 + (row + 0.5) * cells.cell - s.y
    let at = row * cells.columns
    for (let i = 0; i < cells.columns; i++, at++) {
      const dx = cells.x0 + (i + 0.5) * cells.cell - s.x
      const side = dy * ux - dx * uy
      const inverse = 1 / Math.sqrt(side * side + square)
      const c = (side * lean + below) * inverse
      if (!(c > 0)) continue
      const place = (dx * ux + dy * uy) * entriesPerUnit
      const a = (place - half) * inverse + middle
      const e = (place + half) * inverse + middle
      const ci = c | 0
      const f = (across[2 * ci] ?? 0) + (c - ci) * (across[2 * ci + 1] ?? 0)
      const factor = strength * f * inverse * inverse
      if (a >= 0 && e < lastEntry) {
        const ai = a | 0
        const ei = e | 0
        const low = (along[2 * ai] ?? 0) + (a - ai) * (along[2 * ai + 1] ?? 0)
        const high = (along[2 * ei] ?? 0) + (e - ei) * (along[2 * ei + 1] ?? 0)
        values[at] = (values[at] ?? 0) + factor * (high - low)
      } else {
        const stretch = cosineStretch(b, 1, (a - middle) / entriesPerUnit, (e - middle) / entriesPerUnit)
        values[at] = (values[at] ?? 0) + factor * stretch.cosine
      }
    }
  }
}

/** Cell by cell in closed form: elements out of level or very short for their height. */
function addExactly(values: Float32Array, cells: Cells, emitter: Emitter, element: Element): void {
  const alone = { ...emitter, elements: [element] }
  for (let row = 0, at = 0; row < cells.rows; row++) {
    const y = cells.y0 + (row + 0.5) * cells.cell
    for (let column = 0; column < cells.columns; column++, at++) {
      const x = cells.x0 + (column + 0.5) * cells.cell
      values[at] = (values[at] ?? 0) + irradianceAt(alone, [x, y, cells.z], up)
    }
  }
}

/** Adds to each cell the irradiance, W/m², of its horizontal plane (facing up) from one element. */
export function addElement(values: Float32Array, cells: Cells, emitter: Emitter, element: Element): void {
  const height = element.centre[2] - cells.z
  if (!(height > 0)) return
  const { beam, frame } = emitter
  if (Math.abs(frame.u[2]) > level || element.length < height / 10) {
    addExactly(values, cells, emitter, element)
  } else if (beam.kind === 'table') {
    addTabulated(values, cells, emitter, beam, element)
  } else {
    const { across, along, solidAngle } = cosineTablesOf(beam)
    const setting = settingOf(cells, emitter, solidAngle, element)
    const aligned = Math.abs(setting.ux) < level || Math.abs(setting.uy) < level
    const add = aligned ? addAligned : addTurned
    add(values, setting, across, along, beam.along)
  }
}
