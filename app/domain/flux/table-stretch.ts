import { placeIn, type TableBeam } from '#app/domain/flux/beam.ts'
import { integralByNodes, type Lengthwise } from '#app/domain/flux/lengthwise.ts'

const dark: Lengthwise = { cosine: 0, sine: 0 }

/** One cell of a row, g linear from g1 to g2: closed form [g sin + g′ cos], [−g cos + g′ sin]; nodes when it is short. */
function linearCell(from: number, to: number, g1: number, g2: number): Lengthwise {
  const slope = (g2 - g1) / (to - from)
  if (to - from < 0.3) return integralByNodes(from, to, (beta) => g1 + slope * (beta - from))
  return {
    cosine: g2 * Math.sin(to) - g1 * Math.sin(from) + slope * (Math.cos(to) - Math.cos(from)),
    sine: g1 * Math.cos(from) - g2 * Math.cos(to) + slope * (Math.sin(to) - Math.sin(from)),
  }
}

/** Running sums of the integrals at the angles of one row. */
interface CumulativeRow {
  readonly values: readonly number[]
  readonly cosine: readonly number[]
  readonly sine: readonly number[]
}

function cumulativeRow(angles: readonly number[], values: readonly number[]): CumulativeRow {
  const cosine = [0]
  const sine = [0]
  for (let j = 0; j + 1 < angles.length; j++) {
    const cell = linearCell(angles[j] ?? 0, angles[j + 1] ?? 0, values[j] ?? 0, values[j + 1] ?? 0)
    cosine.push((cosine[j] ?? 0) + cell.cosine)
    sine.push((sine[j] ?? 0) + cell.sine)
  }
  return { values, cosine, sine }
}

const cumulativeRows = new WeakMap<TableBeam, CumulativeRow[]>()

function rowsOf(beam: TableBeam): CumulativeRow[] {
  const known = cumulativeRows.get(beam)
  if (known) return known
  const made = beam.intensity.map((values) => cumulativeRow(beam.along, values))
  cumulativeRows.set(beam, made)
  return made
}

/** The part of from … to that the grid of angles covers; null when there is none. */
function coveredPart(angles: readonly number[], from: number, to: number) {
  const start = Math.max(from, angles[0] ?? 0)
  const end = Math.min(to, angles.at(-1) ?? 0)
  const first = placeIn(angles, start)
  const last = placeIn(angles, end)
  return first && last && start < end ? { start, end, first, last } : null
}

function valueAt(values: readonly number[], place: { index: number; share: number }): number {
  return (values[place.index] ?? 0) * (1 - place.share) + (values[place.index + 1] ?? 0) * place.share
}

function rowStretch(angles: readonly number[], row: CumulativeRow, from: number, to: number): Lengthwise {
  const part = coveredPart(angles, from, to)
  if (!part) return dark
  const { start, end, first, last } = part
  if (first.index === last.index) return linearCell(start, end, valueAt(row.values, first), valueAt(row.values, last))
  const next = first.index + 1
  const lastAngle = angles[last.index] ?? 0
  const head = linearCell(start, angles[next] ?? 0, valueAt(row.values, first), row.values[next] ?? 0)
  const tail =
    end > lastAngle ? linearCell(lastAngle, end, row.values[last.index] ?? 0, valueAt(row.values, last)) : dark
  return {
    cosine: head.cosine + (row.cosine[last.index] ?? 0) - (row.cosine[next] ?? 0) + tail.cosine,
    sine: head.sine + (row.sine[last.index] ?? 0) - (row.sine[next] ?? 0) + tail.sine,
  }
}

/** Both integrals of a tabulated beam at the transverse angle α over β from … to, rad; exact for the bilinear table. */
export function tableStretch(beam: TableBeam, alpha: number, from: number, to: number): Lengthwise {
  const place = placeIn(beam.across, alpha)
  const near = place && rowsOf(beam)[place.index]
  const far = place && rowsOf(beam)[place.index + 1]
  if (!near || !far) return dark
  const a = rowStretch(beam.along, near, from, to)
  const b = rowStretch(beam.along, far, from, to)
  return {
    cosine: a.cosine * (1 - place.share) + b.cosine * place.share,
    sine: a.sine * (1 - place.share) + b.sine * place.share,
  }
}

/** ∫ g dβ of a tabulated beam over the same stretch: the trapezoids of a piecewise linear row. */
export function tableSphere(beam: TableBeam, alpha: number, from: number, to: number): number {
  const place = placeIn(beam.across, alpha)
  const part = coveredPart(beam.along, from, to)
  if (!place || !part) return 0
  const rows = [beam.intensity[place.index] ?? [], beam.intensity[place.index + 1] ?? []] as const
  const row = beam.along.map((_, j) => (rows[0][j] ?? 0) * (1 - place.share) + (rows[1][j] ?? 0) * place.share)
  const knots = beam.along.slice(part.first.index + 1, part.last.index + 1)
  const angles = [part.start, ...knots, part.end]
  const values = [
    valueAt(row, part.first),
    ...row.slice(part.first.index + 1, part.last.index + 1),
    valueAt(row, part.last),
  ]
  return angles.reduce((sum, angle, j) => {
    const next = angles[j + 1]
    return next === undefined ? sum : sum + ((next - angle) * ((values[j] ?? 0) + (values[j + 1] ?? 0))) / 2
  }, 0)
}
