import { efficiencyTolerance, supplyTolerances } from '#app/domain/comfort/uncertainty.ts'
import type { FiguresQuestion } from '#app/domain/comparison/layout-figures.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import { electricalPower } from '#app/domain/heaters/power.ts'
import { moveCoordinate, moveDimension, type ThingOf } from '#app/domain/site/dimension.ts'
import type { Dimension, Site, SizeSource } from '#app/domain/site/site.ts'
import { bareSizesOf, thingsOf } from '#app/domain/site/tolerance.ts'

/** What a doubtful size is: a dimension of the site, the sizes of one thing that nobody stated, or the heaters' supply. */
type DoubtKind = 'dimension' | 'unstated' | 'efficiency' | 'voltage'

/** A size that may be other than it is written. Plain data. */
export interface DoubtfulSize {
  readonly key: string
  readonly kind: DoubtKind
  readonly label: string
  /** m, or a share of 1; null for a group of sizes that has no single value. */
  readonly value: number | null
  /** Same unit as the value; of a group, that of each of its sizes. */
  readonly tolerance: number
  readonly unit: 'm' | 'share'
  readonly source: SizeSource | 'not stated' | 'data sheet' | 'supply'
  readonly photo: Dimension['photo'] | null
  /** How many sizes it stands for: 1, or those of a group. */
  readonly sizes: number
}

/** A doubtful size with the questions that it makes of a layout's: one pair for each of its sizes, lower and higher. */
export interface Doubt {
  readonly size: DoubtfulSize
  readonly ways: () => Iterable<{ readonly lower: MovedQuestion; readonly higher: MovedQuestion }>
}

/** A question with something moved. The findings ask for `question`, the heat for `heated`. */
export interface MovedQuestion {
  readonly question: FiguresQuestion
  readonly heated: Pick<FiguresQuestion, 'layout' | 'models'>
}

/** The question as it is. */
export const unmoved = (question: FiguresQuestion): MovedQuestion => ({ question, heated: question })

const withSite = (question: FiguresQuestion, site: Site): MovedQuestion => unmoved({ ...question, site })

/** The dimensions of a site, the heaters' efficiency by model and their voltage, in that order; each with a tolerance. */
export function doubtsOf(question: FiguresQuestion): Doubt[] {
  const dimensions = question.site.dimensions.filter(({ tolerance }) => tolerance > 0)
  return [...dimensions.map((dimension) => dimensionDoubt(question, dimension)), ...supplyDoubts(question)]
}

function dimensionDoubt(question: FiguresQuestion, dimension: Dimension): Doubt {
  const { id, label, value, tolerance, source, photo } = dimension
  const moved = (delta: number) => withSite(question, moveDimension(question.site, dimension, delta))
  return {
    size: { key: `dimension ${id}`, kind: 'dimension', label, value, tolerance, unit: 'm', source, photo: photo ?? null, sizes: 1 }, // prettier-ignore
    ways: () => [{ lower: moved(-tolerance), higher: moved(tolerance) }],
  }
}

/** Doubts of the sizes that no dimension moves, together by their thing, each by the house's rule for such sizes. */
export function unstatedDoubts(question: FiguresQuestion): Doubt[] {
  const { site, house } = question
  const tolerance = house.rules.toleranceUnstated
  return thingsOf(site).flatMap((about): Doubt[] => {
    const coordinates = bareSizesOf(site, about)
    if (coordinates.length === 0) return []
    const moved = (coordinate: string, delta: number) =>
      withSite(question, moveCoordinate(site, { ...about, coordinate }, delta))
    const size = {
      key: `unstated ${about.of} ${about.id}`,
      label: nameOf(site, about),
      value: null,
      tolerance,
      photo: null,
      sizes: coordinates.length,
    }
    return [
      {
        size: { ...size, kind: 'unstated', unit: 'm', source: 'not stated' },
        *ways() {
          for (const coordinate of coordinates)
            yield { lower: moved(coordinate, -tolerance), higher: moved(coordinate, tolerance) }
        },
      },
    ]
  })
}

function nameOf(site: Site, { of, id }: ThingOf): string {
  if (of === 'floor') return 'Outline of the floor'
  if (of === 'seat') return `Seat ${id}`
  if (of === 'table') return `Table ${id}`
  const named = [...site.covers, ...site.members, ...site.walls, ...site.poles, ...site.obstacles]
  const name = named.find((thing) => thing.id === id)?.name
  return name || `${of} ${id}`
}

function supplyDoubts(question: FiguresQuestion): Doubt[] {
  const { layout, models } = question
  const used = new Set(layout.heaters.map(({ model }) => model))
  const known = [...used].sort().flatMap((code) => models.get(code) ?? [])
  const voltage = supplyTolerances.voltage
  const heated = (change: Partial<MovedQuestion['heated']>): MovedQuestion => ({
    question,
    heated: { layout, models, ...change },
  })
  const efficiencies = known.map((model): Doubt => {
    const tolerance = efficiencyTolerance(model) ?? supplyTolerances.efficiency
    const moved = (share: number) => heated({ models: withEfficiency(models, model, share) })
    return {
      size: {
        key: `efficiency ${model.code}`,
        kind: 'efficiency',
        label: `Radiant efficiency of ${model.name}`,
        value: model.radiantEfficiency,
        tolerance: tolerance * model.radiantEfficiency,
        unit: 'share',
        source: 'data sheet',
        photo: null,
        sizes: 1,
      },
      ways: () => [{ lower: moved(-tolerance), higher: moved(tolerance) }],
    }
  })
  if (known.length === 0) return []
  const supplied = (share: number) => heated({ layout: withVoltage(question, share) })
  const supply: Doubt = {
    size: { key: 'voltage', kind: 'voltage', label: 'Voltage at the heaters', value: 1, tolerance: voltage, unit: 'share', source: 'supply', photo: null, sizes: 1 }, // prettier-ignore
    ways: () => [{ lower: supplied(-voltage), higher: supplied(voltage) }],
  }
  return [...efficiencies, supply]
}

function withEfficiency(
  models: FiguresQuestion['models'],
  model: HeaterModel,
  share: number,
): FiguresQuestion['models'] {
  const radiantEfficiency = model.radiantEfficiency * (1 + share)
  return new Map([...models, [model.code, { ...model, radiantEfficiency }]])
}

/** Every heater at another voltage, with the option that was ordered. */
function withVoltage({ layout, models }: FiguresQuestion, share: number): FiguresQuestion['layout'] {
  const heaters = layout.heaters.map((heater) => {
    const model = models.get(heater.model)
    const ratedVoltage = model ? electricalPower(heater, model).ratedVoltage : heater.supplyVoltage
    return { ...heater, ratedVoltage, supplyVoltage: heater.supplyVoltage * (1 + share) }
  })
  return { ...layout, heaters }
}
