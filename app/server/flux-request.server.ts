import { z } from 'zod'
import { largestExponent } from '#app/domain/flux/answerable.ts'
import { emitterOf, groupEmitter, type Emitter } from '#app/domain/flux/emitter.ts'
import { touchesElement } from '#app/domain/flux/irradiance.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import { electricalPower } from '#app/domain/heaters/power.ts'
import type { MountedHeater } from '#app/domain/layout/layout.ts'
import { lengthOf, subtract, type Vec3 } from '#app/domain/vector.ts'
import type { FluxPoint } from '#app/drawing/heat/flux-task.ts'
import { isRefusal, type Refusal } from '#app/server/answers.server.ts'
import { checked } from '#app/server/json-body.server.ts'

/** The most that one question may ask. */
const most = { heaters: 200, elements: 12, points: 5000 } as const

const coordinate = z.number().min(-10_000).max(10_000)
const angle = z.number().min(-3600).max(3600)
const exponent = z.number().min(0).max(largestExponent)
const voltage = z.number().positive().max(1000)
const place = { at: z.strictObject({ x: coordinate, y: coordinate, z: coordinate }), turnDeg: angle, tiltDeg: angle }

const groupSchema = z.strictObject({
  ...place,
  beam: z.strictObject({ kind: z.literal('cosine'), across: exponent, along: exponent }),
  elements: z
    .array(
      z.strictObject({
        offset: z.number().min(-100).max(100),
        length: z.number().positive().max(100),
        radiantPower: z.number().min(0).max(1e7),
      }),
    )
    .min(1),
})
const modelledSchema = z.strictObject({
  ...place,
  model: z.string().min(1).max(80),
  supplyVoltage: voltage,
  ratedVoltage: voltage.optional(),
  stage: z.int().min(1).max(12).optional(),
})
type Group = z.infer<typeof groupSchema>
type Modelled = z.infer<typeof modelledSchema>

/** A heater that names a model is checked as such; any other as a group of elements. */
const heaterSchema = z.unknown().transform((value, context): Group | Modelled => {
  const named = typeof value === 'object' && value !== null && 'model' in value
  const result = checked<Group | Modelled>(named ? modelledSchema : groupSchema, value)
  if (!isRefusal(result)) return result.value
  const path = result.path === 'body' ? [] : result.path.split('.')
  context.issues.push({ code: 'custom', message: result.error, path, input: value })
  return z.NEVER
})

/** A direction of unit length, however long or short the given vector is. */
const normalSchema = z
  .tuple([z.number(), z.number(), z.number()])
  .refine((normal) => normal.some((part) => part !== 0), { error: 'A normal has a length.' })
  .transform((normal): Vec3 => {
    const largest = Math.max(...normal.map(Math.abs))
    const [x, y, z] = [normal[0] / largest, normal[1] / largest, normal[2] / largest]
    const length = Math.hypot(x, y, z)
    return [x / length, y / length, z / length]
  })

const questionSchema = z.strictObject({
  heaters: z.array(heaterSchema),
  points: z.array(z.strictObject({ x: coordinate, y: coordinate, z: coordinate, normal: normalSchema })),
})

/** A checked question: what radiates, where it is asked, and what is worth knowing about the answer. */
export interface FluxRequest {
  readonly emitters: readonly Emitter[]
  readonly points: readonly FluxPoint[]
  readonly warnings: readonly string[]
}

const tooMany = (path: string, limit: number, what: string): Refusal => ({
  status: 413,
  error: `At most ${limit} ${what}.`,
  path,
})

/** Limits are looked at before anything else, so that a large question costs little. */
function findExcess(json: unknown): Refusal | null {
  const loose = z.looseObject({ heaters: z.unknown(), points: z.unknown() }).safeParse(json)
  if (!loose.success) return null
  const { heaters, points } = loose.data
  if (Array.isArray(points) && points.length > most.points) return tooMany('points', most.points, 'points')
  if (!Array.isArray(heaters)) return null
  if (heaters.length > most.heaters) return tooMany('heaters', most.heaters, 'heaters')
  const crowded = heaters.findIndex((heater) => {
    const elements: unknown = z.looseObject({ elements: z.unknown() }).safeParse(heater).data?.elements
    return Array.isArray(elements) && elements.length > most.elements
  })
  return crowded < 0 ? null : tooMany(`heaters.${crowded}.elements`, most.elements, 'elements')
}

