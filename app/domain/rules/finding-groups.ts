import type { Finding, Outcome } from '#app/domain/rules/finding.ts'

/** Findings of one rule with one outcome: the one with the least margin speaks for them. */
export interface FindingGroup {
  readonly key: string
  readonly worst: Finding
  readonly others: readonly Finding[]
}

/** Least margin less its tolerance first; without a margin as they come. */
const tightness = ({ margin, tolerance }: Finding): number => (margin === null ? Infinity : margin - (tolerance ?? 0))

/** How tight a check that passes is: what it measures first, by its margin against its limit; without figures last. */
const room = ({ margin, limit, unit }: Finding): number => {
  if (margin === null) return Infinity
  return (unit === 'm' || unit === 'W/m²' ? 0 : 1e6) + margin / Math.max(1e-9, Math.abs(limit ?? 1))
}

/** Checks that pass, the tightest first. */
export const tightestPasses = (groups: readonly FindingGroup[]): FindingGroup[] =>
  groups.filter(({ worst }) => worst.outcome === 'pass').toSorted((a, b) => room(a.worst) - room(b.worst))

/** Brings findings together by rule, outcome and condition of use; the order of the first of each stays. */
export function groupFindings(findings: readonly Finding[]): FindingGroup[] {
  const groups = new Map<string, Finding[]>()
  for (const finding of findings) {
    const key = `${finding.rule} ${finding.outcome} ${finding.weight} ${finding.condition ?? ''}`
    groups.set(key, [...(groups.get(key) ?? []), finding])
  }
  return [...groups].flatMap(([key, members]) => {
    const [worst, ...others] = members.toSorted((a, b) => tightness(a) - tightness(b))
    return worst ? [{ key, worst, others }] : []
  })
}

const outcomes = ['fails', 'cannot tell', 'measure first', 'pass'] as const

/** How many of the checks came out one way: a rule that finds the same of twelve heaters is one check. */
export const countOutcome = (groups: readonly FindingGroup[], outcome: Outcome): number =>
  groups.filter(({ worst }) => worst.outcome === outcome).length

function wordsFor(count: number, outcome: Outcome): string {
  if (outcome === 'fails') return count === 1 ? 'fails' : 'fail'
  if (outcome === 'pass') return count === 1 ? 'passes' : 'pass'
  return outcome === 'measure first' ? 'to measure first' : outcome
}

const listOutcomes = (groups: readonly FindingGroup[], named: readonly Outcome[]): string =>
  named
    .map((outcome) => ({ outcome, count: countOutcome(groups, outcome) }))
    .filter(({ count }) => count > 0)
    .map(({ outcome, count }) => `${count} ${wordsFor(count, outcome)}`)
    .join(', ')

/** "1 fails, 1 cannot tell, 1 to measure first, 9 pass": how many of the checks came out how. */
export const summaryOf = (groups: readonly FindingGroup[]): string =>
  listOutcomes(groups, outcomes) || 'Nothing to check yet'

/** The same without those that pass: empty when all do. */
export const openOutcomes = (groups: readonly FindingGroup[]): string =>
  listOutcomes(
    groups,
    outcomes.filter((outcome) => outcome !== 'pass'),
  )
