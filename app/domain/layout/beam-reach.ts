import { beamOf, fullAngleOfExponent, type Beam, type TableBeam } from '#app/domain/flux/beam.ts'
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

/**
 * Directions of half the peak intensity: half the full angles, or read from the table through its peak, as it is radiated:
 * within ±90°, to both sides where the table gives one.
 */
export function halfAnglesOf(beam: BeamData): HalfAngles {
  const known = halves.get(beam)
  if (known) return known
  const radiated = beamOf(beam)
  const found = radiated.kind === 'table' ? fromTable(radiated) : fromExponents(radiated)
  halves.set(beam, found)
  return found
}

const bothSides = (exponent: number): [number, number] => {
  const half = radians(fullAngleOfExponent(exponent) / 2)
  return [-half, half]
}

const fromExponents = ({ across, along }: Extract<Beam, { kind: 'cosine' }>): HalfAngles => ({
  across: bothSides(across),
  along: bothSides(along),
})

function fromTable({ across, along, intensity }: TableBeam): HalfAngles {
  const peak = Math.max(...intensity.map((values) => Math.max(...values)))
  const row = intensity.findIndex((values) => values.includes(peak))
  const column = intensity[row]?.indexOf(peak) ?? 0
  const acrossProfile = intensity.map((values) => values[column] ?? 0)
  return {
    across: halfWidth(across, acrossProfile, row, peak / 2),
    along: halfWidth(along, intensity[row] ?? [], column, peak / 2),
  }
}

/** The outermost angles at which a profile passes through half its peak, straight between its entries, rad. */
function halfWidth(angles: readonly number[], profile: readonly number[], at: number, half: number): [number, number] {
  const outward = (step: 1 | -1): number => {
    let edge = at
    for (let i = at; i >= 0 && i < profile.length; i += step) if ((profile[i] ?? 0) >= half) edge = i
    const inside = profile[edge] ?? 0
    const outside = profile[edge + step]
    const share = outside === undefined || inside === outside ? 0 : (inside - half) / (inside - outside)
    const from = angles[edge] ?? 0
    return from + share * ((angles[edge + step] ?? from) - from)
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
  /** Rays round the edge of its beam, at equal steps of the turn. */
  readonly round: readonly Ray[]
}

const sourcesOfBody = new WeakMap<Body, readonly Source[]>()

/** The elements of a body; kept for as long as the body is. */
function sourcesOf(body: Body, model: HeaterModel, angles: HalfAngles): readonly Source[] {
  const known = sourcesOfBody.get(body)
  if (known) return known
  const sources = elementCentres(body, model).map((centre): Source => {
    const bare = { centre, halfLength: model.elementLength / 2, body, angles }
    return { ...bare, round: Array.from({ length: rays }, (_, i) => edgeRay(bare, i / rays)) }
  })
  sourcesOfBody.set(body, sources)
  return sources
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
  const angle = Math.atan2(beyond, Math.sqrt(down * down + dot(d, body.v) ** 2))
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
  const sources = sourcesOf(body, model, angles).filter((source) => !isBeside(source, obstacle))
  if (sources.length === 0) return null
  const gap = gapToBody(body, obstacle)
  let best: InBeam | null = null
  for (const source of sources) {
    if (isInBeam(source, gap.to)) return { distance: gap.distance, from: gap.from, to: gap.to }
    const point = nearestOnEdge(source, obstacle)
    if (!point) continue
    const distance = distanceFromBody(body, point)
    if (!best || distance < best.distance) best = { distance, from: nearestOfBody(body, point), to: point }
  }
  return best
}

/** Rays in one round of the edge of the beam. */
const rays = 64

/** Halvings of the step when a ray is refined. */
const refinements = 8

/** A ray on the edge of the beam: by how much it misses the obstacle, or how far from the body it first meets it. */
interface Attempt {
  readonly turn: number
  readonly miss: number
  readonly distance: number
  readonly point: Vec3
}

/**
 * The first point of the obstacle, nearest to the body, on the rays that make the edge of the beam. When no ray of a
 * round hits, those that miss most narrowly are turned towards it: thin things are found so.
 */
function nearestOnEdge(source: Source, obstacle: Convex): Vec3 | null {
  const attempt = (turn: number, { from, direction }: Ray = edgeRay(source, turn)): Attempt => {
    const { enter, leave } = obstacle.alongRay(from, direction)
    if (enter > leave + thin) return { turn, miss: enter - leave, distance: Infinity, point: from }
    const point = add(from, scale(direction, enter))
    return { turn, miss: 0, distance: distanceFromBody(source.body, point), point }
  }
  const round = source.round.map((ray, i) => attempt(i / rays, ray))
  const best = round.reduce((a, b) => (b.distance < a.distance ? b : a))
  const hit = best.miss === 0 ? best : firstHit(round, attempt)
  return hit && refined(hit, attempt, (a, b) => a.distance < b.distance).point
}

/** Solids thinner than this along a ray are still met, in multiples of its direction. */
const thin = 1e-12

/** Turns the rays that miss more narrowly than their neighbours, until one hits. */
function firstHit(round: readonly Attempt[], attempt: (turn: number) => Attempt): Attempt | null {
  const narrow = round.filter(({ miss }, i) => {
    const before = round[(i + rays - 1) % rays]
    const after = round[(i + 1) % rays]
    return before && after && miss <= before.miss && miss <= after.miss
  })
  for (const candidate of narrow) {
    const turned = refined(candidate, attempt, (a, b) => a.miss < b.miss)
    if (turned.miss === 0) return turned
  }
  return null
}

/** Turns a ray by ever smaller steps to whichever side is better. */
function refined(
  start: Attempt,
  attempt: (turn: number) => Attempt,
  better: (a: Attempt, b: Attempt) => boolean,
): Attempt {
  let best = start
  for (let step = 0.5 / rays, i = 0; i < refinements; i++, step /= 2) {
    const sides = [attempt(best.turn - step), attempt(best.turn + step)]
    for (const side of sides) if (better(side, best)) best = side
  }
  return best
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
function edgeRay({ centre, halfLength, body, angles }: Omit<Source, 'round'>, turn: number): Ray {
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
