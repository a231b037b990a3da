import { describe, expect, it } from 'vitest'
import { heaterFrame } from '#app/domain/layout/body.ts'
import { add, dot, scale, subtract, type Vec3 } from '#app/domain/vector.ts'
import { paintingOrder, whichIsBehind } from '#app/drawing/axonometric/painting-order.ts'
import { corners, projectionFrom } from '#app/drawing/axonometric/projection.ts'
import { boxOf, faceNormal, facesSeen, prismOf, type DrawnSolid } from '#app/drawing/axonometric/solid.ts'
import { chance } from '#tests/support/chance.ts'

interface Block {
  readonly centre: Vec3
  readonly axes: readonly [Vec3, Vec3, Vec3]
  readonly half: readonly [number, number, number]
}
const solidOf = ({ centre, axes, half }: Block) => boxOf(centre, axes, half)

/** Where a line of sight first meets a block, as its way towards the eye; null when it passes by. Slab by slab. */
function nearestOn({ centre, axes, half }: Block, from: Vec3, toEye: Vec3): number | null {
  let [enter, leave] = [-Infinity, Infinity]
  for (const i of [0, 1, 2] as const) {
    const [p, d] = [dot(subtract(from, centre), axes[i]), dot(toEye, axes[i])]
    if (Math.abs(d) < 1e-12) {
      if (Math.abs(p) > half[i]) return null
      continue
    }
    const ends = [(-half[i] - p) / d, (half[i] - p) / d]
    enter = Math.max(enter, Math.min(...ends))
    leave = Math.min(leave, Math.max(...ends))
  }
  return enter < leave ? leave : null
}

const plain: Block['axes'] = [[1, 0, 0], [0, 1, 0], [0, 0, 1]] // prettier-ignore
const block = (x: readonly [number, number], y: readonly [number, number], z: readonly [number, number]): Block => ({
  centre: [(x[0] + x[1]) / 2, (y[0] + y[1]) / 2, (z[0] + z[1]) / 2],
  axes: plain,
  half: [(x[1] - x[0]) / 2, (y[1] - y[0]) / 2, (z[1] - z[0]) / 2],
})

/** Lines of sight over a drawing on which the painted order is wrong, and how many were told. */
function lookedThrough(
  blocks: readonly Block[],
  order: readonly number[],
  projection: ReturnType<typeof projectionFrom>,
  next: () => number,
) {
  // prettier-ignore
  let [wrong, told] = [0, 0]
  for (let ray = 0; ray < 3000; ray++) {
    const from = add(scale(projection.right, (next() - 0.5) * 16), scale(projection.up, (next() - 0.5) * 10))
    const hits = order.flatMap((i) => {
      const at = nearestOn(blocks[i]!, from, projection.toEye)
      return at === null ? [] : [at]
    })
    if (hits.length < 2) continue
    told += 1
    // The last painted is what is seen: it must be the nearest to the eye.
    if (hits.at(-1)! < Math.max(...hits) - 1e-9) wrong += 1
  }
  return { wrong, told }
}

