import { useCallback, useMemo, useReducer, type Dispatch } from 'react'
import type { Brief } from '#app/domain/brief/brief.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import { placeHeater, removeHeaters, setHeaters, type HeaterChange } from '#app/domain/layout/edits.ts'
import { firstPlace } from '#app/domain/layout/first-place.ts'
import { holdMovement } from '#app/domain/layout/holding.ts'
import type { Layout } from '#app/domain/layout/layout.ts'
import { listModelChoices, type ModelChoice } from '#app/domain/layout/model-choice.ts'
import { findSupports } from '#app/domain/layout/support-near.ts'
import type { House } from '#app/domain/rules/house.ts'
import { areaOf } from '#app/domain/site/geometry.ts'
import type { Site } from '#app/domain/site/site.ts'
import { formatLength } from '#app/domain/units.ts'
import type { Vec2 } from '#app/domain/vector.ts'
import { editorReducer, editorStateOf, named, type EditorAction, type EditorState } from '#app/editor/editor-state.ts'
import { nudged, type Nudge } from '#app/editor/tools/nudge.ts'

/** What an editor works on. */
export interface EditorSubject {
  readonly site: Site
  readonly brief: Brief
  readonly catalogue: readonly HeaterModel[]
  readonly house: House
  readonly initial: Layout
}

/** The editor's state and everything that a form, a list or a click does to it, each one step. */
export interface Editor {
  readonly state: EditorState
  readonly dispatch: Dispatch<EditorAction>
  readonly models: ReadonlyMap<string, HeaterModel>
  readonly house: House
  edit: (layout: Layout, selected: readonly string[], said: string) => void
  set: (ids: readonly string[], change: HeaterChange) => void
  remove: (ids: readonly string[]) => void
  nudge: (nudge: Nudge) => void
  /** Places the waiting model at a point; `free` lets go of members and spacing. */
  placeAt: (at: Vec2, free: boolean) => void
  /** Places a model without pointing: in the middle of a member, or of the floor. */
  placeUnder: (choice: ModelChoice, memberId: string | null) => void
}

/** How near a member or a spacing must be to hold what is placed, m. */
const pull = 0.25

/** The state of one variant's editor. */
export function useEditor({ site, brief, catalogue, house, initial }: EditorSubject): Editor {
  const { rules } = house
  const [state, dispatch] = useReducer(editorReducer, initial, editorStateOf)
  const models = useMemo(() => new Map(catalogue.map((model) => [model.code, model])), [catalogue])
  const layout = state.history.present
  const edit = (next: Layout, selected: readonly string[], said: string) =>
    dispatch({ type: 'edit', layout: next, selected, said })

  const set = useCallback(
    (ids: readonly string[], values: HeaterChange) => {
      const moves = values.x !== undefined || values.y !== undefined || values.mount !== undefined
      const keeps = values.memberId !== undefined || !moves
      const change = (before: Layout) => {
        const next = setHeaters(before, ids, values)
        return keeps ? next : findSupports(next, ids, site, models, rules)
      }
      dispatch({ type: 'change', change, said: `${named(ids)} changed` })
    },
    [site, models, rules],
  )
  const remove = useCallback((ids: readonly string[]) => {
    dispatch({ type: 'change', change: (before) => removeHeaters(before, ids), said: `${named(ids)} removed` })
  }, [])

  const place = (choice: ModelChoice, at: Vec2, free: boolean) => {
    const first = firstPlace(choice, site, layout, at, rules)
    if (!first) return dispatch({ type: 'say', said: choice.whyNot[0] ?? 'It cannot be placed here.' })
    const placed = placeHeater(layout, first)
    const id = placed.ids[0] ?? ''
    const say = (metres: number) => formatLength(metres, site.displayUnits)
    const held = free
      ? { dx: 0, dy: 0 }
      : holdMovement({ site, layout: placed.layout, ids: [id], leadId: id, dx: 0, dy: 0, pull, say })
    const moved = setHeaters(placed.layout, [id], { x: at[0] + held.dx, y: at[1] + held.dy })
    edit(findSupports(moved, [id], site, models, rules), [id], `${named([id])} placed`)
  }

  return {
    state,
    dispatch,
    models,
    house,
    edit,
    set,
    remove,
    nudge: (nudge) => {
      const change = (before: Layout) => nudged(before, state.selected, nudge, site, models, rules)
      dispatch({ type: 'change', change, said: '' })
    },
    placeAt(at, free) {
      const choice = listModelChoices(catalogue, site, brief).find(({ model }) => model.code === state.placing)
      if (choice) place(choice, at, free)
    },
    placeUnder(choice, memberId) {
      place(choice, middleOf(site, layout, memberId), false)
    },
  }
}

/** A free place under a member: its middle, else the middle of the longest stretch without a heater. */
function middleOf(site: Site, layout: Layout, memberId: string | null): Vec2 {
  const member = site.members.find(({ id }) => id === memberId)
  if (!member) return middleOfFloor(site)
  const [dx, dy] = [member.to[0] - member.from[0], member.to[1] - member.from[1]]
  const squared = dx * dx + dy * dy || 1
  const taken = layout.heaters
    .filter((heater) => heater.memberId === memberId)
    .map((heater) => ((heater.x - member.from[0]) * dx + (heater.y - member.from[1]) * dy) / squared)
  const stops = [0, ...taken.filter((t) => t > 0 && t < 1).sort((a, b) => a - b), 1]
  const gaps = stops.slice(1).map((to, i) => ({ from: stops[i] ?? 0, to }))
  const widest = gaps.reduce((best, gap) => (gap.to - gap.from > best.to - best.from + 1e-9 ? gap : best))
  const t = (widest.from + widest.to) / 2
  return [member.from[0] + t * dx, member.from[1] + t * dy]
}

/** Centroid of the floor; the mean of the corners of a floor without area. */
function middleOfFloor({ floor }: Site): Vec2 {
  const area = areaOf(floor)
  let [x, y] = [0, 0]
  floor.forEach((a, i) => {
    const b = floor[(i + 1) % floor.length] ?? a
    const twice = a[0] * b[1] - b[0] * a[1]
    x += ((a[0] + b[0]) * twice) / (6 * area)
    y += ((a[1] + b[1]) * twice) / (6 * area)
  })
  return [x, y]
}