const unusable = (path: string, error: string): Refusal => ({ status: 422, error, path })

function modelProblem(asked: Modelled, path: string, model: HeaterModel | undefined): Refusal | null {
  if (!model) return unusable(`${path}.model`, `The catalogue has no model ${asked.model}.`)
  if (model.status === 'withdrawn') return unusable(`${path}.model`, `${model.name} is withdrawn.`)
  if (!model.beam) return unusable(`${path}.model`, `Beam data missing for ${model.name}.`)
  const listed = model.supplyOptions.map((option) => option.voltage)
  if (asked.ratedVoltage !== undefined && !listed.includes(asked.ratedVoltage)) {
    return unusable(`${path}.ratedVoltage`, `${model.name} is offered for ${listed.join(', ')} V.`)
  }
  const stages = model.stages.length
  if (asked.stage !== undefined && asked.stage > stages) {
    return unusable(`${path}.stage`, `${model.name} has ${stages === 1 ? 'one stage' : `${stages} stages`}.`)
  }
  return null
}

interface Source {
  readonly emitter: Emitter
  readonly warning: string | null
}

function modelledSource(asked: Modelled, path: string, models: ReadonlyMap<string, HeaterModel>): Source | Refusal {
  const model = models.get(asked.model)
  const problem = modelProblem(asked, path, model)
  if (problem) return problem
  const { at, ...said } = asked
  const [mount] = model?.mounts ?? []
  const heater: MountedHeater = {
    ...said,
    id: path,
    x: at.x,
    y: at.y,
    lowestPoint: at.z,
    mount: mount ?? 'chain',
    memberId: null,
  }
  const emitter = model && emitterOf(heater, model)
  if (!model || !emitter) return unusable(`${path}.model`, 'No beam data.')
  const { power, ratedPower, ratedVoltage, voltageDiffers } = electricalPower(heater, model)
  const warning = `${path}: rated for ${ratedVoltage} V, supplied with ${asked.supplyVoltage} V: ${Math.round(power)} W instead of ${Math.round(ratedPower)} W.`
  return { emitter, warning: voltageDiffers ? warning : null }
}

function sourceOf(asked: Group | Modelled, index: number, models: ReadonlyMap<string, HeaterModel>): Source | Refusal {
  const path = `heaters.${index}`
  if ('model' in asked) return modelledSource(asked, path, models)
  const { at, ...group } = asked
  return { emitter: groupEmitter({ ...group, id: path, at: [at.x, at.y, at.z] }), warning: null }
}

/** Radius of a sphere about the emitter's first element that holds all of them with a margin, m. */
function reachOf({ elements }: Emitter): number {
  const first = elements[0]
  if (!first) return 0
  return 0.01 + Math.max(...elements.map(({ centre, length }) => lengthOf(subtract(centre, first.centre)) + length / 2))
}

/** The first point that lies on an element, where irradiance has no meaning. */
function findTouching(emitters: readonly Emitter[], points: readonly FluxPoint[]): Refusal | null {
  for (const emitter of emitters) {
    const [x = 0, y = 0, z = 0] = emitter.elements[0]?.centre ?? []
    const near = reachOf(emitter) ** 2
    const index = points.findIndex(
      ({ at }) =>
        (at[0] - x) * (at[0] - x) + (at[1] - y) * (at[1] - y) + (at[2] - z) * (at[2] - z) < near &&
        touchesElement(emitter, at),
    )
    if (index >= 0) return unusable(`points.${index}`, `The point lies on an element of ${emitter.id}.`)
  }
  return null
}

/** The question in a JSON body, checked against the catalogue; refused with 400, 413 or 422 and the path. */
export function readFluxRequest(json: unknown, models: ReadonlyMap<string, HeaterModel>): FluxRequest | Refusal {
  const excess = findExcess(json)
  if (excess) return excess
  const question = checked(questionSchema, json)
  if (isRefusal(question)) return question
  const sources = question.value.heaters.map((asked, index) => sourceOf(asked, index, models))
  const refused = sources.find((source) => isRefusal(source))
  if (refused) return refused
  const usable = sources.filter((source): source is Source => !isRefusal(source))
  const emitters = usable.map(({ emitter }) => emitter)
  const points = question.value.points.map(({ x, y, z: height, normal }): FluxPoint => ({ at: [x, y, height], normal }))
  const warnings = usable.flatMap(({ warning }) => warning ?? [])
  return findTouching(emitters, points) ?? { emitters, points, warnings }
}
