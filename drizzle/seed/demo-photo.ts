import type { PhotoMarks } from '#app/domain/photo/measurements.ts'
import type { Site } from '#app/domain/site/site.ts'
import type { Vec2, Vec3 } from '#app/domain/vector.ts'

/** The demonstration's photo is a drawing of the veranda through a pin-hole camera: px of it. */
export const demoPhotoSize = { width: 1600, height: 1200 } as const

/** What a file key starts with whose picture is drawn and not kept. */
export const demoPhotoKey = 'demo/sallow-lane-veranda.jpg'

/** Where the camera stands, which way it looks, focal length in px. It is level, so plumb lines are plumb in the picture. */
const camera = { at: [4.7, 8.3, 1.62], turn: 0.12, focal: 1120, horizon: 640 } as const

/** The picture of a point of the veranda; valid for what lies before the camera. */
export function pictureOfVeranda([x, y, z]: Vec3): Vec2 {
  const [across, away] = [camera.at[0] - x, camera.at[1] - y]
  const before = away * Math.cos(camera.turn) + across * Math.sin(camera.turn)
  const right = across * Math.cos(camera.turn) - away * Math.sin(camera.turn)
  const { width } = demoPhotoSize
  return [width / 2 + (camera.focal * right) / before, camera.horizon + (camera.focal * (camera.at[2] - z)) / before]
}

const length = 7.2
const depth = 3.1
const ceiling = 2.65
const door = { from: 3.9, to: 4.72, top: 2.04 } as const

/** A click on a point: whole px, as a hand makes it. */
function clicked(...point: Vec3): [number, number] {
  const [x, y] = pictureOfVeranda(point)
  return [Math.round(x), Math.round(y)]
}

/** What a person marked in it: deck and ceiling by the taped veranda, the wall by its door, four measurements. */
export const demoMarks = (): PhotoMarks => ({
  clickSigma: 1,
  planes: [
    {
      id: 'deck',
      name: 'Deck',
      corners: [clicked(0, 0, 0), clicked(length, 0, 0), clicked(length, depth, 0), clicked(0, depth, 0)],
      width: length,
      depth,
      tolerance: 0.01,
      vertical: {
        known: { foot: clicked(door.to, 0, 0), top: clicked(door.to, 0, door.top) },
        height: door.top,
        tolerance: 0.005,
        other: { foot: clicked(0, 0, 0), top: clicked(0, 0, ceiling) },
      },
    },
    {
      id: 'ceiling',
      name: 'Ceiling',
      corners: [
        clicked(0, 0, ceiling),
        clicked(length, 0, ceiling),
        clicked(length, depth, ceiling),
        clicked(0, depth, ceiling),
      ],
      width: length,
      depth,
      tolerance: 0.01,
      vertical: null,
    },
    {
      id: 'wall',
      name: 'House wall',
      corners: [
        clicked(door.from, 0, 0),
        clicked(door.to, 0, 0),
        clicked(door.to, 0, door.top),
        clicked(door.from, 0, door.top),
      ],
      width: door.to - door.from,
      depth: door.top,
      tolerance: 0.005,
      vertical: null,
    },
  ],
  measurements: [
    {
      id: 'joists',
      kind: 'length',
      label: 'joist spacing',
      from: { at: clicked(3, depth, ceiling), plane: 'ceiling' },
      to: { at: clicked(3.6, depth, ceiling), plane: 'ceiling' },
    },
    {
      id: 'height',
      kind: 'height',
      label: 'ceiling height',
      foot: { at: clicked(length, 0, 0), plane: 'deck' },
      top: clicked(length, 0, ceiling),
    },
    {
      id: 'window',
      kind: 'length',
      label: 'window width',
      from: { at: clicked(1.2, 0, 0.95), plane: 'wall' },
      to: { at: clicked(2.9, 0, 0.95), plane: 'wall' },
    },
  ],
})

/** The site with its joist spacing pointing at the marks of a photo. */
export const withDemoPhoto = (site: Site, photoId: string): Site => ({
  ...site,
  dimensions: site.dimensions.map((size) =>
    size.label === 'joist spacing' ? { ...size, photo: { photoId, measurementId: 'joists' } } : size,
  ),
})

