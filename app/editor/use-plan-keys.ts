import { useEffect, useRef, type Dispatch, type KeyboardEvent } from 'react'
import { flushSync } from 'react-dom'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { Layout } from '#app/domain/layout/layout.ts'
import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'
import type { Site } from '#app/domain/site/site.ts'
import type { EditorAction } from '#app/editor/editor-state.ts'
import { keyActionOf, type KeyAction } from '#app/editor/tools/keys.ts'
import { isNudge, nudged, type Nudge } from '#app/editor/tools/nudge.ts'

interface PlanKeys {
  readonly layout: Layout
  readonly selected: readonly string[]
  readonly site: Site
  readonly models: ReadonlyMap<string, HeaterModel>
  readonly rules: HouseRules
  readonly readOnly: boolean
  readonly dispatch: Dispatch<EditorAction>
  /** Drops what the pointer does; whether it did something. */
  readonly onLetGo: () => boolean
  readonly onEnlarge: (factor: number) => void
  readonly onWholePlan: () => void
  /** Enter on a seat. */
  readonly onSeat: (id: string) => void
}

/** Keys on the plan. Holding a key down is one gesture: it is kept when the key comes up, and Escape drops it. */
export function usePlanKeys(keys: PlanKeys) {
  const held = useRef<string | null>(null)
  const draft = useRef<Layout | null>(null)
  const latest = useRef(keys)
  useEffect(() => {
    latest.current = keys
  })

  function keep() {
    if (held.current === null) return
    held.current = null
    draft.current = null
    latest.current.dispatch({ type: 'keep shown' })
  }

  function nudge(action: Nudge, key: string, focused: string | null) {
    const { layout, selected, site, models, rules, dispatch } = latest.current
    const ids = focused && !selected.includes(focused) ? [focused] : selected
    if (ids.length === 0) return false
    if (ids !== selected) dispatch({ type: 'select', ids })
    if (held.current !== key) keep()
    const from = held.current === key && draft.current ? draft.current : layout
    held.current = key
    draft.current = nudged(from, ids, action, site, models, rules)
    const step = { layout: draft.current, reason: null, lines: [] }
    flushSync(() => dispatch({ type: 'show', step }))
    return true
  }

  function act(action: KeyAction, key: string, focused: string | null): boolean {
    const { dispatch, readOnly, selected, onLetGo, onEnlarge, onWholePlan } = latest.current
    switch (action.kind) {
      case 'enlarge':
        onEnlarge(action.factor)
        return true
      case 'whole plan':
        onWholePlan()
        return true
      case 'let go':
        held.current = null
        draft.current = null
        dispatch({ type: onLetGo() ? 'drop shown' : 'let go' })
        return true
      case 'select all':
        dispatch({ type: 'select all' })
        return true
      default:
        break
    }
    if (readOnly) return false
    if (isNudge(action)) return nudge(action, key, focused)
    keep()
    if (focused && selected.length === 0) dispatch({ type: 'select', ids: [focused] })
    dispatch({ type: action.kind })
    return true
  }

  function onKeyDown(event: KeyboardEvent<SVGSVGElement>) {
    const target = event.target instanceof Element ? event.target : null
    const heaterId = target?.querySelector('[data-heater]')?.getAttribute('data-heater') ?? null
    const object = target?.hasAttribute('data-object') ? target : null
    const focused = object ? heaterId : null
    if (event.key === 'Enter' || event.key === ' ') {
      if (!object) return
      event.preventDefault()
      const seatId = object.querySelector('[data-seat]')?.getAttribute('data-seat')
      if (seatId) return keys.onSeat(seatId)
      if (!focused) return
      const among = keys.selected.includes(focused)
      const ids = !event.shiftKey
        ? [focused]
        : among
          ? keys.selected.filter((id) => id !== focused)
          : [...keys.selected, focused]
      return keys.dispatch({ type: 'select', ids })
    }
    const action = keyActionOf(event)
    if (!action) return
    if (act(action, event.key, focused)) {
      event.preventDefault()
      event.stopPropagation()
    }
  }

  function onKeyUp(event: KeyboardEvent<SVGSVGElement>) {
    if (event.key === held.current) keep()
  }

  return { onKeyDown, onKeyUp, onBlur: keep }
}
