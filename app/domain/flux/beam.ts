import { wholeCosineIntegral } from '#app/domain/flux/cosine-integral.ts'
import type { BeamData } from '#app/domain/heaters/heater-model.ts'
import { radians } from '#app/domain/vector.ts'

/**
 * Relative radiant intensity of an element. `cosine`: cos^across α · cos^along β with real exponents, α transverse and
 * β longitudinal. `table`: bilinear over transverse × longitudinal angles in rad, not necessarily symmetric; rows by α.
 */
export type Beam =
  | { readonly kind: 'cosine'; readonly across: number; readonly along: number }
  | {
      readonly kind: 'table'
      readonly across: readonly number[]
      readonly along: readonly number[]
      readonly intensity: readonly (readonly number[])[]
    }

/** A beam given as a table. */
export type TableBeam = Extract<Beam, { kind: 'table' }>

const rightAngle = Math.PI / 2

/** Exponent n with cos^n(half of the angle) = 1/2, from the full angle between half-intensity directions, degrees. */
export function exponentOfFullAngle(fullAngleDeg: number): number {
  return Math.log(0.5) / Math.log(Math.cos(radians(fullAngleDeg / 2)))
}

/** Full angle between the directions of half intensity of cos^n, degrees; 180 for n = 0. */
export function fullAngleOfExponent(exponent: number): number {
  return exponent === 0 ? 180 : (360 / Math.PI) * Math.acos(0.5 ** (1 / exponent))
}

/** Position of `angle` between two neighbouring grid angles; null outside the grid. */
export function placeIn(angles: readonly number[], angle: number): { index: number; share: number } | null {
  const last = angles.length - 1
  if (last < 1 || !(angle >= (angles[0] ?? 0) && angle <= (angles[last] ?? 0))) return null
  let low = 0
  let high = last
  while (high - low > 1) {
    const middle = (low + high) >> 1
    if ((angles[middle] ?? 0) <= angle) low = middle
    else high = middle
  }
  const from = angles[low] ?? 0
  return { index: low, share: (angle - from) / ((angles[high] ?? 0) - from) }
}

/** Intensity relative to the cosine's axis or in the table's own scale; nothing beyond ±90° or the table's edge. */
export function relativeIntensity(beam: Beam, alpha: number, beta: number): number {
  if (Math.abs(alpha) >= rightAngle || Math.abs(beta) > rightAngle) return 0
  if (beam.kind === 'cosine') return Math.cos(alpha) ** beam.across * Math.cos(beta) ** beam.along
  const row = placeIn(beam.across, alpha)
  const column = placeIn(beam.along, beta)
  if (!row || !column) return 0
  const at = (i: number, j: number) => beam.intensity[row.index + i]?.[column.index + j] ?? 0
  const near = at(0, 0) * (1 - column.share) + at(0, 1) * column.share
  const far = at(1, 0) * (1 - column.share) + at(1, 1) * column.share
  return near * (1 - row.share) + far * row.share
}

/** Weight of each hat function of the grid β under cos β: the exact integral, from ∫ (linear) cos = [g sin + g′ cos]. */
function hatWeights(angles: readonly number[]): number[] {
  const weights = angles.map(() => 0)
  for (let j = 0; j + 1 < angles.length; j++) {
    const from = angles[j] ?? 0
    const to = angles[j + 1] ?? 0
    const slope = (Math.cos(to) - Math.cos(from)) / (to - from)
    weights[j] = (weights[j] ?? 0) - Math.sin(from) - slope
    weights[j + 1] = (weights[j + 1] ?? 0) + Math.sin(to) + slope
  }
  return weights
}

function tableSolidAngle(beam: TableBeam): number {
  const along = hatWeights(beam.along)
  return beam.across.reduce((sum, alpha, i) => {
    const width = ((beam.across[i + 1] ?? alpha) - (beam.across[i - 1] ?? alpha)) / 2
    const row = (beam.intensity[i] ?? []).reduce((total, value, j) => total + value * (along[j] ?? 0), 0)
    return sum + width * row
  }, 0)
}

const solidAngles = new WeakMap<Beam, number>()

/**
 * ∫ relative intensity dΩ, sr, dΩ = cosβ dβ dα: the peak intensity is the radiant power divided by it. Cosines:
 * W(a) · W(b+1). Tables: the exact integral of the bilinear surface.
 */
export function solidAngleOf(beam: Beam): number {
  const known = solidAngles.get(beam)
  if (known !== undefined) return known
  const value =
    beam.kind === 'cosine'
      ? wholeCosineIntegral(beam.across) * wholeCosineIntegral(beam.along + 1)
      : tableSolidAngle(beam)
  solidAngles.set(beam, value)
  return value
}

/** Angles and their order in the source after mirroring: an axis that starts at 0 is symmetric about it. */
function mirrored(angles: readonly number[]): { angle: number; index: number }[] {
  const given = angles.map((angle, index) => ({ angle, index }))
  if (angles[0] !== 0) return given
  return [
    ...given
      .slice(1)
      .reverse()
      .map(({ angle, index }) => ({ angle: -angle, index })),
    ...given,
  ]
}

/** Grid angles within ±90°, with the edge itself added where the source runs beyond it. */
function withinRightAngle(anglesDeg: readonly number[]): number[] {
  const kept = anglesDeg.filter((angle) => Math.abs(angle) <= 90)
  const ends = [-90, 90].filter((end) => (anglesDeg[0] ?? 0) < end && (anglesDeg.at(-1) ?? 0) > end)
  return [...new Set([...kept, ...ends])].sort((a, b) => a - b).map(radians)
}

function tableBeamOf(data: Extract<BeamData, { kind: 'table' }>): TableBeam {
  const rows = mirrored(data.acrossDeg)
  const columns = mirrored(data.alongDeg)
  const whole: TableBeam = {
    kind: 'table',
    across: rows.map(({ angle }) => radians(angle)),
    along: columns.map(({ angle }) => radians(angle)),
    intensity: rows.map((row) => columns.map((column) => data.intensity[row.index]?.[column.index] ?? 0)),
  }
  const across = withinRightAngle(rows.map(({ angle }) => angle))
  const along = withinRightAngle(columns.map(({ angle }) => angle))
  return { kind: 'table', across, along, intensity: across.map((a) => along.map((b) => bilinear(whole, a, b))) }
}

/** Bilinear value of a table without the emission limit at ±90°. */
function bilinear(beam: TableBeam, alpha: number, beta: number): number {
  const row = placeIn(beam.across, alpha)
  const column = placeIn(beam.along, beta)
  if (!row || !column) return 0
  return [0, 1].reduce((sum, i) => {
    const values = beam.intensity[row.index + i] ?? []
    const value = (values[column.index] ?? 0) * (1 - column.share) + (values[column.index + 1] ?? 0) * column.share
    return sum + value * (i === 0 ? 1 - row.share : row.share)
  }, 0)
}

/**
 * The beam of a data sheet. Half-intensity angles become exponents of the cosine. A table keeps its angles; an axis
 * whose first angle is 0 is taken as symmetric; what lies beyond ±90° is not radiated, what the table leaves out is dark.
 */
export function beamOf(data: BeamData): Beam {
  if (data.kind === 'table') return tableBeamOf(data)
  return {
    kind: 'cosine',
    across: exponentOfFullAngle(data.acrossFullAngleDeg),
    along: exponentOfFullAngle(data.alongFullAngleDeg),
  }
}