const points = (...corners: readonly Vec3[]): string =>
  corners.map((corner) => pictureOfVeranda(corner).map((px) => px.toFixed(1)).join(',')).join(' ') // prettier-ignore

const face = (fill: string, ...corners: readonly Vec3[]): string =>
  `<polygon fill="${fill}" points="${points(...corners)}"/>`

const line = (stroke: string, width: number, a: Vec3, b: Vec3): string =>
  `<polyline fill="none" stroke="${stroke}" stroke-width="${width}" points="${points(a, b)}"/>`

const every = (step: number, to: number): number[] =>
  Array.from({ length: Math.floor(to / step + 1e-9) + 1 }, (_, k) => k * step)

/** A rectangle on the house wall. */
const onWall = (fill: string, x: readonly [number, number], z: readonly [number, number]): string =>
  face(fill, [x[0], 0, z[0]], [x[1], 0, z[0]], [x[1], 0, z[1]], [x[0], 0, z[1]])

function table(): string {
  const [x, y, top]: [Vec2, Vec2, number] = [[1.4, 3.8], [1.1, 2], 0.74] // prettier-ignore
  const legs: readonly Vec2[] = [[1.5, 1.9], [3.7, 1.9], [1.5, 1.2], [3.7, 1.2]] // prettier-ignore
  return [
    ...legs.map(([lx, ly]) => line('#3d3128', 9, [lx, ly, 0], [lx, ly, top])),
    face('#6f5540', [x[0], y[1], top - 0.05], [x[1], y[1], top - 0.05], [x[1], y[1], top], [x[0], y[1], top]),
    face('#8a6b50', [x[0], y[0], top], [x[1], y[0], top], [x[1], y[1], top], [x[0], y[1], top]),
  ].join('')
}

/** The picture as SVG: the veranda at dusk, drawn from its sizes and from no real place. */
export function demoPhotoSvg(): string {
  const { width, height } = demoPhotoSize
  const parts = [
    `<rect width="${width}" height="${height}" fill="#3c4654"/>`,
    face('#3f4a39', [-6, 6.6, 0], [14, 6.6, 0], [14, -14, 0], [-6, -14, 0]),
    onWall('#7d6759', [-0.6, 7.8], [0, 3.1]),
    ...every(0.15, 3).map((z) => line('#6d5a4e', 1.5, [-0.6, 0, z], [7.8, 0, z])),
    face('#5d5348', [0, 0, 0], [length, 0, 0], [length, depth, 0], [0, depth, 0]),
    ...every(0.155, depth).map((y) => line('#4d453c', 2, [0, y, 0], [length, y, 0])),
    onWall('#e3b56b', [1.2, 2.9], [0.95, 2.1]),
    ...[1.2, 2.05, 2.9].map((x) => line('#2f2a26', 6, [x, 0, 0.95], [x, 0, 2.1])),
    onWall('#39463f', [door.from, door.to], [0, door.top]),
    onWall('#c99a58', [4.05, 4.57], [1.1, 1.85]),
    face('#a08a6d', [0, 0, ceiling], [length, 0, ceiling], [length, depth, ceiling], [0, depth, ceiling]),
    ...every(0.12, depth).map((y) => line('#937e62', 1.5, [0, y, ceiling], [length, y, ceiling])),
    ...every(0.6, length).map((x) => line('#5f4f3b', 3, [x, 0, ceiling], [x, depth, ceiling])),
    face('#54483a', [0, depth, ceiling], [length, depth, ceiling], [length, depth, 2.87], [0, depth, 2.87]),
    table(),
    line('#d9d2c4', 3, [2.6, 1.55, ceiling], [2.6, 1.55, 1.95]),
    face('#efe2c4', [2.4, 1.55, 1.65], [2.8, 1.55, 1.65], [2.72, 1.55, 1.95], [2.48, 1.55, 1.95]),
  ]
  return `<svg xmlns="http://www.w3.org/2000/svg" width="${width}" height="${height}" viewBox="0 0 ${width} ${height}">${parts.join('')}</svg>`
}
