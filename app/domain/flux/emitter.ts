import { beamOf, type Beam } from '#app/domain/flux/beam.ts'
import { electricalPower } from '#app/domain/heaters/power.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import { bodyOf, elementCentres, heaterFrame, type HeaterFrame } from '#app/domain/layout/body.ts'
import type { MountedHeater } from '#app/domain/layout/layout.ts'
import { add, scale, type Vec3 } from '#app/domain/vector.ts'

/** A tubular element: the centre of its axis (which runs along the emitter's u), its length m, its radiant power W. */
export interface Element {
  readonly centre: Vec3
  readonly length: number
  readonly radiantPower: number
}

/** What radiates of one heater: parallel elements that share a frame and a beam. */
export interface Emitter {
  readonly id: string
  readonly frame: HeaterFrame
  readonly beam: Beam
  readonly elements: readonly Element[]
}

/** Which figure of the data sheet's range of radiant efficiency to reckon with. */
export type Efficiency = 'low' | 'nominal' | 'high'

const beams = new WeakMap<object, Beam>()

/** One beam object per data sheet, so that what is computed from it once is found again. */
function sharedBeam(data: NonNullable<HeaterModel['beam']>): Beam {
  const known = beams.get(data)
  if (known) return known
  const made = beamOf(data)
  beams.set(data, made)
  return made
}

function efficiencyOf(model: HeaterModel, efficiency: Efficiency): number {
  if (efficiency === 'nominal' || !model.radiantEfficiencyRange) return model.radiantEfficiency
  return model.radiantEfficiencyRange[efficiency]
}

/**
 * The emitter of a mounted heater; null when its model has no beam data. All elements share the power of the chosen
 * stage equally: the data do not say which ones are lit.
 */
export function emitterOf(
  heater: MountedHeater,
  model: HeaterModel,
  efficiency: Efficiency = 'nominal',
): Emitter | null {
  if (!model.beam) return null
  const radiantPower = electricalPower(heater, model).power * efficiencyOf(model, efficiency)
  const body = bodyOf(heater, model)
  const centres = elementCentres(body, model)
  return {
    id: heater.id,
    frame: { u: body.u, v: body.v, w: body.w },
    beam: sharedBeam(model.beam),
    elements: centres.map((centre) => ({
      centre,
      length: model.elementLength,
      radiantPower: radiantPower / centres.length,
    })),
  }
}

/** A group of parallel elements about a centre, as a person or a test states it. */
export interface ElementGroup {
  readonly id: string
  /** Centre of the group, m. */
  readonly at: Vec3
  readonly turnDeg: number
  readonly tiltDeg: number
  readonly beam: Beam
  /** Offset along v (to the right of u at tilt 0), m; length m; radiant power W. */
  readonly elements: readonly { readonly offset: number; readonly length: number; readonly radiantPower: number }[]
}

/** The emitter of an explicit group of elements. */
export function groupEmitter(group: ElementGroup): Emitter {
  const frame = heaterFrame(group.turnDeg, group.tiltDeg)
  return {
    id: group.id,
    frame,
    beam: group.beam,
    elements: group.elements.map(({ offset, length, radiantPower }) => ({
      centre: add(group.at, scale(frame.v, offset)),
      length,
      radiantPower,
    })),
  }
}
