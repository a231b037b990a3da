import { seatsAtSides, usualHeights, usualSetback } from '#app/domain/site/seating.ts'
import type { Shape } from '#app/domain/site/site.ts'
import { at, floorMoves, move, rectangle, table, templateOf, type Move } from '#app/domain/site/templates/template.ts'
import { shutRim, usualStates } from '#app/domain/site/usual-states.ts'

/** Rim to top of an open umbrella, m. */
const rise = 0.6
const tableSide = 0.8

/** A terrace with a row of umbrellas, under each a table for four. */
export const umbrellaTerrace = templateOf(
  {
    key: 'umbrella-terrace',
    name: 'Terrace with umbrellas',
    says: 'A row of umbrellas that open and shut, under each a table for four.',
  },
  [
    { key: 'length', label: 'length, x', usual: 12, min: 2, max: 100 },
    { key: 'depth', label: 'depth, y', usual: 5, min: 2, max: 60 },
    { key: 'diameter', label: 'umbrella diameter, open', usual: 3, min: 1, max: 12 },
    { key: 'rim', label: 'rim height, open', usual: 2.2, min: 1.5, max: 10 },
    { key: 'spacing', label: 'umbrella spacing', usual: 4, min: 1.2, max: 50 },
  ],
  (size) => {
    const [length, depth, spacing] = [size('length'), size('depth'), size('spacing')]
    const count = Math.max(1, Math.floor(length / spacing + 1e-6))
    const first = (length - (count - 1) * spacing) / 2
    const sets = Array.from({ length: count }, (_, k) => ({
      k,
      name: `U${k + 1}`,
      centre: at(first + k * spacing, depth / 2),
    }))
    const seatIds = (name: string) => [1, 2, 3, 4].map((n) => `${name}-${n}`)
    /** A move of everything of every set, by a share that depends on its number. */
    const all = (axis: 0 | 1, by: (k: number) => number): Move[] =>
      sets.flatMap(({ k, name }) => [
        move('obstacle', `umbrella-${k + 1}`, `shape.centre.${axis}`, by(k)),
        ...[0, 1].map((state) => move('obstacle', `umbrella-${k + 1}`, `states.${state}.shape.centre.${axis}`, by(k))),
        move('table', name, `centre.${axis}`, by(k)),
        ...seatIds(name).map((id) => move('seat', id, axis === 0 ? 'x' : 'y', by(k))),
      ])
    return {
      site: {
        kind: 'terrace with umbrellas',
        axes: 'x along the front, y away from it, z up from the finished floor',
        floor: rectangle(length, depth),
        beyond: [],
        levels: [],
        covers: [],
        members: [],
        walls: [],
        poles: [],
        obstacles: sets.map(({ k, centre }) => {
          const shape: Shape = {
            kind: 'cylinder',
            centre,
            radius: size('diameter') / 2,
            z: at(size('rim'), size('rim') + rise),
          }
          return {
            id: `umbrella-${k + 1}`,
            name: `umbrella ${k + 1}`,
            kind: 'umbrella',
            material: 'combustible',
            movable: true,
            shape,
            states: usualStates('umbrella', shape),
            transmittance: 0,
            note: null,
          }
        }),
        tables: sets.map(({ name, centre }) => table(name, centre, [tableSide, tableSide], 0.74)),
        seats: sets.flatMap(({ name, centre }) =>
          seatsAtSides(
            { centre, size: [tableSide, tableSide], turnDeg: 0 },
            { below: 1, above: 1, left: 1, right: 1 },
            usualSetback,
          ).map((place, i) => ({
            id: `${name}-${i + 1}`,
            group: name,
            priority: 'primary' as const,
            posture: 'seated' as const,
            ...usualHeights.seated,
            ...place,
          })),
        ),
      },
      moves: {
        length: floorMoves(
          0,
          all(0, () => 0.5),
        ),
        depth: floorMoves(
          1,
          all(1, () => 0.5),
        ),
        diameter: sets.flatMap(({ k }) => [
          move('obstacle', `umbrella-${k + 1}`, 'shape.radius', 0.5),
          move('obstacle', `umbrella-${k + 1}`, 'states.0.shape.radius', 0.5),
        ]),
        rim: sets.flatMap(({ k }) => [
          ...['shape.z.0', 'shape.z.1', 'states.0.shape.z.0', 'states.0.shape.z.1', 'states.1.shape.z.1'].map(
            (coordinate) => move('obstacle', `umbrella-${k + 1}`, coordinate),
          ),
          move('obstacle', `umbrella-${k + 1}`, 'states.1.shape.z.0', shutRim),
        ]),
        spacing: all(0, (k) => k - (count - 1) / 2),
      },
    }
  },
)
