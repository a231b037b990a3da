import type { Site } from '#app/domain/site/site.ts'
import type { Vec2 } from '#app/domain/vector.ts'
import { chosenAfterClick, moveChosen } from '#app/editor/site/chosen.ts'
import type { Chosen } from '#app/editor/site/choice.ts'
import { handlesOf, hasOutline, putHandle, withPartAdded } from '#app/editor/site/handles.ts'
import { thingAt } from '#app/editor/site/thing-at.ts'

/** What a pointer that goes down starts: the choice from then on, and what each place of the pointer makes of the site. */
export interface SiteGesture {
  readonly chosen: Chosen
  /** From the site as it was when the pointer went down. */
  readonly step: (site: Site, to: Vec2) => Site
  /** What a click without a movement makes of the site; null when it only chooses. */
  readonly click: ((site: Site) => Site) | null
}

const rounded = (metres: number): number => Math.round(metres * 100) / 100
const nearness = (a: Vec2, b: Vec2): number => Math.hypot(a[0] - b[0], a[1] - b[1])

function nearestOf(places: readonly Vec2[], at: Vec2, reach: number): number | null {
  const away = places.map((place) => nearness(place, at))
  const least = Math.min(...away)
  return least <= reach ? away.indexOf(least) : null
}

/**
 * The gesture of a pointer at a place, `reach` m around it: a corner or end of the chosen thing, a new corner in the
 * middle of an edge of its outline, the chosen things, or whatever else is there. Null on bare floor. Places are kept
 * to 10 mm.
 */
export function gestureAt(
  site: Site,
  chosen: Chosen | null,
  from: Vec2,
  reach: number,
  shift: boolean,
): SiteGesture | null {
  if (chosen && !shift) {
    const handles = handlesOf(site, chosen)
    const part = nearestOf(handles, from, reach)
    if (part !== null) {
      const grabbed = { ...chosen, part }
      const step = (old: Site, to: Vec2) => putHandle(old, chosen, part, [rounded(to[0]), rounded(to[1])])
      return { chosen: grabbed, step, click: null }
    }
    const middles = hasOutline(site, chosen)
      ? handles.map((a, i) => middle(a, handles[(i + 1) % handles.length] ?? a))
      : []
    const edge = nearestOf(middles, from, reach)
    if (edge !== null) {
      const added = { ...chosen, part: edge + 1 }
      const step = (old: Site, to: Vec2) => withPartAdded(old, chosen, edge, [rounded(to[0]), rounded(to[1])])
      return { chosen: added, step, click: (old) => withPartAdded(old, chosen, edge) }
    }
  }
  const hit = thingAt(site, from, reach)
  if (!hit) return null
  const kept = !shift && chosen?.kind === hit.kind && chosen.ids.includes(hit.ids[0] ?? '')
  const next = kept ? { ...chosen, part: null } : chosenAfterClick(chosen, hit, shift)
  if (!next) return null
  return {
    chosen: next,
    step: (old, to) => moveChosen(old, next, rounded(to[0] - from[0]), rounded(to[1] - from[1])),
    click: null,
  }
}

const middle = (a: Vec2, b: Vec2): Vec2 => [(a[0] + b[0]) / 2, (a[1] + b[1]) / 2]
