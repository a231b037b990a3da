import { relativeIntensity, solidAngleOf } from '#app/domain/flux/beam.ts'
import type { Element, Emitter } from '#app/domain/flux/emitter.ts'
import type { Grid } from '#app/domain/flux/grid.ts'
import { nodeCount, nodesOf } from '#app/domain/flux/nodes.ts'
import { spanSize, type Spans } from '#app/domain/flux/spans.ts'
import { add, scale } from '#app/domain/vector.ts'

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

/** The nodes of a stretch of an element, as x, y, z and share of the element's power, flat. */
function nodesOfStretch(emitter: Emitter, element: Element, from: number, to: number, height: number): Float64Array {
  const part = to - from
  const centre = add(element.centre, scale(emitter.frame.u, ((from + to) / 2 - 0.5) * element.length))
  const stretch = { ...element, centre, length: element.length * part }
  const along = emitter.beam.kind === 'cosine' ? emitter.beam.along : 2
  const nodes = nodesOf(emitter, stretch, nodeCount(height / stretch.length, along))
  return Float64Array.from(nodes.flatMap(({ at, share }) => [...at, share * part]))
}

/**
 * Adds to each cell of the floor Σ weight(altitude) · E_n over the nodes of what it sees of one element, W/m², E_n on a
 * plane that faces the node: what a body takes up whose area against radiation depends on its altitude only. As many
 * nodes as the height asks for, to 0.1 %.
 */
export function addDirected(
  values: Float64Array,
  grid: Grid,
  emitter: Emitter,
  element: Element,
  weights: AltitudeWeights,
  { count, figures }: Spans,
): void {
  const { u, v, w } = emitter.frame
  const height = Math.abs(element.centre[2] - grid.z)
  const strength = element.radiantPower / solidAngleOf(emitter.beam)
  const intensityTowards = intensityOf(emitter)
  const last = weights.length - 1
  const stretches = new Map<string, Float64Array>()
  for (let k = 0; k < spanSize * count; k += spanSize) {
    const [row = 0, first = 0, end = 0, from = 0, to = 1, through = 1] = figures.subarray(k, k + spanSize)
    const key = `${from} ${to}`
    const nodes = stretches.get(key) ?? nodesOfStretch(emitter, element, from, to, height)
    stretches.set(key, nodes)
    const y = grid.y0 + (row + 0.5) * grid.cell
    for (let column = first, at = row * grid.columns + first; column < end; column++, at++) {
      if (grid.inside[at] !== 1) continue
      const x = grid.x0 + (column + 0.5) * grid.cell
      let sum = 0
      for (let n = 0; n < nodes.length; n += 4) {
        const dx = x - (nodes[n] ?? 0)
        const dy = y - (nodes[n + 1] ?? 0)
        const dz = grid.z - (nodes[n + 2] ?? 0)
        const alongBeam = dx * w[0] + dy * w[1] + dz * w[2]
        if (!(alongBeam > 0)) continue
        const acrossBeam = dx * v[0] + dy * v[1] + dz * v[2]
        const square = dx * dx + dy * dy + dz * dz
        const r = Math.sqrt(square)
        const intensity = intensityTowards(dx * u[0] + dy * u[1] + dz * u[2], acrossBeam, alongBeam, r)
        sum += ((nodes[n + 3] ?? 0) * intensity * read(weights, -dz / r, last)) / square
      }
      values[at] = (values[at] ?? 0) + strength * through * sum
    }
  }
}
