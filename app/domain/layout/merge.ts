import type { Layout, MountedHeater } from '#app/domain/layout/layout.ts'

/** A heater that both sides changed, differently; null: that side removed it. */
export interface HeaterConflict {
  readonly id: string
  readonly mine: MountedHeater | null
  readonly theirs: MountedHeater | null
}

/** Two layouts made from one, brought together. Where they disagree, `merged` holds mine until somebody chooses. */
export interface Merge {
  readonly merged: Layout
  readonly conflicts: readonly HeaterConflict[]
  /** The title that theirs has, where both changed it. */
  readonly title: { readonly mine: string; readonly theirs: string } | null
}

/** Brings two edits of one layout together, heater by heater: what only one side changed is taken from that side. */
export function mergeLayouts(base: Layout, mine: Layout, theirs: Layout): Merge {
  const [was, own, other] = [base, mine, theirs].map((layout) => new Map(layout.heaters.map((h) => [h.id, h])))
  const ids = [...new Set([...theirs.heaters, ...mine.heaters].map((heater) => heater.id))]
  const conflicts: HeaterConflict[] = []
  const heaters: MountedHeater[] = []
  for (const id of ids) {
    const [before, left, right] = [was?.get(id) ?? null, own?.get(id) ?? null, other?.get(id) ?? null]
    const chosen = sameHeater(left, before) ? right : left
    if (!sameHeater(left, right) && !sameHeater(left, before) && !sameHeater(right, before))
      conflicts.push({ id, mine: left, theirs: right })
    if (chosen) heaters.push(chosen)
  }
  const titleDiffers = mine.title !== theirs.title && mine.title !== base.title && theirs.title !== base.title
  return {
    merged: { title: mine.title === base.title ? theirs.title : mine.title, heaters },
    conflicts,
    title: titleDiffers ? { mine: mine.title, theirs: theirs.title } : null,
  }
}

/** Takes the other side's value of one heater that both changed. */
export function takeTheirs(layout: Layout, conflict: HeaterConflict): Layout {
  const { theirs } = conflict
  const without = layout.heaters.filter((heater) => heater.id !== conflict.id)
  if (!theirs) return { ...layout, heaters: without }
  const present = without.length < layout.heaters.length
  return {
    ...layout,
    heaters: present
      ? layout.heaters.map((heater) => (heater.id === conflict.id ? theirs : heater))
      : [...layout.heaters, theirs],
  }
}

/** The same heater in every value; two absent ones are the same. */
function sameHeater(a: MountedHeater | null, b: MountedHeater | null): boolean {
  if (a === b) return true
  if (!a || !b) return false
  return (
    a.id === b.id &&
    a.model === b.model &&
    a.supplyVoltage === b.supplyVoltage &&
    a.ratedVoltage === b.ratedVoltage &&
    a.stage === b.stage &&
    a.x === b.x &&
    a.y === b.y &&
    a.lowestPoint === b.lowestPoint &&
    a.turnDeg === b.turnDeg &&
    a.tiltDeg === b.tiltDeg &&
    a.mount === b.mount &&
    a.memberId === b.memberId &&
    (a.splayed ?? false) === (b.splayed ?? false)
  )
}

/** The same title and the same heaters in the same order. */
export const sameLayout = (a: Layout, b: Layout): boolean =>
  a === b ||
  (a.title === b.title &&
    a.heaters.length === b.heaters.length &&
    a.heaters.every((heater, i) => sameHeater(heater, b.heaters[i] ?? null)))
