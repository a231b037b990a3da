import { memo, useMemo, type KeyboardEvent } from 'react'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { Layout } from '#app/domain/layout/layout.ts'
import type { PlanCaution } from '#app/domain/rules/cautions-on-plan.ts'
import type { Finding } from '#app/domain/rules/finding.ts'
import type { Site } from '#app/domain/site/site.ts'
import { figurePatch, placeFigure } from '#app/drawing/nearest/label-place.ts'
import type { Pen } from '#app/drawing/pen.ts'
import { placeCautions } from '#app/drawing/plan/caution-places.ts'
import { CautionSign } from '#app/drawing/plan/caution-sign.tsx'
import { pairOnPlan, planFigure, PlanNearest } from '#app/drawing/plan/nearest.tsx'
import { notePatch, placeNotes } from '#app/drawing/plan/notes.ts'
import { patchAround, type Patch } from '#app/drawing/plan/occupied.ts'
import type { PlanView } from '#app/drawing/plan/plan-view.ts'
import { seatsCarryFigures } from '#app/drawing/plan/seat.tsx'
import { takenByHeaters, takenBySite } from '#app/drawing/plan/taken.ts'
import { wallCorners } from '#app/drawing/plan/wall.tsx'
import type { ShownNearest } from '#app/editor/nearest-shown.ts'

interface PlanFindingsProps {
  readonly site: Site
  /** As kept. */
  readonly layout: Layout
  readonly models: ReadonlyMap<string, HeaterModel>
  readonly view: PlanView
  readonly pen: Pen
  readonly nearest: readonly ShownNearest[]
  readonly cautions: readonly PlanCaution[]
  /** Whether names stand on the plan, which figures then keep clear of. */
  readonly words: boolean
  readonly onFinding: (finding: Finding) => void
}

/** What the findings have to show on the plan: nearest pairs as dimensions, each a Tab stop, and the signs of cautions. */
export const PlanFindings = memo(function PlanFindings(props: PlanFindingsProps) {
  const { site, layout, models, view, pen, nearest, cautions, words, onFinding } = props
  const taken = useMemo(() => {
    const withFigure = seatsCarryFigures(site.seats, view, pen)
    const walls = site.walls.map((wall) => patchAround(wallCorners(wall, view)))
    const heaters = takenByHeaters(layout, models, view, pen)
    const things = [...takenBySite(site, view, pen, withFigure), ...heaters, ...walls]
    return words ? [...things, ...placeNotes(site, view, pen, things).map((note) => notePatch(note, pen))] : things
  }, [site, layout, models, view, pen, words])
  const placed = nearest.reduce<readonly { readonly pair: ShownNearest; readonly around: readonly Patch[] }[]>(
    (before, pair) => {
      const around = [...taken, ...before.map((other) => figureOf(other.pair, other.around, view, pen))]
      return [...before, { pair, around }]
    },
    [],
  )
  const figures = placed.map(({ pair, around }) => figureOf(pair, around, view, pen))
  const signs = placeCautions(cautions, view, pen, [...taken, ...figures])
  return (
    <g>
      {signs.map(({ key, ...sign }) => (
        <CautionSign key={key} {...sign} pen={pen} />
      ))}
      {placed.map(({ pair, around }) => (
        <NearestStop key={pair.chosen ? 'chosen' : 'tightest'} {...{ pair, view, pen, onFinding }} taken={around} />
      ))}
    </g>
  )
})

function figureOf(pair: ShownNearest, taken: readonly Patch[], view: PlanView, pen: Pen): Patch {
  const text = planFigure(pair)
  return figurePatch(placeFigure(...pairOnPlan(view, pair), text, taken, pen), text, pen)
}

interface NearestStopProps {
  readonly pair: ShownNearest
  readonly view: PlanView
  readonly pen: Pen
  readonly taken: readonly Patch[]
  readonly onFinding: (finding: Finding) => void
}

/** A dimension that chooses its finding in the list, by pointer and by key. */
function NearestStop({ pair, view, pen, taken, onFinding }: NearestStopProps) {
  const { finding } = pair
  const [from, to] = pairOnPlan(view, pair)
  const onKeyDown = (event: KeyboardEvent) => {
    if (event.key !== 'Enter' && event.key !== ' ') return
    event.preventDefault()
    event.stopPropagation()
    onFinding(finding)
  }
  return (
    <g
      tabIndex={0}
      role="button"
      aria-pressed={pair.chosen}
      aria-label={`${finding.subject.id}: ${finding.title}, ${pair.figure}`}
      className="cursor-pointer outline-none focus-visible:[&>*]:outline-2 focus-visible:[&>*]:outline-offset-4 focus-visible:[&>*]:outline-dusk-select"
      onPointerDown={(event) => event.stopPropagation()}
      onClick={() => onFinding(finding)}
      onKeyDown={onKeyDown}
    >
      <path
        d={`M${from.join(' ')}L${to.join(' ')}`}
        stroke="transparent"
        strokeWidth={16}
        strokeLinecap="round"
        fill="none"
      />
      <PlanNearest {...{ pair, view, pen, taken }} />
    </g>
  )
}
