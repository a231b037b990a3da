import { relativeIntensity, solidAngleOf } from '#app/domain/flux/beam.ts'
import type { Element, Emitter } from '#app/domain/flux/emitter.ts'
import type { Grid } from '#app/domain/flux/grid.ts'
import { nodeCount, nodesOf } from '#app/domain/flux/nodes.ts'
import { clearStretches, type Obstruction } from '#app/domain/flux/shading.ts'
import { dot, subtract, type Vec3 } from '#app/domain/vector.ts'

/** Weight of radiation by the sine of its altitude above the horizontal, at 0 … 1 in equal steps; below: the first. */
export type AltitudeWeights = Float64Array

/** Entries of a beam's powers by the cosine of an angle, 0 … 1, read by straight lines. */
const entries = 2048

const powers = new Map<number, Float64Array>()

function powersOf(exponent: number): Float64Array {
  const known = powers.get(exponent)
  if (known) return known
  const made = Float64Array.from({ length: entries + 2 }, (_, i) => Math.min(1, i / entries) ** exponent)
  if (powers.size > 200) powers.clear()
  powers.set(exponent, made)
  return made
}

function read(table: Float64Array, share: number, count: number): number {
  const place = Math.min(Math.max(share, 0), 1) * count
  const i = place | 0
  const low = table[i] ?? 0
  return low + (place - i) * ((table[i + 1] ?? low) - low)
}

/** Relative intensity in the direction (along u, v, w) of length r, from tables where the beam is of cosines. */
function intensityOf({ beam }: Emitter): (u: number, v: number, w: number, r: number) => number {
  if (beam.kind === 'table') return (u, v, w, r) => relativeIntensity(beam, Math.atan2(v, w), Math.asin(u / r))
  const across = powersOf(beam.across)
  const along = powersOf(beam.along)
  return (_, v, w, r) => {
    const h = Math.sqrt(v * v + w * w)
    return read(across, w / h, entries) * read(along, h / r, entries)
  }
}

/** Share of an element that reaches a point past the obstructions near a node, 1 where nothing is in the way. */
function shareAt(stretches: readonly { from: number; to: number; transmittance: number }[], place: number): number {
  return stretches.find(({ from, to }) => from <= place && place <= to)?.transmittance ?? 1
}

/**
 * Adds to each cell of the floor Σ weight(altitude) · E_n over the nodes of one element, W/m², E_n on a plane that faces
 * the node: what a body takes up whose area against radiation depends on its altitude only. As many nodes as the
 * height asks for, to 0.1 %; with obstructions each node counts by what is let through towards it.
 */
export function addDirected(
  values: Float64Array,
  grid: Grid,
  emitter: Emitter,
  element: Element,
  weights: AltitudeWeights,
  obstructions: readonly Obstruction[],
): void {
  const { u, v, w } = emitter.frame
  const height = Math.abs(element.centre[2] - grid.z)
  const along = emitter.beam.kind === 'cosine' ? emitter.beam.along : 2
  const nodes = nodesOf(emitter, element, nodeCount(height / element.length, along))
  const strength = element.radiantPower / solidAngleOf(emitter.beam)
  const intensityTowards = intensityOf(emitter)
  const last = weights.length - 1
  for (let at = 0; at < grid.inside.length; at++) {
    if (grid.inside[at] !== 1) continue
    const row = Math.floor(at / grid.columns)
    const x = grid.x0 + (at - row * grid.columns + 0.5) * grid.cell
    const y = grid.y0 + (row + 0.5) * grid.cell
    const point: Vec3 = [x, y, grid.z]
    const stretches = obstructions.length > 0 ? clearStretches(obstructions, emitter, element, point) : []
    let sum = 0
    for (const node of nodes) {
      const dx = x - node.at[0]
      const dy = y - node.at[1]
      const dz = grid.z - node.at[2]
      const alongBeam = dx * w[0] + dy * w[1] + dz * w[2]
      if (!(alongBeam > 0)) continue
      const acrossBeam = dx * v[0] + dy * v[1] + dz * v[2]
      const square = dx * dx + dy * dy + dz * dz
      const r = Math.sqrt(square)
      const through = stretches.length > 0 ? shareAt(stretches, dot(subtract(node.at, element.centre), u)) : 1
      const intensity = intensityTowards(dx * u[0] + dy * u[1] + dz * u[2], acrossBeam, alongBeam, r)
      sum += (node.share * through * intensity * read(weights, -dz / r, last)) / square
    }
    values[at] = (values[at] ?? 0) + strength * sum
  }
}
