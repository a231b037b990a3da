import type { Brief } from '#app/domain/brief/brief.ts'
import { assumptionsOf } from '#app/domain/brief/assumptions.ts'
import type { LayoutFigures } from '#app/domain/comparison/layout-figures.ts'
import { cautionLimits } from '#app/domain/comfort/cautions.ts'
import { indoorsAt } from '#app/domain/comfort/indoors.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { Layout } from '#app/domain/layout/layout.ts'
import { isStopped } from '#app/domain/rules/check-layout.ts'
import type { Finding } from '#app/domain/rules/finding.ts'
import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'
import type { Site } from '#app/domain/site/site.ts'
import { formatLength, formatQuantity, type DisplayUnits } from '#app/domain/units.ts'

/** A variant as far as the cautions of a sheet need it. */
interface CautionedVariant extends LayoutFigures {
  readonly number: number
  readonly layout: Layout
}

interface Told {
  readonly brief: Brief
  readonly rules: HouseRules
  readonly models: ReadonlyMap<string, HeaterModel>
  readonly units: DisplayUnits
  readonly site: Pick<Site, 'dimensions' | 'displayUnits'>
  readonly variants: readonly CautionedVariant[]
}

/** What a customer must know beside the picture, the weightiest first; sentences without figures that nobody gave. */
export function sheetCautions(told: Told): string[] {
  return [
    ...stopped(told),
    ...heads(told),
    ...clearances(told),
    ...measureFirst(told),
    ...loads(told),
    ...assumptions(told),
    withoutHeat(told),
    'No figure approves: the manual, a licensed electrician, the structure’s engineer and the fire authority do.',
  ]
}

/** What was found, each once, to stand within a sentence. */
const titlesOf = (findings: readonly Finding[]): string[] => [
  ...new Set(findings.map(({ title }) => `${title.charAt(0).toLowerCase()}${title.slice(1)}`)),
]

function stopped({ variants }: Told): string[] {
  return variants.flatMap(({ number, findings }) => {
    const stops = findings.filter((finding) => isStopped(finding) && finding.outcome === 'fails')
    if (stops.length === 0) return []
    const titles = titlesOf(stops)
    const others = titles.length > 2 ? `; and ${titles.length - 2} more` : ''
    return [`Variant ${number} may not be installed as it stands: ${titles.slice(0, 2).join('; ')}${others}.`]
  })
}

function heads({ variants, brief, rules }: Told): string[] {
  const caution = cautionLimits(brief, rules).head.value
  return variants.flatMap(({ number, totals: { headMaximum } }) => {
    if (!headMaximum || headMaximum.irradiance <= caution) return []
    const figure = formatQuantity(headMaximum.irradiance, 'irradiance', 'metric')
    return [`Variant ${number}: ${figure} at the head of seat ${headMaximum.seatId}, over the caution of ${caution}.`]
  })
}

function clearances({ variants, models, units }: Told): string[] {
  const parts = variants.flatMap(({ number, layout }) => {
    const used = [...new Set(layout.heaters.map(({ model }) => model))].flatMap(
      (code) => models.get(code)?.clearanceToCombustible ?? [],
    )
    if (used.length === 0) return []
    const most = (values: readonly (number | null)[]) => formatLength(Math.max(...values.map((v) => v ?? 0)), units)
    const [above, end, front] = [used.map((c) => c.above), used.map((c) => c.end), used.map((c) => c.frontOfBeam)]
    return [`variant ${number}, ${most(end)} at the ends, ${most(above)} above, ${most(front)} in front`]
  })
  return parts.length === 0 ? [] : [`Nothing that burns nearer than: ${parts.join('; ')}.`]
}

function loads({ variants }: Told): string[] {
  const open = variants.some(({ findings }) =>
    findings.some(({ rule, outcome }) => rule === 'support-load' && outcome === 'cannot tell'),
  )
  return open ? ['Load on the members: the maker of the structure must confirm it.'] : []
}

function measureFirst({ variants }: Told): string[] {
  return variants.flatMap(({ number, findings }) => {
    const rules = findings.filter(({ outcome }) => outcome === 'measure first')
    if (rules.length === 0) return []
    const [first = '', ...more] = titlesOf(rules)
    const others = more.length === 0 ? '' : ` and ${more.length} more`
    return [`Measure first, variant ${number}: ${first}${others}.`]
  })
}

function assumptions({ brief, site }: Told): string[] {
  const all = assumptionsOf(brief, site)
  return all.length === 0 ? [] : [`Assumed: ${all.join('; ')}.`]
}

function withoutHeat({ variants, units, brief, rules }: Told): string {
  const seat = variants[0]?.warmth[0]
  const base = 'Heaters warm people, not the air.'
  if (!seat) return base
  const [calm, windy] = [seat.feelsLike.calm.before, seat.feelsLike.design.before].map((celsius) =>
    formatQuantity(celsius, 'temperature', units, 0),
  )
  const feel = `${base} Without heat it feels like ${calm} out of the wind, ${windy} in it.`
  const heated = variants.flatMap(({ warmth }) => warmth.filter(({ seat }) => seat.priority !== 'not heated'))
  const indoors = heated.some((each) => indoorsAt(each, brief, 'design', rules).answer === 'it does')
  return indoors || heated.length === 0 ? feel : `${feel} In that wind no seat here feels like indoors.`
}
