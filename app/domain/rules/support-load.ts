import { heaterRule, judgedBy, type HeaterCheck } from '#app/domain/rules/check.ts'
import type { Finding } from '#app/domain/rules/finding.ts'
import { houseRules } from '#app/domain/rules/house-rules.ts'

/**
 * The load at each suspension point is not over what its support allows: half the heater's weight at each of two eyes,
 * else all of it at one point. What a support allows is often not known, and never guessed. Null for an unsupported heater.
 */
export function supportLoad(check: HeaterCheck): Finding | null {
  const { site, model, support } = check
  if (support.outcome === 'not held' || support.ids.length === 0) return null
  const points = support.eyes.length || 1
  const load = (model.body.mass * houseRules.gravity.value) / points
  const carriers = support.ids.map((id) => carrierOf(check, id))
  const unknown = carriers.find(({ allowed }) => allowed === null)
  const allowed = unknown ? null : Math.min(...carriers.map((carrier) => carrier.allowed ?? Infinity))
  const names = carriers.map(({ name }) => name).join(' and ')
  const status = (unknown ?? carriers[0])?.status ?? ''
  return judgedBy(
    heaterRule(check, 'support-load', 'hard stop', 'N', `Load status on ${site.name}: ${status}`),
    {
      fails: `Load over what ${names} allows`,
      'measure first': `Load near what ${names} allows`,
      pass: `Load allowed on ${names}`,
      'cannot tell': `Load on ${names} is not known`,
    },
    {
      value: load,
      limit: allowed,
      margin: allowed === null ? null : allowed - load,
      tolerance: 0,
      remedy: unknown ? `Confirm the allowed load: ${status}.` : 'Spread the load, or strengthen the support.',
    },
  )
}

interface Carrier {
  readonly name: string
  /** N per suspension point; null: not known. */
  readonly allowed: number | null
  readonly status: string
}

function carrierOf({ site }: HeaterCheck, id: string): Carrier {
  const member = site.members.find((candidate) => candidate.id === id)
  if (member) return { name: member.name, allowed: member.allowedPointLoad, status: member.loadStatus }
  const other = [...site.walls, ...site.poles].find((candidate) => candidate.id === id)
  return { name: other?.name ?? id, allowed: null, status: other?.loadStatus ?? 'not stated' }
}
