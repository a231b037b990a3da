import { pointLoads, type PointLoad } from '#app/domain/layout/support-loads.ts'
import { findingOf, heaterRule, judgedBy, type HeaterCheck } from '#app/domain/rules/check.ts'
import type { Finding } from '#app/domain/rules/finding.ts'
import { fixedRules } from '#app/domain/rules/fixed-rules.ts'

/**
 * The load at each suspension point is not over what its support allows. What a support allows is often not known, and
 * never guessed. Beside it, where it is known: whether one point alone would hold the heater. None for an unsupported
 * heater.
 */
export function supportLoad(check: HeaterCheck): Finding[] {
  const { model, body, support, site } = check
  const loads = pointLoads(site, model, body, support)
  const judged = loads.map((each) => ({ ...each, ...carrierOf(check, each) }))
  const [first] = judged
  if (!first) return []
  const unknown = judged.find(({ allowed }) => allowed === null)
  const room = ({ allowed, load }: (typeof judged)[number]) => (allowed ?? Infinity) - load
  const tightest = unknown ?? judged.reduce((a, b) => (room(b) < room(a) ? b : a), first)
  const names = [...new Set(judged.map(({ name }) => name))].join(' and ')
  const load = unknown ? Math.max(...judged.map((each) => each.load)) : tightest.load
  const status = tightest.status
  const rule = heaterRule(check, 'support-load', 'hard stop', 'N', `Site, load status of ${names}: ${status}`)
  const finding = judgedBy(
    rule,
    {
      fails: `Load over what ${names} allows`,
      'measure first': `Load near what ${names} allows`,
      pass: `Load allowed on ${names}`,
      'cannot tell': `Load on ${names} is not known`,
    },
    {
      value: load,
      limit: tightest.allowed,
      margin: tightest.allowed === null ? null : tightest.allowed - load,
      tolerance: 0,
      remedy: unknown ? 'The maker of the structure must confirm it.' : 'Spread the load, or strengthen the support.',
    },
  )
  const alone = finding.outcome === 'pass' ? aloneTooMuch(check, judged) : null
  return alone ? [finding, alone] : [finding]
}

type Judged = PointLoad & Carrier

/** One point would not hold the heater should the other let go; null when it would. */
function aloneTooMuch(check: HeaterCheck, judged: readonly Judged[]): Finding | null {
  const over = judged.find(({ alone, allowed }) => allowed !== null && alone > allowed + 1e-9)
  if (!over || over.allowed === null) return null
  const rule = heaterRule(check, 'support-load-alone', 'soft', 'N', fixedRules.safetyLine.source)
  return findingOf(rule, 'fails', {
    title: `${over.name} does not allow all of it at one point`,
    value: over.alone,
    limit: over.allowed,
    margin: over.allowed - over.alone,
    tolerance: 0,
    remedy: 'Lead the secondary safety line to another support.',
  })
}

/** What carries a point load, and how much it allows there. */
interface Carrier {
  readonly name: string
  /** N per suspension point; null: not known. */
  readonly allowed: number | null
  readonly status: string
}

function carrierOf({ site }: HeaterCheck, { supportId }: PointLoad): Carrier {
  const member = site.members.find(({ id }) => id === supportId)
  if (member) return { name: member.name, allowed: member.allowedPointLoad, status: member.loadStatus }
  const other = [...site.walls, ...site.poles].find(({ id }) => id === supportId)
  return { name: other?.name ?? supportId, allowed: null, status: other?.loadStatus ?? 'not stated' }
}
