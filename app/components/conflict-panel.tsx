import { useState } from 'react'
import { Button } from '#app/components/button.tsx'

/** One thing that was changed in two places, as each says it. */
interface ConflictRow {
  readonly key: string
  readonly label: string
  readonly mine: string
  readonly theirs: string
  /** Nothing was changed here: the other copy is taken unless somebody chooses otherwise. */
  readonly theirsAlone?: boolean
}

interface ConflictPanelProps {
  /** Who saved the other copy, "by …" or "elsewhere", and when, " at …" or nothing. */
  who: string
  when: string
  rows: readonly ConflictRow[]
  /** Keys of the rows where the other copy is taken. */
  onSettle: (theirs: ReadonlySet<string>) => void
}

/** Both values of everything that was changed twice; the buttons are the values, and nothing is lost until one is taken. */
export function ConflictPanel({ rows, who, when, onSettle }: ConflictPanelProps) {
  const [taken, setTaken] = useState<ReadonlySet<string>>(
    () => new Set(rows.filter(({ theirsAlone }) => theirsAlone).map(({ key }) => key)),
  )
  const choose = (key: string, theirs: boolean) =>
    setTaken((old) => new Set(theirs ? [...old, key] : [...old].filter((each) => each !== key)))
  return (
    <section
      aria-labelledby="conflict"
      className="mb-5 rounded-md border border-rule-strong bg-paper-raised px-4 py-3.5"
    >
      <h2 id="conflict" className="text-base font-strong">
        Saved {who}
        {when} while you were changing it
      </h2>
      <p className="mt-0.5 mb-3 text-ink-2">Choose which value stays. Until then nothing of yours or theirs is lost.</p>
      <ul className="space-y-2.5">
        {rows.map(({ key, label, mine, theirs }) => (
          <li key={key} className="grid items-center gap-x-3 gap-y-1 tablet:grid-cols-[12rem_1fr_1fr]">
            <span className="font-medium">{label}</span>
            <Value text={theirs} who={`Saved ${who}`} chosen={taken.has(key)} onChoose={() => choose(key, true)} />
            <Value text={mine} who="Yours" chosen={!taken.has(key)} onChoose={() => choose(key, false)} />
          </li>
        ))}
      </ul>
      <p className="mt-3.5 flex flex-wrap gap-2">
        <Button kind="primary" onClick={() => onSettle(taken)}>
          Save these
        </Button>
        <Button kind="text" onClick={() => onSettle(new Set(rows.map(({ key }) => key)))}>
          Take everything saved {who}
        </Button>
      </p>
    </section>
  )
}

function Value({ text, who, chosen, onChoose }: { text: string; who: string; chosen: boolean; onChoose: () => void }) {
  return (
    <button
      type="button"
      aria-pressed={chosen}
      onClick={onChoose}
      className="flex min-h-8 items-baseline gap-2 rounded-md border border-rule-strong px-2.5 py-1 text-left aria-pressed:border-ink aria-pressed:bg-ink aria-pressed:text-paper-raised pointer-coarse:min-h-11"
    >
      <span className="text-2xs opacity-80">{who}</span>
      <span className="font-medium">Use {text === '' ? 'no answer' : text}</span>
    </button>
  )
}
