import type { Body } from '#app/domain/layout/body.ts'
import { findingOf, heaterRule, type HeaterCheck } from '#app/domain/rules/check.ts'
import type { Finding } from '#app/domain/rules/finding.ts'
import { scale, type Vec3 } from '#app/domain/vector.ts'

/** Density of air, kg/m³, and drag coefficients (EN 1991-1-4, from memory: a long bar about 2, a slender pole 1.2). */
const airDensity = 1.25
const dragOfBody = 2
const dragOfPole = 1.2

/** Drag of the wind, N: F = ½ ρ v² C_d A for a speed in m/s and an area in m². */
export const dragForce = (speed: number, dragCoefficient: number, area: number): number =>
  0.5 * airDensity * speed ** 2 * dragCoefficient * area

/**
 * The largest area that a tilted body shows to a level wind, m²: the longest level part of ± a_u u ± a_v v ± a_w w, with
 * a_i the area of the face square to that axis.
 */
export function largestWindArea({ u, v, w, half }: Body): number {
  const faces: readonly Vec3[] = [
    scale(u, 4 * half.v * half.w),
    scale(v, 4 * half.u * half.w),
    scale(w, 4 * half.u * half.v),
  ]
  const [a, b, c] = faces
  if (!a || !b || !c) return 0
  const signs = [1, -1] as const
  return Math.max(
    ...signs.flatMap((s) => signs.map((t) => Math.hypot(a[0] + s * b[0] + t * c[0], a[1] + s * b[1] + t * c[1]))),
  )
}

/**
 * Information: the moment at the foot of the pole that holds a heater, N·m, from the drag on the heater in its worst
 * direction and on the pole, at the brief's gust. What the pole stands is not known, so nothing is approved. Null for
 * heaters on no pole.
 */
export function poleWind(check: HeaterCheck): Finding | null {
  const { site, heater, body, brief, support } = check
  const pole = heater.mount === 'pole clamp' ? site.poles.find(({ id }) => support.ids.includes(id)) : undefined
  if (!pole) return null
  const onBody = dragForce(brief.windGust, dragOfBody, largestWindArea(body))
  const onPole = dragForce(brief.windGust, dragOfPole, pole.diameter * pole.top)
  const moment = onBody * body.centre[2] + (onPole * pole.top) / 2
  const source = `½ρv²·C_d·A at the gust of the brief, ${brief.windGust} m/s; ρ ${airDensity} kg/m³, C_d ${dragOfBody} body, ${dragOfPole} pole (EN 1991-1-4, from memory)` // prettier-ignore
  return findingOf(heaterRule(check, 'pole-wind', 'advice', 'N·m', source), 'cannot tell', {
    title: `Wind on the heater turns at the foot of ${pole.name}; what it stands is not known`,
    value: moment,
    remedy: `${onBody.toFixed(1)} N on the heater, ${onPole.toFixed(1)} N on the pole. The structure's engineer judges pole and foot, for the storm of the place too.`, // prettier-ignore
  })
}
