import { coverFaults } from '#app/domain/site/cover-faults.ts'
import { distanceToOutline, isInside } from '#app/domain/site/geometry.ts'
import { outlineFault } from '#app/domain/site/outline.ts'
import { obstacleFaults } from '#app/domain/site/shape-faults.ts'
import type { SiteFault } from '#app/domain/site/site-fault.ts'
import type { Member, Site } from '#app/domain/site/site.ts'
import { formatLength } from '#app/domain/units.ts'
import type { Vec2 } from '#app/domain/vector.ts'

/** The largest floor of a job, m, whichever way it lies. */
const largestFloor = { long: 100, short: 60 } as const

/** How far beyond the floor an end of a member may lie, m (house rule, no published source). */
const memberBeyond = 2

/** A length below this is none, m. */
const none = 1e-3

/** How many things of each kind a site holds at most. */
export const mostOf = {
  covers: 50,
  members: 200,
  walls: 100,
  poles: 200,
  obstacles: 200,
  tables: 500,
  seats: 2000,
  levels: 20,
  dimensions: 500,
} as const

const kinds = [
  'covers',
  'members',
  'walls',
  'poles',
  'obstacles',
  'tables',
  'seats',
  'levels',
  'dimensions',
] as const satisfies readonly (keyof typeof mostOf)[]

const known = new WeakMap<Site, readonly SiteFault[]>()

/**
 * Everything of a site that cannot be, in the order of its parts; empty when it can be kept. The page refuses an edit
 * by it and the server a save. A seat outside the floor is none: it is not counted until moved.
 */
export function siteFaults(site: Site): readonly SiteFault[] {
  const before = known.get(site)
  if (before) return before
  const faults = [
    ...countFaults(site),
    ...idFaults(site),
    ...floorFaults(site),
    ...coverFaults(site),
    ...site.members.flatMap((member, i) => memberFaults(site, member, i)),
    ...heightFaults(site),
    ...obstacleFaults(site),
    ...seatFaults(site),
  ]
  known.set(site, faults)
  return faults
}

/** The first thing that an edit breaks: a fault in a place that had none before. Null when it breaks nothing. */
export function refusalOf(before: Site, after: Site): SiteFault | null {
  const had = new Set(siteFaults(before).map(({ path }) => path.join('.')))
  return siteFaults(after).find(({ path }) => !had.has(path.join('.'))) ?? null
}

function countFaults(site: Site): SiteFault[] {
  return kinds.flatMap((kind) => {
    const count = site[kind].length
    if (count <= mostOf[kind]) return []
    const [most, here] = [mostOf[kind], count].map((n) => n.toLocaleString('en'))
    return [{ path: [kind], message: `A site has at most ${most} ${kind}; here are ${here}.` }]
  })
}

function idFaults(site: Site): SiteFault[] {
  const seen = new Set<string>()
  return kinds.flatMap((kind) =>
    site[kind].flatMap(({ id }, index): SiteFault[] => {
      if (seen.has(id)) return [{ path: [kind, index, 'id'], message: `The id ${id} is there twice.` }]
      seen.add(id)
      return []
    }),
  )
}

const extent = (values: readonly number[]): number => Math.max(...values) - Math.min(...values)

function floorFaults(site: Site): SiteFault[] {
  const faults: SiteFault[] = []
  const sides = [0, 1].map((axis) => extent(site.floor.map((corner) => corner[axis] ?? 0))).toSorted((a, b) => b - a)
  const [long = 0, short = 0] = sides
  if (long > largestFloor.long || short > largestFloor.short) {
    const [most, least] = [largestFloor.long, largestFloor.short].map((side) => formatLength(side, site.displayUnits))
    faults.push({ path: ['floor'], message: `A floor is at most ${most} by ${least}.` })
  }
  const outline = outlineFault(site.floor)
  if (outline) faults.push({ path: ['floor'], message: outline })
  site.levels.forEach((level, i) => {
    const fault = outlineFault(level.outline)
    if (fault) faults.push({ path: ['levels', i, 'outline'], message: fault })
  })
  site.beyond.forEach(({ edge }, i) => {
    const count = site.floor.length
    if (edge >= count) faults.push({ path: ['beyond', i, 'edge'], message: `The floor has ${count} edges.` })
  })
  return faults
}

function memberFaults(site: Site, member: Member, i: number): SiteFault[] {
  const length = (metres: number) => formatLength(metres, site.displayUnits)
  const fault = (part: string, message: string): SiteFault => ({ path: ['members', i, part], message })
  const faults: SiteFault[] = []
  const { underside } = member
  if ('follows' in underside) {
    if (!site.covers.some(({ id }) => id === underside.follows))
      faults.push({
        path: ['members', i, 'underside', 'follows'],
        message: `There is no cover ${underside.follows}.`,
      })
  } else if (Math.min(underside.from, underside.to) <= 0) {
    const lower = length(Math.min(underside.from, underside.to))
    faults.push(fault('underside', `The underside of ${member.name} is above the floor. Here ${lower}.`))
  }
  if (Math.hypot(member.to[0] - member.from[0], member.to[1] - member.from[1]) < none)
    faults.push(fault('to', `${member.name} has no length: its ends are one point.`))
  for (const end of ['from', 'to'] as const) {
    const away = distanceFrom(site.floor, member[end])
    if (away > memberBeyond + 1e-9)
      faults.push(
        fault(
          end,
          `Each end of ${member.name} lies within ${length(memberBeyond)} of the floor. Here ${length(away)} away.`,
        ),
      )
  }
  return faults
}

/** Distance of a point from the floor, m; 0 on it. */
const distanceFrom = (floor: readonly Vec2[], [x, y]: Vec2): number =>
  isInside(floor, x, y) ? 0 : distanceToOutline(floor, x, y)

function heightFaults(site: Site): SiteFault[] {
  const length = (metres: number) => formatLength(metres, site.displayUnits)
  return [
    ...site.walls.flatMap(({ name, from, to, top }, i): SiteFault[] => [
      ...(Math.hypot(to[0] - from[0], to[1] - from[1]) < none
        ? [{ path: ['walls', i, 'to'], message: `${name} has no length: its ends are one point.` }]
        : []),
      ...(top !== null && top <= 0
        ? [{ path: ['walls', i, 'top'], message: `The top of ${name} is above the floor. Here ${length(top)}.` }]
        : []),
    ]),
    ...site.poles.flatMap(({ name, top }, i): SiteFault[] =>
      top > 0
        ? []
        : [{ path: ['poles', i, 'top'], message: `The top of ${name} is above the floor. Here ${length(top)}.` }],
    ),
  ]
}

function seatFaults(site: Site): SiteFault[] {
  const length = (metres: number) => formatLength(metres, site.displayUnits)
  return site.seats.flatMap(({ id, bodyHeight, headHeight }, i) =>
    headHeight > bodyHeight
      ? []
      : [
          {
            path: ['seats', i, 'headHeight'],
            message: `The head of seat ${id} is above its body plane at ${length(bodyHeight)}. Here ${length(headHeight)}.`,
          },
        ],
  )
}
