import { fieldBeforeAbsorption } from '#app/domain/comfort/radiant-field.ts'
import type { Source } from '#app/domain/comfort/sources.ts'
import type { Emitter } from '#app/domain/flux/emitter.ts'
import { irradianceAt, largestIrradianceAt } from '#app/domain/flux/irradiance.ts'
import type { Obstruction } from '#app/domain/flux/shading.ts'
import type { Seat } from '#app/domain/site/site.ts'
import { radians, type Vec3 } from '#app/domain/vector.ts'

/** The largest irradiance over all directions at a point: where it comes from and what each source gives of it, W/m². */
export interface LargestParts {
  readonly direction: Vec3
  readonly parts: readonly number[]
}

/** What each source gives a seat, in the order of the sources. Every figure of a seat is a sum of these. */
export interface SeatHeat {
  /** Horizontal irradiance on the body plane, W/m². */
  readonly body: readonly number[]
  /** Horizontal irradiance at the head, W/m². */
  readonly headHorizontal: readonly number[]
  readonly head: LargestParts
  readonly bodyLargest: LargestParts
  /** Absorbed effective radiant field, W/m² of body surface. */
  readonly field: readonly number[]
  /** Largest near-infrared irradiance at the eye; null when a source's share of it is not known. */
  readonly nearInfrared: LargestParts | null
}

const up: Vec3 = [0, 0, 1]

/** Middle of the body and of the head of a seat. */
export const bodyPoint = (seat: Seat): Vec3 => [seat.x, seat.y, seat.bodyHeight]
export const headPoint = (seat: Seat): Vec3 => [seat.x, seat.y, seat.headHeight]

/** Heat of every source at one seat; unshaded unless obstructions are given. */
export function heatAtSeat(
  seat: Seat,
  sources: readonly Source[],
  obstructions: readonly Obstruction[] = [],
): SeatHeat {
  const [body, head] = [bodyPoint(seat), headPoint(seat)]
  const receiver = { point: body, posture: seat.posture, facing: radians(seat.facingDeg) }
  const emitters = sources.map(({ emitter }) => emitter)
  const horizontal = (point: Vec3) => emitters.map((emitter) => irradianceAt(emitter, point, up, obstructions))
  const largestAtHead = largestAt(head, emitters, obstructions)
  return {
    body: horizontal(body),
    headHorizontal: horizontal(head),
    head: largestAtHead,
    bodyLargest: largestAt(body, emitters, obstructions),
    field: sources.map(
      ({ emitter, absorptance }) => absorptance * fieldBeforeAbsorption(emitter, receiver, obstructions),
    ),
    nearInfrared: nearInfraredAt(head, sources, largestAtHead, obstructions),
  }
}

function largestAt(point: Vec3, emitters: readonly Emitter[], obstructions: readonly Obstruction[]): LargestParts {
  const { direction } = largestIrradianceAt(emitters, point, obstructions)
  return { direction, parts: emitters.map((emitter) => irradianceAt(emitter, point, direction, obstructions)) }
}

/** As at the head, of the near-infrared share of each source; the same direction where all have the same share. */
function nearInfraredAt(
  point: Vec3,
  sources: readonly Source[],
  head: LargestParts,
  obstructions: readonly Obstruction[],
): LargestParts | null {
  const share = sources[0]?.nearInfrared ?? null
  if (share !== null && sources.every(({ nearInfrared }) => nearInfrared === share)) {
    return { direction: head.direction, parts: head.parts.map((part) => part * share) }
  }
  const emitters = sources.map(({ nearInfraredEmitter }) => nearInfraredEmitter).filter((each) => each !== null)
  return emitters.length < sources.length ? null : largestAt(point, emitters, obstructions)
}
