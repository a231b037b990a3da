import { duplicateHeaters, placeHeaters, removeHeaters, type HeaterPlace } from '#app/domain/layout/edits.ts'
import type { Layout, MountedHeater } from '#app/domain/layout/layout.ts'
import type { ChosenFinding } from '#app/editor/nearest-shown.ts'
import { historyOf, record, redo, undo, type History } from '#app/editor/history.ts'
import type { GestureStep } from '#app/editor/tools/gesture.ts'

/** Everything that a hand changes on the variant page. */
export interface EditorState {
  readonly history: History<Layout>
  /** What a gesture shows before it ends; null when none is under way. */
  readonly draft: GestureStep | null
  readonly selected: readonly string[]
  readonly seatId: string | null
  /** The finding whose nearest pair is drawn; null: none chosen. */
  readonly finding: ChosenFinding | null
  readonly copied: readonly MountedHeater[]
  /** Model that the next click on the plan places; null: none. */
  readonly placing: string | null
  /** The sentence that says what the last edit did; announced. */
  readonly said: string
  /** How many gestures were dropped: answers asked for before the last one are stale. */
  readonly dropped: number
}

/** What can happen to it. */
export type EditorAction =
  | { type: 'show'; step: GestureStep }
  | { type: 'keep shown' }
  | { type: 'drop shown' }
  | { type: 'edit'; layout: Layout; selected?: readonly string[]; said?: string }
  /** Worked out from the layout as it then is. */
  | { type: 'change'; change: (layout: Layout) => Layout; said: string }
  | { type: 'undo' | 'redo' | 'copy' | 'paste' | 'duplicate' | 'remove' | 'select all' | 'let go' }
  | { type: 'select'; ids: readonly string[] }
  | { type: 'seat'; id: string | null }
  | { type: 'finding'; finding: ChosenFinding | null }
  | { type: 'placing'; model: string | null }
  | { type: 'say'; said: string }

/** An editor that opens on a layout. */
export const editorStateOf = (layout: Layout): EditorState => ({
  history: historyOf(layout),
  draft: null,
  selected: [],
  seatId: null,
  finding: null,
  copied: [],
  placing: null,
  said: '',
  dropped: 0,
})

/** The layout to show: the gesture's while one is under way. */
export const shownLayout = (state: EditorState): Layout => state.draft?.layout ?? state.history.present

/** How far copies stand from their originals, m in x and y. */
const copyShift = 0.5

/** The next state. A gesture is one step however long it took; Escape leaves none. */
export function editorReducer(state: EditorState, action: EditorAction): EditorState {
  const layout = state.history.present
  switch (action.type) {
    case 'show':
      return { ...state, draft: action.step }
    case 'drop shown':
      return state.draft ? { ...state, draft: null, dropped: state.dropped + 1 } : state
    case 'keep shown':
      return state.draft ? edited({ ...state, draft: null }, state.draft.layout, state.selected, '') : state
    case 'edit':
      return edited(state, action.layout, action.selected ?? state.selected, action.said ?? '')
    case 'change':
      return edited(state, action.change(layout), state.selected, action.said)
    case 'undo':
      return travelled(state, undo(state.history), 'Undone')
    case 'redo':
      return travelled(state, redo(state.history), 'Done again')
    case 'copy':
      return { ...state, copied: layout.heaters.filter((heater) => state.selected.includes(heater.id)) }
    case 'paste': {
      const places: HeaterPlace[] = state.copied.map((heater) => ({
        ...heater,
        x: heater.x + copyShift,
        y: heater.y - copyShift,
      }))
      const placed = placeHeaters(layout, places)
      if (places.length === 0) return state
      const copied = placed.layout.heaters.slice(layout.heaters.length)
      return { ...edited(state, placed.layout, placed.ids, `${named(placed.ids)} placed`), copied }
    }
    case 'duplicate': {
      const placed = duplicateHeaters(layout, state.selected, copyShift, -copyShift)
      return placed.ids.length === 0 ? state : edited(state, placed.layout, placed.ids, `${named(placed.ids)} placed`)
    }
    case 'remove':
      return state.selected.length === 0
        ? state
        : edited(state, removeHeaters(layout, state.selected), [], `${named(state.selected)} removed`)
    case 'select all':
      return { ...state, selected: layout.heaters.map((heater) => heater.id) }
    case 'let go':
      if (state.draft) return { ...state, draft: null, dropped: state.dropped + 1 }
      return state.placing ? { ...state, placing: null } : { ...state, selected: [], seatId: null, finding: null }
    case 'select':
      return { ...state, selected: action.ids }
    case 'seat':
      return { ...state, seatId: action.id }
    case 'finding':
      return withFinding(state, action.finding)
    case 'placing':
      return { ...state, placing: action.model, draft: null }
    case 'say':
      return { ...state, said: action.said }
  }
}

function withFinding(state: EditorState, finding: ChosenFinding | null): EditorState {
  if (!finding) return { ...state, finding: null }
  const { kind, id } = finding.subject
  const about = kind === 'heater' ? { selected: [id] } : kind === 'seat' ? { seatId: id } : {}
  return { ...state, ...about, finding, said: `${id === 'layout' ? '' : `${id}: `}${finding.title}` }
}

function edited(state: EditorState, layout: Layout, selected: readonly string[], said: string): EditorState {
  return { ...state, draft: null, history: record(state.history, layout), selected: present(layout, selected), said }
}

function travelled(state: EditorState, history: History<Layout>, said: string): EditorState {
  if (history === state.history) return { ...state, draft: null }
  return { ...state, history, draft: null, selected: present(history.present, state.selected), said }
}

const present = (layout: Layout, ids: readonly string[]) =>
  ids.filter((id) => layout.heaters.some((heater) => heater.id === id))

/** "Heater H4", "Heaters H1, H2 and 3 more". */
export function named(ids: readonly string[]): string {
  if (ids.length <= 1) return `Heater ${ids[0] ?? ''}`
  const shown = ids.slice(0, 2).join(', ')
  return ids.length <= 2 ? `Heaters ${shown}` : `Heaters ${shown} and ${ids.length - 2} more`
}
