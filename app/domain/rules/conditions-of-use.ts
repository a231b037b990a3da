import type { Finding } from '#app/domain/rules/finding.ts'

/** "H1", "H1 and H2", "H1, H2 and 3 more". */
function heatersOf(findings: readonly Finding[]): string {
  const ids = [...new Set(findings.flatMap(({ subject }) => (subject.kind === 'heater' ? [subject.id] : [])))]
  if (ids.length > 3) return `${ids.slice(0, 2).join(', ')} and ${ids.length - 2} more`
  return ids.length < 2 ? (ids[0] ?? 'seats') : `${ids.slice(0, -1).join(', ')} and ${ids.at(-1) ?? ''}`
}

/** Named conditions of use: each state that does not pass, with the heaters that it concerns. */
export function conditionsOfUse(findings: readonly Finding[]): string[] {
  const states = new Map<string, Finding[]>()
  for (const finding of findings) {
    if (finding.condition === null || finding.outcome === 'pass') continue
    states.set(finding.condition, [...(states.get(finding.condition) ?? []), finding])
  }
  return [...states].map(([state, found]) => `${heatersOf(found)} off while ${state}`)
}
