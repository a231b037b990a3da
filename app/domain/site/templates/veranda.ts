import { floorMoves, move, placesAlong, rectangle, templateOf } from '#app/domain/site/templates/template.ts'

/** A veranda against a house wall: a timber ceiling on joists, level or falling away from the wall. */
export const veranda = templateOf(
  {
    key: 'veranda',
    name: 'Veranda against a house wall',
    says: 'House wall, a timber ceiling over the whole floor, joists from the wall to the open edge.',
  },
  [
    { key: 'length', label: 'length along the wall, x', usual: 6, min: 1, max: 100 },
    { key: 'depth', label: 'depth from the wall, y', usual: 3, min: 1, max: 60 },
    { key: 'wall-height', label: 'ceiling height at the wall', usual: 2.7, min: 1.5, max: 15 },
    { key: 'edge-height', label: 'ceiling height at the open edge', usual: 2.5, min: 1.5, max: 15 },
    { key: 'spacing', label: 'joist spacing', usual: 0.6, min: 0.2, max: 10 },
    { key: 'width', label: 'joist width', usual: 0.045, min: 0.01, max: 1 },
    { key: 'joist-depth', label: 'joist depth', usual: 0.195, min: 0.01, max: 1 },
  ],
  (size) => {
    const [length, depth] = [size('length'), size('depth')]
    const joists = placesAlong(length, size('spacing')).map((x, k) => ({ id: `joist-${k}`, k, x }))
    const each = <T>(of: (joist: (typeof joists)[number]) => T[]) => joists.flatMap(of)
    return {
      site: {
        kind: 'house veranda',
        axes: 'x along the house wall, y away from it, z up from the finished floor',
        floor: rectangle(length, depth),
        beyond: [{ edge: 2, kind: 'garden', name: 'the garden' }],
        levels: [],
        covers: [
          {
            id: 'cover',
            name: 'timber ceiling',
            corners: [
              [0, 0, size('wall-height')],
              [length, 0, size('wall-height')],
              [length, depth, size('edge-height')],
              [0, depth, size('edge-height')],
            ],
            material: 'combustible',
            opening: false,
            swing: 0,
            voidDepth: null,
            note: null,
          },
        ],
        members: joists.map(({ id, k, x }) => ({
          id,
          name: `joist ${k}`,
          kind: 'timber joist',
          from: [x, 0],
          to: [x, depth],
          underside: { follows: 'cover' },
          width: size('width'),
          depth: size('joist-depth'),
          material: 'combustible',
          allowedPointLoad: null,
          loadStatus: 'not known',
        })),
        walls: [
          {
            id: 'wall',
            name: 'house wall',
            from: [0, 0],
            to: [length, 0],
            top: null,
            material: 'unknown',
            loadStatus: 'not known',
          },
        ],
        poles: [],
        obstacles: [],
        tables: [],
        seats: [],
      },
      moves: {
        length: floorMoves(0, [
          move('cover', 'cover', 'corners.1.0'),
          move('cover', 'cover', 'corners.2.0'),
          move('wall', 'wall', 'to.0'),
        ]),
        depth: floorMoves(1, [
          move('cover', 'cover', 'corners.2.1'),
          move('cover', 'cover', 'corners.3.1'),
          ...each(({ id }) => [move('member', id, 'to.1')]),
        ]),
        'wall-height': [move('cover', 'cover', 'corners.0.2'), move('cover', 'cover', 'corners.1.2')],
        'edge-height': [move('cover', 'cover', 'corners.2.2'), move('cover', 'cover', 'corners.3.2')],
        spacing: each(({ id, k }) => (k === 0 ? [] : [move('member', id, 'from.0', k), move('member', id, 'to.0', k)])),
        width: each(({ id }) => [move('member', id, 'width')]),
        'joist-depth': each(({ id }) => [move('member', id, 'depth')]),
      },
    }
  },
)
