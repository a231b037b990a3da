import { describe, expect, it } from 'vitest'
import { heightOverPlane } from '#app/domain/photo/height-over-plane.ts'
import { lengthInPlane, pointInPlane } from '#app/domain/photo/length-in-plane.ts'
import { photoMarksSchema, type PhotoPlane } from '#app/domain/photo/measurements.ts'
import { refuseCorners } from '#app/domain/photo/rectangle-corners.ts'
import { solveLinear } from '#app/domain/photo/linear-solve.ts'
import { floorPhoto, markOf } from '#tests/support/marked-photo.ts'
import type { PinHole } from '#tests/support/pin-hole-camera.ts'

const camera: PinHole = { at: [1.5, -7, 1.7], towards: [0, 0, 0.8], focal: 2200, middle: [2000, 1500] }
const photo = floorPhoto(camera)

type Vertical = NonNullable<PhotoPlane['vertical']>
const changed = (facts: Partial<PhotoPlane>) => ({
  ...photo,
  marks: { ...photo.marks, planes: [{ ...photo.plane, ...facts }] },
})
const withVertical = (facts: Partial<Vertical>) => changed({ vertical: { ...photo.plane.vertical!, ...facts } })

const onFloor = (x: number, y: number) => ({ at: markOf(camera, [x, y, 0]), plane: 'floor' })
const length = { id: 'l', from: onFloor(-1, 0), to: onFloor(1, 0.5) }
const height = { id: 'h', foot: onFloor(0.4, 0.5), top: markOf(camera, [0.4, 0.5, 2.3]) }

describe('corners that are no rectangle', () => {
  const square: PhotoPlane['corners'] = [[100, 100], [300, 110], [320, 300], [90, 280]] // prettier-ignore
  it('takes a four-sided figure either way round', () => {
    expect(refuseCorners(square)).toBeNull()
    const [a, b, c, d] = square
    expect(refuseCorners([d, c, b, a])).toBeNull()
  })
  it.each([
    [
      'not finite',
      [
        [100, NaN],
        [300, 110],
        [320, 300],
        [90, 280],
      ],
    ],
    [
      'corners together',
      [
        [100, 100],
        [101, 101],
        [320, 300],
        [90, 280],
      ],
    ],
    [
      'corners together',
      [
        [100, 100],
        [300, 110],
        [101, 100],
        [90, 280],
      ],
    ],
    [
      'corners in line',
      [
        [100, 100],
        [200, 200],
        [300, 300],
        [90, 280],
      ],
    ],
    [
      'corners in line',
      [
        [100, 100],
        [200, 200],
        [300, 300],
        [400, 400],
      ],
    ],
    [
      'crossed',
      [
        [100, 100],
        [320, 300],
        [300, 110],
        [90, 280],
      ],
    ],
    [
      'crossed',
      [
        [100, 100],
        [300, 110],
        [90, 280],
        [320, 300],
      ],
    ],
    [
      'corner inside',
      [
        [100, 100],
        [300, 110],
        [140, 130],
        [90, 280],
      ],
    ],
  ] satisfies [string, PhotoPlane['corners']][])('%s', (reason, corners) => {
    expect(refuseCorners(corners)).toMatchObject({ refused: reason })
    expect(lengthInPlane(changed({ corners }), length)).toMatchObject({ refused: reason })
    expect(heightOverPlane(changed({ corners }), height)).toMatchObject({ refused: reason })
  })
})

