import { moveMember, moveSeats, removeMember, removeSeats } from '#app/domain/site/edits.ts'
import type { Site } from '#app/domain/site/site.ts'

/** Things of the site that are chosen together: seats, or one member. */
export type Chosen =
  { readonly kind: 'seat'; readonly ids: readonly string[] } | { readonly kind: 'member'; readonly id: string }

/** What a click makes of the choice; with Shift seats are added or taken out. */
export function chosenAfterClick(before: Chosen | null, clicked: Chosen, shift: boolean): Chosen {
  if (!shift || clicked.kind === 'member' || before?.kind !== 'seat') return clicked
  const [id] = clicked.ids
  if (id === undefined) return before
  return { kind: 'seat', ids: before.ids.includes(id) ? before.ids.filter((each) => each !== id) : [...before.ids, id] }
}

/** The site with the chosen things moved by (dx, dy), m. */
export const moveChosen = (site: Site, chosen: Chosen, dx: number, dy: number): Site =>
  chosen.kind === 'seat' ? moveSeats(site, chosen.ids, dx, dy) : moveMember(site, chosen.id, dx, dy)

/** The site without the chosen things. */
export const removeChosen = (site: Site, chosen: Chosen): Site =>
  chosen.kind === 'seat' ? removeSeats(site, chosen.ids) : removeMember(site, chosen.id)

/** The choice without what is not on the site any more, null when nothing is left. */
export function stillThere(site: Site, chosen: Chosen | null): Chosen | null {
  if (!chosen) return null
  if (chosen.kind === 'member') return site.members.some(({ id }) => id === chosen.id) ? chosen : null
  const ids = chosen.ids.filter((id) => site.seats.some((seat) => seat.id === id))
  return ids.length === 0 ? null : ids.length === chosen.ids.length ? chosen : { kind: 'seat', ids }
}

/** "Seat R1-3", "3 seats", "Beam 2". */
export function chosenWords(site: Site, chosen: Chosen): string {
  if (chosen.kind === 'member') return site.members.find(({ id }) => id === chosen.id)?.name ?? chosen.id
  return chosen.ids.length === 1 ? `Seat ${chosen.ids[0]}` : `${chosen.ids.length} seats`
}
