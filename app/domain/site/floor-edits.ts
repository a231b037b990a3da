import {
  withCornerAdded,
  withCornerAt,
  withEdgeLength,
  withoutCorner,
  type MovedEnd,
} from '#app/domain/site/outline.ts'
import type { Dimension, Site } from '#app/domain/site/site.ts'
import type { Vec2 } from '#app/domain/vector.ts'

/** The site with one corner of the floor at another place. */
export const moveFloorCorner = (site: Site, corner: number, at: Vec2): Site => ({
  ...site,
  floor: withCornerAt(site.floor, corner, at),
})

/** The site with an edge of the floor of a typed length, m; the named end of the edge moves. */
export const setFloorEdge = (site: Site, edge: number, length: number, moved: MovedEnd): Site => ({
  ...site,
  floor: withEdgeLength(site.floor, edge, length, moved),
})

/**
 * The site with a corner more in an edge of the floor, in its middle or at a place. What lies beyond the edge stays at
 * its first part; sizes keep deciding the corners they decided.
 */
export const addFloorCorner = (site: Site, edge: number, at?: Vec2): Site => ({
  ...site,
  floor: withCornerAdded(site.floor, edge, at),
  beyond: site.beyond.map((place) => (place.edge > edge ? { ...place, edge: place.edge + 1 } : place)),
  dimensions: renumbered(site.dimensions, (corner) => (corner > edge ? corner + 1 : corner)),
})

/** The site without one corner of the floor, what lay beyond its edge, and what sizes decided of it. */
export const removeFloorCorner = (site: Site, corner: number): Site => ({
  ...site,
  floor: withoutCorner(site.floor, corner),
  beyond: site.beyond
    .filter(({ edge }) => edge !== corner)
    .map((place) => (place.edge > corner ? { ...place, edge: place.edge - 1 } : place)),
  dimensions: renumbered(site.dimensions, (at) => (at === corner ? null : at > corner ? at - 1 : at)),
})

/** The site with another floor altogether. Edges that are not there any more have nothing beyond them. */
export const replaceFloor = (site: Site, floor: readonly Vec2[]): Site => ({
  ...site,
  floor: floor.map(([x, y]): [number, number] => [x, y]),
  beyond: site.beyond.filter(({ edge }) => edge < floor.length),
  dimensions: renumbered(site.dimensions, () => null),
})

type Beyond = Site['beyond'][number]

/** The site with something else beyond an edge of the floor; null: nothing known. */
export const setBeyond = (site: Site, edge: number, place: Omit<Beyond, 'edge'> | null): Site => ({
  ...site,
  beyond: [...site.beyond.filter((each) => each.edge !== edge), ...(place ? [{ ...place, edge }] : [])].toSorted(
    (a, b) => a.edge - b.edge,
  ),
})

/** Dimensions whose moves of floor corners name other corners; null takes a move away. */
function renumbered(dimensions: readonly Dimension[], cornerOf: (corner: number) => number | null): Dimension[] {
  return dimensions.map((dimension) => {
    if (!dimension.moves.some(({ of }) => of === 'floor')) return dimension
    const moves = dimension.moves.flatMap((move) => {
      if (move.of !== 'floor') return [move]
      const [corner = '', ...rest] = move.coordinate.split('.')
      const now = cornerOf(Number(corner))
      return now === null ? [] : [{ ...move, coordinate: [now, ...rest].join('.') }]
    })
    return { ...dimension, moves }
  })
}
