import { useRef, type KeyboardEvent } from 'react'
import { listOf } from '#app/domain/site/edits.ts'
import type { ChosenKind } from '#app/editor/site/choice.ts'
import { useSiteEditing } from '#app/editor/site/editing.ts'

/** What the panel lists. */
export type ListedKind = ChosenKind | 'sizes'

const kinds: readonly { readonly kind: ListedKind; readonly words: string }[] = [
  { kind: 'floor', words: 'Floor' },
  { kind: 'level', words: 'Levels' },
  { kind: 'cover', words: 'Covers' },
  { kind: 'member', words: 'Members' },
  { kind: 'wall', words: 'Walls' },
  { kind: 'pole', words: 'Posts, poles' },
  { kind: 'obstacle', words: 'Obstacles' },
  { kind: 'table', words: 'Tables' },
  { kind: 'seat', words: 'Seats' },
  { kind: 'sizes', words: 'Sizes' },
]

/** The kinds of things with how many there are; one is open. Arrows move between them. */
export function KindList({ kind, onKind }: { kind: ListedKind; onKind: (kind: ListedKind) => void }) {
  const { site } = useSiteEditing()
  const list = useRef<HTMLDivElement>(null)
  const count = (each: ListedKind): number | null =>
    each === 'floor' ? null : each === 'sizes' ? site.dimensions.length : site[listOf[each]].length
  const move = (event: KeyboardEvent) => {
    const forward = event.key === 'ArrowDown' || event.key === 'ArrowRight'
    const back = event.key === 'ArrowUp' || event.key === 'ArrowLeft'
    if (!forward && !back) return
    event.preventDefault()
    const at = kinds.findIndex((each) => each.kind === kind)
    const next = kinds[(at + (forward ? 1 : -1) + kinds.length) % kinds.length]
    if (!next) return
    onKind(next.kind)
    list.current?.querySelector<HTMLElement>(`[data-kind="${next.kind}"]`)?.focus()
  }
  return (
    <div
      ref={list}
      role="tablist"
      aria-label="What is here"
      aria-orientation="vertical"
      onKeyDown={move}
      className="flex gap-0.5 overflow-x-auto border-b border-rule pb-1 tablet:flex-col tablet:self-start tablet:border-r tablet:border-b-0 tablet:pr-2"
    >
      {kinds.map(({ kind: each, words }) => (
        <button
          key={each}
          type="button"
          role="tab"
          data-kind={each}
          aria-selected={kind === each}
          tabIndex={kind === each ? 0 : -1}
          onClick={() => onKind(each)}
          className="flex min-h-8 flex-none items-center justify-between gap-2 rounded-md px-2 whitespace-nowrap text-ink-2 hover:bg-paper-sunk hover:text-ink aria-selected:bg-paper-sunk aria-selected:font-medium aria-selected:text-ink aria-selected:shadow-[inset_0_-3px_0_var(--color-ember)] tablet:aria-selected:shadow-[inset_3px_0_0_var(--color-ember)] pointer-coarse:min-h-12"
        >
          <span>{words}</span>
          <span className="text-xs text-ink-3">{count(each)?.toLocaleString('en') ?? ''}</span>
        </button>
      ))}
    </div>
  )
}
