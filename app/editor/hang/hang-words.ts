import type { HungHeater } from '#app/domain/layout/hang-sheet.ts'
import type { Hanger } from '#app/domain/layout/hanging.ts'
import type { Support } from '#app/domain/layout/supports.ts'
import type { Site } from '#app/domain/site/site.ts'
import { formatLength, formatQuantity, type DisplayUnits } from '#app/domain/units.ts'
import { noFigure } from '#app/editor/figures.ts'

/** A length as it is cut and set: whole millimetres, or feet and inches to the eighth. */
export const cutText = (metres: number, units: DisplayUnits): string =>
  units === 'metric' ? `${Math.round(metres * 1000)}` : formatLength(metres, units)

/** The same with its unit. */
export const cutTextWithUnit = (metres: number, units: DisplayUnits): string =>
  units === 'metric' ? `${cutText(metres, units)} mm` : cutText(metres, units)

/** How a turnbuckle is set from rest: "9 shorter", "13 longer", "as it is". */
export function takeUpText({ takeUp }: Hanger, units: DisplayUnits): string {
  if (Math.abs(takeUp) < 0.0005) return 'as it is'
  return `${cutText(Math.abs(takeUp), units)} ${takeUp > 0 ? 'longer' : 'shorter'}`
}

/** What is to be done about a hanger that cannot be made as drawn; null for one that can. */
export function outcomeText(hanger: Hanger, mount: string, units: DisplayUnits): string | null {
  const at = `Eye ${hanger.end + 1}`
  if (hanger.outcome === 'too short')
    return `${at}: too short for ${mount}. Use a short bracket, ${cutTextWithUnit(hanger.length, units)} from underside to eye.`
  if (hanger.outcome === 'beyond the turnbuckle')
    return `${at}: more than the turnbuckle's range by ${cutTextWithUnit(Math.abs(hanger.left), units)}. Another hanger.`
  return null
}

/** A force in the person's unit. */
export const forceText = (newtons: number, units: DisplayUnits): string => formatQuantity(newtons, 'force', units)

/** A tilt to a tenth of a degree, its sign only where it has one. */
export function tiltText(degrees: number): string {
  const text = Math.abs(degrees).toFixed(1)
  return `${degrees < 0 && text !== '0.0' ? '−' : ''}${text}°`
}

/** Where an eye is in plan, in the words of the site's axes. */
export const placeText = ({ eye }: Hanger, units: DisplayUnits): string =>
  `${formatLength(eye[0], units)}, ${formatLength(eye[1], units)}`

/** What a mount that does not hang is fixed to, and how far it stands off. */
export function fixedText(support: Support, site: Site): string {
  const names = support.ids.map((id) => nameOf(site, id)).join(' and ')
  const off = support.distance === null ? '' : `, ${formatLength(support.distance, site.displayUnits)} off it`
  return names ? `${names}${off}` : noFigure
}

/** The name of a member, wall or pole. */
export const nameOf = (site: Site, id: string): string =>
  [...site.members, ...site.walls, ...site.poles].find((thing) => thing.id === id)?.name ?? id

/** How far its eyes hang aside of their member's axis, within the reach that is stated; null when they hang under it. */
export function asideText({ support, schedule, heater }: HungHeater, units: DisplayUnits): string | null {
  const { distance, reach } = support ?? { distance: null, reach: null }
  if (!schedule || distance === null || distance < 0.0005 || reach === null || heater.splayed) return null
  const what = heater.mount === 'chain' ? 'Its chain hangs' : 'The heads of its rods reach'
  return `${what} ${cutTextWithUnit(distance, units)} aside of the member's axis, ${cutTextWithUnit(reach, units)} at the most.`
}
