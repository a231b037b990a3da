import type { Dimension, Site, SizeSource } from '#app/domain/site/site.ts'
import type { DemoDimension } from '#drizzle/seed/demo-file.ts'

type Move = Dimension['moves'][number]
type Place = Omit<Site, 'dimensions'>

const sources: readonly (readonly [RegExp, SizeSource])[] = [
  [/laser/, 'laser'],
  [/tape/, 'tape'],
  [/photo/, 'photo'],
  [/plan/, 'drawing'],
  [/guess/, 'guessed'],
]

/** A customer's own count or pacing is "told". */
function sourceOf(text: string): SizeSource {
  return sources.find(([pattern]) => pattern.test(text))?.[1] ?? 'told'
}

const move = (of: Move['of'], id: string, coordinate: string, by = 1): Move => ({ of, id, coordinate, by })

/** Every corner of the covers whose x (0) or y (1) is the given coordinate. */
function cornersAt(site: Place, axis: 0 | 1, at: number, moved: 0 | 1 | 2): Move[] {
  return site.covers.flatMap((cover) =>
    cover.corners.flatMap((corner, i) =>
      corner[axis] === at ? [move('cover', cover.id, `corners.${i}.${moved}`)] : [],
    ),
  )
}

/** Things that end at the far side of the floor: its outline, covers, members, walls and the obstacles along it. */
function farEdge(site: Place, axis: 0 | 1, at: number): Move[] {
  const name = axis === 0 ? 'x' : 'y'
  const lines = [
    ...site.walls.map((wall) => ({ of: 'wall' as const, ...wall })),
    ...(axis === 1 ? site.members.map((member) => ({ of: 'member' as const, ...member })) : []),
  ]
  const boxes = site.obstacles.flatMap((obstacle) =>
    obstacle.shape.kind === 'box' ? [{ ...obstacle, shape: obstacle.shape }] : [],
  )
  return [
    ...site.floor.flatMap((corner, i) => (corner[axis] === at ? [move('floor', 'floor', `${i}.${axis}`)] : [])),
    ...cornersAt(site, axis, at, axis),
    ...lines.flatMap((line) => (line.to[axis] === at ? [move(line.of, line.id, `to.${axis}`)] : [])),
    ...boxes.flatMap(({ id, shape }) => {
      if (shape[name][1] !== at) return []
      const far = move('obstacle', id, `shape.${name}.1`)
      return axis === 1 ? [move('obstacle', id, 'shape.y.0'), far] : [far]
    }),
  ]
}

/** Members at equal spacing from the first: the k-th moves k times as far as the spacing. */
function membersBySpacing(site: Place): Move[] {
  return site.members.flatMap((member, k) =>
    k === 0 ? [] : [move('member', member.id, 'from.0', k), move('member', member.id, 'to.0', k)],
  )
}

const hung = (id: string): Move[] => [move('obstacle', id, 'shape.z.0'), move('obstacle', id, 'shape.z.1')]

/** What each labelled size of the demo sites decides. */
const decides: Readonly<Record<string, (site: Place, value: number) => Move[]>> = {
  'terrace length, x': (site, value) => farEdge(site, 0, value),
  'deck length, x': (site, value) => farEdge(site, 0, value),
  'veranda length, x': (site, value) => farEdge(site, 0, value),
  'terrace depth, y': (site, value) => farEdge(site, 1, value),
  'deck depth, y': (site, value) => farEdge(site, 1, value),
  'veranda depth, y': (site, value) => farEdge(site, 1, value),
  'roof underside at house wall': (site) => cornersAt(site, 1, 0, 2),
  'roof underside at river edge': (site) =>
    site.covers.flatMap(({ corners }) => cornersAt(site, 1, corners[2]?.[1] ?? 0, 2)),
  'beam spacing': membersBySpacing,
  'joist spacing': membersBySpacing,
  'timber trim, projection from wall': () => [move('obstacle', 'trim', 'shape.y.1')],
  'timber trim, underside height': () => hung('trim'),
  'bar wall height': () => [move('wall', 'wall', 'top')],
  'umbrella rim height': (site) => site.obstacles.flatMap(({ id }) => hung(id)),
  'umbrella diameter': (site) => site.obstacles.map(({ id }) => move('obstacle', id, 'shape.radius', 0.5)),
  'parapet glass height': () => [],
  'ceiling height': (site) => [
    ...site.covers.flatMap((cover) => cover.corners.map((_, i) => move('cover', cover.id, `corners.${i}.2`))),
    ...hung('fan'),
    ...hung('pendant'),
    move('obstacle', 'blind', 'shape.z.1'),
  ],
  'ceiling void': (site) => site.covers.map(({ id }) => move('cover', id, 'voidDepth')),
}

/** A labelled size as a dimension of the site that moves the coordinates it decides. Throws on an unknown label. */
export function dimensionOf(given: DemoDimension, index: number, site: Place): Dimension {
  const value = given.mm / 1000
  const moves = decides[given.label]
  if (!moves) throw new Error(`No meaning known for the size "${given.label}".`)
  return {
    id: `size-${index + 1}`,
    label: given.label,
    value,
    tolerance: given.toleranceMm / 1000,
    source: sourceOf(given.source),
    note: given.source,
    moves: moves(site, value),
  }
}
