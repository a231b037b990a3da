import { z } from 'zod'
import { mountSchema } from '#app/domain/heaters/heater-model.ts'
import { maxHeaters } from '#app/domain/layout/limits.ts'

/**
 * A heater as it hangs. x, y: plan position of the centre of the body box, m. lowestPoint: lowest point of the tilted
 * body above finished floor, m. turnDeg: direction of the element axis in plan, counter-clockwise from +x. tiltDeg:
 * angle of the beam from straight down, positive towards the left of the element axis.
 */
export const mountedHeaterSchema = z.strictObject({
  id: z.string().min(1).max(40),
  model: z.string().min(1).max(80),
  supplyVoltage: z.number().positive().max(1000),
  /** Voltage of the option ordered; absent: the supply voltage if the model lists it, else the nearest option. */
  ratedVoltage: z.number().positive().max(1000).optional(),
  /** 1-based; absent: the last, full power. */
  stage: z.int().min(1).max(12).optional(),
  x: z.number().min(-1000).max(1000),
  y: z.number().min(-1000).max(1000),
  lowestPoint: z.number().min(0).max(30),
  turnDeg: z.number().min(-360).max(360),
  tiltDeg: z.number().min(-90).max(90),
  mount: mountSchema,
  /** The member, wall or pole it is fixed to. */
  memberId: z.string().max(40).nullable(),
  /** Each suspension eye hangs from two members, one on either side; only of chain and drop rods. */
  splayed: z.boolean().optional(),
})
export type MountedHeater = z.infer<typeof mountedHeaterSchema>

/** What a variant saves: its title and its heaters. */
export const layoutSchema = z.strictObject({
  title: z.string().trim().min(1).max(120),
  heaters: z.array(mountedHeaterSchema).max(maxHeaters),
})
export type Layout = z.infer<typeof layoutSchema>
