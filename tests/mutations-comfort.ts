/** One place of a formula to be broken: the text as it stands, what replaces it, and the tests that must then fail. */
export interface Mutation {
  readonly file: string
  readonly from: string
  readonly to: string
  readonly test: string
}

const comfort = 'tests/published/comfort.test.ts'
const bands = 'tests/published/bands.test.ts'
const limits = 'tests/published/comfort-limits.test.ts'
const warmth = 'tests/domain/comfort/seat-warmth.test.ts'
const field = 'tests/domain/comfort/radiant-field.test.ts'
const largest = 'tests/domain/comfort/largest-direction.test.ts'
const level = 'tests/domain/comfort/level-sight.test.ts'
const explain = 'tests/domain/comfort/explain.test.ts'
const uncertainty = 'tests/domain/comfort/uncertainty.test.ts'
const cautions = 'tests/domain/comfort/cautions.test.ts'
const seatRules = 'tests/domain/rules/seat-rules.test.ts'
const indoors = 'tests/domain/comfort/indoors.test.ts'
const units = 'tests/domain/units.test.ts'

const within = (file: string, test: string, ...changes: [from: string, to: string][]): Mutation[] =>
  changes.map(([from, to]) => ({ file: `app/domain/${file}`, from, to, test }))

/** Mutations of the comfort formulas and the conversions. */
export const comfortMutations: readonly Mutation[] = [
  ...within(
    'comfort/feels-like.ts',
    comfort,
    ['8.3 * wind ** 0.6', '8.3 * wind ** 0.5'],
    ['const radiantCoefficient = 6.012', 'const radiantCoefficient = 6.102'],
    ['const skinTemperature = 33', 'const skinTemperature = 34'],
    ['const clo = 0.155', 'const clo = 0.165'],
    ['1.05 + 0.645 * clothing', '1.05 - 0.645 * clothing'],
    ['resistance(stillAirCoefficient) / resistance(', 'resistance(stillAirCoefficient) * resistance('],
    ['radiant * conditions.surroundingsTemperature', 'radiant * conditions.airTemperature'],
    ['return without + operativeRise', 'return without - operativeRise'],
  ),
  ...within(
    'comfort/projected-area.ts',
    comfort,
    ['{ seated: 0.696, standing: 0.725 }', '{ seated: 0.725, standing: 0.725 }'],
    ['[0.29, 0.324, 0.305, 0.303, 0.262, 0.224, 0.177]', '[0.29, 0.324, 0.305, 0.293, 0.262, 0.224, 0.177]'],
    ['(high - low) * (column - j)', '(high - low) * (row - i)'],
    ['turn > 180 ? 360 - turn : turn', 'turn > 180 ? turn - 180 : turn'],
  ),
  ...within(
    'comfort/band-share.ts',
    bands,
    ['= 14387.77', '= 14397.77'],
    ['(6 * x) / n ** 3', '(6 * x) / n ** 2'],
    ['shareBelow(0.78 * absolute)', 'shareBelow(0.87 * absolute)'],
    ['temperature + 273.15', 'temperature'],
  ),
  ...within(
    'comfort/sensation.ts',
    comfort,
    ['3.96e-8 * enlarged', '3.69e-8 * enlarged'],
    ['0.42 * (metabolic', '0.24 * (metabolic'],
    ['Math.exp(-0.036 * metabolic)', 'Math.exp(0.036 * metabolic)'],
    ['12.1 * Math.sqrt(airSpeed)', '12.1 * airSpeed'],
    ['1 - 0.95 * Math.exp', '1 - 0.85 * Math.exp'],
    ['feelsLike >= 10', 'feelsLike >= 9'],
    ['wind < 1 &&', 'wind <= 1 &&'],
  ),
  ...within('comfort/sources.ts', warmth, ["wave === 'short-wave' ? 0.7 : 0.95", "wave === 'short-wave' ? 0.95 : 0.7"]),
  ...within(
    'comfort/radiant-field.ts',
    field,
    ['Math.atan2(y, x) - facing', 'Math.atan2(y, x) + facing'],
    ['const share = (to - from) / 2 / length', 'const share = (to - from) / length'],
    ['Math.atan2(z, Math.hypot(x, y))', 'Math.atan2(Math.hypot(x, y), z)'],
    ['-dot(towards, u) / distance', 'dot(towards, u) / distance'],
  ),
  ...within(
    'comfort/net-flux.ts',
    largest,
    ['scale(view.emitter.frame.u, -sine)', 'scale(view.emitter.frame.u, sine)'],
    ['if (first <= 0 && last <= 0) return [0, 0, 0]', 'if (first <= 0 && last <= 0) return flux.vector'],
    ['return first > 0\n', 'return first < 0\n'],
    ['planeStarts(vectorsByHeater(lit))', 'vectorsByHeater(lit)'],
  ),
  ...within(
    'comfort/level-sight.ts',
    level,
    ['cosine * Math.cos(width)', 'cosine * Math.sin(width)'],
    ['Math.hypot(cosine, sine)', 'Math.max(cosine, sine)'],
    ['[Math.cos(azimuth), Math.sin(azimuth), 0]', '[Math.cos(azimuth), Math.sin(azimuth), 0.2]'],
    ['arcs.push(arcOf(cut, arc.to))', ''],
    ['const mostPlanes = 100', 'const mostPlanes = 8'],
  ),
  ...within(
    'comfort/seat-heat.ts',
    level,
    ['atEye: nearInfraredEmitter && netFluxOf(nearInfraredEmitter, head)', 'atEye: netFluxOf(emitter, head)'],
    ['netFluxOf(nearInfraredEmitter, head)', 'netFluxOf(nearInfraredEmitter, body)'],
    ['irradianceByNormalAt(emitters, point, obstructions)', 'irradianceByNormalAt(emitters, point)'],
  ),
  ...within(
    'comfort/seat-warmth.ts',
    warmth,
    ['body < noHeat', 'body <= 0'],
    ['if (body < target.low)', 'if (body <= target.low)'],
    ['body > target.high', 'body >= target.high'],
    ['* energy.dutyFraction', ''],
    ['coldest.irradiance / mean : null', 'mean / coldest.irradiance : null'],
    ['headHorizontal / body', 'body / headHorizontal'],
    ['before: feelsLike(0, conditions)', 'before: brief.airTemperature'],
  ),
  ...within('comfort/surroundings.ts', warmth, ['underside > seat.bodyHeight', 'underside < seat.bodyHeight']),
  ...within(
    'comfort/uncertainty.ts',
    uncertainty,
    ['/ (2 * step)', '/ step'],
    ['sum + part * model.powerVoltageExponent', 'sum + part'],
    ['radiantEfficiency - range.low', 'range.low'],
    ['tolerances.seat).map', 'tolerances.heaterPosition).map'],
    ['bodyLargest.direction', 'head.direction'],
    ['everything ? placeShares', '!everything ? placeShares'],
    ['(part - ratio * (own[i] ?? 0)) / divisor', 'part / divisor'],
    ['part * (sources[i]?.nearInfrared ?? 0)', 'part'],
    ['/ (2 * feelingStep)', '/ feelingStep'],
  ),
  ...within(
    'site/tolerance.ts',
    uncertainty,
    ['lever * dimension.tolerance', 'dimension.tolerance'],
    ['(sum, move) => sum + move.by, 0', '(sum) => sum + 1, 0'],
  ),
  ...within(
    'comfort/uncertainty.ts',
    explain,
    ['heat.field.map((field) => field * perField)', '[...heat.field]'],
    ['return heat.bodyLargest.parts', 'return heat.body'],
    ['heat.nearInfrared?.parts ?? null', 'heat.head.parts'],
    ['return warmth.headToBody', 'return warmth.head'],
  ),
  ...within(
    'comfort/explain.ts',
    explain,
    ['whole === 0 ? 0 : value / whole', 'whole === 0 ? 0 : value'],
    ['return warmth.feelsLike[figure.wind].before', 'return 0'],
  ),
  ...within(
    'comfort/seen-heaters.ts',
    explain,
    ['ofUnshaded: own / whole', 'ofUnshaded: own'],
    ['[each]) < 1', '[each]) < 0.5'],
    ["['head', headPoint(seat)]", "['head', bodyPoint(seat)]"],
  ),
  ...within('comfort/shade.ts', explain, ["shade === 'away' ? 'away' : 'in place'", "'in place'"]),
  ...within(
    'comfort/cautions.ts',
    limits,
    ['seconds ** -0.75', 'seconds ** -0.5'],
    ['const continuousLimit = 100', 'const continuousLimit = 300'],
  ),
  ...within(
    'comfort/cautions.ts',
    cautions,
    ['stayMinutes >= rules', 'stayMinutes > rules'],
    ['air: 0, limit: 400', 'air: 0, limit: 200'],
    ['(to.limit - from.limit) * share', '(from.limit - to.limit) * share'],
    ['airTemperature <= cool.air ?', 'airTemperature <= 25 ?'],
    ['relaxed ? inAir : published', 'inAir'],
  ),
  ...within('comfort/cautions.ts', seatRules, ["'headCautionLongStay' : ", "'headCautionShortStay' : "]),
  ...within(
    'rules/near-infrared.ts',
    seatRules,
    ['each > limit', 'each >= limit'],
    ['cannotTell.length > 0 ? [] :', 'cannotTell.length < 0 ? [] :'],
  ),
  ...within(
    'rules/head-flux.ts',
    seatRules,
    ['value: seat.bodyLargest', 'value: seat.body ?? 0'],
    ["'hard stop', stop, atHeadOrBody", "'hard stop', head, atHeadOrBody"],
  ),
  ...within('rules/seat-tolerance.ts', seatRules, ['...shifts.flatMap(({ by }) => by)', '0.04']),
  ...within('comfort/indoors.ts', indoors, ['times * head', 'head'], ['needed / fromAbove', 'needed * fromAbove']),
  ...within(
    'units.ts',
    units,
    ['const inch = 0.0254', 'const inch = 0.0256'],
    ['celsius * 1.8 + 32', 'celsius * 1.8 - 32'],
    ['Math.round(metres * 1e4) / 1e4', 'Math.round(metres * 1e3) / 1e3'],
    ["unit('W/ft²', 1 / (foot * foot), 1,", "unit('W/ft²', foot * foot, 1,"],
  ),
]
