import type { Cells } from '#app/domain/flux/cells.ts'
import type { Edge, Solid } from '#app/domain/flux/solid.ts'
import type { Vec2, Vec3 } from '#app/domain/vector.ts'

/** The outline that a solid throws from a point source onto a horizontal plane, as the extent of each row of cells. */
export interface Silhouette {
  /** For each row the least and the greatest x of the shadow, m; least > greatest where there is none. */
  readonly least: Float64Array
  readonly greatest: Float64Array
  /** Rows that it may reach: the first and the last; the extents of others are not to be read. */
  firstRow: number
  lastRow: number
}

/** Room for silhouettes over so many rows. */
export const emptySilhouette = (rows: number): Silhouette => ({
  least: new Float64Array(rows),
  greatest: new Float64Array(rows),
  firstRow: 0,
  lastRow: -1,
})

/** The part of a solid between the plane and the source: straight edges, or an upright cylinder's height. */
export type Caster =
  | { readonly kind: 'edges'; readonly edges: readonly Edge[] }
  | {
      readonly kind: 'cylinder'
      readonly x: number
      readonly y: number
      readonly radius: number
      readonly bottom: number
      readonly top: number
    }

type Cylinder = Extract<Caster, { kind: 'cylinder' }>

/** What reaches less far over the plane throws no shadow, m. */
const thinnest = 1e-9

/** Kept free below the source, as a share of its height over the plane: a shadow from there would run to infinity. */
const headroom = 0.01

/** An edge cut to the heights bottom … top, and the places where it was cut. */
function cutEdge(
  [from, to]: Edge,
  bottom: number,
  top: number,
): { edge: Edge; cuts: { at: Vec3; top: boolean }[] } | null {
  const rise = to[2] - from[2]
  const placeAt = (z: number) => (rise === 0 ? 0 : (z - from[2]) / rise)
  const at = (t: number): Vec3 => [from[0] + t * (to[0] - from[0]), from[1] + t * (to[1] - from[1]), from[2] + t * rise]
  if (rise === 0) return from[2] < bottom || from[2] > top ? null : { edge: [from, to], cuts: [] }
  const ends = [placeAt(bottom), placeAt(top)].sort((a, b) => a - b)
  const start = Math.max(0, ends[0] ?? 0)
  const end = Math.min(1, ends[1] ?? 1)
  if (start > end) return null
  const edge: Edge = [at(start), at(end)]
  const cuts = edge
    .map((place, i) => ({ at: place, cut: i === 0 ? start > 0 : end < 1, top: (i === 0) === rise < 0 }))
    .filter(({ cut }) => cut)
  return { edge, cuts }
}

const pairs = (points: readonly Vec3[]): Edge[] =>
  points.flatMap((a, i) => points.slice(i + 1).map((b): Edge => [a, b]))

/** What of a solid can throw a shadow from a source at `height` onto the plane at z; null when nothing can. */
export function casterOf(solid: Solid, z: number, height: number): Caster | null {
  const bottom = Math.max(solid.low[2], z)
  const top = Math.min(solid.high[2], height - headroom * (height - z))
  if (top - bottom < thinnest) return null
  if (solid.kind === 'cylinder') {
    return { kind: 'cylinder', x: solid.centre[0], y: solid.centre[1], radius: solid.radius, bottom, top }
  }
  if (solid.low[2] >= bottom && solid.high[2] <= top) return { kind: 'edges', edges: solid.edges }
  const cut = solid.edges.map((edge) => cutEdge(edge, bottom, top)).filter((each) => each !== null)
  const cuts = cut.flatMap((each) => each.cuts)
  const caps = [true, false].flatMap((isTop) => pairs(cuts.filter((c) => c.top === isTop).map((c) => c.at)))
  return { kind: 'edges', edges: [...cut.map((each) => each.edge), ...caps] }
}

/** Height of the highest part of a caster. */
export function topOf(caster: Caster): number {
  if (caster.kind === 'cylinder') return caster.top
  return caster.edges.reduce((top, [a, b]) => Math.max(top, a[2], b[2]), -Infinity)
}

/** Cells' geometry and the extents under way. */
interface Rows {
  readonly y0: number
  readonly cell: number
  readonly count: number
  readonly least: Float64Array
  readonly greatest: Float64Array
}

/** Opens the rows from y1 to y2 for the extents. */
function openRows(into: Silhouette, cells: Cells, y1: number, y2: number): Rows {
  into.firstRow = Math.max(0, Math.ceil((y1 - cells.y0) / cells.cell - 0.5))
  into.lastRow = Math.min(cells.rows - 1, Math.floor((y2 - cells.y0) / cells.cell - 0.5))
  for (let row = into.firstRow; row <= into.lastRow; row++) {
    into.least[row] = Infinity
    into.greatest[row] = -Infinity
  }
  return { y0: cells.y0, cell: cells.cell, count: cells.rows, least: into.least, greatest: into.greatest }
}

function extend(rows: Rows, row: number, x: number): void {
  if (x < (rows.least[row] ?? 0)) rows.least[row] = x
  if (x > (rows.greatest[row] ?? 0)) rows.greatest[row] = x
}

