import { beamOf, type Beam } from '#app/domain/flux/beam.ts'
import { emitterOf, type Emitter } from '#app/domain/flux/emitter.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import { demoModels } from '#drizzle/seed/demo-sites.ts'

/** A model of the invented catalogue with the beam of its data sheet. */
export interface DemoBeam {
  readonly code: string
  readonly model: HeaterModel
  readonly beam: Beam
}

/** Every model of the invented catalogue that has beam data. */
export const demoBeams: readonly DemoBeam[] = demoModels().flatMap((model) =>
  model.beam ? [{ code: model.code, model, beam: beamOf(model.beam) }] : [],
)

/** The emitter of a whole heater of a model at a place: its lowest point m above the floor, on its own rated voltage. */
export function hungHeater(
  model: HeaterModel,
  options: { x?: number; y?: number; lowestPoint: number; turnDeg?: number; tiltDeg?: number; stage?: number },
): Emitter {
  const { x = 0, y = 0, lowestPoint, turnDeg = 0, tiltDeg = 0, stage } = options
  const supplyVoltage = model.supplyOptions[0]!.voltage
  const placed = { x, y, lowestPoint, turnDeg, tiltDeg, supplyVoltage, memberId: null }
  const heater = { id: model.code, model: model.code, mount: 'chain', ...placed, ...(stage && { stage }) } as const
  return emitterOf(heater, model)!
}
