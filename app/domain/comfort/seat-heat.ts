import { largestLevelDirection } from '#app/domain/comfort/level-sight.ts'
import {
  irradianceByNormal,
  largestDirection,
  netFluxOf,
  vectorInFront,
  type NetFlux,
} from '#app/domain/comfort/net-flux.ts'
import { fieldBeforeAbsorption } from '#app/domain/comfort/radiant-field.ts'
import type { Source } from '#app/domain/comfort/sources.ts'
import type { Emitter } from '#app/domain/flux/emitter.ts'
import {
  irradianceAt,
  irradianceByEmitter,
  irradianceByNormalAt,
  largestIrradianceAt,
} from '#app/domain/flux/irradiance.ts'
import type { Obstruction } from '#app/domain/flux/shading.ts'
import type { Seat } from '#app/domain/site/site.ts'
import { dot, radians, type Vec3 } from '#app/domain/vector.ts'

/** The largest irradiance over some directions at a point: where it comes from and what each source gives of it, W/m². */
interface LargestParts {
  readonly direction: Vec3
  readonly parts: readonly number[]
}

/** What each source gives a seat, in the order of the sources: what the figures that follow a drag are sums of. */
export interface PlainHeat {
  /** Horizontal irradiance on the body plane, W/m². */
  readonly body: readonly number[]
  /** Horizontal irradiance at the head, W/m². */
  readonly headHorizontal: readonly number[]
  /** Over all directions. */
  readonly head: LargestParts
  /** Absorbed effective radiant field, W/m² of body surface. */
  readonly field: readonly number[]
}

/** All that each source gives a seat. Every figure of a seat is a sum of these. */
export interface SeatHeat extends PlainHeat {
  /** Over all directions, at the body's height. */
  readonly bodyLargest: LargestParts
  /** Near infrared at the eye over all level directions; null when a source's share of it is not known. */
  readonly nearInfrared: LargestParts | null
}

/** What one element gives a seat, whatever the other elements do. */
interface ElementHeat {
  readonly body: number
  readonly headHorizontal: number
  readonly field: number
  readonly atBody: NetFlux | null
  readonly atHead: NetFlux | null
  /** As at the head, of its near-infrared share; null without that share too. */
  readonly atEye: NetFlux | null
}

const up: Vec3 = [0, 0, 1]

/** Middle of the body and of the head of a seat. */
export const bodyPoint = (seat: Seat): Vec3 => [seat.x, seat.y, seat.bodyHeight]
export const headPoint = (seat: Seat): Vec3 => [seat.x, seat.y, seat.headHeight]

/** Effective radiant field that one element gives a seat, absorbed, W/m² of body surface. */
export function fieldAtSeat(
  { emitter, absorptance }: Source,
  seat: Seat,
  obstructions: readonly Obstruction[] = [],
): number {
  const receiver = { point: bodyPoint(seat), posture: seat.posture, facing: radians(seat.facingDeg) }
  return absorptance * fieldBeforeAbsorption(emitter, receiver, obstructions)
}

function elementHeat(source: Source, seat: Seat, obstructions: readonly Obstruction[]): ElementHeat {
  const { emitter, nearInfraredEmitter } = source
  const [body, head] = [bodyPoint(seat), headPoint(seat)]
  return {
    body: irradianceAt(emitter, body, up, obstructions),
    headHorizontal: irradianceAt(emitter, head, up, obstructions),
    field: fieldAtSeat(source, seat, obstructions),
    atBody: netFluxOf(emitter, body),
    atHead: netFluxOf(emitter, head),
    atEye: nearInfraredEmitter && netFluxOf(nearInfraredEmitter, head),
  }
}

const remembered = new WeakMap<Source, WeakMap<Seat, ElementHeat>>()

/** As `elementHeat` unshaded; found again for the same element and seat, so a drag reckons only the heater that moves. */
function rememberedHeat(source: Source, seat: Seat): ElementHeat {
  const bySeat = remembered.get(source) ?? new WeakMap<Seat, ElementHeat>()
  const known = bySeat.get(seat)
  if (known) return known
  const made = elementHeat(source, seat, [])
  remembered.set(source, bySeat.set(seat, made))
  return made
}

