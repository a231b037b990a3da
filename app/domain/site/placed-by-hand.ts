import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'
import { findThing, numberAt, type ThingOf } from '#app/domain/site/dimension.ts'
import type { Dimension, Site } from '#app/domain/site/site.ts'
import { usualTolerance } from '#app/domain/site/size-source.ts'
import { formatLength, roundLength, type DisplayUnits } from '#app/domain/units.ts'

/** What a change by hand makes of the sizes that decide what was changed. */
export interface PlacedByHand {
  readonly site: Site
  /** Sizes whose value went along, as they were and as they are now. */
  readonly followed: readonly { readonly before: Dimension; readonly now: Dimension }[]
  /** Sizes that do not decide any more what was placed otherwise than they say. */
  readonly released: readonly Dimension[]
}

type Move = Dimension['moves'][number]

/** A coordinate that a size decides: where it was, m, and by how much it was moved. */
interface Decided {
  readonly move: Move
  readonly was: number
  readonly by: number
}

/** Lengths nearer than this are the same, m: coordinates are kept to 0.1 mm. */
const same = 1e-3
const longestNote = 200

const keyOf = ({ of, id, coordinate }: Move): string => `${of} ${id} ${coordinate}`

/**
 * The site after things were placed by hand or by typed figures, with its sizes in agreement. A size is told by the
 * coordinates that equal it; when all of them move alike, its value goes with them and is guessed from then on. When
 * only some do, as one beam of several at a spacing, or none of the size would be left, it stays and decides those no
 * longer: they count as every coordinate without a size. Where two sizes could follow, the less known one does. An edit of the sizes themselves is
 * left as it is.
 */
export function placedByHand(before: Site, after: Site, rules: HouseRules): PlacedByHand {
  if (after.dimensions !== before.dimensions) return { site: after, followed: [], released: [] }
  const touched = before.dimensions
    .map((dimension) => ({ dimension, decided: decidedBy(dimension, before, after) }))
    .filter(({ decided }) => decided.some(({ by }) => by !== 0))
  const explained = new Set<string>()
  const grown = new Map<string, number>()
  for (const { dimension, decided } of touched.toSorted((a, b) => b.dimension.tolerance - a.dimension.tolerance)) {
    const named = namedBy(dimension, decided)
    const by = changeOf(named)
    if (by === null || isTurnedOver(dimension.value, by) || named.some(({ move }) => explained.has(keyOf(move))))
      continue
    grown.set(dimension.id, by)
    for (const each of decided) explained.add(keyOf(each.move))
  }
  const moved = touched.flatMap(({ decided }) => decided.filter(({ by }) => by !== 0).map(({ move }) => keyOf(move)))
  const wrong = new Set(moved.filter((key) => !explained.has(key)))
  return withSizesChanged(after, grown, wrong, rules)
}

/** The coordinates that a size decides and that are still there; none when none of its things was changed. */
function decidedBy({ moves }: Dimension, before: Site, after: Site): Decided[] {
  const thingChanged = (thing: ThingOf) => findThing(before, thing) !== findThing(after, thing)
  if (!moves.some(thingChanged)) return []
  return moves.flatMap((move) => {
    const [was, now] = [numberAt(before, move), numberAt(after, move)]
    if (was === null || now === null || move.by === 0) return []
    return [{ move, was, by: roundLength(now - was) }]
  })
}

/** The coordinates that equal the size, each times its share; where none does, all that it decides. */
function namedBy({ value }: Dimension, decided: readonly Decided[]): readonly Decided[] {
  const named = decided.filter(({ move, was }) => Math.abs(was - move.by * value) < same)
  return named.length > 0 ? named : decided
}

/** By how much a size was changed when its coordinates all moved alike, m; null when they did not. */
function changeOf(named: readonly Decided[]): number | null {
  const [change = 0, ...others] = named.map(({ move, by }) => by / move.by)
  return change !== 0 && others.every((other) => Math.abs(other - change) < same) ? change : null
}

/** Whether a length would become less than nothing, as one from a wall to a thing that is dragged through the wall. */
const isTurnedOver = (value: number, by: number): boolean => value > 0 && value + by < same

function withSizesChanged(
  site: Site,
  grown: ReadonlyMap<string, number>,
  wrong: ReadonlySet<string>,
  rules: HouseRules,
): PlacedByHand {
  const followed: { before: Dimension; now: Dimension }[] = []
  const released: Dimension[] = []
  const dimensions = site.dimensions.map((before): Dimension => {
    const by = grown.get(before.id)
    const moves = before.moves.filter((move) => move.by === 0 || !wrong.has(keyOf(move)))
    if (moves.length < before.moves.length) released.push(before)
    if (by === undefined) return moves.length < before.moves.length ? { ...before, moves } : before
    const now = { ...guessed(before, roundLength(before.value + by), site.displayUnits, rules), moves }
    followed.push({ before, now })
    return now
  })
  return { site: followed.length + released.length > 0 ? { ...site, dimensions } : site, followed, released }
}

/** A size of a value that nobody measured; what was known before stays in its note. */
function guessed(size: Dimension, value: number, units: DisplayUnits, rules: HouseRules): Omit<Dimension, 'moves'> {
  const { id, label, source, note } = size
  const was = `placed by hand; before ${sizeWords(size, units)}`
  return {
    id,
    label,
    value,
    tolerance: Math.max(size.tolerance, usualTolerance('guessed', value, rules), rules.toleranceUnstated),
    source: 'guessed',
    note: source === 'guessed' ? note : [was, ...(note ? [note] : [])].join('; ').slice(0, longestNote),
  }
}

const sizeWords = ({ value, tolerance, source }: Dimension, units: DisplayUnits): string =>
  `${formatLength(value, units)} ± ${formatLength(tolerance, units)}, ${source}`

/** What became of the sizes, in one or two short sentences; null when none was touched. */
export function placedInWords(
  { followed, released }: PlacedByHand,
  units: DisplayUnits,
  { toleranceUnstated }: HouseRules,
): string | null {
  const sentences = [
    ...followed.slice(0, 1).map(({ before, now }) => {
      const more = followed.length > 1 ? `, and ${followed.length - 1} more like it` : ''
      return `Placed by hand: ${now.label} is ${sizeWords(now, units)}; it was ${sizeWords(before, units)}${more}.`
    }),
    ...released.slice(0, 1).map(({ label }) => {
      const more = released.length - 1
      const who = more > 0 ? `${label} and ${more} more ${more === 1 ? 'size' : 'sizes'}` : label
      const counts = formatLength(toleranceUnstated, units)
      return `Placed by hand, ± ${counts} from now on: ${who} no longer ${more > 0 ? 'decide' : 'decides'} what was moved.`
    }),
  ]
  return sentences.length > 0 ? sentences.join(' ') : null
}
