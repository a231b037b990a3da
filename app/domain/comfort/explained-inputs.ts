import type { Brief } from '#app/domain/brief/brief.ts'
import { convectiveCoefficient } from '#app/domain/comfort/feels-like.ts'
import { effectiveAreaShare } from '#app/domain/comfort/projected-area.ts'
import { conditionsAt, type SeatWarmth, type WarmthInput, type WindName } from '#app/domain/comfort/seat-warmth.ts'
import type { SeenHeater } from '#app/domain/comfort/seen-heaters.ts'
import type { Shade } from '#app/domain/comfort/shade.ts'
import type { Source } from '#app/domain/comfort/sources.ts'
import { heightsOf, type SeatFigure } from '#app/domain/comfort/uncertainty.ts'
import type { Obstruction } from '#app/domain/flux/shading.ts'
import { electricalPower } from '#app/domain/heaters/power.ts'
import type { Layout } from '#app/domain/layout/layout.ts'

/** One figure that went in, in SI and °C. */
export interface ExplainedInput {
  readonly name: string
  readonly value: number
  readonly unit: 'm' | '°' | '°C' | 'm/s' | 'clo' | 'met' | '%' | 'W' | 'W/m²' | 'W/m²K' | 'V' | 'none'
  readonly source: string
  /** Nobody has confirmed it: it stays an assumption until somebody does. */
  readonly assumed: boolean
}

/** What the inputs of one figure are told from. */
export interface Asked {
  readonly warmth: SeatWarmth
  readonly figure: SeatFigure
  readonly input: WarmthInput
  readonly sources: readonly Source[]
  readonly shade: Shade
  readonly obstructions: readonly Obstruction[]
  readonly seen: readonly SeenHeater[] | null
}

/** Everything that went into a figure. */
export function inputsOf(asked: Asked): ExplainedInput[] {
  const { warmth, figure, input } = asked
  return [
    ...seatInputs(warmth, figure),
    ...('wind' in figure ? feelingInputs(warmth, input.brief, figure.wind) : []),
    ...(figure.quantity === 'sensation' ? voteInputs(warmth, input.brief, figure.wind) : []),
    ...(figure.quantity === 'head-to-body' ? ratioInputs(warmth) : []),
    ...shadeInputs(asked),
    ...heaterInputs(input),
    ...(figure.quantity === 'near-infrared' ? elementInputs(asked) : []),
  ]
}

const known = (name: string, value: number, unit: ExplainedInput['unit'], source: string): ExplainedInput => ({
  name,
  value,
  unit,
  source,
  assumed: false,
})

function seatInputs({ seat }: SeatWarmth, figure: SeatFigure): ExplainedInput[] {
  return [
    known('seat x', seat.x, 'm', 'site'),
    known('seat y', seat.y, 'm', 'site'),
    ...heightsOf(figure).map((height) =>
      known(height === 'headHeight' ? 'head height' : 'body height', seat[height], 'm', 'site'),
    ),
    ...('wind' in figure ? [known('facing', seat.facingDeg, '°', 'site')] : []),
  ]
}

function fromBrief(
  brief: Brief,
  key: 'airTemperature' | 'windDesign' | 'windGust' | 'clothing' | 'relativeHumidity' | 'activity',
  name: string,
  unit: ExplainedInput['unit'],
): ExplainedInput {
  const assumed = brief.assumed.includes(key)
  return { name, value: brief[key], unit, source: assumed ? 'brief, assumed' : 'brief', assumed }
}

function feelingInputs({ seat, surroundings, field }: SeatWarmth, brief: Brief, wind: WindName): ExplainedInput[] {
  const conditions = conditionsAt(seat, brief, surroundings, wind)
  const windKey = ({ calm: null, design: 'windDesign', gust: 'windGust' } as const)[wind]
  return [
    fromBrief(brief, 'airTemperature', 'air temperature', '°C'),
    windKey
      ? fromBrief(brief, windKey, `wind, ${wind}`, 'm/s')
      : known('wind, calm', conditions.wind, 'm/s', 'house rule: air that hardly moves'),
    fromBrief(brief, 'clothing', 'clothing', 'clo'),
    {
      name: 'surroundings',
      value: surroundings.temperature,
      unit: '°C',
      source: surroundingsSource(surroundings),
      assumed: surroundings.assumed,
    },
    known('convection h_c', convectiveCoefficient(conditions.wind), 'W/m²K', 'ASHRAE Fundamentals, seated'),
    known(
      'effective area share f_eff',
      effectiveAreaShare[seat.posture],
      'none',
      `${seat.posture}, ASHRAE Fundamentals`,
    ),
    known('effective radiant field', field ?? 0, 'W/m²', 'sum of the elements, absorbed'),
  ]
}

