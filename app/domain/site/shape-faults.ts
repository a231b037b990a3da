import { outlineFault } from '#app/domain/site/outline.ts'
import type { SiteFault } from '#app/domain/site/site-fault.ts'
import type { Shape, Site } from '#app/domain/site/site.ts'
import { formatLength } from '#app/domain/units.ts'

/** What is wrong with the obstacles and their states: no extent, upside down, below the lowest floor, names twice. */
export function obstacleFaults(site: Site): SiteFault[] {
  const lowest = Math.min(0, ...site.levels.map(({ height }) => height))
  return site.obstacles.flatMap((obstacle, i) => [
    ...shapeFaults(site, obstacle.shape, ['obstacles', i, 'shape'], lowest),
    ...(obstacle.states ?? []).flatMap(({ name, shape }, k, all): SiteFault[] => [
      ...(shape ? shapeFaults(site, shape, ['obstacles', i, 'states', k, 'shape'], lowest) : []),
      ...(all.findIndex((other) => other.name === name) < k
        ? [{ path: ['obstacles', i, 'states', k, 'name'], message: `Two states are called “${name}”.` }]
        : []),
    ]),
  ])
}

function shapeFaults(site: Site, shape: Shape, path: (string | number)[], lowest: number): SiteFault[] {
  const length = (metres: number) => formatLength(metres, site.displayUnits)
  const [foot, top] = shape.z
  const faults: SiteFault[] = []
  if (top <= foot)
    faults.push({ path: [...path, 'z'], message: `The top is above the foot at ${length(foot)}. Here ${length(top)}.` })
  if (foot < lowest - 1e-9)
    faults.push({ path: [...path, 'z'], message: `The foot is at least at ${length(lowest)}. Here ${length(foot)}.` })
  if (shape.kind === 'box')
    for (const axis of ['x', 'y'] as const) {
      const [from, to] = shape[axis]
      if (to <= from)
        faults.push({ path: [...path, axis], message: `To ${axis} is more than ${length(from)}. Here ${length(to)}.` })
    }
  const outline = shape.kind === 'prism' ? outlineFault(shape.outline) : null
  if (outline) faults.push({ path: [...path, 'outline'], message: outline })
  return faults
}
