import { useState } from 'react'
import { edgeLength, outlineCorners, parseOutline, withEdgeLength, type MovedEnd } from '#app/domain/site/outline.ts'
import { refusalOf } from '#app/domain/site/site-faults.ts'
import type { Site } from '#app/domain/site/site.ts'
import { formatLength } from '#app/domain/units.ts'
import type { Vec2 } from '#app/domain/vector.ts'
import { Button } from '#app/components/button.tsx'
import { Choice } from '#app/components/choice.tsx'
import { TextAreaField } from '#app/components/field.tsx'
import type { Chosen } from '#app/editor/site/choice.ts'
import { useSiteEditing } from '#app/editor/site/editing.ts'
import { handlesOf, putHandle, withoutPart, withPartAdded } from '#app/editor/site/handles.ts'
import { SizeInput } from '#app/editor/site/size-input.tsx'

interface OutlineFieldsProps {
  /** The floor, a level or a prism. */
  readonly chosen: Chosen
  readonly onChoose: (chosen: Chosen) => void
  /** The site with another outline for it. */
  readonly replace: (site: Site, outline: readonly Vec2[]) => Site
}

/** Corners of an outline as buttons, the chosen one with its place and the edge that starts there, and all of them as text. */
export function OutlineFields({ chosen, onChoose, replace }: OutlineFieldsProps) {
  const { site, readOnly, change } = useSiteEditing()
  const outline = handlesOf(site, chosen)
  const { part } = chosen
  return (
    <div className="space-y-3">
      <p role="group" aria-label="Corners" className="flex max-h-28 flex-wrap gap-1 overflow-y-auto">
        {outline.map((_, i) => (
          <button
            key={i}
            type="button"
            aria-pressed={part === i}
            aria-label={`Corner ${i + 1}`}
            onClick={() => onChoose({ ...chosen, part: i })}
            className="size-7 rounded-md border border-rule-strong text-xs aria-pressed:border-ink aria-pressed:bg-ink aria-pressed:text-paper-raised pointer-coarse:size-11"
          >
            {i + 1}
          </button>
        ))}
      </p>
      {part !== null && outline[part] && (
        <CornerFields key={part} {...{ chosen, outline, part, replace }} at={outline[part]} />
      )}
      {part !== null && !readOnly && (
        <p className="flex flex-wrap gap-2">
          <Button
            size="small"
            icon="plus"
            disabled={outline.length >= outlineCorners.most}
            onClick={() => {
              change((old) => withPartAdded(old, chosen, part))
              onChoose({ ...chosen, part: part + 1 })
            }}
          >
            Corner after {part + 1}
          </Button>
          <RemoveCorner chosen={chosen} part={part} onChoose={onChoose} />
        </p>
      )}
      {!readOnly && <PastedCorners key={outline.length} outline={outline} replace={replace} />}
    </div>
  )
}

function RemoveCorner({
  chosen,
  part,
  onChoose,
}: {
  chosen: Chosen
  part: number
  onChoose: (chosen: Chosen) => void
}) {
  const { site, change } = useSiteEditing()
  const least = handlesOf(site, chosen).length <= outlineCorners.least
  const without = withoutPart(site, chosen, part) ?? site
  const why = least ? `At least ${outlineCorners.least} corners.` : (refusalOf(site, without)?.message ?? null)
  return (
    <>
      <Button
        size="small"
        kind="danger"
        icon="remove"
        disabled={why !== null}
        onClick={() => {
          change((old) => withoutPart(old, chosen, part) ?? old)
          onChoose({ ...chosen, part: null })
        }}
      >
        Corner {part + 1}
      </Button>
      {why && <span className="self-center text-2xs text-ink-3">{why}</span>}
    </>
  )
}

interface CornerFieldsProps extends Pick<OutlineFieldsProps, 'chosen' | 'replace'> {
  readonly outline: readonly Vec2[]
  readonly part: number
  readonly at: Vec2
}

function CornerFields({ chosen, outline, part, at, replace }: CornerFieldsProps) {
  const { readOnly } = useSiteEditing()
  const [moved, setMoved] = useState<MovedEnd>('last')
  const next = (part + 1) % outline.length
  return (
    <div className="grid grid-cols-2 items-start gap-x-3 gap-y-2.5 tablet:grid-cols-4 wide:grid-cols-3">
      <SizeInput
        label={`Corner ${part + 1}, x`}
        value={at[0]}
        edit={(old, x) => putHandle(old, chosen, part, [x, at[1]])}
      />
      <SizeInput
        label={`Corner ${part + 1}, y`}
        value={at[1]}
        edit={(old, y) => putHandle(old, chosen, part, [at[0], y])}
      />
      <SizeInput
        label={`Edge from ${part + 1} to ${next + 1}`}
        value={edgeLength(outline, part)}
        min={0.01}
        max={200}
        hint={`Moves corner ${(moved === 'last' ? next : part) + 1}`}
        edit={(old, length) => replace(old, withEdgeLength(outline, part, length, moved))}
      />
      {!readOnly && (
        <div className="pt-4">
          <Choice
            label="Which end of the edge moves"
            value={moved}
            options={[
              { value: 'first', label: `Move ${part + 1}` },
              { value: 'last', label: `Move ${next + 1}` },
            ]}
            onChange={setMoved}
          />
        </div>
      )}
    </div>
  )
}

/** A list as long as this is put in at once: a browser's own way takes a minute for 10,000 lines, characters. */
const longPaste = 2000

/** All corners as text, one a line: a typed way for the whole outline, and for a list that comes from elsewhere. */
function PastedCorners({ outline, replace }: { outline: readonly Vec2[]; replace: OutlineFieldsProps['replace'] }) {
  const { site, change } = useSiteEditing()
  const units = site.displayUnits
  const kept = outline.map((corner) => corner.map((v) => formatLength(v, units, 'fine')).join(', ')).join('\n')
  const [typed, setTyped] = useState<string | null>(null)
  const [error, setError] = useState<string | null>(null)
  const take = () => {
    const read = parseOutline(typed ?? kept, units)
    if ('error' in read) return setError(read.error)
    const refusal = refusalOf(site, replace(site, read.outline))
    if (refusal) return setError(refusal.message)
    change((old) => replace(old, read.outline))
    setError(null)
    setTyped(null)
  }
  return (
    <details>
      <summary className="min-h-6 cursor-pointer text-xs text-ink-2 underline pointer-coarse:min-h-11">
        All corners as text
      </summary>
      <div className="space-y-2 pt-1">
        <TextAreaField
          label="Corners, one a line: x, y"
          rows={6}
          value={typed ?? kept}
          error={error}
          spellCheck={false}
          onPaste={(event) => {
            const pasted = event.clipboardData.getData('text/plain')
            if (pasted.length < longPaste) return
            event.preventDefault()
            const { value, selectionStart, selectionEnd } = event.currentTarget
            setTyped(value.slice(0, selectionStart) + pasted + value.slice(selectionEnd))
            setError(null)
          }}
          onChange={(event) => {
            setTyped(event.target.value)
            setError(null)
          }}
        />
        <Button size="small" disabled={typed === null} onClick={take}>
          Take these corners
        </Button>
      </div>
    </details>
  )
}
