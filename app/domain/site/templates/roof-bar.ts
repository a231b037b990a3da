import { seatsAtSides, usualHeights, usualSetback } from '#app/domain/site/seating.ts'
import { at, floorMoves, move, rectangle, table, templateOf } from '#app/domain/site/templates/template.ts'

const [barDepth, barTop, glass, stool] = [0.6, 1.05, 0.02, 0.65]

/** A bar on a roof: a wall behind, a counter with stools along it, glass at the far edge, open sky. */
export const roofBar = templateOf(
  {
    key: 'roof-bar',
    name: 'Roof bar under open sky',
    says: 'A wall behind, a counter with people along it, a glass parapet at the far edge.',
  },
  [
    { key: 'length', label: 'length along the wall, x', usual: 12, min: 3, max: 100 },
    { key: 'depth', label: 'depth from the wall, y', usual: 8, min: 3, max: 60 },
    { key: 'wall', label: 'height of the wall', usual: 3.2, min: 0.5, max: 30 },
    { key: 'parapet', label: 'height of the parapet', usual: 1.2, min: 0.2, max: 5 },
    { key: 'bar', label: 'length of the counter', usual: 6, min: 1, max: 100 },
    { key: 'bar-away', label: 'from the wall to the counter', usual: 1.2, min: 0, max: 20 },
  ],
  (size) => {
    const [length, depth] = [size('length'), size('depth')]
    const counter = table('bar', [length / 2, size('bar-away') + barDepth / 2], [size('bar'), barDepth], barTop)
    const many = Math.max(1, Math.floor(size('bar') / stool))
    const people = seatsAtSides(counter, { below: 0, above: many, left: 0, right: 0 }, usualSetback)
    return {
      site: {
        kind: 'roof bar',
        axes: 'x along the wall, y away from it, z up from the finished floor',
        floor: rectangle(length, depth),
        beyond: [{ edge: 2, kind: 'drop', name: 'the street below' }],
        levels: [],
        covers: [],
        members: [],
        walls: [
          {
            id: 'wall',
            name: 'wall behind the bar',
            from: [0, 0],
            to: [length, 0],
            top: size('wall'),
            material: 'unknown',
            loadStatus: 'not known',
          },
        ],
        poles: [],
        obstacles: [
          {
            id: 'parapet',
            name: 'glass parapet',
            kind: 'other',
            material: 'non-combustible',
            movable: false,
            shape: { kind: 'box', x: [0, length], y: at(depth - glass, depth), z: [0, size('parapet')] },
            transmittance: 0,
            note: null,
          },
        ],
        tables: [counter],
        seats: people.map((place, i) => ({
          id: `bar-seat-${i + 1}`,
          group: 'bar',
          priority: 'primary',
          posture: 'standing',
          ...usualHeights.standing,
          ...place,
        })),
      },
      moves: {
        length: floorMoves(0, [
          move('wall', 'wall', 'to.0'),
          move('obstacle', 'parapet', 'shape.x.1'),
          move('table', 'bar', 'centre.0', 0.5),
          ...people.map((_, i) => move('seat', `bar-seat-${i + 1}`, 'x', 0.5)),
        ]),
        depth: floorMoves(1, [move('obstacle', 'parapet', 'shape.y.0'), move('obstacle', 'parapet', 'shape.y.1')]),
        wall: [move('wall', 'wall', 'top')],
        parapet: [move('obstacle', 'parapet', 'shape.z.1')],
        bar: [
          move('table', 'bar', 'size.0'),
          ...people.map((_, i) => move('seat', `bar-seat-${i + 1}`, 'x', (i + 0.5) / many - 0.5)),
        ],
        'bar-away': [move('table', 'bar', 'centre.1'), ...people.map((_, i) => move('seat', `bar-seat-${i + 1}`, 'y'))],
      },
    }
  },
)
