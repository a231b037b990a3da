import { emitterOf, type Emitter } from '#app/domain/flux/emitter.ts'
import type { MapQuestion } from '#app/domain/flux/map-question.ts'
import type { Obstruction } from '#app/domain/flux/shading.ts'
import { cylinderSolid, slabSolid } from '#app/domain/flux/solid.ts'
import type { Vec2, Vec3 } from '#app/domain/vector.ts'
import { demoModels } from '#drizzle/seed/demo-sites.ts'

/** What is measured: the demo's own models, whose exponents are real, asked of the function that the worker calls. */
const models = new Map(demoModels().map((model) => [model.code, model]))
const twoElements = ['betony-3-0', 'sanicle-3-2', 'sanicle-4-8', 'teasel-2-8'] as const

const rectangle = (width: number, depth: number): Vec2[] => [
  [0, 0],
  [width, 0],
  [width, depth],
  [0, depth],
]

export interface Hanging {
  readonly x: number
  readonly y: number
  readonly turnDeg?: number
  readonly tiltDeg?: number
  readonly model?: string
}

/** A heater of a demo model, hung at the middle of the heights its manual allows. */
export function hung(id: string, { x, y, turnDeg = 0, tiltDeg = 0, model = twoElements[0] }: Hanging): Emitter {
  const data = models.get(model)
  if (!data) throw new Error(`no demo model ${model}`)
  const { min, recommendedMax } = data.mountingHeight
  const heater = {
    id,
    model,
    supplyVoltage: data.supplyOptions[0]?.voltage ?? 230,
    x,
    y,
    lowestPoint: ((min ?? 2.4) + (recommendedMax ?? 3)) / 2,
    turnDeg,
    tiltDeg,
    mount: 'chain',
    memberId: null,
  } as const
  const emitter = emitterOf(heater, data)
  if (!emitter) throw new Error(`no beam for ${model}`)
  return emitter
}

/** Every heater at another turn, none along a wall: what a map costs in general. */
const ownTurn = (i: number) => (11 + 17 * i) % 180
/** Along the walls and across: the lines of cells run along the elements, which saves half. */
export const alongWalls = (i: number) => (i % 2) * 90

/** `count` heaters of two elements in a row over a floor of 12 × 5 m, of all four such models. */
export function row(count: number, turnOf: (i: number) => number = ownTurn): Emitter[] {
  return Array.from({ length: count }, (_, i) =>
    hung(`h${i}`, {
      x: (12 * (i + 0.5)) / count,
      y: 2.5,
      turnDeg: turnOf(i),
      tiltDeg: i % 4 === 3 ? 0 : (i % 3) * 15,
      model: twoElements[i % 4] ?? 'betony-3-0',
    }),
  )
}

/** A question over 12 × 5 m with about so many cells; without levels nothing is traced. */
export function terrace(emitters: readonly Emitter[], cells = 24_000, more: Partial<MapQuestion> = {}): MapQuestion {
  const cell = Math.sqrt(60 / cells)
  return { emitters, floor: rectangle(12, 5), z: 0.6, cell, quantity: { kind: 'flux' }, levels: [], edges: [], ...more }
}

/** 100 × 60 m with 100 heaters, one over each 10 × 6 m. */
export function largeSite(turnOf: (i: number) => number = ownTurn): MapQuestion {
  const emitters = Array.from({ length: 100 }, (_, i) =>
    hung(`h${i}`, {
      x: 5 + (i % 10) * 10,
      y: 3 + Math.floor(i / 10) * 6,
      turnDeg: turnOf(i),
      tiltDeg: (i % 3) * 15,
      model: twoElements[i % 4] ?? 'betony-3-0',
    }),
  )
  return { ...terrace(emitters), floor: rectangle(100, 60), cell: 0.25 }
}

/** Things of a terrace in turn: table, post, table, umbrella. */
export function things(count: number): Obstruction[] {
  return Array.from({ length: count }, (_, i): Obstruction => {
    const x = (12 * (i + 0.5)) / Math.max(count, 1)
    const y = 1 + (i % 3) * 1.5
    const opaque = { id: `t${i}`, heaterId: null, transmittance: 0 }
    if (i % 4 === 1) return { ...opaque, solids: [cylinderSolid([x, y], 0.06, 0, 2.6)] }
    if (i % 4 === 3 && i % 8 === 3) {
      return { ...opaque, transmittance: 0.3, solids: [cylinderSolid([x, y], 1.2, 1.9, 2.3)] }
    }
    return { ...opaque, solids: [slabSolid([x, y], [0.8, 0.8], 15 * i, 0.7, 0.74)] }
  })
}

/** 60 seats of a terrace, at body height. */
export const seats: Vec3[] = Array.from({ length: 60 }, (_, i) => [
  0.6 + (i % 15) * 0.75,
  0.8 + Math.floor(i / 15) * 1.1,
  0.6,
])

/** Layouts of eight heaters of two elements that differ in where they hang. */
export function variants(count: number): Emitter[][] {
  return Array.from({ length: count }, (_, k) =>
    Array.from({ length: 8 }, (__, i) =>
      hung(`h${i}`, {
        x: 0.75 + i * 1.5 + (k % 10) * 0.03,
        y: 2 + (k % 37) * 0.03,
        turnDeg: (k % 2) * 90,
        tiltDeg: (k % 3) * 10,
      }),
    ),
  )
}
