import { eyeLimit, eyeLimitInAir } from '#app/domain/comfort/cautions.ts'
import { houseRules } from '#app/domain/rules/house-rules.ts'
import { tradePractice } from '#app/domain/rules/trade-practice.ts'
import { formatLength, formatQuantity } from '#app/domain/units.ts'

/** One rule as a person reads it. */
export interface RuleRow {
  readonly name: string
  readonly figure: string
  readonly source: string
  readonly meaning: string
}

const flux = (value: number) =>
  `${formatQuantity(value, 'irradiance', 'metric')} (${formatQuantity(value, 'irradiance', 'imperial')})`

const both = (metres: number) => `${formatLength(metres, 'metric')} (${formatLength(metres, 'imperial')})`

/** What falls on a guest. */
export const warmthRules: readonly RuleRow[] = [
  {
    name: 'Target',
    figure: `${houseRules.targetLow.value} to ${flux(houseRules.targetHigh.value)}`,
    source: houseRules.targetLow.source,
    meaning: 'Irradiance on the horizontal body plane of every seat that counts. A brief may set its own band.',
  },
  {
    name: 'Head caution, long stay',
    figure: flux(houseRules.headCautionLongStay.value),
    source: houseRules.headCautionLongStay.source,
    meaning: `Largest irradiance in any direction at the head, for a stay of ${houseRules.longStayMinutes.value} minutes or more.`,
  },
  {
    name: 'Head caution, short stay',
    figure: flux(houseRules.headCautionShortStay.value),
    source: houseRules.headCautionShortStay.source,
    meaning: 'The same for a shorter stay.',
  },
  {
    name: 'Stop',
    figure: flux(houseRules.irradianceStop.value),
    source: houseRules.irradianceStop.source,
    meaning: 'A layout that reaches it at body, head or eye height cannot be submitted.',
  },
  {
    name: 'Eyes, long stay',
    figure: `${flux(eyeLimit(3600))}, in the cold up to ${eyeLimitInAir(0)} W/m²`,
    source: `ICNIRP, 100 W/m² beyond 1,000 s; about 400 W/m² at 0 °C and 300 at 10 °C (from memory); ${houseRules.eyeRelaxedBelow.source}`,
    meaning: `Near infrared, 0.78 to 3 µm, at the eye of a guest who looks level. At 15 °C: ${Math.round(eyeLimitInAir(15))} W/m², at ${houseRules.eyeRelaxedBelow.value} °C and warmer the published figure. Advice.`,
  },
  {
    name: 'Eyes, short stay',
    figure: `18 t^−0.75 kW/m², at 5 minutes ${Math.round(eyeLimit(300))} W/m²`,
    source: 'ICNIRP (from memory)',
    meaning: 'The same for a stay of t seconds, up to 1,000; the relaxed figure where that is greater.',
  },
  {
    name: 'Spread and overlap',
    figure: flux(houseRules.overlapThreshold.value),
    source: houseRules.overlapThreshold.source,
    meaning: 'Spread: the area where one heater alone gives it. Overlap: where two or more each alone do.',
  },
]

/** How heaters hang, what they are fed with and what weather they stand. */
export const hangingRules: readonly RuleRow[] = [
  {
    name: 'Tolerance of a size nobody named',
    figure: `± ${formatLength(houseRules.tolerance.value, 'metric')}`,
    source: houseRules.tolerance.source,
    meaning: 'Counts for every coordinate that no measured size decides. Placed heights have none.',
  },
  {
    name: 'Tolerance of a size by its source',
    figure: [
      `laser ± ${formatLength(houseRules.toleranceLaser.value, 'metric')}`,
      `tape ± ${formatLength(houseRules.toleranceTape.value, 'metric')}`,
      `drawing ± ${formatLength(houseRules.toleranceDrawing.value, 'metric')}`,
      `photo ${100 * houseRules.tolerancePhotoShare.value} %, at least ± ${formatLength(houseRules.tolerancePhotoLeast.value, 'metric')}`,
      `told or guessed ± ${100 * houseRules.toleranceGuessShare.value} %`,
    ].join(', '),
    source: houseRules.toleranceLaser.source,
    meaning:
      'Taken when a source is named, until somebody says better. Told and guessed sizes stay visible as assumed.',
  },
  {
    name: 'Chain beside its member',
    figure: formatLength(houseRules.chainSidewaysLimit.value, 'metric'),
    source: houseRules.chainSidewaysLimit.source,
    meaning: 'How far sideways of the member an eye may be for a chain to hang plumb.',
  },
  {
    name: 'Splayed hanger, reach',
    figure: formatLength(houseRules.splayReach.value, 'metric'),
    source: houseRules.splayReach.source,
    meaning: 'How far in plan each member of a splayed pair may be from its eye.',
  },
  {
    name: 'Splayed hanger, angle',
    figure: `${houseRules.splayAngleDeg.value}° from plumb`,
    source: houseRules.splayAngleDeg.source,
    meaning: 'The flattest that a splayed hanger may lie.',
  },
  {
    name: 'One point alone',
    figure: 'a whole heater',
    source: houseRules.safetyLine.source,
    meaning: 'What a suspension point should hold where its load is known, should the other hanger let go.',
  },
  {
    name: 'Supply above rated voltage',
    figure: `× ${houseRules.supplyOverRated.value}`,
    source: houseRules.supplyOverRated.source,
    meaning: 'An option whose rated voltage the supply passes by more than this may not be used.',
  },
  {
    name: 'Ingress protection, open sky',
    figure: `second numeral ≥ ${houseRules.ingressOpenSky.value}`,
    source: houseRules.ingressOpenSky.source,
    meaning: 'And a location note that allows rain. The same under a roof that opens.',
  },
  {
    name: 'Ingress protection, closed cover',
    figure: `second numeral ≥ ${houseRules.ingressUnderCover.value}`,
    source: houseRules.ingressUnderCover.source,
    meaning: 'A recess box hangs under a closed cover only. Without data: cannot tell.',
  },
  {
    name: 'Bright glow near a step',
    figure: formatLength(houseRules.glowNearStep.value, 'metric'),
    source: houseRules.glowNearStep.source,
    meaning: 'In plan, from a model of bright glow to where the level changes. Advice.',
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
