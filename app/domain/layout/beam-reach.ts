import type { BeamData, HeaterModel } from '#app/domain/heaters/heater-model.ts'
import { elementCentres, type Body } from '#app/domain/layout/body.ts'
import { distanceFromBody, gapToBody, nearestOfBody } from '#app/domain/layout/clear-space.ts'
import { leastAlong, type Convex } from '#app/domain/site/convex.ts'
import { add, dot, radians, scale, subtract, type Vec3 } from '#app/domain/vector.ts'

/** The half-intensity angles of a beam, rad: from and to, across (α) and along (β). */
export interface HalfAngles {
  readonly across: readonly [from: number, to: number]
  readonly along: readonly [from: number, to: number]
}

const halves = new WeakMap<BeamData, HalfAngles>()

/** Directions of half the peak intensity: half the full angles, or read from the table through its peak. */
export function halfAnglesOf(beam: BeamData): HalfAngles {
  const known = halves.get(beam)
  if (known) return known
  const found = beam.kind === 'angles' ? fromFullAngles(beam) : fromTable(beam)
  halves.set(beam, found)
  return found
}

function fromFullAngles(beam: { acrossFullAngleDeg: number; alongFullAngleDeg: number }): HalfAngles {
  const across = radians(beam.acrossFullAngleDeg / 2)
  const along = radians(beam.alongFullAngleDeg / 2)
  return { across: [-across, across], along: [-along, along] }
}

function fromTable({ acrossDeg, alongDeg, intensity }: Extract<BeamData, { kind: 'table' }>): HalfAngles {
  const peak = Math.max(...intensity.flat())
  const row = intensity.findIndex((values) => values.includes(peak))
  const column = intensity[row]?.indexOf(peak) ?? 0
  const acrossProfile = intensity.map((values) => values[column] ?? 0)
  return {
    across: halfWidth(acrossDeg, acrossProfile, row, peak / 2),
    along: halfWidth(alongDeg, intensity[row] ?? [], column, peak / 2),
  }
}

/** The outermost angles at which a profile passes through half its peak, straight between its entries, rad. */
function halfWidth(
  anglesDeg: readonly number[],
  profile: readonly number[],
  at: number,
  half: number,
): [number, number] {
  const outward = (step: 1 | -1): number => {
    let edge = at
    for (let i = at; i >= 0 && i < profile.length; i += step) if ((profile[i] ?? 0) >= half) edge = i
    const inside = profile[edge] ?? 0
    const outside = profile[edge + step]
    const share = outside === undefined || inside === outside ? 0 : (inside - half) / (inside - outside)
    const from = anglesDeg[edge] ?? 0
    return radians(from + share * ((anglesDeg[edge + step] ?? from) - from))
  }
  const ends = [outward(-1), outward(1)].sort((a, b) => a - b)
  return [ends[0] ?? 0, ends[1] ?? 0]
}

/** One element inside its body: its axis' centre and half length. */
interface Source {
  readonly centre: Vec3
  readonly halfLength: number
  readonly body: Body
  readonly angles: HalfAngles
}

/**
 * True when a point lies within the half-intensity angles, taken from the nearest point of the element: α across it,
 * β beyond its end.
 */
function isInBeam({ centre, halfLength, body, angles }: Source, point: Vec3): boolean {
  const d = subtract(point, centre)
  const down = dot(d, body.w)
  if (down <= 0) return false
  const across = Math.atan2(dot(d, body.v), down)
  if (across < angles.across[0] - nearly || across > angles.across[1] + nearly) return false
  const along = dot(d, body.u)
  const beyond = along - Math.max(-halfLength, Math.min(halfLength, along))
  const angle = Math.atan2(beyond, Math.hypot(down, dot(d, body.v)))
  return angle >= angles.along[0] - nearly && angle <= angles.along[1] + nearly
}

/** Angles within this of the edge of the beam count as inside it, rad. */
const nearly = 1e-9

/** The least distance from the body to what lies in its beam, with the pair of points that has it, m. */
export interface InBeam {
  readonly distance: number
  readonly from: Vec3
  readonly to: Vec3
}

/**
 * Least distance from a body to the part of a convex obstacle that lies within the half-intensity angles of any of its
 * elements; null when no part does. The nearest point of the whole obstacle decides when it is in the beam; else the
 * nearest part lies on the edge of the beam, where rays from the element first meet the obstacle. Found to about 2 mm.
 */
