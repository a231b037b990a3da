import { describe, expect, it } from 'vitest'
import { refusalOf, siteFaults } from '#app/domain/site/site-faults.ts'
import { siteSchema } from '#app/domain/site/site.ts'
import { demoSites } from '#drizzle/seed/demo-sites.ts'
import { badSites, withBox } from '#tests/support/bad-sites.ts'
import { plainSite } from '#tests/support/plain-site.ts'

const plain = plainSite()
const member = plain.members[0]!

describe('what a site may not be', () => {
  it.each(badSites)('%s is refused with the limit', (_, site, path, message) => {
    const [fault] = siteFaults(site)
    expect(fault?.path.join('.')).toBe(path)
    expect(fault?.message).toMatch(message)
    expect(refusalOf(plain, site)?.path.join('.')).toBe(path)
  })

  it('every demo site, the plain one and a bare floor may be', () => {
    for (const { site } of demoSites()) expect(siteFaults(site)).toEqual([])
    expect(siteFaults(plain)).toEqual([])
    expect(siteFaults({ ...plain, covers: [], members: [], seats: [] })).toEqual([])
  })

  it('says lengths in the person’s units', () => {
    const imperial = plainSite({ displayUnits: 'imperial', members: [{ ...member, to: [9.048, 2] }] })
    expect(siteFaults(imperial)[0]?.message).toContain('Here 10 ft 0 in away')
  })

  it('a seat outside the floor is no fault, a sunken floor lets things stand lower', () => {
    expect(siteFaults(plainSite({ seats: [{ ...plain.seats[0]!, x: 40 }] }))).toEqual([])
    const levels = [
      {
        id: 'l',
        name: 'pit',
        height: -0.5,
        outline: [
          [0, 0],
          [3, 0],
          [3, 3],
        ] as [number, number][],
      },
    ]
    expect(siteFaults({ ...withBox({ z: [-0.5, 1] }), levels })).toEqual([])
  })

  it('an edit of a site with an old fault is refused only where it breaks something else', () => {
    const old = withBox({ z: [1, 0.5] })
    expect(refusalOf(old, { ...old, name: 'renamed' })).toBeNull()
    expect(refusalOf(old, { ...old, covers: [] })?.path.join('.')).toBe('members.0.underside.follows')
  })

  it('2,001 seats are refused', () => {
    const seats = Array.from({ length: 2001 }, (_, i) => ({ ...plain.seats[0]!, id: `s${i}` }))
    expect(siteFaults({ ...plain, seats })[0]).toEqual({
      path: ['seats'],
      message: 'A site has at most 2,000 seats; here are 2,001.',
    })
    expect(siteSchema.safeParse({ ...plain, seats }).success).toBe(false)
  })
})
