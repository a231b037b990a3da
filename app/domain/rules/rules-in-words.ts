import { eyeLimit, eyeLimitInAir } from '#app/domain/comfort/cautions.ts'
import { fixedRules } from '#app/domain/rules/fixed-rules.ts'
import { houseRuleGroups, houseRuleRow } from '#app/domain/rules/house-rule-fields.ts'
import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'
import { tradePractice } from '#app/domain/rules/trade-practice.ts'
import { formatLength, formatQuantity } from '#app/domain/units.ts'

/** One rule as a person reads it. */
export interface RuleRow {
  readonly name: string
  readonly figure: string
  readonly source: string
  readonly meaning: string
}

/** What an organisation decides for itself, by group. */
export const houseRuleRows = (
  rules: HouseRules,
): readonly { readonly group: string; readonly rows: readonly RuleRow[] }[] =>
  Object.entries(houseRuleGroups).map(([group, fields]) => ({
    group,
    rows: fields.map((field) => houseRuleRow(field, rules)),
  }))

const flux = (value: number) =>
  `${formatQuantity(value, 'irradiance', 'metric')} (${formatQuantity(value, 'irradiance', 'imperial')})`

const both = (metres: number) => `${formatLength(metres, 'metric')} (${formatLength(metres, 'imperial')})`

/** What no house changes: published figures, and what follows from them. */
export const fixedRuleRows: readonly RuleRow[] = [
  {
    name: 'Stop',
    figure: flux(fixedRules.irradianceStop.value),
    source: fixedRules.irradianceStop.source,
    meaning: 'A layout that reaches it at body, head or eye height cannot be submitted.',
  },
  {
    name: 'Eyes, long stay',
    figure: `${flux(eyeLimit(3600))}, in the cold up to ${eyeLimitInAir(0)} W/m²`,
    source: `ICNIRP, 100 W/m² beyond 1,000 s; about 400 W/m² at 0 °C and 300 at 10 °C (from memory); ${fixedRules.eyeRelaxedBelow.source}`,
    meaning: `Near infrared, 0.78 to 3 µm, at the eye of a guest who looks level. At 15 °C: ${Math.round(eyeLimitInAir(15))} W/m², at ${fixedRules.eyeRelaxedBelow.value} °C and warmer the published figure. Advice.`,
  },
  {
    name: 'Eyes, short stay',
    figure: `18 t^−0.75 kW/m², at 5 minutes ${Math.round(eyeLimit(300))} W/m²`,
    source: 'ICNIRP (from memory)',
    meaning: 'The same for a stay of t seconds, up to 1,000; the relaxed figure where that is greater.',
  },
  {
    name: 'One point alone',
    figure: 'a whole heater',
    source: fixedRules.safetyLine.source,
    meaning: 'What a suspension point should hold where its load is known, should the other hanger let go.',
  },
  {
    name: 'Wind on a heater at a pole',
    figure: '½ρv²·C_d·A',
    source: 'Closed form; ρ 1.25 kg/m³, C_d 2 for the body and 1.2 for the pole (EN 1991-1-4, from memory)',
    meaning: 'Moment at the foot at the gust of the brief. Information: no pole is approved by it.',
  },
]

/** What the trade does where a manual is silent: shown as advice beside "cannot tell", never a pass. */
export const tradeRules: readonly RuleRow[] = [
  {
    name: 'Combustible edge',
    figure: both(tradePractice.combustibleEdge.value),
    source: tradePractice.combustibleEdge.source,
    meaning: 'Kept clear by the distance in the manual; this is the usual one.',
  },
  {
    name: 'Undersides',
    figure: both(tradePractice.underside.value),
    source: tradePractice.underside.source,
    meaning: 'Not below this where the manual asks it; the manual’s own least height is a hard stop.',
  },
]
