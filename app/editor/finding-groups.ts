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

/** "1 fails, 1 cannot tell, 1 to measure first, 9 pass": how many of the checks came out how. */
export function summaryOf(groups: readonly FindingGroup[]): string {
  const count = (outcome: Outcome) => groups.filter(({ worst }) => worst.outcome === outcome).length
  const parts: [number, string][] = [
    [count('fails'), count('fails') === 1 ? 'fails' : 'fail'],
    [count('cannot tell'), 'cannot tell'],
    [count('measure first'), 'to measure first'],
    [count('pass'), count('pass') === 1 ? 'passes' : 'pass'],
  ]
  const said = parts.filter(([n]) => n > 0).map(([n, word]) => `${n} ${word}`)
  return said.length > 0 ? said.join(', ') : 'Nothing to check yet'
}
