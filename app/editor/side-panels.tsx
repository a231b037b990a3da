import { memo, useEffect, useRef, type ReactNode } from 'react'
import { Explained, Findings, Heaters, Seats, Top, type SideSubject } from '#app/editor/side-parts.tsx'
import { TouchSheet, type SheetSections } from '#app/editor/touch-sheet.tsx'
import type { Room } from '#app/editor/use-media.ts'

interface SidePanelsProps {
  readonly subject: SideSubject
  readonly room: Room
  /** What the map shows, for the sheet of a tablet. */
  readonly tools: ReactNode
  readonly sections: SheetSections | null
}

/**
 * Beside the plan on a desk, a sheet with tabs below it on a tablet, one list on a phone. Drawn after the plan: a frame
 * of a drag does not wait for it.
 */
export const SidePanels = memo(function SidePanels({ subject, room, tools, sections }: SidePanelsProps) {
  if (sections) return <TouchSheet {...{ subject, tools, sections }} />
  if (room === 'phone') return <Below subject={subject} />
  return <Beside subject={subject} />
})

/** The list of a phone; a seat's explanation comes into view when it opens. */
function Below({ subject }: { subject: SideSubject }) {
  const opened = useRef<HTMLDivElement>(null)
  const { explained } = subject
  useEffect(() => {
    if (explained) opened.current?.scrollIntoView({ block: 'start' })
  }, [explained])
  return (
    <div className="bg-paper-raised">
      <p className="border-b border-rule bg-amber-wash px-4.5 py-2.5 text-amber">
        Placing needs a tablet. Here the layout can be read.
      </p>
      <div ref={opened}>
        <Explained subject={subject} />
      </div>
      <Findings subject={subject} />
      <Seats subject={subject} />
    </div>
  )
}

/** The column of a desk; what opens at its top comes into view. */
function Beside({ subject }: { subject: SideSubject }) {
  const column = useRef<HTMLElement>(null)
  const { explained, placing } = subject
  useEffect(() => {
    if (explained || placing) column.current?.scrollTo({ top: 0 })
  }, [explained, placing])
  return (
    <aside
      ref={column}
      aria-label="Heater, findings and seats"
      className="relative w-95 flex-none overflow-y-auto border-l border-rule bg-paper-raised wide:w-110"
    >
      <Top subject={subject} />
      <Findings subject={subject} />
      <Seats subject={subject} />
      <Heaters subject={subject} />
    </aside>
  )
}
