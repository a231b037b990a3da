import type { ThingKind } from '#app/domain/site/edits.ts'

/** Kinds of what can be chosen on the site. */
export type ChosenKind = 'floor' | ThingKind

/** Things of the site that are chosen together, and of a single one the corner or end that moves alone. */
export interface Chosen {
  readonly kind: ChosenKind
  /** Empty for the floor. */
  readonly ids: readonly string[]
  readonly part: number | null
}

/** A choice of one thing. */
export const chosenThing = (kind: ThingKind, id: string, part: number | null = null): Chosen => ({
  kind,
  ids: [id],
  part,
})

export const chosenFloor = (part: number | null = null): Chosen => ({ kind: 'floor', ids: [], part })
