import { idsOf, listOf, removeThings, type ThingKind } from '#app/domain/site/edits.ts'
import { replaceFloor } from '#app/domain/site/floor-edits.ts'
import type { Dimension, Member, Site } from '#app/domain/site/site.ts'

/** What can be copied from another site by itself. */
export type CopiedPart = 'floor' | ThingKind
export const copiedParts = [
  'floor',
  'cover',
  'member',
  'wall',
  'pole',
  'obstacle',
  'table',
  'level',
  'seat',
] as const satisfies readonly CopiedPart[]

/**
 * The site of another place as this one's: everything but its name and units. Sizes come along with their tolerances
 * and sources; photos and the picture to trace stay with the job that they are of.
 */
export const copyWhole = (own: Site, other: Site): Site => ({
  ...other,
  name: own.name,
  displayUnits: own.displayUnits,
  dimensions: other.dimensions.map(withoutPhoto),
  trace: own.trace,
})

function withoutPhoto(dimension: Dimension): Dimension {
  const { id, label, value, tolerance, source, note, moves } = dimension
  return { id, label, value, tolerance, source, note, moves }
}

/**
 * The site with some kinds of things of another added to its own; a copied floor takes the place of its own. Things
 * whose id is taken get a free one. The sizes that decide something copied come along and decide that alone; a member
 * whose cover does not come along stands at the heights it had.
 */
export function copyParts(own: Site, from: Site, parts: ReadonlySet<CopiedPart>): Site {
  const other = parts.has('cover') ? from : removeThings(from, 'cover', from.covers.map(({ id }) => id)) // prettier-ignore
  const floor = parts.has('floor') ? replaceFloor(own, other.floor) : own
  const names = newNames(own, other, parts)
  const nameOf = (id: string) => names.get(id) ?? id
  const all = <T extends { readonly id: string }>(part: ThingKind, mine: T[], theirs: readonly T[]): T[] =>
    parts.has(part) ? [...mine, ...theirs.map((thing) => ({ ...thing, id: nameOf(thing.id) }))] : mine
  return {
    ...floor,
    ...(parts.has('floor') && { beyond: other.beyond }),
    covers: all('cover', own.covers, other.covers),
    members: all('member', own.members, other.members.map((member) => following(member, nameOf))), // prettier-ignore
    walls: all('wall', own.walls, other.walls),
    poles: all('pole', own.poles, other.poles),
    obstacles: all('obstacle', own.obstacles, other.obstacles),
    tables: all('table', own.tables, other.tables),
    levels: all('level', own.levels, other.levels),
    seats: all('seat', own.seats, other.seats),
    dimensions: [...floor.dimensions, ...copiedSizes(other, parts, nameOf)],
  }
}

const following = (member: Member, nameOf: (id: string) => string): Member =>
  'follows' in member.underside ? { ...member, underside: { follows: nameOf(member.underside.follows) } } : member

/** A free id for everything of the other site that would come along with one that is taken. */
function newNames(own: Site, other: Site, parts: ReadonlySet<CopiedPart>): Map<string, string> {
  const taken = idsOf(own)
  const names = new Map<string, string>()
  const coming = copiedParts.flatMap((part): readonly { readonly id: string }[] =>
    part === 'floor' || !parts.has(part) ? [] : other[listOf[part]],
  )
  for (const { id } of [...coming, ...other.dimensions]) {
    let name = id
    for (let number = 2; taken.has(name); number++) name = `${id.slice(0, 34)}-${number}`
    taken.add(name)
    names.set(id, name)
  }
  return names
}

function copiedSizes(other: Site, parts: ReadonlySet<CopiedPart>, nameOf: (id: string) => string): Dimension[] {
  return other.dimensions.flatMap((dimension) => {
    const moves = dimension.moves.filter(({ of }) => parts.has(of)).map((move) => ({ ...move, id: nameOf(move.id) }))
    return moves.length === 0 ? [] : [{ ...withoutPhoto(dimension), id: nameOf(dimension.id), moves }]
  })
}