export function nearestInBeam(body: Body, model: HeaterModel, obstacle: Convex): InBeam | null {
  if (!model.beam) return null
  const angles = halfAnglesOf(model.beam)
  const gap = gapToBody(body, obstacle)
  let best: InBeam | null = null
  for (const centre of elementCentres(body, model)) {
    const source = { centre, halfLength: model.elementLength / 2, body, angles }
    if (isInBeam(source, gap.to)) return { distance: gap.distance, from: gap.from, to: gap.to }
    const point = nearestOnEdge(source, obstacle)
    if (!point) continue
    const distance = distanceFromBody(body, point)
    if (!best || distance < best.distance) best = { distance, from: nearestOfBody(body, point), to: point }
  }
  return best
}

/** Rays in one round of the edge of the beam: a first round, and a finer one when thin things slip through the first. */
const rounds = [96, 960] as const

/** Halvings of the step when the best ray is refined. */
const refinements = 9

/** The first point of the obstacle, nearest to the body, on the rays that make the edge of the beam. */
function nearestOnEdge(source: Source, obstacle: Convex): Vec3 | null {
  if (isBeside(source, obstacle)) return null
  let best = { turn: 0, distance: Infinity, point: source.centre }
  const attempt = (turn: number) => {
    const { from, direction } = edgeRay(source, turn)
    const along = obstacle.firstOnRay(from, direction)
    if (along === null) return
    const point = add(from, scale(direction, along))
    const distance = distanceFromBody(source.body, point)
    if (distance < best.distance) best = { turn, distance, point }
  }
  for (const rays of rounds) {
    for (let i = 0; i < rays; i++) attempt(i / rays)
    if (best.distance === Infinity) continue
    for (let step = 0.5 / rays, i = 0; i < refinements; i++, step /= 2) {
      const { turn } = best
      attempt(turn - step)
      attempt(turn + step)
    }
    return best.point
  }
  return null
}

/** The whole obstacle lies behind the element or beyond one of the planes that hold its beam. */
function isBeside({ centre, halfLength, body: { u, v, w }, angles }: Source, obstacle: Convex): boolean {
  const beyond = (normal: Vec3, reach: number) => leastAlong(obstacle, normal) - dot(normal, centre) > reach
  const side = (across: number, sign: 1 | -1): Vec3 =>
    scale(add(scale(v, Math.cos(across)), scale(w, -Math.sin(across))), sign)
  if (beyond(scale(w, -1), 0)) return true
  if (beyond(side(angles.across[1], 1), 0) || beyond(side(angles.across[0], -1), 0)) return true
  const widest = Math.max(Math.abs(angles.across[0]), Math.abs(angles.across[1]))
  const end = (along: number, sign: 1 | -1): Vec3 => add(scale(u, sign), scale(w, -Math.tan(along) / Math.cos(widest)))
  return beyond(end(angles.along[1], 1), halfLength) || beyond(end(-angles.along[0], -1), halfLength)
}

interface Ray {
  readonly from: Vec3
  readonly direction: Vec3
}

/** Ray on the edge of the beam; `turn` from 0 to 1 goes round: one side, one end, the other side, the other end. */
function edgeRay({ centre, halfLength, body, angles }: Source, turn: number): Ray {
  const round = (((turn % 1) + 1) % 1) * 4
  const quarter = Math.floor(round)
  const t = round - quarter
  const mix = (a: number, b: number, k: number) => a + (b - a) * k
  if (quarter === 1 || quarter === 3) {
    const end = quarter === 1 ? 1 : -1
    const across = mix(angles.across[quarter === 1 ? 1 : 0], angles.across[quarter === 1 ? 0 : 1], t)
    return rayAt(centre, body, across, angles.along[end === 1 ? 1 : 0], end * halfLength)
  }
  const across = angles.across[quarter === 0 ? 1 : 0]
  const s = quarter === 0 ? mix(-1, 1, t) : mix(1, -1, t)
  const fan = 1 / 3
  const place = Math.max(-1, Math.min(1, s / fan))
  const out = Math.max(0, (Math.abs(s) - fan) / (1 - fan))
  const along = s > 0 ? angles.along[1] * out : angles.along[0] * out
  return rayAt(centre, body, across, along, place * halfLength)
}

function rayAt(centre: Vec3, { u, v, w }: Body, across: number, along: number, at: number): Ray {
  const square = add(scale(w, Math.cos(across)), scale(v, Math.sin(across)))
  return {
    from: add(centre, scale(u, at)),
    direction: add(scale(square, Math.cos(along)), scale(u, Math.sin(along))),
  }
}
