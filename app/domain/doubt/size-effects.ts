import type { FiguresQuestion } from '#app/domain/comparison/layout-figures.ts'
import { doubtsOf, unmoved, unstatedDoubts, type Doubt, type DoubtfulSize } from '#app/domain/doubt/doubtful-size.ts'
import { requireWorker } from '#app/domain/doubt/off-page.ts'
import { marginIn, turnedChecks, weigh, type Figures, type Weighed } from '#app/domain/doubt/weighed.ts'
import type { Finding } from '#app/domain/rules/finding.ts'

/** What a figure changes by when a size is less, and when it is more, by its tolerance; null without the figure. */
export interface Change {
  readonly lower: number | null
  readonly higher: number | null
}

/**
 * What a doubtful size does to a layout. Of a group of sizes each is moved by itself: `lower` is then the root of the sum
 * of squares of all that lowers the figure, negative, `higher` that of all that raises it.
 */
export interface SizeEffect {
  readonly size: DoubtfulSize
  /** Of the coldest priority seat and of the hottest head, W/m²; of the tightest clearance or height, m. */
  readonly coldest: Change
  readonly head: Change
  readonly margin: Change
  /** Checks that come out otherwise at either end of the tolerance, by key. */
  readonly turns: readonly string[]
  /** Change of the margin of each check that is to be measured first, by key: the larger of both ways. */
  readonly shares: Readonly<Record<string, number>>
}

/** How far a long computation has come. */
export interface Progress {
  readonly done: number
  readonly total: number
}

/** Effects of the sizes in the order in which the site lists them. */
export interface SizeEffects {
  readonly nominal: Figures
  readonly effects: readonly SizeEffect[]
  /** Things whose unstated sizes were left out: there are too many. */
  readonly leftOut: number
}

/** Unstated sizes that are moved at most; those of the things named first. */
const mostUnstated = 600

/**
 * Every doubtful size moved both ways by its tolerance, the layout weighed each time by the exact engine. `unstated` also
 * moves the sizes that no dimension moves, by the house's rule, no more than `most` of them. Throws on a page's main thread. Tells its progress after each size.
 */
export function* sizeEffects(
  question: FiguresQuestion,
  unstated: boolean,
  most = mostUnstated,
): Generator<Progress, SizeEffects, undefined> {
  requireWorker()
  const nominal = weigh(unmoved(question))
  const groups = unstated ? unstatedDoubts(question) : []
  const taken = groups.filter((_, i) => sizesOf(groups.slice(0, i + 1)) <= most)
  const doubts = [...doubtsOf(question), ...taken]
  const total = sizesOf(doubts)
  const effects: SizeEffect[] = []
  let done = 0
  for (const { size, ways } of doubts) {
    const moves: Moved[] = []
    for (const { lower, higher } of ways()) {
      yield { done, total }
      moves.push({ lower: weigh(lower), higher: weigh(higher) })
      done += 1
    }
    effects.push(effectOf(size, nominal, moves))
  }
  const { coldest, head, tightest, checks } = nominal
  return { nominal: { coldest, head, tightest, checks }, effects, leftOut: groups.length - taken.length }
}

const sizesOf = (doubts: readonly Doubt[]): number => doubts.reduce((sum, { size }) => sum + size.sizes, 0)

/** A layout with one size lower and higher. */
interface Moved {
  readonly lower: Weighed
  readonly higher: Weighed
}

function effectOf(size: DoubtfulSize, nominal: Weighed, moves: readonly Moved[]): SizeEffect {
  const change = (figure: (weighed: Weighed) => number | null) => changeOf(nominal, moves, figure)
  const turned = moves.flatMap(({ lower, higher }) => [
    ...turnedChecks(nominal, lower),
    ...turnedChecks(nominal, higher),
  ])
  return {
    size,
    coldest: change(({ coldest }) => coldest && coldest.irradiance),
    head: change(({ head }) => head && head.irradiance),
    margin: change(({ tightest }) => tightest && tightest.margin),
    turns: [...new Set(turned)],
    shares: Object.fromEntries(
      [...nominal.checks].flatMap(([key, finding]) =>
        finding.outcome === 'measure first' ? [[key, shareOf(moves, key, finding)]] : [],
      ),
    ),
  }
}

/** Of one size both changes as they are; of several what lowers and what raises the figure, each by its squares. */
function changeOf(nominal: Weighed, moves: readonly Moved[], figure: (weighed: Weighed) => number | null): Change {
  const from = figure(nominal)
  if (from === null) return { lower: null, higher: null }
  const by = (to: number | null) => (to === null ? null : to - from)
  const pairs = moves.map(({ lower, higher }) => [by(figure(lower)), by(figure(higher))] as const)
  const [only] = pairs
  if (pairs.length === 1 && only) return { lower: only[0], higher: only[1] }
  const all = pairs.flat().flatMap((each) => each ?? [])
  return {
    lower: -Math.hypot(...all.filter((each) => each < 0)) || 0,
    higher: Math.hypot(...all.filter((each) => each > 0)),
  }
}

/** What a size is of a check's tolerance: the larger change of its margin of both ways, by the squares of several. */
function shareOf(moves: readonly Moved[], key: string, finding: Finding): number {
  const { margin } = finding
  if (margin === null) return 0
  const changes = moves.map(({ lower, higher }) =>
    Math.max(...[lower, higher].map((weighed) => Math.abs((marginIn(finding, key, weighed) ?? margin) - margin))),
  )
  return Math.hypot(...changes)
}