function extendBySegment(rows: Rows, x1: number, y1: number, x2: number, y2: number): void {
  const low = Math.max(0, Math.ceil((Math.min(y1, y2) - rows.y0) / rows.cell - 0.5))
  const high = Math.min(rows.count - 1, Math.floor((Math.max(y1, y2) - rows.y0) / rows.cell - 0.5))
  const slope = y2 === y1 ? 0 : (x2 - x1) / (y2 - y1)
  for (let row = low; row <= high; row++) extend(rows, row, x1 + (rows.y0 + (row + 0.5) * rows.cell - y1) * slope)
}

function extendByDisc(rows: Rows, x: number, y: number, radius: number): void {
  const low = Math.max(0, Math.ceil((y - radius - rows.y0) / rows.cell - 0.5))
  const high = Math.min(rows.count - 1, Math.floor((y + radius - rows.y0) / rows.cell - 0.5))
  for (let row = low; row <= high; row++) {
    const off = rows.y0 + (row + 0.5) * rows.cell - y
    const half = Math.sqrt(Math.max(0, radius * radius - off * off))
    extend(rows, row, x - half)
    extend(rows, row, x + half)
  }
}

/** The hull of two discs: both and the two lines that touch them from outside. */
function extendByDiscs(rows: Rows, a: readonly [number, number, number], b: readonly [number, number, number]): void {
  extendByDisc(rows, ...a)
  extendByDisc(rows, ...b)
  const [dx, dy] = [b[0] - a[0], b[1] - a[1]]
  const distance = Math.sqrt(dx * dx + dy * dy)
  const sine = (a[2] - b[2]) / distance
  if (!(Math.abs(sine) < 1)) return
  const cosine = Math.sqrt(1 - sine * sine)
  for (const side of [-1, 1]) {
    const nx = (sine * dx - side * cosine * dy) / distance
    const ny = (sine * dy + side * cosine * dx) / distance
    extendBySegment(rows, a[0] + a[2] * nx, a[1] + a[2] * ny, b[0] + b[2] * nx, b[1] + b[2] * ny)
  }
}

/** First column of a silhouette in one of its rows, 0 … `columns`. */
export function firstIn({ least }: Silhouette, { x0, cell, columns }: Cells, row: number): number {
  return Math.min(Math.max(Math.ceil(((least[row] ?? 0) - x0) / cell - 0.5), 0), columns)
}

/** Column after the last of a silhouette in one of its rows, 0 … `columns`; not beyond the first when it holds none. */
export function endIn({ greatest }: Silhouette, { x0, cell, columns }: Cells, row: number): number {
  return Math.min(Math.max(Math.floor(((greatest[row] ?? 0) - x0) / cell + 0.5), 0), columns)
}

/** Writes the silhouette of a caster from a source into the extents of the rows of cells. */
export function drawSilhouette(into: Silhouette, cells: Cells, caster: Caster, source: Vec3): void {
  if (caster.kind === 'cylinder') drawCylinder(into, cells, caster, source)
  else drawEdges(into, cells, caster.edges, source)
}

/** The disc, x, y and radius, that a cylinder's section at a height throws onto the plane at z. */
function discOf(caster: Cylinder, height: number, z: number, [x, y, top]: Vec3): readonly [number, number, number] {
  const k = (top - z) / (top - height)
  return [x + (caster.x - x) * k, y + (caster.y - y) * k, caster.radius * k]
}

function drawCylinder(into: Silhouette, cells: Cells, caster: Cylinder, source: Vec3): void {
  const low = discOf(caster, caster.bottom, cells.z, source)
  const high = discOf(caster, caster.top, cells.z, source)
  const rows = openRows(
    into,
    cells,
    Math.min(low[1] - low[2], high[1] - high[2]),
    Math.max(low[1] + low[2], high[1] + high[2]),
  )
  if (into.lastRow >= into.firstRow) extendByDiscs(rows, low, high)
}

/** Writes an outline in plan into the extents of the rows of cells. */
export function drawOutline(into: Silhouette, cells: Cells, outline: readonly Vec2[]): void {
  const ys = outline.map(([, y]) => y)
  const rows = openRows(into, cells, Math.min(...ys), Math.max(...ys))
  outline.forEach(([x, y], i) => {
    const next = outline[(i + 1) % outline.length]
    if (next) extendBySegment(rows, x, y, next[0], next[1])
  })
}

function drawEdges(into: Silhouette, cells: Cells, edges: readonly Edge[], source: Vec3): void {
  const [sx, sy, sz] = source
  const gap = sz - cells.z
  let [lowest, highest] = [Infinity, -Infinity]
  for (const [a, b] of edges) {
    const [ya, yb] = [sy + ((a[1] - sy) * gap) / (sz - a[2]), sy + ((b[1] - sy) * gap) / (sz - b[2])]
    lowest = Math.min(lowest, ya, yb)
    highest = Math.max(highest, ya, yb)
  }
  const rows = openRows(into, cells, lowest, highest)
  if (into.lastRow < into.firstRow) return
  for (const [a, b] of edges) {
    const ka = gap / (sz - a[2])
    const kb = gap / (sz - b[2])
    extendBySegment(rows, sx + (a[0] - sx) * ka, sy + (a[1] - sy) * ka, sx + (b[0] - sx) * kb, sy + (b[1] - sy) * kb)
  }
}
