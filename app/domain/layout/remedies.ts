import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { MountedHeater } from '#app/domain/layout/layout.ts'
import { movedToSupport, railsFor } from '#app/domain/layout/support-remedies.ts'
import { supportOf } from '#app/domain/layout/supports.ts'
import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'
import { removeThings } from '#app/domain/site/edits.ts'
import type { Member, Site } from '#app/domain/site/site.ts'

/** What would hold a heater that is not: another place, or rails over the place it has. Null where that would not. */
export interface Remedies {
  readonly move: MovedHeater | null
  readonly rails: RailedHeater | null
}

/** The heater at the nearest thing that holds it. */
interface MovedHeater {
  readonly heater: MountedHeater
  /** How far it goes in plan, m. */
  readonly distance: number
  readonly supportName: string
}

/** The rails to add to the site and the heater that names the first of them. */
export interface RailedHeater {
  readonly heater: MountedHeater
  readonly rails: readonly Member[]
}

/** The remedies of a heater that nothing holds; both are tried, so that what is offered does hold it. */
export function remediesOf(site: Site, heater: MountedHeater, model: HeaterModel, rules: HouseRules): Remedies {
  return { move: moveOf(site, heater, model, rules), rails: railsOf(site, heater, model, rules) }
}

function moveOf(site: Site, heater: MountedHeater, model: HeaterModel, rules: HouseRules): MovedHeater | null {
  const moved = movedToSupport(site, heater, model, rules)
  if (!moved || supportOf(site, moved, model, rules).outcome === 'not held') return null
  const supports = [...site.members, ...site.walls, ...site.poles]
  const supportName = supports.find(({ id }) => id === moved.memberId)?.name ?? ''
  return { heater: moved, distance: Math.hypot(moved.x - heater.x, moved.y - heater.y), supportName }
}

function railsOf(site: Site, heater: MountedHeater, model: HeaterModel, rules: HouseRules): RailedHeater | null {
  const rails = railsFor(site, heater, model)
  const [first] = rails ?? []
  if (!rails || !first) return null
  const railed = { ...heater, memberId: first.id, ...(heater.splayed ? { splayed: false } : {}) }
  return supportOf(withRails(site, rails), railed, model, rules).outcome === 'held' ? { heater: railed, rails } : null
}

/** The site with rails added. */
export const withRails = (site: Site, rails: readonly Member[]): Site => ({
  ...site,
  members: [...site.members, ...rails],
})

/** The site without rails that were added. */
export const withoutRails = (site: Site, rails: readonly Member[]): Site =>
  removeThings(
    site,
    'member',
    rails.map(({ id }) => id),
  )
