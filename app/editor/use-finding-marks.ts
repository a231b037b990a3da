import { useCallback, useMemo, type Dispatch } from 'react'
import type { SeatWarmth } from '#app/domain/comfort/seat-warmth.ts'
import { cautionsOnPlan } from '#app/domain/rules/cautions-on-plan.ts'
import type { Finding } from '#app/domain/rules/finding.ts'
import type { DisplayUnits } from '#app/domain/units.ts'
import type { EditorAction, EditorState } from '#app/editor/editor-state.ts'
import { findChosen, nearestShown } from '#app/editor/nearest-shown.ts'

/** Findings with the seats that some of them are about. */
interface FoundAbout {
  readonly findings: readonly Finding[]
  readonly warmth: readonly Pick<SeatWarmth, 'seat'>[]
}

/** What the findings have to show on the drawings, and how a drawing chooses one of them. */
export function useFindingMarks(
  { finding, selected, history }: EditorState,
  dispatch: Dispatch<EditorAction>,
  { findings, warmth }: FoundAbout,
  units: DisplayUnits,
) {
  const layout = history.present
  const lead = selected[0] ?? null
  const nearest = useMemo(
    () => nearestShown(findings, findChosen(findings, finding), lead, units),
    [findings, finding, lead, units],
  )
  const cautions = useMemo(() => cautionsOnPlan(layout, warmth, findings), [layout, warmth, findings])
  const onFinding = useCallback((chosen: Finding) => dispatch({ type: 'finding', finding: chosen }), [dispatch])
  return { nearest, cautions, onFinding }
}
