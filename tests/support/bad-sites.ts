import type { Obstacle, Site } from '#app/domain/site/site.ts'
import { plainSite } from '#tests/support/plain-site.ts'

const plain = plainSite()
const cover = plain.covers[0]!
const member = plain.members[0]!
const box: Obstacle = {
  id: 'box',
  name: 'box',
  kind: 'other',
  material: 'unknown',
  movable: false,
  shape: { kind: 'box', x: [1, 2], y: [1, 2], z: [0, 1] },
  transmittance: 0,
  note: null,
}

/** The plain site with a box of 1 m in it, some of its facts replaced. */
export const withBox = (shape: Partial<Obstacle['shape']>, more: Partial<Obstacle> = {}) =>
  plainSite({ obstacles: [{ ...box, shape: { ...box.shape, ...shape } as Obstacle['shape'], ...more }] })
const withCorners = (corners: [number, number, number][], more = {}) =>
  plainSite({ covers: [{ ...cover, corners, ...more }] })
const wall = { id: 'w', name: 'wall', material: 'unknown' as const, loadStatus: '' }

/** Every bad site with the dotted path and the words that say the limit. */
export const badSites: [string, Site, string, RegExp][] = [
  ['floor crossing itself', plainSite({ floor: [[0, 0], [6, 4], [6, 0], [0, 4]], members: [] }), 'floor', /cross/], // prettier-ignore
  ['floor without area', plainSite({ floor: [[0, 0], [6, 0], [3, 0]], members: [] }), 'floor', /0\.01 m²/], // prettier-ignore
  ['floor over 100 m', plainSite({ floor: [[0, 0], [100.01, 0], [100.01, 4], [0, 4]] }), 'floor', /100\.00 m by 60\.00 m/], // prettier-ignore
  ['level crossing itself', plainSite({ levels: [{ id: 'l', name: 'l', height: 0.2, outline: [[0, 0], [1, 1], [1, 0], [0, 1]] }] }), 'levels.0.outline', /cross/], // prettier-ignore
  [
    'edge that is not there',
    plainSite({ beyond: [{ edge: 4, kind: 'street', name: '' }] }),
    'beyond.0.edge',
    /4 edges/,
  ],
  ['three corners in a line', withCorners([[0, 0, 3], [3, 0, 3], [6, 0, 3]]), 'covers.0.corners', /fourth corner/], // prettier-ignore
  ['first three in a line', withCorners([[0, 0, 3], [3, 0, 3], [6, 0, 3], [6, 4, 3]]), 'covers.0.corners', /Corners 1, 2 and 3/], // prettier-ignore
  ['corners across', withCorners([[0, 0, 3], [6, 4, 3], [6, 0, 3], [0, 4, 3]]), 'covers.0.corners', /in order/], // prettier-ignore
  ['a cover under the floor', withCorners([[0, 0, 3], [6, 0, 3], [6, 4, -0.1], [0, 4, -0.1]]), 'covers.0.corners', /Corner 3 is at −0\.10 m/], // prettier-ignore
  ['a cover below a head', withCorners([[0, 0, 1.1], [6, 0, 1.1], [6, 4, 1.1], [0, 4, 1.1]]), 'covers.0.corners', /seat S1.*1\.10 m.*1\.10 m/], // prettier-ignore
  ['blades down to a head', withCorners([[0, 0, 1.3], [6, 0, 1.3], [6, 4, 1.3], [0, 4, 1.3]], { opening: true, swing: 0.25 }), 'covers.0.corners', /1\.05 m.*1\.10 m/], // prettier-ignore
  [
    'a member away from the floor',
    plainSite({ members: [{ ...member, to: [8.01, 2] }] }),
    'members.0.to',
    /within 2\.00 m.*2\.01 m/,
  ],
  ['a member of no length', plainSite({ members: [{ ...member, to: member.from }] }), 'members.0.to', /no length/],
  [
    'a member under the floor',
    plainSite({ members: [{ ...member, underside: { from: 2, to: -1 } }] }),
    'members.0.underside',
    /−1\.00 m/,
  ],
  ['no such cover', plainSite({ covers: [] }), 'members.0.underside.follows', /no cover roof/],
  [
    'a wall of no length',
    plainSite({ walls: [{ ...wall, from: [1, 1], to: [1, 1], top: 3 }] }),
    'walls.0.to',
    /no length/,
  ],
  [
    'a wall of no height',
    plainSite({ walls: [{ ...wall, from: [1, 1], to: [2, 1], top: -1 }] }),
    'walls.0.top',
    /−1\.00 m/,
  ],
  [
    'a pole of no height',
    plainSite({ poles: [{ ...wall, at: [1, 1], top: 0, diameter: 0.1 }] }),
    'poles.0.top',
    /above the floor/,
  ],
  ['a box upside down', withBox({ z: [1, 0.5] }), 'obstacles.0.shape.z', /foot at 1\.00 m. Here 0\.50 m/],
  ['a box below the floor', withBox({ z: [-0.5, 1] }), 'obstacles.0.shape.z', /at least at 0\.00 m/],
  ['a box turned over', withBox({ x: [2, 1] } as never), 'obstacles.0.shape.x', /more than 2\.00 m/],
  ['a prism crossing itself', withBox({ kind: 'prism', outline: [[0, 0], [1, 1], [1, 0], [0, 1]], x: undefined, y: undefined } as never), 'obstacles.0.shape.outline', /cross/], // prettier-ignore
  ['a state upside down', withBox({}, { states: [{ name: 'open', shape: { ...box.shape, z: [1, 1] } as Obstacle['shape'] }] }), 'obstacles.0.states.0.shape.z', /above the foot/], // prettier-ignore
  ['two states of one name', withBox({}, { states: [{ name: 'open', shape: null }, { name: 'open', shape: null }] }), 'obstacles.0.states.1.name', /“open”/], // prettier-ignore
  [
    'a head below its body',
    plainSite({ seats: [{ ...plain.seats[0]!, headHeight: 0.6 }] }),
    'seats.0.headHeight',
    /0\.60 m/,
  ],
  ['an id twice', plainSite({ levels: [{ id: 'beam', name: '', height: 0, outline: [[0, 0], [1, 0], [1, 1]] }] }), 'levels.0.id', /beam is there twice/], // prettier-ignore
]
