import { mostOf, refusalOf } from '#app/domain/site/site-faults.ts'
import { listOf, type ThingKind } from '#app/domain/site/edits.ts'
import { Button } from '#app/components/button.tsx'
import { useSiteEditing } from '#app/editor/site/editing.ts'
import { middleOf, withThingAt, type NewThing } from '#app/editor/site/new-things.ts'
import { obstacleKinds } from '#app/editor/site/obstacle-kinds.ts'

interface AddRowProps {
  readonly kind: ThingKind
  /** What waits for a click on the plan. */
  readonly adding: NewThing | null
  readonly onAdding: (what: NewThing | null) => void
  readonly onAdd: (what: NewThing) => void
}

/** Words on the buttons that add. */
const newWords: Record<Exclude<ThingKind, 'obstacle'>, string> = {
  cover: 'Cover',
  member: 'Member',
  wall: 'Wall along the floor',
  pole: 'Post or pole',
  table: 'Table',
  level: 'Level',
  seat: 'Seat',
}

/** Adds a thing in the middle of the floor, or where the plan is clicked. */
export function AddRow({ kind, adding, onAdding, onAdd }: AddRowProps) {
  const { site } = useSiteEditing()
  const full = site[listOf[kind]].length >= mostOf[listOf[kind]]
  const whats: readonly NewThing[] = kind === 'obstacle' ? obstacleKinds : [kind]
  const [first] = whats
  const refusal = full || !first ? null : refusalOf(site, withThingAt(site, first, middleOf(site)).site)
  const onPlan = adding !== null
  if (full) return <p className="py-2 text-ink-2">At most {mostOf[listOf[kind]].toLocaleString('en')} of these.</p>
  return (
    <div className="pb-2">
      <p role="group" aria-label="Add" className="flex flex-wrap items-center gap-1.5">
        {whats.map((what) => (
          <Button
            key={what}
            size="small"
            icon="plus"
            aria-pressed={adding === what}
            className="first-letter:uppercase aria-pressed:border-ink aria-pressed:bg-ink aria-pressed:text-paper-raised"
            onClick={() => (onPlan ? onAdding(adding === what ? null : what) : onAdd(what))}
          >
            {what in newWords && what !== 'other' ? wordsOf(what) : capital(what)}
          </Button>
        ))}
        {kind !== 'wall' && first && (
          <Button
            size="small"
            kind="text"
            aria-pressed={onPlan}
            onClick={() => onAdding(onPlan ? null : first)}
            className="aria-pressed:underline"
          >
            {onPlan ? 'End adding' : 'By clicking the plan'}
          </Button>
        )}
      </p>
      {onPlan && (
        <p role="status" className="pt-1 text-xs text-ink-2">
          Click the floor for each {adding}; Escape ends it.
        </p>
      )}
      {refusal && <p className="pt-1 text-2xs font-medium text-clay">{refusal.message}</p>}
    </div>
  )
}

const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1)

function wordsOf(what: NewThing): string {
  switch (what) {
    case 'cover':
    case 'member':
    case 'wall':
    case 'pole':
    case 'table':
    case 'level':
    case 'seat':
      return newWords[what]
    default:
      return capital(what)
  }
}
