import { tightestMargin } from '#app/domain/comparison/compared-variant.ts'
import { layoutTotals, seatWarmth, type SeatWarmth, type TargetOutcome } from '#app/domain/comfort/seat-warmth.ts'
import type { MovedQuestion } from '#app/domain/doubt/doubtful-size.ts'
import { checkLayout } from '#app/domain/rules/check-layout.ts'
import type { Finding, Outcome } from '#app/domain/rules/finding.ts'

/** A figure at a seat, W/m². */
interface AtSeat {
  readonly seatId: string
  readonly irradiance: number
}

/** The tightest clearance or height, m, and the check it belongs to. */
interface Tightest {
  readonly check: string
  readonly margin: number
  readonly tolerance: number | null
}

/** The figures and checks of a layout that doubt is about; plain data. */
export interface Figures {
  /** The priority seat with the least on the body plane, and how it stands to its target. */
  readonly coldest: (AtSeat & { readonly target: TargetOutcome }) | null
  /** The head with the largest irradiance over all directions. */
  readonly head: AtSeat | null
  readonly tightest: Tightest | null
  readonly checks: ReadonlyMap<string, Finding>
}

/** What a doubtful size is weighed by. */
export interface Weighed extends Figures {
  readonly warmth: ReadonlyMap<string, SeatWarmth>
}

/** One check's name, the same whatever its outcome: the rule, what it is about and in which state. */
const checkKey = ({ rule, weight, subject, condition }: Finding): string =>
  [rule, subject.kind === 'seat' ? weight : '', subject.kind, subject.id, condition ?? ''].join('|')

/** Figures and checks of a layout by the functions of its own page, without shade. */
export function weigh({ question, heated }: MovedQuestion): Weighed {
  const { site, brief, layout, models, house } = question
  const warmth = seatWarmth({ site, brief, ...heated })
  const totals = layoutTotals(warmth, layout, models, brief)
  const findings = checkLayout({ site, brief, layout, models, warmth, house })
  const tightest = tightestMargin(findings)
  const bySeat = new Map(warmth.map((each) => [each.seat.id, each]))
  const { coldest } = totals
  return {
    coldest: coldest && { ...coldest, target: bySeat.get(coldest.seatId)?.target ?? 'no heater' },
    head: totals.headMaximum,
    tightest: tightest && {
      check: checkKey(tightest.finding),
      margin: tightest.margin,
      tolerance: tightest.finding.tolerance,
    },
    checks: checksOf(findings),
    warmth: bySeat,
  }
}

const severity: readonly Outcome[] = ['fails', 'cannot tell', 'measure first', 'pass']

/** Findings by check; of several about one thing the worst, then the one with the least margin. */
function checksOf(findings: readonly Finding[]): Map<string, Finding> {
  const checks = new Map<string, Finding>()
  for (const finding of findings) {
    const key = checkKey(finding)
    const known = checks.get(key)
    if (!known || isWorse(finding, known)) checks.set(key, finding)
  }
  return checks
}

function isWorse(a: Finding, b: Finding): boolean {
  const apart = severity.indexOf(a.outcome) - severity.indexOf(b.outcome)
  return apart === 0 ? (a.margin ?? Infinity) < (b.margin ?? Infinity) : apart < 0
}

/** Outcome of a check; one that is not listed passes, as rules list what does not. */
export const outcomeIn = ({ checks }: Figures, key: string): Outcome => checks.get(key)?.outcome ?? 'pass'

/** The checks that come out otherwise in `moved` than in `nominal`, in the order in which they are listed. */
export function turnedChecks(nominal: Figures, moved: Figures): string[] {
  const keys = new Set([...nominal.checks.keys(), ...moved.checks.keys()])
  return [...keys].filter((key) => outcomeIn(nominal, key) !== outcomeIn(moved, key))
}

/**
 * Margin of a check of `nominal` in a moved layout, in the finding's unit. A seat's margin follows its own figure, as a
 * seat that passes is not listed. Null when it is not to be had.
 */
export function marginIn(nominal: Finding, key: string, moved: Weighed): number | null {
  const { subject, value, limit, margin } = nominal
  if (subject.kind !== 'seat') return moved.checks.get(key)?.margin ?? null
  const seat = moved.warmth.get(subject.id)
  if (!seat || value === null || limit === null || !margin) return null
  const figure = seatFigure(nominal, seat)
  if (figure === null) return moved.checks.get(key)?.margin ?? null
  return Math.sign(margin) * Math.sign(limit - value) * (limit - figure)
}

function seatFigure({ rule, weight }: Finding, seat: SeatWarmth): number | null {
  if (rule === 'seat-target') return seat.body
  if (rule !== 'head-flux' || seat.head === null) return null
  return weight === 'soft' ? seat.head : Math.max(seat.head, seat.bodyLargest ?? 0)
}
