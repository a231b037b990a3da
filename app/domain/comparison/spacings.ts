import type { Layout } from '#app/domain/layout/layout.ts'

/** Heaters whose centres lie within this distance of one line stand in one row, m. */
const rowWidth = 0.15

/** Spacings closer together than this are the same one, m. */
const sameSpacing = 0.005

/** Distances between neighbours in rows along x and along y, m, rising, each value once. */
export interface Spacings {
  readonly x: readonly number[]
  readonly y: readonly number[]
}

/** Centre to centre distances between neighbours of each row of a layout. */
export function spacingsOf({ heaters }: Pick<Layout, 'heaters'>): Spacings {
  const places = heaters.map(({ x, y }) => ({ along: x, across: y }))
  return { x: alongRows(places), y: alongRows(places.map(({ along, across }) => ({ along: across, across: along }))) }
}

interface Place {
  readonly along: number
  readonly across: number
}

function alongRows(places: readonly Place[]): number[] {
  const gaps = rowsOf(places).flatMap((row) => {
    const stations = row.map((place) => place.along).sort((a, b) => a - b)
    return stations.slice(1).map((station, i) => station - (stations[i] ?? station))
  })
  const rising = gaps.filter((gap) => gap > rowWidth).sort((a, b) => a - b)
  return rising.filter((gap, i) => i === 0 || gap - (rising[i - 1] ?? 0) > sameSpacing)
}

function rowsOf(places: readonly Place[]): Place[][] {
  const rows: Place[][] = []
  for (const place of places.toSorted((a, b) => a.across - b.across)) {
    const row = rows.at(-1)
    if (row?.[0] && place.across - row[0].across <= rowWidth) row.push(place)
    else rows.push([place])
  }
  return rows
}
