import type { Beam } from '#app/domain/flux/beam.ts'
import type { HeaterFrame } from '#app/domain/layout/body.ts'
import type { Vec3 } from '#app/domain/vector.ts'

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
