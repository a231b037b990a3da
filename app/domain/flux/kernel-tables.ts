import { solidAngleOf, type Beam, type TableBeam } from '#app/domain/flux/beam.ts'
import { cosineStretch } from '#app/domain/flux/lengthwise.ts'
import { tableStretch } from '#app/domain/flux/table-stretch.ts'

/**
 * Look-up tables of a beam for maps, read by straight lines: each entry is a value followed by the rise to the next.
 * Lengthwise: G(q) = ∫ g cosβ dβ up to atan q, for −`farthest` … `farthest`; across: f over the cosine of the
 * transverse angle, 0 … 1.
 */
export const entriesPerUnit = 128
export const farthest = 8
export const lastEntry = 2 * farthest * entriesPerUnit
export const acrossEntries = 2048

/** Values at 0 … count as pairs of value and rise. */
function pairsOf(count: number, valueAt: (i: number) => number): Float64Array {
  const pairs = new Float64Array(2 * count + 2)
  for (let i = 0, value = valueAt(0); i <= count; i++) {
    const next = i < count ? valueAt(i + 1) : value
    pairs[2 * i] = value
    pairs[2 * i + 1] = next - value
    value = next
  }
  return pairs
}

/** Tables of a separable beam. */
export interface CosineTables {
  readonly across: Float64Array
  readonly along: Float64Array
  readonly solidAngle: number
}

/** A beam of cosines. */
type CosineBeam = Extract<Beam, { kind: 'cosine' }>

function makeCosineTables(beam: CosineBeam, perUnit: number, acrossCount: number): CosineTables {
  return {
    across: pairsOf(acrossCount, (i) => (i / acrossCount) ** beam.across),
    along: pairsOf(2 * farthest * perUnit, (i) => {
      const q = i / perUnit - farthest
      return q === 0 ? 0 : Math.sign(q) * cosineStretch(beam.along, 1, 0, Math.abs(q)).cosine
    }),
    solidAngle: solidAngleOf(beam),
  }
}

const cosineTables = new WeakMap<Beam, CosineTables>()

/** The tables of cos^a α · cos^b β, made once per beam. */
export function cosineTablesOf(beam: CosineBeam): CosineTables {
  const known = cosineTables.get(beam)
  if (known) return known
  const made = makeCosineTables(beam, entriesPerUnit, acrossEntries)
  cosineTables.set(beam, made)
  return made
}

/** Entries of the finer tables for single points, where 1e-4 of the value is asked for. */
export const fineEntriesPerUnit = 256
export const fineAcrossEntries = 1024

const fineTables = new WeakMap<Beam, CosineTables>()

/** The same, finer. */
export function fineTablesOf(beam: CosineBeam): CosineTables {
  const known = fineTables.get(beam)
  if (known) return known
  const made = makeCosineTables(beam, fineEntriesPerUnit, fineAcrossEntries)
  fineTables.set(beam, made)
  return made
}

const rowTables = new WeakMap<TableBeam, readonly Float64Array[]>()

/** G for every transverse row of a tabulated beam, made once per beam. */
export function rowTablesOf(beam: TableBeam): readonly Float64Array[] {
  const known = rowTables.get(beam)
  if (known) return known
  const from = Math.atan(-farthest)
  const made = beam.across.map((alpha) =>
    pairsOf(lastEntry, (i) => tableStretch(beam, alpha, from, Math.atan(i / entriesPerUnit - farthest)).cosine),
  )
  rowTables.set(beam, made)
  return made
}
