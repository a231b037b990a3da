import type { Vec3 } from '#app/domain/vector.ts'

/** A level direction, rad counter-clockwise from +x, and the irradiance of the vertical plane that looks there. */
interface Sight {
  readonly azimuth: number
  readonly irradiance: number
}

/** Two directions, the irradiance that no direction between them can exceed, and where it would be. */
interface Arc {
  readonly from: Sight
  readonly to: Sight
  readonly most: number
  readonly at: number
}

/** Vertical planes that the search starts from, all round. */
const starts = 6

/** What the search may leave unfound, as a share of what it has found. */
const leftOut = 1e-6

/** Planes after which the search ends. */
const mostPlanes = 100

/** Share of an arc at either end within which it is not cut, but in its middle. */
const nearEnd = 0.02

const directionOf = (azimuth: number): Vec3 => [Math.cos(azimuth), Math.sin(azimuth), 0]

/**
 * The level direction whose vertical plane receives most, and +x where none receives anything. Irradiance is a sublinear
 * function of the normal, so between two directions it stays under the cosine curve through both; the arc whose curve
 * rises highest is cut there until none can hold 1e-6 more than what is found. Where all directions receive nearly the
 * same the search ends after 100 planes, when less than 0.1 % can be left.
 */
export function largestLevelDirection(irradianceOn: (normal: Vec3) => number): Vec3 {
  const look = (azimuth: number): Sight => ({ azimuth, irradiance: irradianceOn(directionOf(azimuth)) })
  const first = Array.from({ length: starts }, (_, i) => look((i * 2 * Math.PI) / starts))
  const arcs = first.map((from, i) => {
    const to = first[i + 1] ?? first[0] ?? from
    return arcOf(from, i + 1 < starts ? to : { ...to, azimuth: to.azimuth + 2 * Math.PI })
  })
  let best = first.reduce((a, b) => (b.irradiance > a.irradiance ? b : a))
  for (let planes = starts; planes < mostPlanes; planes++) {
    const index = highest(arcs)
    const arc = arcs[index]
    if (!arc || arc.most <= best.irradiance * (1 + leftOut)) break
    const cut = look(arc.at)
    if (cut.irradiance > best.irradiance) best = cut
    arcs[index] = arcOf(arc.from, cut)
    arcs.push(arcOf(cut, arc.to))
  }
  return best.irradiance > 0 ? directionOf(best.azimuth) : [1, 0, 0]
}

function highest(arcs: readonly Arc[]): number {
  let index = 0
  arcs.forEach((arc, i) => {
    if (arc.most > (arcs[index]?.most ?? 0)) index = i
  })
  return index
}

/** The cosine curve through both ends, E cos(φ − φ₀): its crest where that lies between them, else the greater end. */
function arcOf(from: Sight, to: Sight): Arc {
  const width = to.azimuth - from.azimuth
  const cosine = from.irradiance
  const sine = (to.irradiance - cosine * Math.cos(width)) / Math.sin(width)
  const crest = Math.atan2(sine, cosine)
  const middle = from.azimuth + width / 2
  if (!(crest > 0 && crest < width)) return { from, to, most: Math.max(cosine, to.irradiance), at: middle }
  const inside = crest > nearEnd * width && crest < (1 - nearEnd) * width
  return { from, to, most: Math.hypot(cosine, sine), at: inside ? from.azimuth + crest : middle }
}
