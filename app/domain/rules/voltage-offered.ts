import { electricalPower } from '#app/domain/heaters/power.ts'
import { findingOf, heaterRule, judgedBy, type HeaterCheck } from '#app/domain/rules/check.ts'
import type { Finding } from '#app/domain/rules/finding.ts'
import { houseFigure } from '#app/domain/rules/house-rules.ts'
import { figureOfRuleSet } from '#app/domain/rules/sourced-figure.ts'

/**
 * The option ordered is listed for the model, and the supply is not more above its rated voltage than the house
 * allows, 1.1 times by default (hard stops); a supply below the rated voltage is soft, with the power that is left.
 */
export function voltageOffered(check: HeaterCheck): Finding {
  const { heater, model, brief, house } = check
  const overRated = figureOfRuleSet(brief.ruleSet, 'supply-over-rated') ?? houseFigure(house.rules, 'supplyOverRated')
  const rule = heaterRule(check, 'voltage-offered', 'hard stop', 'V', overRated.source)
  if (model.supplyOptions.length === 0) {
    return findingOf(rule, 'cannot tell', { title: 'The manual lists no supply voltage' })
  }
  const listed = model.supplyOptions.map(({ voltage }) => voltage)
  const remedy = `Listed for ${listed.join(', ')} V.`
  if (heater.ratedVoltage !== undefined && !listed.includes(heater.ratedVoltage)) {
    return findingOf(rule, 'fails', { title: 'Voltage option not listed', value: heater.ratedVoltage, remedy })
  }
  const { power, ratedPower, ratedVoltage } = electricalPower(heater, model)
  const option = model.supplyOptions.find(({ voltage }) => voltage === ratedVoltage)
  if (option?.phases === 3 && brief.supply.phases === 1) {
    return findingOf(rule, 'fails', { title: 'Three-phase option on a single-phase supply', remedy })
  }
  if (heater.supplyVoltage < ratedVoltage) {
    const share = Math.round((power / ratedPower) * 100)
    const order = listed.includes(heater.supplyVoltage) ? ` Order the ${heater.supplyVoltage} V option.` : ''
    return findingOf({ ...rule, weight: 'soft' }, 'fails', {
      title: 'Supply below the rated voltage',
      value: heater.supplyVoltage,
      limit: ratedVoltage,
      margin: heater.supplyVoltage - ratedVoltage,
      tolerance: 0,
      remedy: `Gives ${Math.round(power)} W instead of ${Math.round(ratedPower)} W (${share} %).${order}`,
    })
  }
  const limit = overRated.value * ratedVoltage
  return judgedBy(
    rule,
    {
      fails: 'Supply over the rated voltage',
      'measure first': 'Supply near the greatest voltage',
      pass: 'Voltage offered',
      'cannot tell': 'The manual lists no supply voltage',
    },
    { value: heater.supplyVoltage, limit, margin: limit - heater.supplyVoltage, tolerance: 0, remedy },
  )
}
