import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import { bayOf } from '#app/domain/layout/bay.ts'
import type { Body } from '#app/domain/layout/body.ts'
import { splayedPair } from '#app/domain/layout/splayed-pair.ts'
import type { Support } from '#app/domain/layout/supports.ts'
import { fixedRules } from '#app/domain/rules/fixed-rules.ts'
import { nearestOnSegment } from '#app/domain/site/geometry.ts'
import type { Member, Site } from '#app/domain/site/site.ts'
import type { Vec2 } from '#app/domain/vector.ts'

/** What a heater pulls with at one point of what carries it. Forces N. */
export interface PointLoad {
  readonly supportId: string
  readonly at: Vec2
  readonly load: number
  /** What this point carries when the other hanger, or the other side, lets go: all of the heater. */
  readonly alone: number
  /** Moment that a mount standing off puts on its wall or pole, N·m; 0 for what hangs. */
  readonly moment: number
}

/** Weight of a heater, N. */
export const weightOf = (model: HeaterModel): number => model.body.mass * fixedRules.gravity.value

/**
 * The load at each point that carries a heater, by statics: half its weight at each of two eyes (their tensions where
 * they are splayed), shared by levers between both members of a recess box, else all of it at one point. Without the
 * weight of hangers and cables. None for an unsupported heater.
 */
export function pointLoads(site: Site, model: HeaterModel, body: Body, support: Support): PointLoad[] {
  const weight = weightOf(model)
  if (support.outcome === 'not held') return []
  if (support.eyes.length > 0) {
    return support.eyes.flatMap((eye) => eyeLoads(eye, weight / support.eyes.length, weight))
  }
  const { ids, distance } = support
  const bay = ids.length === 2 ? bayOf(site, body) : null
  if (bay?.left && bay.right) return bayLoads(bay.left, bay.right, bay.bodyWidth, body, weight)
  return ids.map((supportId) => {
    const stands = site.walls.some(({ id }) => id === supportId) || site.poles.some(({ id }) => id === supportId)
    const at: Vec2 = [body.centre[0], body.centre[1]]
    return { supportId, at, load: weight, alone: weight, moment: stands ? weight * (distance ?? 0) : 0 }
  })
}

function eyeLoads({ eye, place, legs }: Support['eyes'][number], share: number, weight: number): PointLoad[] {
  if (!legs) {
    return place ? [{ supportId: place.id, at: [eye[0], eye[1]], load: share, alone: weight, moment: 0 }] : []
  }
  const [a, b] = legs.map(({ sideways, underside }) => ({ sideways, rise: (underside ?? eye[2]) - eye[2] }))
  if (!a || !b) return []
  const pair = splayedPair([a, b], share)
  const alone = splayedPair([a, b], weight)
  return legs.map((leg, i) => {
    const k = i === 0 ? 0 : 1
    return { supportId: leg.memberId, at: leg.point, load: pair[k].tension, alone: alone[k].tension, moment: 0 }
  })
}

type Beside = NonNullable<NonNullable<ReturnType<typeof bayOf>>['left']>

function bayLoads(left: Beside, right: Beside, bodyWidth: number, body: Body, weight: number): PointLoad[] {
  const arm = ({ clear, member }: Beside) => clear + bodyWidth / 2 + member.width / 2
  const [toLeft, toRight] = [arm(left), arm(right)]
  const at: Vec2 = [body.centre[0], body.centre[1]]
  const shared = (member: Member, opposite: number): PointLoad => ({
    supportId: member.id,
    at,
    load: (weight * opposite) / (toLeft + toRight),
    alone: weight,
    moment: 0,
  })
  return [shared(left.member, toRight), shared(right.member, toLeft)]
}

/** A member counts as resting on another when its end is this near to the other's axis, m. */
const restsWithin = 0.01

/** What one end of a rail rests on. */
export interface RailRest {
  readonly end: Vec2
  readonly onId: string | null
}

/** What both ends of a rail rest on: the nearest other member whose axis passes there; null where there is none. */
export function railRests(site: Site, rail: Member): readonly [RailRest, RailRest] {
  const restOf = (end: Vec2): RailRest => {
    const near = site.members
      .filter(({ id, kind }) => id !== rail.id && kind !== railKind)
      .map((member) => ({ id: member.id, ...nearestOnSegment(member.from, member.to, end[0], end[1]) }))
      .filter(({ distance }) => distance <= restsWithin)
      .toSorted((a, b) => a.distance - b.distance)
    return { end, onId: near[0]?.id ?? null }
  }
  return [restOf(rail.from), restOf(rail.to)]
}

/** The kind of a member that only joins two others. */
export const railKind = 'rail'

/** How loads on a rail go on to what its two ends rest on, by levers; the rail's own weight is not in it. N. */
export function railReactions(
  rail: Member,
  loads: readonly { readonly at: Vec2; readonly load: number }[],
): readonly [from: number, to: number] {
  let [from, to] = [0, 0]
  for (const { at, load } of loads) {
    const { along } = nearestOnSegment(rail.from, rail.to, at[0], at[1])
    from += load * (1 - along)
    to += load * along
  }
  return [from, to]
}
