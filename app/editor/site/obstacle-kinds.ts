import type { Obstacle } from '#app/domain/site/site.ts'

/** Kinds of obstacles, the commonest first. */
export const obstacleKinds = [
  'door',
  'blind',
  'umbrella',
  'fan',
  'lamp',
  'cable',
  'sprinkler',
  'trim',
  'screen',
  'furniture',
  'other',
] as const satisfies readonly Obstacle['kind'][]