describe('the painter’s order', () => {
  it('shows the nearest thing on every line of sight, over 40 sets of 12 turned blocks from four corners', () => {
    const next = chance(20261201)
    let told = 0
    for (let set = 0; set < 40; set++) {
      const blocks: Block[] = []
      while (blocks.length < 12) {
        const { u, v, w } = heaterFrame(next() * 360, next() * 90 - 45)
        const made: Block = {
          centre: [(next() - 0.5) * 8, (next() - 0.5) * 6, next() * 4],
          axes: [u, v, w],
          half: [0.2 + next(), 0.1 + next() * 0.5, 0.1 + next() * 0.5],
        }
        const reach = Math.hypot(...made.half)
        const clear = blocks.every((other) => Math.hypot(...subtract(made.centre, other.centre)) > reach + Math.hypot(...other.half)) // prettier-ignore
        if (clear) blocks.push(made)
      }
      const projection = projectionFrom(corners[set % 4]!)
      const seen = lookedThrough(blocks, paintingOrder(blocks.map(solidOf), projection), projection, next)
      told += seen.told
      expect(seen.wrong).toBe(0)
    }
    expect(told).toBeGreaterThan(500)
  })

  it.each([
    ['a long beam over a table near its far end', block([0, 12], [2, 2.1], [2.4, 2.5]), block([10.5, 11.5], [0.5, 1.5], [0, 2.3])], // prettier-ignore
    ['a wall beside a low thing in front of its near end', block([0, 12], [4, 4.2], [0, 3]), block([0, 1], [3, 3.9], [0, 0.5])], // prettier-ignore
    ['a post under the middle of a member', block([-6, 6], [0, 0.1], [2.5, 2.7]), block([-5, -4.9], [0, 0.1], [0, 2.5])], // prettier-ignore
  ])('is right for %s, wherever one looks from', (_, a, b) => {
    const next = chance(11)
    for (const corner of corners) {
      const projection = projectionFrom(corner)
      const order = paintingOrder([solidOf(a), solidOf(b)], projection)
      const close = (from: Vec3) => [a, b].every((each) => nearestOn(each, from, projection.toEye) !== null)
      for (let ray = 0; ray < 20_000; ray++) {
        const from = add(scale(projection.right, (next() - 0.5) * 30), scale(projection.up, (next() - 0.5) * 20))
        if (!close(from)) continue
        const [first, second] = order.map((i) => nearestOn([a, b][i]!, from, projection.toEye)!)
        expect(second!).toBeGreaterThanOrEqual(first! - 1e-9)
      }
    }
  })

  it('is not the order of middles: a long wall whose middle is nearer stands behind a small thing at its far end', () => {
    const projection = projectionFrom('lower left')
    const [wall, box] = [block([-3, 20], [-12, -11.8], [0, 3]), block([18, 19], [-13, -12.2], [0, 1])]
    const middle = (each: Block) => dot(each.centre, projection.toEye)
    expect(middle(box)).toBeLessThan(middle(wall))
    expect(whichIsBehind(solidOf(wall), solidOf(box), projection)).toBe(-1)
    expect(paintingOrder([solidOf(box), solidOf(wall)], projection)).toEqual([1, 0])
  })

  it('has no opinion on things that do not cover each other', () => {
    expect(whichIsBehind(solidOf(block([0, 1], [0, 1], [0, 1])), solidOf(block([9, 10], [-9, -8], [0, 1])), projectionFrom('upper left'))).toBe(0) // prettier-ignore
  })

  it('takes a line, as a hanger is, for a thing', () => {
    const projection = projectionFrom('lower left')
    const hanger: DrawnSolid = { corners: [[1, 1, 2], [1, 1, 3]], faces: [[0, 1]] } // prettier-ignore
    const wall = solidOf(block([-5, 5], [3, 3.2], [0, 9]))
    expect(paintingOrder([hanger, wall], projection)).toEqual([1, 0])
    expect(paintingOrder([hanger, solidOf(block([-9, 5], [-1, 0], [0, 9]))], projection)).toEqual([0, 1])
  })

  it('paints every thing once, also those that run into each other', () => {
    const all = [block([0, 2], [0, 2], [0, 2]), block([1, 3], [1, 3], [1, 3]), block([0, 3], [1, 2], [0.5, 1.5])].map(solidOf) // prettier-ignore
    expect(paintingOrder(all, projectionFrom('upper right')).toSorted()).toEqual([0, 1, 2])
  })
})

describe('a solid', () => {
  const middle = ({ corners: points }: DrawnSolid): Vec3 => scale(points.reduce(add), 1 / points.length)
  it.each([
    ['a box', boxOf([1, 2, 3], plain, [1, 2, 3])],
    ['a box of a left-handed frame', boxOf([1, 2, 3], [[0, 1, 0], [1, 0, 0], [0, 0, 1]], [1, 2, 3])], // prettier-ignore
    ['a prism with corners one way', prismOf([[0, 0], [2, 0], [2, 1]], 0, 1)], // prettier-ignore
    ['a prism with corners the other way, its top askew', prismOf([[2, 1], [2, 0], [0, 0]], 0, [1, 2, 3])], // prettier-ignore
  ])('%s has faces that look outward', (_, solid) => {
    for (const face of solid.faces) {
      const corner = solid.corners[face[0]!]!
      expect(dot(faceNormal(solid, face), subtract(corner, middle(solid)))).toBeGreaterThan(0)
    }
  })
  it('shows three of its six faces from a corner', () => {
    for (const corner of corners) expect(facesSeen(boxOf([0, 0, 0], plain, [1, 1, 1]), projectionFrom(corner).toEye)).toHaveLength(3) // prettier-ignore
  })
  it('keeps each height at its own corner', () => {
    const { corners: points } = prismOf([[2, 1], [2, 0], [0, 0]], 0, [1, 2, 3]) // prettier-ignore
    expect(points.slice(3)).toEqual(expect.arrayContaining([[2, 1, 1], [2, 0, 2], [0, 0, 3]])) // prettier-ignore
  })
})
