import { lazy, Suspense } from 'react'
import type { Site } from '#app/domain/site/site.ts'
import type { SectionCut } from '#app/drawing/plan/section-cut.tsx'
import { firstCut } from '#app/editor/section-line/placed-cut.ts'

const LineFields = lazy(() => import('#app/editor/section-line/line-fields.tsx'))

interface SectionLinePanelProps {
  readonly cut: SectionCut | null
  readonly site: Site
  readonly onChange: (cut: SectionCut | null) => void
}

const look =
  'inline-flex h-7 cursor-pointer list-none items-center rounded-md border border-dusk-line-2 bg-dusk-ground px-2.5 text-xs font-medium text-dusk-line hover:bg-dusk-floor pointer-coarse:h-11 [&::-webkit-details-marker]:hidden'

/** Puts a section line of one’s own on the plan, and gives its ends as lengths to type. */
export function SectionLinePanel({ cut, site, onChange }: SectionLinePanelProps) {
  if (!cut)
    return (
      <button type="button" className={look} onClick={() => onChange(firstCut(site))}>
        Section along a line
      </button>
    )
  return (
    <details className="relative">
      <summary className={look}>Line {cut.letter}</summary>
      <div className="absolute right-0 bottom-full z-30 mb-1 w-72 rounded-md border border-rule bg-paper-raised p-3 text-sm text-ink shadow-lift">
        <Suspense fallback={<p>Opening</p>}>
          <LineFields {...{ cut, site, onChange }} />
        </Suspense>
      </div>
    </details>
  )
}
