import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import { shortName } from '#app/domain/heaters/short-name.ts'
import type { MountedHeater } from '#app/domain/layout/layout.ts'
import { nearestOnSegment } from '#app/domain/site/geometry.ts'
import type { Site } from '#app/domain/site/site.ts'
import { formatLength, type DisplayUnits } from '#app/domain/units.ts'
import { radians } from '#app/domain/vector.ts'
import { degreesFigure } from '#app/editor/figures.ts'

/** Why a lowest point is refused, with the limit and the old value; null when the manual allows it. */
export function wrongHeight(metres: number, heater: MountedHeater, model: HeaterModel, units: DisplayUnits) {
  const least = model.mountingHeight.min
  if (least === null || metres >= least) return null
  const was = formatLength(heater.lowestPoint, units)
  return `At least ${formatLength(least, units)} for ${shortName(model)}. Was ${was}.`
}

/** Why a tilt is refused, either way round; null when the manual allows it. */
export function wrongTilt(degrees: number, model: HeaterModel): string | null {
  const limits = model.tiltDeg
  if (!limits) return Math.abs(degrees) > 90 ? 'Tilt 0 to 90°.' : null
  const size = Math.abs(degrees)
  return size >= limits.min && size <= limits.max
    ? null
    : `Tilt ${limits.min} to ${limits.max}° by the manual of ${shortName(model)}.`
}

/** Where a tilted beam goes on the plan, in words; null when it goes straight down. */
export function beamSide(heater: MountedHeater): string | null {
  if (heater.tiltDeg === 0) return null
  const turn = radians(heater.turnDeg)
  const sign = Math.sign(heater.tiltDeg)
  const [x, y] = [-Math.sin(turn) * sign, Math.cos(turn) * sign]
  if (Math.abs(x) >= Math.abs(y)) return x > 0 ? 'To the right' : 'To the left'
  return y > 0 ? 'Up the plan' : 'Down the plan'
}

/** "1.90–2.70": the manual's range of the lowest point, for the right end of a label. */
export function heightAside(model: HeaterModel | undefined, units: DisplayUnits): string {
  const { min, recommendedMax } = model?.mountingHeight ?? { min: null, recommendedMax: null }
  const figure = (metres: number | null) =>
    metres === null ? '' : units === 'metric' ? metres.toFixed(2) : formatLength(metres, units)
  return min === null && recommendedMax === null ? '' : `${figure(min)}–${figure(recommendedMax)}`
}

/** What the manual allows and how the support stands to it, in two sentences. */
export function limitsNote(heater: MountedHeater, model: HeaterModel, site: Site, units: DisplayUnits): string {
  const length = (metres: number) => formatLength(metres, units)
  const { min, recommendedMax } = model.mountingHeight
  const heights = min === null ? 'Lowest point not stated' : `Lowest point ${length(min)}`
  const upTo = recommendedMax === null ? '' : ` to ${length(recommendedMax)}`
  const tilts = model.tiltDeg ? `, tilt ${model.tiltDeg.min} to ${model.tiltDeg.max}°` : ', tilt not stated'
  return `${heights}${upTo}${tilts} by the manual. ${supportNote(heater, model, site, units)}`
}

function supportNote(heater: MountedHeater, model: HeaterModel, site: Site, units: DisplayUnits): string {
  const support = supportNamed(heater.memberId, site)
  if (!support) return nearestNote(heater, site, units)
  const away = distanceTo(support, heater)
  const reach = model.mountReach[heater.mount]
  const reaches = reach === undefined ? '' : `, ${heater.mount} reach ${formatLength(reach, units)}`
  const holds = heater.tiltDeg === 0 || model.mountsThatHoldTilt.includes(heater.mount)
  const tilt = holds ? 'hold' : 'do not hold'
  const last = heater.tiltDeg === 0 ? '' : ` and ${tilt} the tilt of ${degreesFigure(Math.abs(heater.tiltDeg))}°`
  return `${capital(support.name)} is ${formatLength(away, units)} away${reaches}${last}.`
}

function nearestNote(heater: MountedHeater, site: Site, units: DisplayUnits): string {
  const [nearest] = supportsFor(heater.mount, site)
    .map((support) => ({ name: support.name, away: distanceTo(support, heater) }))
    .sort((a, b) => a.away - b.away)
  return nearest
    ? `No support. Nearest is ${nearest.name}, ${formatLength(nearest.away, units)} away.`
    : 'No support, and nothing to fix to on this site.'
}

const capital = (text: string) => text.charAt(0).toUpperCase() + text.slice(1)

type Support = Site['members'][number] | Site['walls'][number] | Site['poles'][number]

/** What a mount can be fixed to on a site. */
export function supportsFor(mount: MountedHeater['mount'], site: Site): readonly Support[] {
  if (mount === 'wall bracket') return site.walls
  return mount === 'pole clamp' ? site.poles : site.members
}

const supportNamed = (id: string | null, site: Site): Support | undefined =>
  [...site.members, ...site.walls, ...site.poles].find((each) => each.id === id)

function distanceTo(support: Support, { x, y }: MountedHeater): number {
  return 'at' in support
    ? Math.hypot(x - support.at[0], y - support.at[1])
    : nearestOnSegment(support.from, support.to, x, y).distance
}
