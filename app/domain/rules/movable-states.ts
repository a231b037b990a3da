import type { Finding } from '#app/domain/rules/finding.ts'
import type { Obstacle, Site } from '#app/domain/site/site.ts'
import { isCombustible, stateWords } from '#app/domain/site/solids.ts'

/** Best first. */
const outcomes: readonly Finding['outcome'][] = ['pass', 'measure first', 'cannot tell', 'fails']

const worseOf = (a: Finding['outcome'], b: Finding['outcome']): Finding['outcome'] =>
  outcomes.indexOf(a) > outcomes.indexOf(b) ? a : b

/**
 * The findings of one heater with the conditions of use judged over all rules together: a state that does not pass is a
 * condition only while some other state of the same thing passes. Where none does, what even the best of them has is no
 * condition but a plain finding: all failing fail, whatever the state.
 */
export function plainWhereNoStatePasses(site: Site, findings: readonly Finding[]): readonly Finding[] {
  if (findings.every(({ condition }) => condition === null)) return findings
  let judged = findings
  for (const obstacle of site.obstacles) {
    if (obstacle.movable) judged = overStates(obstacle, stateWords(site, obstacle), judged)
  }
  return judged
}

function overStates(obstacle: Obstacle, states: readonly string[], findings: readonly Finding[]): readonly Finding[] {
  const worst = states.map((state) =>
    findings
      .filter(({ condition }) => condition === state)
      .reduce<Finding['outcome']>((a, { outcome }) => worseOf(a, outcome), 'pass'),
  )
  const best = outcomes.find((outcome) => worst.includes(outcome))
  if (!best || best === 'pass') return findings
  const whole = states.filter((_, i) => worst[i] === best)
  const isWhole = ({ condition, outcome }: Finding) =>
    condition !== null && whole.includes(condition) && outcome === best
  const weight = isCombustible(obstacle.material) ? 'hard stop' : 'soft'
  const remedy = 'No state of it passes: move the heater, or the thing.'
  return findings.flatMap((finding): Finding | readonly Finding[] => {
    if (!isWhole(finding)) return finding
    const tightest = findings.filter((other) => isWhole(other) && other.rule === finding.rule).reduce(tighterOf)
    return finding === tightest ? { ...finding, weight, condition: null, remedy } : []
  })
}

const tighterOf = (a: Finding, b: Finding): Finding => ((b.margin ?? 0) < (a.margin ?? 0) ? b : a)