/** A seat with the heat of each element that reaches it. */
interface HeatedSeat {
  readonly seat: Seat
  readonly sources: readonly Source[]
  readonly heats: readonly ElementHeat[]
  readonly obstructions: readonly Obstruction[]
}

function heatedSeat(
  seat: Seat,
  sources: readonly Source[],
  obstructions: readonly Obstruction[],
  remember: boolean,
): HeatedSeat {
  const shaded = obstructions.length > 0
  const heats = sources.map((source) =>
    remember && !shaded ? rememberedHeat(source, seat) : elementHeat(source, seat, obstructions),
  )
  return { seat, sources, heats, obstructions }
}

/**
 * Heat of every source at one seat; unshaded unless obstructions are given. With `remember`, what it reckons is kept for
 * the next call with the same objects, about 1 kB per element and seat.
 */
export function heatAtSeat(
  seat: Seat,
  sources: readonly Source[],
  obstructions: readonly Obstruction[] = [],
  remember = false,
): SeatHeat {
  const heated = heatedSeat(seat, sources, obstructions, remember)
  return {
    ...plainHeatOf(heated),
    bodyLargest: largestAt(
      heated,
      bodyPoint(seat),
      heated.heats.map(({ atBody }) => atBody),
    ),
    nearInfrared: nearInfraredAt(headPoint(seat), sources, heated.heats, obstructions),
  }
}

/** As `heatAtSeat`, without what only cautions ask for: half the work. */
export function plainHeatAtSeat(
  seat: Seat,
  sources: readonly Source[],
  obstructions: readonly Obstruction[] = [],
  remember = false,
): PlainHeat {
  return plainHeatOf(heatedSeat(seat, sources, obstructions, remember))
}

function plainHeatOf(heated: HeatedSeat): PlainHeat {
  const { heats } = heated
  return {
    body: heats.map(({ body }) => body),
    headHorizontal: heats.map(({ headHorizontal }) => headHorizontal),
    field: heats.map(({ field }) => field),
    head: largestAt(
      heated,
      headPoint(heated.seat),
      heats.map(({ atHead }) => atHead),
    ),
  }
}

function largestAt(
  { sources, obstructions }: HeatedSeat,
  point: Vec3,
  fluxes: readonly (NetFlux | null)[],
): LargestParts {
  if (obstructions.length === 0) return largestParts(fluxes)
  return shadedLargest(
    point,
    sources.map(({ emitter }) => emitter),
    obstructions,
  )
}

function largestParts(fluxes: readonly (NetFlux | null)[]): LargestParts {
  return partsOn(fluxes, largestDirection(fluxes))
}

/** What each flux gives a plane. */
function partsOn(fluxes: readonly (NetFlux | null)[], direction: Vec3): LargestParts {
  return { direction, parts: fluxes.map((flux) => (flux ? dot(vectorInFront(flux, direction), direction) : 0)) }
}

function shadedLargest(point: Vec3, emitters: readonly Emitter[], obstructions: readonly Obstruction[]): LargestParts {
  const { direction } = largestIrradianceAt(emitters, point, obstructions)
  return { direction, parts: irradianceByEmitter(emitters, point, direction, obstructions) }
}

/** A guest looks level: the near-infrared shares of all sources on the vertical plane that receives most of them. */
function nearInfraredAt(
  point: Vec3,
  sources: readonly Source[],
  heats: readonly ElementHeat[],
  obstructions: readonly Obstruction[],
): LargestParts | null {
  const emitters = sources.flatMap(({ nearInfraredEmitter }) => nearInfraredEmitter ?? [])
  if (emitters.length < sources.length) return null
  if (obstructions.length === 0) {
    const fluxes = heats.map(({ atEye }) => atEye)
    return partsOn(fluxes, largestLevelDirection(irradianceByNormal(fluxes)))
  }
  const direction = largestLevelDirection(irradianceByNormalAt(emitters, point, obstructions))
  return { direction, parts: irradianceByEmitter(emitters, point, direction, obstructions) }
}
