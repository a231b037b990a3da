import { describe, expect, it } from 'vitest'
import { addPhotoSize, replaceByPhotoSize, traceOf } from '#app/domain/photo/into-site.ts'
import { addMeasurement, addPlane, changePlane, removePlane, unusedMarkId } from '#app/domain/photo/edits.ts'
import { listMarks, moveMark, outsideOf } from '#app/domain/photo/mark-places.ts'
import { combinedOf, readingsOf } from '#app/domain/photo/measure-photo.ts'
import { noMarks, photoMarksSchema } from '#app/domain/photo/measurements.ts'
import { siteSchema } from '#app/domain/site/site.ts'
import { demoMarks } from '#drizzle/seed/demo-photo.ts'
import { demoSites } from '#drizzle/seed/demo-sites.ts'

const marks = demoMarks()
const { site } = demoSites().find(({ key }) => key === 'C')!
const photo = { photoId: '00000000-0000-4000-8000-00000000000a', measurementId: 'joists' }

describe('marks of a photo', () => {
  it('are all listed: 4 corners a plane, 4 of the uprights, 2 of each measurement', () => {
    expect(listMarks(marks)).toHaveLength(3 * 4 + 4 + 3 * 2)
    expect(new Set(listMarks(marks).map(({ path }) => path)).size).toBe(22)
  })

  it('move one at a time by their path, and nothing by a path that is none', () => {
    for (const { path } of listMarks(marks)) {
      const moved = moveMark(marks, path, [11, 12])
      expect(photoMarksSchema.parse(moved)).toEqual(moved)
      const changed = listMarks(moved).filter(({ at }, k) => String(at) !== String(listMarks(marks)[k]!.at))
      expect(changed).toEqual([expect.objectContaining({ path, at: [11, 12] })])
    }
    for (const path of ['planes.9.corners.0', 'planes.0.name', 'measurements', 'planes.0.constructor']) {
      expect(moveMark(marks, path, [1, 2])).toEqual(marks)
    }
  })

  it('are refused outside the picture and with an id twice', () => {
    expect(outsideOf(marks, { width: 1600, height: 1200 })).toBeNull()
    expect(outsideOf(marks, { width: 1500, height: 1200 })).toMatchObject({ path: expect.stringContaining('corners') })
    expect(outsideOf(addPlane(marks, marks.planes[0]!), { width: 1600, height: 1200 })?.path).toBe('planes.3.id')
  })

  it('lose what is measured in a plane with the plane', () => {
    expect(removePlane(marks, 'deck').measurements.map(({ id }) => id)).toEqual(['joists', 'window'])
    expect(changePlane(marks, 'deck', { width: 8 }).planes[0]).toMatchObject({ width: 8, depth: 3.1 })
    expect(unusedMarkId({ ...noMarks, planes: [{ ...marks.planes[0]!, id: 'plane-1' }] }, 'plane')).toBe('plane-2')
  })
})

describe('readings of one thing', () => {
  it('are found by kind and name in every photo of the job', () => {
    const again = { ...marks.measurements[0]!, id: 'again', label: ' Joist Spacing ' }
    const photos = [
      { id: 'a', marks },
      { id: 'b', marks: addMeasurement(marks, again) },
    ]
    expect(readingsOf(photos, marks.measurements[0]!).map(({ photoId }) => photoId)).toEqual(['a', 'b', 'b'])
    expect(combinedOf(photos, marks.measurements[0]!)).toMatchObject({ count: 3, warning: null })
    expect(combinedOf([], marks.measurements[0]!)).toBeNull()
  })
})

describe('a length of a photo in the site', () => {
  const size = { label: 'joist spacing', value: 0.61234, tolerance: 0.05, photo }
  it('is a new size that decides nothing yet', () => {
    const added = addPhotoSize(site, size).dimensions.at(-1)
    expect(added).toMatchObject({ value: 0.6123, tolerance: 0.05, source: 'photo', photo, moves: [] })
    expect(siteSchema.safeParse(addPhotoSize(site, size)).success).toBe(true)
  })

  it('replaces a size and moves what that decides', () => {
    const joists = site.dimensions.find(({ label }) => label === 'joist spacing')!
    const measured = replaceByPhotoSize(site, joists.id, size)!
    expect(measured.members[2]!.from[0]).toBeCloseTo(1.2 + 2 * 0.0123, 9)
    expect(measured.dimensions.find(({ id }) => id === joists.id)).toMatchObject({
      value: 0.6123,
      source: 'photo',
      photo,
    })
    expect(measured.covers).toEqual(site.covers)
  })

  it('replaces nothing that is not there or could not be', () => {
    expect(replaceByPhotoSize(site, 'none', size)).toBeNull()
    const ceiling = site.dimensions.find(({ label }) => label === 'ceiling height')!
    expect(replaceByPhotoSize(site, ceiling.id, { ...size, value: 500 })).toBeNull()
  })
})

describe('a picture to trace', () => {
  const marked = { photoId: photo.photoId, height: 800, from: [100, 700] as const, to: [500, 700] as const, length: 8 }
  it('has its scale by one length and its first point where it was said', () => {
    const trace = traceOf({ ...marked, origin: [0, 0], turnDeg: 0 })
    expect(trace).toMatchObject({ metresPerPixel: 0.02 })
    expect('at' in trace && trace.at).toEqual([expect.closeTo(-2, 12), expect.closeTo(-2, 12)])
  })

  it('turns about its corner so that the first point stays', () => {
    const trace = traceOf({ ...marked, origin: [1, 2], turnDeg: 90 })
    // A quarter turn takes (2, 2) m from the corner to (−2, 2).
    expect('at' in trace && trace.at).toEqual([expect.closeTo(3, 12), expect.closeTo(0, 12)])
  })

  it('is refused for two points in one place or a length that is none', () => {
    expect(traceOf({ ...marked, to: [105, 700], origin: [0, 0], turnDeg: 0 })).toHaveProperty('error')
    expect(traceOf({ ...marked, length: 0, origin: [0, 0], turnDeg: 0 })).toHaveProperty('error')
    expect(traceOf({ ...marked, length: 9000, origin: [0, 0], turnDeg: 0 })).toHaveProperty('error')
  })
})
