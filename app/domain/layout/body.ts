import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { MountedHeater } from '#app/domain/layout/layout.ts'
import { add, cross, radians, scale, type Vec3 } from '#app/domain/vector.ts'

/** The heater's own directions: u along the element, w the beam axis out of the reflector, v = w × u. */
export interface HeaterFrame {
  readonly u: Vec3
  readonly v: Vec3
  readonly w: Vec3
}

/** A tilted body box: its centre, its axes and half its size along u, v and w, m. */
export interface Body extends HeaterFrame {
  readonly centre: Vec3
  readonly half: { readonly u: number; readonly v: number; readonly w: number }
}

/** Frame of a heater turned counter-clockwise in plan and tilted to the left of its element axis; angles in degrees. */
export function heaterFrame(turnDeg: number, tiltDeg: number): HeaterFrame {
  const turn = radians(turnDeg)
  const tilt = radians(tiltDeg)
  const u: Vec3 = [Math.cos(turn), Math.sin(turn), 0]
  const left: Vec3 = [-Math.sin(turn), Math.cos(turn), 0]
  const w = add(scale([0, 0, -1], Math.cos(tilt)), scale(left, Math.sin(tilt)))
  return { u, v: cross(w, u), w }
}

/** The tilted body of a mounted heater: its lowest corner is at `lowestPoint`, its centre over (x, y). */
export function bodyOf(heater: MountedHeater, model: HeaterModel): Body {
  const frame = heaterFrame(heater.turnDeg, heater.tiltDeg)
  const half = { u: model.body.length / 2, v: model.body.width / 2, w: model.body.depth / 2 }
  const rise = half.u * Math.abs(frame.u[2]) + half.v * Math.abs(frame.v[2]) + half.w * Math.abs(frame.w[2])
  return { ...frame, half, centre: [heater.x, heater.y, heater.lowestPoint + rise] }
}

/** Centres of the elements' axes inside the tilted body, one per element, along v. */
export function elementCentres(body: Body, model: HeaterModel): Vec3[] {
  const toAxes = add(body.centre, scale(body.w, body.half.w - model.elementAboveLowest))
  return Array.from({ length: model.elementCount }, (_, i) =>
    add(toAxes, scale(body.v, (i - (model.elementCount - 1) / 2) * model.elementPitch)),
  )
}