describe('lengths', () => {
  it('are given otherwise', () => expect(lengthInPlane(photo, length)).toHaveProperty('value'))

  it.each([
    ['no size', { width: 0 }],
    ['no size', { depth: -1 }],
    ['not finite', { width: NaN }],
    ['not finite', { depth: Infinity }],
    ['not finite', { tolerance: NaN }],
  ] satisfies [string, Partial<PhotoPlane>][])('%s: %o', (reason, facts) => {
    expect(lengthInPlane(changed(facts), length)).toMatchObject({ refused: reason })
    expect(pointInPlane(changed(facts), length.from)).toMatchObject({ refused: reason })
  })

  it('refuses a plane that is not there', () => {
    const nowhere = { at: length.from.at, plane: 'gone' }
    expect(lengthInPlane(photo, { ...length, from: nowhere, to: nowhere })).toMatchObject({ refused: 'no plane' })
    expect(pointInPlane(photo, nowhere)).toMatchObject({ refused: 'no plane' })
  })

  it('refuses marks of two planes by their names', () => {
    const wall = { ...photo.plane, id: 'wall', name: 'House wall' }
    const both = { ...photo, marks: { ...photo.marks, planes: [photo.plane, wall] } }
    const answer = lengthInPlane(both, { ...length, to: { ...length.to, plane: 'wall' } })
    expect(answer).toMatchObject({ refused: 'other plane', words: expect.stringContaining('House wall') })
  })

  it('refuses a mark beyond the horizon, and takes one before it', () => {
    const [far] = [markOf(camera, [0, 4000, 0])]
    const beyond: [number, number] = [far[0], far[1] - 20]
    expect(lengthInPlane(photo, { ...length, to: { at: beyond, plane: 'floor' } })).toMatchObject({
      refused: 'beyond horizon',
      words: expect.stringContaining('second mark'),
    })
    expect(pointInPlane(photo, { at: beyond, plane: 'floor' })).toMatchObject({ refused: 'beyond horizon' })
    expect(lengthInPlane(photo, { ...length, from: { at: [NaN, 5], plane: 'floor' } })).toMatchObject({
      refused: 'not finite',
    })
  })

  it('refuses what its error leaves nothing of', () => {
    const far = { at: markOf(camera, [0, 900, 0]), plane: 'floor' }
    expect(lengthInPlane(photo, { ...length, to: far })).toMatchObject({ refused: 'too rough' })
  })

  it('refuses two marks in one place', () => {
    expect(lengthInPlane(photo, { ...length, to: length.from })).toMatchObject({ refused: 'marks together' })
  })
})

describe('heights', () => {
  const vertical = photo.plane.vertical!
  it('are given otherwise', () => expect(heightOverPlane(photo, height)).toHaveProperty('value'))

  it('refuses without an upright of known height', () => {
    expect(heightOverPlane(changed({ vertical: null }), height)).toMatchObject({ refused: 'no upright' })
  })

  it.each([
    ['no size', { height: 0 }],
    ['not finite', { height: NaN }],
    ['not finite', { known: { foot: vertical.known.foot, top: [NaN, 1] } }],
    ['marks together', { known: { foot: vertical.known.foot, top: vertical.known.foot } }],
    ['uprights in line', { other: vertical.known }],
    ['beyond horizon', { other: { foot: [1500, 300], top: [1500, 100] } }],
  ] satisfies [string, Partial<Vertical>][])('%s: %o', (reason, facts) => {
    expect(heightOverPlane(withVertical(facts), height)).toMatchObject({ refused: reason })
  })

  it('refuses a top that is not above its foot', () => {
    const [x, y] = height.top
    expect(heightOverPlane(photo, { ...height, top: [x + 200, y] })).toMatchObject({ refused: 'not plumb' })
  })

  it('refuses a top without a place, a foot beyond the horizon, another plane', () => {
    expect(heightOverPlane(photo, { ...height, top: [NaN, 1] })).toMatchObject({ refused: 'not finite' })
    expect(heightOverPlane(photo, { ...height, foot: { at: [2000, 10], plane: 'floor' } })).toMatchObject({
      refused: 'beyond horizon',
    })
    expect(heightOverPlane(photo, { ...height, foot: { ...height.foot, plane: 'gone' } })).toMatchObject({
      refused: 'no plane',
    })
  })

  it('refuses a height straight under the camera', () => {
    const above: PinHole = { at: [0.3, 0.3, 6], towards: [0.3, 0.3001, 0], focal: 1500, middle: [2000, 1500] }
    const seen = floorPhoto(above)
    const foot = { at: markOf(above, [0.3, 0.3, 0]), plane: 'floor' }
    expect(heightOverPlane(seen, { id: 'h', foot, top: markOf(above, [0.3, 0.3001, 1]) })).toMatchObject({
      refused: 'along view',
    })
  })
})

describe('what is kept', () => {
  it('is the marks as they are measured, and nothing outside a photo', () => {
    expect(photoMarksSchema.safeParse(photo.marks).success).toBe(true)
    const outside = { ...photo.marks, planes: [{ ...photo.plane, corners: [[-1, 0], [9, 0], [9, 9], [0, 9]] }] } // prettier-ignore
    expect(photoMarksSchema.safeParse(outside).success).toBe(false)
    expect(photoMarksSchema.safeParse({ ...photo.marks, clickSigma: 0 }).success).toBe(false)
  })
})

describe('equations that depend on each other', () => {
  it('have no solution', () => {
    expect(solveLinear([[1, 2, 3], [2, 4, 6]])).toBeNull() // prettier-ignore
    expect(solveLinear([[0, 2, 4], [3, 0, 9]])).toEqual([3, 2]) // prettier-ignore
  })
})
