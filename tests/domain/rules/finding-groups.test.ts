import { expect, it } from 'vitest'
import type { Finding } from '#app/domain/rules/finding.ts'
import { groupFindings, summaryOf } from '#app/domain/rules/finding-groups.ts'

const finding = (rule: string, outcome: Finding['outcome'], margin: number | null, id = 'H1'): Finding => ({
  rule,
  outcome,
  weight: 'hard stop',
  subject: { kind: 'heater', id },
  title: `${rule} of ${id}`,
  margin,
  tolerance: margin === null ? null : 0.01,
  value: null,
  limit: null,
  unit: 'm',
  source: 'a manual',
  condition: null,
  remedy: null,
  nearest: null,
})

it('lets the tightest margin speak for a rule, and loses nobody', () => {
  const findings = [
    finding('above', 'fails', -0.1, 'H1'),
    finding('above', 'fails', -0.4, 'H2'),
    finding('load', 'cannot tell', null, 'H1'),
    finding('load', 'cannot tell', null, 'H2'),
    finding('above', 'pass', 0.2, 'H3'),
  ]
  const groups = groupFindings(findings)
  expect(groups.map(({ worst, others }) => [worst.subject.id, worst.outcome, others.length])).toEqual([
    ['H2', 'fails', 1],
    ['H1', 'cannot tell', 1],
    ['H3', 'pass', 0],
  ])
  expect(groups.flatMap(({ worst, others }) => [worst, ...others])).toHaveLength(findings.length)
  expect(summaryOf(groups)).toBe('1 fails, 1 cannot tell, 1 passes')
})
it('keeps states of a movable thing apart', () => {
  const open = { ...finding('above', 'fails', -0.1), condition: 'the door is open' }
  expect(groupFindings([open, finding('above', 'fails', -0.2)])).toHaveLength(2)
})
it('says when there is nothing', () => expect(summaryOf([])).toBe('Nothing to check yet'))
