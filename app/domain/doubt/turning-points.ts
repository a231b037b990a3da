import { requireWorker } from '#app/domain/doubt/off-page.ts'
import type { Progress } from '#app/domain/doubt/size-effects.ts'
import { outcomeIn, turnedChecks, type Figures } from '#app/domain/doubt/weighed.ts'
import type { FiguresAt } from '#app/domain/doubt/wrong-sizes.ts'
import type { Finding, Outcome } from '#app/domain/rules/finding.ts'

/** Largest error asked about, as a share. */
export const largestError = 0.15

/** Step of the scan, as a share: what turns and turns back within one is not seen. */
const scanStep = 0.005
/** Errors are found to this share. */
const exactTo = 5e-5

/** Where something turns: the errors nearest to none on either side, as shares; null where it does not. */
export interface TurningPoint {
  readonly shorter: number | null
  readonly longer: number | null
}

/** Where one check turns, and into what on either side. */
export interface TurningCheck extends TurningPoint {
  readonly check: string
  readonly finding: Finding
  readonly from: Outcome
  readonly toShorter: Outcome | null
  readonly toLonger: Outcome | null
}

/** Where the checks turn, the one that turns soonest first, and where the coldest seat's place to its target does. */
export interface TurningPoints {
  readonly checks: readonly TurningCheck[]
  readonly coldestTarget: TurningPoint
}

/** Something that was first another at `error`. */
interface Turn {
  readonly key: string
  readonly error: number
}

/** The coldest seat's place to its target, beside the checks. */
const coldestKey = 'coldest seat'

const answerOf = (figures: Figures, key: string): string =>
  key === coldestKey ? (figures.coldest?.target ?? 'no heater') : outcomeIn(figures, key)

/**
 * The smallest errors either way at which checks and the coldest seat's target turn: by steps of 0.5 % outward from none
 * up to 15 %, then by halving to 0.005 %. Throws on a page's main thread. Tells its progress after each step.
 */
export function* turningPoints(figuresAt: FiguresAt): Generator<Progress, TurningPoints, undefined> {
  requireWorker()
  const steps = Math.round(largestError / scanStep)
  const turns: Record<'shorter' | 'longer', Turn[]> = { shorter: [], longer: [] }
  let done = 0
  for (const [side, sign] of [
    ['shorter', -1],
    ['longer', 1],
  ] as const) {
    // prettier-ignore
    for (let i = 1; i <= steps; i++) {
      yield { done, total: 2 * steps }
      const bracket = [sign * (i - 1) * scanStep, sign * i * scanStep] as const
      turns[side].push(...turnsBetween(figuresAt, bracket, turns[side]))
      done += 1
    }
  }
  const pointOf = (key: string): TurningPoint => ({
    shorter: turns.shorter.find((turn) => turn.key === key)?.error ?? null,
    longer: turns.longer.find((turn) => turn.key === key)?.error ?? null,
  })
  return { checks: turningChecks(figuresAt, turns, pointOf), coldestTarget: pointOf(coldestKey) }
}

/** What turns for the first time between two errors, each with its error. */
function turnsBetween(
  figuresAt: FiguresAt,
  [before, after]: readonly [number, number],
  found: readonly Turn[],
): Turn[] {
  const [nominal, there] = [figuresAt(0), figuresAt(after)]
  return [...turnedChecks(nominal, there), coldestKey].flatMap((key): Turn[] => {
    const from = answerOf(nominal, key)
    if (answerOf(there, key) === from || found.some((turn) => turn.key === key)) return []
    let [same, other] = [before, after]
    while (Math.abs(other - same) > exactTo) {
      const middle = (same + other) / 2
      if (answerOf(figuresAt(middle), key) === from) same = middle
      else other = middle
    }
    return [{ key, error: other }]
  })
}

function turningChecks(
  figuresAt: FiguresAt,
  { shorter, longer }: Record<'shorter' | 'longer', readonly Turn[]>,
  pointOf: (key: string) => TurningPoint,
): TurningCheck[] {
  const nominal = figuresAt(0)
  const keys = new Set([...shorter, ...longer].map(({ key }) => key))
  keys.delete(coldestKey)
  const checks = [...keys].flatMap((check): TurningCheck[] => {
    const point = pointOf(check)
    const outcomeAt = (error: number | null) => (error === null ? null : outcomeIn(figuresAt(error), check))
    const finding = [0, point.shorter, point.longer].flatMap((error) =>
      error === null ? [] : (figuresAt(error).checks.get(check) ?? []),
    )[0]
    if (!finding) return []
    const [toShorter, toLonger] = [outcomeAt(point.shorter), outcomeAt(point.longer)]
    return [{ check, finding, from: outcomeIn(nominal, check), ...point, toShorter, toLonger }]
  })
  return checks.sort((a, b) => nearestError(a) - nearestError(b) || (a.check < b.check ? -1 : 1))
}

/** The smaller of both errors; infinite where nothing turns. */
export const nearestError = ({ shorter, longer }: TurningPoint): number =>
  Math.min(Math.abs(shorter ?? Infinity), Math.abs(longer ?? Infinity))
