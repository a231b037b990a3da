import { useMemo, useState } from 'react'
import { mergeLayouts, takeTheirs, type HeaterConflict } from '#app/domain/layout/merge.ts'
import type { Layout, MountedHeater } from '#app/domain/layout/layout.ts'
import { formatLength, type DisplayUnits } from '#app/domain/units.ts'
import { Button } from '#app/components/button.tsx'
import type { SaveConflict } from '#app/editor/autosave.ts'
import { degreesFigure } from '#app/editor/figures.ts'
import { changedWords } from '#app/editor/save-status.ts'

interface ConflictPanelProps {
  readonly conflict: SaveConflict<Layout>
  readonly units: DisplayUnits
  /** Goes on from the other side's revision with this layout. */
  readonly onSettle: (layout: Layout) => void
  /** Keeps mine as a variant of its own and takes theirs here. */
  readonly onTwoVariants: () => void
}

type Side = 'mine' | 'theirs'

/** Both values of everything that two people changed; nothing is saved until one is chosen for each. */
export function ConflictPanel({ conflict, units, onSettle, onTwoVariants }: ConflictPanelProps) {
  const { base, mine, theirs } = conflict
  const merge = useMemo(() => mergeLayouts(base, mine, theirs.body), [base, mine, theirs])
  const [chosen, setChosen] = useState<Readonly<Record<string, Side>>>({})
  const [title, setTitle] = useState<Side | null>(null)
  const left = merge.conflicts.filter(({ id }) => !chosen[id]).length + (merge.title && !title ? 1 : 0)
  const { who, when } = changedWords(conflict)
  const settle = () => {
    const heaters = merge.conflicts
      .filter(({ id }) => chosen[id] === 'theirs')
      .reduce((layout, each) => takeTheirs(layout, each), merge.merged)
    onSettle(merge.title && title === 'theirs' ? { ...heaters, title: merge.title.theirs } : heaters)
  }
  return (
    <section
      aria-labelledby="conflict-title"
      className="m-3 rounded-md border border-rule-strong bg-paper-raised px-4 py-3.5"
    >
      <div role="alert">
        <h2 id="conflict-title" className="text-sm font-strong">
          This variant was changed {who}
          {when}
        </h2>
      </div>
      <p className="mt-0.5 text-ink-2">
        {merge.conflicts.length === 0 && !merge.title
          ? 'You changed other things. Both go together.'
          : 'Both changed the same. Nothing is lost until you choose.'}
      </p>
      {merge.title && (
        <Pair
          name="Title"
          {...{ who, when }}
          theirs={merge.title.theirs}
          mine={merge.title.mine}
          side={title}
          onSide={setTitle}
        />
      )}
      {merge.conflicts.map((each) => (
        <Pair
          key={each.id}
          name={each.id}
          {...{ who, when }}
          theirs={valueOf(each, 'theirs', units)}
          mine={valueOf(each, 'mine', units)}
          side={chosen[each.id] ?? null}
          onSide={(side) => setChosen({ ...chosen, [each.id]: side })}
        />
      ))}
      <div className="mt-3 flex flex-wrap gap-2">
        <Button kind="primary" disabled={left > 0} onClick={settle}>
          {left > 0 ? `${left} to choose` : 'Save together'}
        </Button>
        <Button kind="text" onClick={onTwoVariants}>
          Make two variants
        </Button>
      </div>
    </section>
  )
}

interface PairProps {
  readonly name: string
  readonly who: string
  readonly when: string
  readonly theirs: string
  readonly mine: string
  readonly side: Side | null
  readonly onSide: (side: Side) => void
}

function Pair({ name, who, when, theirs, mine, side, onSide }: PairProps) {
  const column = (label: string, value: string, which: Side) => (
    <div className="min-w-0 flex-1">
      <p className="text-2xs text-ink-2">{label}</p>
      <Button
        className={`mt-0.5 w-full ${side === which ? 'border-ink bg-paper-sunk' : ''}`}
        aria-pressed={side === which}
        onClick={() => onSide(which)}
      >
        <span className="truncate">Use {value}</span>
      </Button>
    </div>
  )
  return (
    <div className="mt-2.5" role="group" aria-label={name}>
      <p className="font-medium">{name}</p>
      <div className="flex gap-3">
        {column(`Changed ${who}${when}`, theirs, 'theirs')}
        {column('You', mine, 'mine')}
      </div>
    </div>
  )
}

/** What differs between the two, as the buttons say it: "2.45 m, 15°"; "it removed". */
function valueOf(conflict: HeaterConflict, side: Side, units: DisplayUnits): string {
  const [own, other] = side === 'mine' ? [conflict.mine, conflict.theirs] : [conflict.theirs, conflict.mine]
  if (!own) return 'it removed'
  const length = (metres: number) => formatLength(metres, units)
  const parts: [keyof MountedHeater, string][] = [
    ['model', own.model],
    ['x', `x ${length(own.x)}`],
    ['y', `y ${length(own.y)}`],
    ['lowestPoint', length(own.lowestPoint)],
    ['turnDeg', `turn ${degreesFigure(own.turnDeg)}°`],
    ['tiltDeg', `${degreesFigure(own.tiltDeg)}°`],
    ['mount', own.mount],
    ['memberId', own.memberId ?? 'no support'],
    ['supplyVoltage', `${own.supplyVoltage} V`],
    ['ratedVoltage', `made for ${own.ratedVoltage ?? own.supplyVoltage} V`],
    ['stage', own.stage === undefined ? 'full power' : `stage ${own.stage}`],
  ]
  const differing = parts.filter(([key]) => !other || own[key] !== other[key]).map(([, text]) => text)
  return differing.slice(0, 4).join(', ')
}
