import { placeIn, solidAngleOf, type TableBeam } from '#app/domain/flux/beam.ts'
import type { Cells } from '#app/domain/flux/cells.ts'
import type { Element, Emitter } from '#app/domain/flux/emitter.ts'
import { entriesPerUnit, farthest, lastEntry, rowTablesOf } from '#app/domain/flux/kernel-tables.ts'
import { spanSize, type Spans } from '#app/domain/flux/spans.ts'

/** G of a row between two places; beyond the table's reach the row is as good as dark. */
function riseOf(row: Float64Array, a: number, b: number): number {
  const from = Math.min(Math.max(a, 0), lastEntry)
  const to = Math.min(Math.max(b, 0), lastEntry)
  const ai = from | 0
  const bi = to | 0
  const low = (row[2 * ai] ?? 0) + (from - ai) * (row[2 * ai + 1] ?? 0)
  return (row[2 * bi] ?? 0) + (to - bi) * (row[2 * bi + 1] ?? 0) - low
}

/**
 * Adds what the cells of each span see of one level element with a tabulated beam, as the cosine kernel does: G from the two rows beside
 * the transverse angle. Beyond 83° from the perpendicular lengthwise nothing is added.
 */
export function addTabulated(
  values: Float32Array,
  cells: Cells,
  emitter: Emitter,
  beam: TableBeam,
  element: Element,
  spans: Spans,
): void {
  const rows = rowTablesOf(beam)
  const { u, w } = emitter.frame
  const { centre, length, radiantPower } = element
  const height = centre[2] - cells.z
  const lean = w[1] * u[0] - w[0] * u[1]
  const outward = height * w[2]
  const strength = (radiantPower * height) / (solidAngleOf(beam) * length)
  const middle = farthest * entriesPerUnit
  for (let k = 0; k < spanSize * spans.count; k += spanSize) {
    const [row = 0, first = 0, end = 0, from = 0, to = 1, share = 1] = spans.figures.subarray(k, k + spanSize)
    const dy = cells.y0 + (row + 0.5) * cells.cell - centre[1]
    for (let column = first, at = row * cells.columns + first; column < end; column++, at++) {
      const dx = cells.x0 + (column + 0.5) * cells.cell - centre[0]
      const side = dy * u[0] - dx * u[1]
      const alongBeam = side * lean - outward
      if (!(alongBeam > 0)) continue
      const acrossBeam = side * w[2] + height * lean
      const square = side * side + height * height
      const place = placeIn(beam.across, Math.atan2(acrossBeam, alongBeam))
      const near = place && rows[place.index]
      const far = place && rows[place.index + 1]
      if (!near || !far) continue
      const scale = entriesPerUnit / Math.sqrt(square)
      const t = dx * u[0] + dy * u[1]
      const a = (t + (0.5 - to) * length) * scale + middle
      const b = (t + (0.5 - from) * length) * scale + middle
      const rise = riseOf(near, a, b) * (1 - place.share) + riseOf(far, a, b) * place.share
      values[at] = (values[at] ?? 0) + (strength * share * rise) / square
    }
  }
}
