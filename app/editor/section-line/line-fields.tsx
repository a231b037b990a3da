import type { Site } from '#app/domain/site/site.ts'
import { turnCut, type SectionCut } from '#app/drawing/plan/section-cut.tsx'
import { Button } from '#app/components/button.tsx'
import { endRanges, moveEnds } from '#app/editor/section-line/placed-cut.ts'
import { LengthInput } from '#app/editor/site/length-input.tsx'

interface LineFieldsProps {
  readonly cut: SectionCut
  readonly site: Site
  readonly onChange: (cut: SectionCut | null) => void
}

/** The ends of a section line as lengths, which way it looks, and taking it away. */
export default function LineFields({ cut, site, onChange }: LineFieldsProps) {
  const ranges = endRanges(site)
  const field = (end: 'from' | 'to', axis: 'x' | 'y') => {
    const i = axis === 'x' ? 0 : 1
    const [min, max] = ranges[axis]
    return (
      <LengthInput
        label={`${end === 'from' ? 'Left' : 'Right'} end, ${axis}`}
        units={site.displayUnits}
        value={cut[end][i]}
        min={min}
        max={max}
        onCommit={(metres) => {
          const by = metres - cut[end][i]
          onChange(moveEnds(cut, [end], axis === 'x' ? [by, 0] : [0, by], site))
        }}
      />
    )
  }
  return (
    <>
      <p className="mb-2 text-xs text-ink-2">
        Drag its ends or its middle on the plan, or type them. It looks to where the discs point.
      </p>
      <div className="grid grid-cols-2 gap-2">
        {field('from', 'x')}
        {field('from', 'y')}
        {field('to', 'x')}
        {field('to', 'y')}
      </div>
      <div className="mt-3 flex justify-between gap-2">
        <Button size="small" onClick={() => onChange(turnCut(cut))}>
          Turn the other way
        </Button>
        <Button size="small" kind="text" onClick={() => onChange(null)}>
          Take it away
        </Button>
      </div>
    </>
  )
}
