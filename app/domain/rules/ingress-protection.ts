import { allowsRain, waterNumeral } from '#app/domain/heaters/ingress.ts'
import { bodyCorners } from '#app/domain/layout/clear-space.ts'
import { findingOf, heaterRule, type HeaterCheck } from '#app/domain/rules/check.ts'
import type { Finding } from '#app/domain/rules/finding.ts'
import { houseFigure } from '#app/domain/rules/house-rules.ts'
import { coverHeightAt } from '#app/domain/site/cover.ts'

/** What is over a heater: every corner of it under one closed cover, else rain comes to it. */
function shelterOf({ site, body }: HeaterCheck): 'closed cover' | 'opening roof' | 'open sky' {
  const corners = bodyCorners(body)
  const over = site.covers.filter((cover) => corners.every(([x, y]) => coverHeightAt(cover, x, y) !== null))
  if (over.some(({ opening }) => !opening)) return 'closed cover'
  return over.length > 0 ? 'opening roof' : 'open sky'
}

/**
 * The ingress protection suits the place (house rule): under open sky or an opening roof the second numeral is at least
 * the house's, 5 by default, and the location note allows rain; under a closed cover 4; a recess box only under a closed
 * cover.
 */
export function ingressProtection(check: HeaterCheck): Finding {
  const { heater, model, house } = check
  const shelter = shelterOf(check)
  const closed = shelter === 'closed cover'
  const need = houseFigure(house.rules, closed ? 'ingressUnderCover' : 'ingressOpenSky')
  const rule = heaterRule(check, 'ingress-protection', 'hard stop', 'none', need.source)
  const remedy = closed ? 'Choose a model for the weather under a cover.' : 'Choose a model that may stand in the rain.'
  if (heater.mount === 'recess box' && !closed) {
    return findingOf(rule, 'fails', { title: `Recess box under ${shelterWords[shelter]}`, remedy })
  }
  const value = waterNumeral(model.ingressProtection)
  const figures = { value, limit: need.value }
  if (value === null) {
    return findingOf(rule, 'cannot tell', {
      title: 'No ingress protection stated',
      ...figures,
      remedy: 'Enter it from the manual.',
    })
  }
  const margin = value - need.value
  const told = `${model.ingressProtection ?? ''}, ${model.locationNote ?? 'no location note'}`
  if (margin < 0) return findingOf(rule, 'fails', { title: `Not for ${shelterWords[shelter]}: ${told}`, ...figures, margin, tolerance: 0, remedy }) // prettier-ignore
  const rain = allowsRain(model.locationNote)
  if (!closed && rain === false) return findingOf(rule, 'fails', { title: `Not for ${shelterWords[shelter]}: ${told}`, ...figures, remedy }) // prettier-ignore
  if (!closed && rain === null) {
    return findingOf(rule, 'cannot tell', {
      title: 'No location note about rain',
      ...figures,
      remedy: 'Ask its maker.',
    })
  }
  return findingOf(rule, 'pass', { title: `Suits ${shelterWords[shelter]}`, ...figures, margin, tolerance: 0 })
}

const shelterWords = {
  'closed cover': 'a closed cover',
  'opening roof': 'a roof that opens',
  'open sky': 'open sky',
} as const
