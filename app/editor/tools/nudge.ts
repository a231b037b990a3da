import { moveHeaters, raiseHeaters, tiltHeaters, turnHeaters } from '#app/domain/layout/edits.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { Layout } from '#app/domain/layout/layout.ts'
import { findSupports } from '#app/domain/layout/support-near.ts'
import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'
import type { Site } from '#app/domain/site/site.ts'
import type { KeyAction } from '#app/editor/tools/keys.ts'

/** A small exact change of the chosen heaters, by a key or a step. */
export type Nudge = Extract<KeyAction, { kind: 'nudge' | 'raise' | 'turn' | 'tilt' }>

/** Whether a key's action is a nudge. */
export const isNudge = (action: KeyAction): action is Nudge =>
  action.kind === 'nudge' || action.kind === 'raise' || action.kind === 'turn' || action.kind === 'tilt'

/** A layout after a nudge; a moved heater finds its support anew. */
export function nudged(
  layout: Layout,
  ids: readonly string[],
  nudge: Nudge,
  site: Site,
  models: ReadonlyMap<string, HeaterModel>,
  rules: HouseRules,
): Layout {
  switch (nudge.kind) {
    case 'nudge':
      return findSupports(moveHeaters(layout, ids, nudge.dx, nudge.dy), ids, site, models, rules)
    case 'raise':
      return raiseHeaters(layout, ids, nudge.by)
    case 'turn':
      return turnHeaters(layout, ids, nudge.by)
    case 'tilt':
      return tiltHeaters(layout, ids, nudge.by)
  }
}
