import { at, floorMoves, move, placesAlong, rectangle, templateOf } from '#app/domain/site/templates/template.ts'

const section = { width: 0.08, depth: 0.16 }

/** A pergola that stands by itself: four posts, two beams along x on them, rafters across under open sky. */
export const pergola = templateOf(
  {
    key: 'pergola',
    name: 'Free-standing pergola',
    says: 'Four posts, two beams on them and rafters across, open to the sky.',
  },
  [
    { key: 'length', label: 'length, x', usual: 5, min: 1, max: 100 },
    { key: 'depth', label: 'depth, y', usual: 3.5, min: 1, max: 60 },
    { key: 'height', label: 'underside of the beams', usual: 2.4, min: 1.5, max: 15 },
    { key: 'spacing', label: 'rafter spacing', usual: 0.9, min: 0.2, max: 10 },
    { key: 'post', label: 'post thickness', usual: 0.12, min: 0.03, max: 1 },
  ],
  (size) => {
    const [length, depth, height] = [size('length'), size('depth'), size('height')]
    const onTop = height + section.depth
    const rafters = placesAlong(length, size('spacing')).map((x, k) => ({ id: `rafter-${k}`, k, x }))
    const posts = [at(0, 0), at(length, 0), at(length, depth), at(0, depth)].map((place, i) => ({
      id: `post-${i + 1}`,
      place,
      i,
    }))
    const common = { ...section, material: 'combustible' as const, allowedPointLoad: null, loadStatus: 'not known' }
    const beam = (id: string, name: string, y: number) => ({
      ...common,
      id,
      name,
      kind: 'timber beam',
      from: at(0, y),
      to: at(length, y),
      underside: { from: height, to: height },
    })
    return {
      site: {
        kind: 'free-standing pergola',
        axes: 'x along the front, y away from it, z up from the finished floor',
        floor: rectangle(length, depth),
        beyond: [],
        levels: [],
        covers: [],
        members: [
          beam('beam-front', 'front beam', 0),
          beam('beam-back', 'back beam', depth),
          ...rafters.map(({ id, k, x }) => ({
            ...common,
            id,
            name: `rafter ${k}`,
            kind: 'timber rafter',
            from: at(x, 0),
            to: at(x, depth),
            underside: { from: onTop, to: onTop },
          })),
        ],
        walls: [],
        poles: posts.map(({ id, place, i }) => ({
          id,
          name: `post ${i + 1}`,
          at: place,
          top: height,
          diameter: size('post'),
          material: 'combustible',
          loadStatus: 'not known',
        })),
        obstacles: [],
        tables: [],
        seats: [],
      },
      moves: {
        length: floorMoves(0, [
          move('member', 'beam-front', 'to.0'),
          move('member', 'beam-back', 'to.0'),
          move('pole', 'post-2', 'at.0'),
          move('pole', 'post-3', 'at.0'),
        ]),
        depth: floorMoves(1, [
          move('member', 'beam-back', 'from.1'),
          move('member', 'beam-back', 'to.1'),
          ...rafters.map(({ id }) => move('member', id, 'to.1')),
          move('pole', 'post-3', 'at.1'),
          move('pole', 'post-4', 'at.1'),
        ]),
        height: [
          ...['beam-front', 'beam-back', ...rafters.map(({ id }) => id)].flatMap((id) => [
            move('member', id, 'underside.from'),
            move('member', id, 'underside.to'),
          ]),
          ...posts.map(({ id }) => move('pole', id, 'top')),
        ],
        spacing: rafters.flatMap(({ id, k }) =>
          k === 0 ? [] : [move('member', id, 'from.0', k), move('member', id, 'to.0', k)],
        ),
        post: posts.map(({ id }) => move('pole', id, 'diameter')),
      },
    }
  },
)
