import { listOf, moveThings, removeThings } from '#app/domain/site/edits.ts'
import type { Site } from '#app/domain/site/site.ts'
import type { Chosen, ChosenKind } from '#app/editor/site/choice.ts'
import { movedHandle, withoutPart } from '#app/editor/site/handles.ts'

/** What a click makes of the choice; with Shift things of one kind are added or taken out. */
export function chosenAfterClick(before: Chosen | null, clicked: Chosen, shift: boolean): Chosen | null {
  if (!shift || before?.kind !== clicked.kind || clicked.kind === 'floor') return clicked
  const [id] = clicked.ids
  if (id === undefined) return before
  const ids = before.ids.includes(id) ? before.ids.filter((each) => each !== id) : [...before.ids, id]
  return ids.length === 0 ? null : { kind: before.kind, ids, part: null }
}

/** The site with the chosen things, or the chosen corner or end alone, moved by (dx, dy), m. The floor moves by corners only. */
export function moveChosen(site: Site, chosen: Chosen, dx: number, dy: number): Site {
  if (chosen.part !== null) return movedHandle(site, chosen, chosen.part, dx, dy)
  return chosen.kind === 'floor' ? site : moveThings(site, chosen.kind, chosen.ids, dx, dy)
}

/** The site without the chosen things, or without the chosen corner of an outline. */
export function removeChosen(site: Site, chosen: Chosen): Site {
  const without = chosen.part === null ? null : withoutPart(site, chosen, chosen.part)
  if (without) return without
  return chosen.kind === 'floor' ? site : removeThings(site, chosen.kind, chosen.ids)
}

/** The choice without what is not on the site any more, null when nothing is left. */
export function stillThere(site: Site, chosen: Chosen | null): Chosen | null {
  if (!chosen) return null
  if (chosen.kind === 'floor') {
    return chosen.part !== null && chosen.part >= site.floor.length ? { ...chosen, part: null } : chosen
  }
  const here = new Set(site[listOf[chosen.kind]].map(({ id }) => id))
  const ids = chosen.ids.filter((id) => here.has(id))
  return ids.length === 0 ? null : ids.length === chosen.ids.length ? chosen : { ...chosen, ids }
}

/** One of each kind, and several, in words. */
export const kindWords = {
  floor: ['Floor', 'floors'],
  level: ['Level', 'levels'],
  cover: ['Cover', 'covers'],
  member: ['Member', 'members'],
  wall: ['Wall', 'walls'],
  pole: ['Post or pole', 'posts and poles'],
  obstacle: ['Obstacle', 'obstacles'],
  table: ['Table', 'tables'],
  seat: ['Seat', 'seats'],
} as const satisfies Record<ChosenKind, readonly [string, string]>

/** "Seat R1-3", "3 seats", "beam 2", "Table T". */
export function chosenWords(site: Site, { kind, ids, part }: Chosen): string {
  const [one, many] = kindWords[kind]
  const corner = part === null ? '' : `, ${kind === 'member' || kind === 'wall' ? 'end' : 'corner'} ${part + 1}`
  if (kind === 'floor') return `${one}${corner}`
  if (ids.length !== 1) return `${ids.length} ${many}`
  const thing = site[listOf[kind]].find(({ id }) => id === ids[0])
  if (!thing) return one
  return `${'name' in thing ? thing.name : `${one} ${thing.id}`}${corner}`
}
