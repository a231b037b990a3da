import { useEffect, useRef, type KeyboardEvent } from 'react'
import { flushSync } from 'react-dom'
import { roundLength } from '#app/domain/units.ts'
import { moveChosen } from '#app/editor/site/chosen.ts'
import type { SiteDraft, SiteHand } from '#app/editor/site/use-site-gestures.ts'
import { keyActionOf, type KeyAction } from '#app/editor/tools/keys.ts'

interface SiteKeys extends Pick<SiteHand, 'site' | 'chosen' | 'readOnly' | 'viewing' | 'onDraft' | 'onKeep'> {
  /** Drops what the pointer does; whether it did something. */
  readonly dropGesture: () => boolean
  /** Everything else that a key means; whether it meant something. */
  readonly onKey: (action: KeyAction) => boolean
}

interface Held {
  readonly key: string
  readonly dx: number
  readonly dy: number
}

/** Keys on the site's plan. Holding an arrow down is one step, kept when it comes up; Escape drops it. */
export function useSiteKeys(keys: SiteKeys) {
  const latest = useRef(keys)
  const held = useRef<Held | null>(null)
  useEffect(() => {
    latest.current = keys
  })

  function keep() {
    const by = held.current
    held.current = null
    const { chosen, onKeep, onDraft } = latest.current
    if (!by || !chosen) return
    onDraft(null)
    onKeep((old) => moveChosen(old, chosen, by.dx, by.dy), chosen)
  }

  function nudge({ dx, dy }: { dx: number; dy: number }, key: string): boolean {
    const { site, chosen, readOnly, onDraft } = latest.current
    if (!chosen || readOnly || (chosen.kind === 'floor' && chosen.part === null)) return false
    if (held.current?.key !== key) keep()
    const before = held.current ?? { dx: 0, dy: 0 }
    const by = { key, dx: roundLength(before.dx + dx), dy: roundLength(before.dy + dy) }
    held.current = by
    const draft: SiteDraft = { site: moveChosen(site, chosen, by.dx, by.dy), chosen }
    flushSync(() => onDraft(draft))
    return true
  }

  function act(action: KeyAction, key: string): boolean {
    const { viewing, dropGesture, onDraft, onKey } = latest.current
    switch (action.kind) {
      case 'nudge':
        return nudge(action, key)
      case 'enlarge':
        viewing.enlargeAt(action.factor)
        return true
      case 'whole plan':
        viewing.showAll()
        return true
      case 'let go': {
        const nudging = held.current !== null
        held.current = null
        if (nudging) onDraft(null)
        return dropGesture() || nudging || onKey(action)
      }
      default:
        keep()
        return onKey(action)
    }
  }

  function onKeyDown(event: KeyboardEvent) {
    const action = keyActionOf(event)
    if (action && act(action, event.key)) event.preventDefault()
  }
  function onKeyUp(event: KeyboardEvent) {
    if (event.key === held.current?.key) keep()
  }
  return { onKeyDown, onKeyUp, onBlur: keep }
}
