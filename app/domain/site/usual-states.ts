import type { Obstacle, Shape } from '#app/domain/site/site.ts'
import { roundLength } from '#app/domain/units.ts'

type State = NonNullable<Obstacle['states']>[number]

/** A rolled blind or screen is this high under its top, a shut umbrella this far from its pole, m (house rules). */
const rolled = 0.2
const shut = 0.15
/** A shut umbrella hangs down to this share of the open one's rim height (house rule). */
export const shutRim = 0.5

/**
 * The states that a movable thing of a kind usually has, from all that it sweeps: a door open or closed, an umbrella
 * open or shut, a blind or screen down or up. A fan turns or rests anywhere in the same sweep, so it has one state.
 * Other kinds are in their place or away. Shapes are a first proposal to be measured.
 */
export function usualStates(kind: Obstacle['kind'], swept: Shape): State[] {
  switch (kind) {
    case 'door':
      return [
        { name: 'open', shape: swept },
        { name: 'closed', shape: null },
      ]
    case 'umbrella':
      return [
        { name: 'open', shape: swept },
        { name: 'shut', shape: shutUmbrella(swept) },
      ]
    case 'blind':
    case 'screen':
      return [
        { name: 'down', shape: swept },
        { name: 'up', shape: rolledUp(swept) },
      ]
    case 'fan':
      return [{ name: 'turning', shape: swept }]
    default:
      return [
        { name: 'in its place', shape: swept },
        { name: 'away', shape: null },
      ]
  }
}

function rolledUp(swept: Shape): Shape {
  const [foot, top] = swept.z
  return { ...swept, z: [roundLength(Math.max(foot, top - rolled)), top] }
}

function shutUmbrella(swept: Shape): Shape {
  if (swept.kind !== 'cylinder') return swept
  const [rim, top] = swept.z
  return { ...swept, radius: Math.min(shut, swept.radius), z: [roundLength(rim * shutRim), top] }
}

/** The state's shape where the thing itself was changed: states that filled the whole sweep follow it. */
export function statesAfter(states: readonly State[], before: Shape, after: Shape): State[] {
  const whole = JSON.stringify(before)
  return states.map((state) => (JSON.stringify(state.shape) === whole ? { ...state, shape: after } : state))
}

/** Kinds of things that usually move. */
export const usuallyMovable = (kind: Obstacle['kind']): boolean =>
  kind === 'door' || kind === 'umbrella' || kind === 'blind' || kind === 'screen' || kind === 'fan'