/** What the vote is read from beside what makes it feel so. */
function voteInputs({ feelsLike }: SeatWarmth, brief: Brief, wind: WindName): ExplainedInput[] {
  const { before, after } = feelsLike[wind]
  return [
    ...(after === null ? [] : [known(`feels like, ${wind}`, after, '°C', 'the figure of that name')]),
    known(`feels like, ${wind}, heaters off`, before, '°C', 'the same with no heater'),
    fromBrief(brief, 'relativeHumidity', 'relative humidity', '%'),
    fromBrief(brief, 'activity', 'activity', 'met'),
  ]
}

/** The two figures that the ratio is of. */
function ratioInputs({ headHorizontal, body }: SeatWarmth): ExplainedInput[] {
  if (headHorizontal === null || body === null) return []
  return [
    known('horizontal irradiance at the head', headHorizontal, 'W/m²', 'sum of the elements'),
    known('irradiance on the body plane', body, 'W/m²', 'sum of the elements'),
  ]
}

const shadeSources: Readonly<Record<Shade, string>> = {
  none: 'without shade: nothing stands in the way',
  'in-place': 'with shade: what can shade; movable things in place, each filling all that it sweeps',
  away: 'with shade: what can shade; movable things away',
}

/** Whether shade counts, and what each thing in the way lets through. */
function shadeInputs({ shade, obstructions, seen }: Asked): ExplainedInput[] {
  const inTheWay = new Set(seen?.flatMap(({ past }) => past))
  const each = obstructions.filter(({ id }) => inTheWay.has(id))
  return [
    known('things that can shade', obstructions.length, 'none', shadeSources[shade]),
    ...each.map(({ id, transmittance }) => known(`${id} lets through`, transmittance, 'none', 'in the way')),
  ]
}

/** Temperature of the elements of each heater and their share of near infrared. */
function elementInputs({ input, sources }: Asked): ExplainedInput[] {
  return input.layout.heaters.flatMap(({ id, model }) => {
    const temperature = input.models.get(model)?.elementTemperature ?? null
    const share = sources.find(({ heaterId }) => heaterId === id)?.nearInfrared ?? null
    if (temperature === null || share === null) return []
    return [
      known(`${id} element temperature`, temperature, '°C', 'data sheet'),
      known(`${id} share of 0.78–3 µm`, share, 'none', 'Planck’s law'),
    ]
  })
}

function surroundingsSource({ underCover, assumed }: SeatWarmth['surroundings']): string {
  if (underCover) return 'under a cover: the air temperature'
  return assumed ? 'open sky: the air temperature until it is entered' : 'brief, open sky'
}

/** Power, voltage and place of every heater that the figure is made with. */
function heaterInputs({ layout, models }: WarmthInput): ExplainedInput[] {
  return layout.heaters.flatMap((heater) => heaterInput(heater, models.get(heater.model)))
}

function heaterInput(
  heater: Layout['heaters'][number],
  model: ReturnType<WarmthInput['models']['get']>,
): ExplainedInput[] {
  if (!model?.beam) return []
  const { power } = electricalPower(heater, model)
  const of = (name: string) => `${heater.id} ${name}`
  return [
    known(of('x'), heater.x, 'm', 'layout'),
    known(of('y'), heater.y, 'm', 'layout'),
    known(of('lowest point'), heater.lowestPoint, 'm', 'layout'),
    known(of('turn'), heater.turnDeg, '°', 'layout'),
    known(of('tilt'), heater.tiltDeg, '°', 'layout'),
    known(of('supply voltage'), heater.supplyVoltage, 'V', 'layout'),
    known(of('power'), power, 'W', `${model.name}, data sheet: P ∝ V^${model.powerVoltageExponent}`),
    known(of('radiant efficiency'), model.radiantEfficiency, 'none', `${model.name}, data sheet`),
  ]
}
