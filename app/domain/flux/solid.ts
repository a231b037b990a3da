import type { Body } from '#app/domain/layout/body.ts'
import type { Shape } from '#app/domain/site/site.ts'
import { add, dot, radians, scale, type Vec2, type Vec3 } from '#app/domain/vector.ts'

/** A half-space n·x ≤ offset. */
interface Face {
  readonly normal: Vec3
  readonly offset: number
}

/** A straight edge between two corners. */
export type Edge = readonly [from: Vec3, to: Vec3]

/** A convex solid that can stand in the way of radiation, with the box round it. Lengths m. */
export type Solid = { readonly low: Vec3; readonly high: Vec3 } & (
  | { readonly kind: 'convex'; readonly faces: readonly Face[]; readonly edges: readonly Edge[] }
  | { readonly kind: 'cylinder'; readonly centre: Vec2; readonly radius: number }
)

function convex(faces: readonly Face[], edges: readonly Edge[]): Solid {
  const corners = edges.flat()
  const extreme = (pick: (...values: number[]) => number): Vec3 => [
    pick(...corners.map((corner) => corner[0])),
    pick(...corners.map((corner) => corner[1])),
    pick(...corners.map((corner) => corner[2])),
  ]
  return { kind: 'convex', faces, edges, low: extreme(Math.min), high: extreme(Math.max) }
}

/** A box of any attitude: a heater's body, a table top. */
export function boxSolid({ centre, u, v, w, half }: Body): Solid {
  const axes = [
    { axis: u, reach: half.u },
    { axis: v, reach: half.v },
    { axis: w, reach: half.w },
  ]
  const faces = axes.flatMap(({ axis, reach }) =>
    [1, -1].map((sign) => ({ normal: scale(axis, sign), offset: sign * dot(axis, centre) + reach })),
  )
  const cornerAt = (corner: number) =>
    axes.reduce((at, { axis, reach }, bit) => add(at, scale(axis, corner & (1 << bit) ? reach : -reach)), centre)
  const edges = [0, 1, 2, 3, 4, 5, 6, 7].flatMap((corner) =>
    [1, 2, 4].filter((bit) => !(corner & bit)).map((bit): Edge => [cornerAt(corner), cornerAt(corner | bit)]),
  )
  return convex(faces, edges)
}

/** A plan rectangle of any turn between two heights. */
export function slabSolid(centre: Vec2, size: Vec2, turnDeg: number, bottom: number, top: number): Solid {
  const turn = radians(turnDeg)
  return boxSolid({
    centre: [centre[0], centre[1], (bottom + top) / 2],
    u: [Math.cos(turn), Math.sin(turn), 0],
    v: [-Math.sin(turn), Math.cos(turn), 0],
    w: [0, 0, 1],
    half: { u: size[0] / 2, v: size[1] / 2, w: (top - bottom) / 2 },
  })
}

/** An upright cylinder. */
export function cylinderSolid(centre: Vec2, radius: number, bottom: number, top: number): Solid {
  return {
    kind: 'cylinder',
    centre,
    radius,
    low: [centre[0] - radius, centre[1] - radius, bottom],
    high: [centre[0] + radius, centre[1] + radius, top],
  }
}

/** Twice the signed area of a plan triangle; positive when counter-clockwise. */
function turnOf(a: Vec2, b: Vec2, c: Vec2): number {
  return (b[0] - a[0]) * (c[1] - a[1]) - (b[1] - a[1]) * (c[0] - a[0])
}

/** Triangles of a simple outline by cutting ears. */
function trianglesOf(outline: readonly Vec2[]): [Vec2, Vec2, Vec2][] {
  const area = outline.reduce((sum, a, i) => {
    const b = outline[(i + 1) % outline.length] ?? a
    return sum + a[0] * b[1] - b[0] * a[1]
  }, 0)
  const rest = area < 0 ? [...outline].reverse() : [...outline]
  const triangles: [Vec2, Vec2, Vec2][] = []
  for (let i = 0, misses = 0; rest.length >= 3 && misses <= rest.length;) {
    const a = rest[(i + rest.length - 1) % rest.length]
    const b = rest[i % rest.length]
    const c = rest[(i + 1) % rest.length]
    if (!a || !b || !c) break
    const holds = (p: Vec2) => turnOf(a, b, p) >= 0 && turnOf(b, c, p) >= 0 && turnOf(c, a, p) >= 0
    const isEar = turnOf(a, b, c) > 0 && !rest.some((p) => p !== a && p !== b && p !== c && holds(p))
    if (isEar) triangles.push([a, b, c])
    if (isEar || turnOf(a, b, c) === 0) {
      rest.splice(i % rest.length, 1)
      misses = 0
    } else {
      i++
      misses++
    }
  }
  return triangles
}

function prismSolid(base: readonly [Vec2, Vec2, Vec2], bottom: number, top: number): Solid {
  const sides = base.map((a, i): Face => {
    const b = base[(i + 1) % 3] ?? a
    const normal: Vec3 = [b[1] - a[1], a[0] - b[0], 0]
    return { normal, offset: normal[0] * a[0] + normal[1] * a[1] }
  })
  const ends: Face[] = [
    { normal: [0, 0, 1], offset: top },
    { normal: [0, 0, -1], offset: -bottom },
  ]
  const edges = base.flatMap(([x, y], i): Edge[] => {
    const [x2, y2] = base[(i + 1) % 3] ?? [x, y]
    return [
      [
        [x, y, bottom],
        [x, y, top],
      ],
      [
        [x, y, bottom],
        [x2, y2, bottom],
      ],
      [
        [x, y, top],
        [x2, y2, top],
      ],
    ]
  })
  return convex([...sides, ...ends], edges)
}

/** The convex solids that make up an obstacle's shape; an outline of any form becomes three-sided prisms. */
export function solidsOf(shape: Shape): Solid[] {
  const [bottom, top] = shape.z
  if (shape.kind === 'cylinder') return [cylinderSolid(shape.centre, shape.radius, bottom, top)]
  if (shape.kind === 'prism') return trianglesOf(shape.outline).map((base) => prismSolid(base, bottom, top))
  const [x1, x2] = shape.x
  const [y1, y2] = shape.y
  return [slabSolid([(x1 + x2) / 2, (y1 + y2) / 2], [x2 - x1, y2 - y1], 0, bottom, top)]
}
