import { memo, useMemo, useRef, type ReactNode } from 'react'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { Layout, MountedHeater } from '#app/domain/layout/layout.ts'
import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'
import type { Site } from '#app/domain/site/site.ts'
import type { QuantityScale } from '#app/drawing/heat/quantity.ts'
import type { NearestPair } from '#app/drawing/nearest/nearest-dimension.tsx'
import { screenPen } from '#app/drawing/pen.ts'
import { cutAlong, type SectionCut } from '#app/drawing/plan/section-cut.tsx'
import { SectionDrawing, sectionTitle } from '#app/drawing/section/section-drawing.tsx'
import { commonScale, cutExtent, sectionViewOf, type SectionView } from '#app/drawing/section/section-view.ts'
import type { SectionsView } from '#app/editor/use-flux.ts'
import { useSize } from '#app/editor/use-size.ts'

/** The cuts of a layout: across through its chosen heater, else through the third; and the line that a person put, else along
 * through the same. */
export function cutsOf(
  site: Site,
  layout: Layout,
  selected: readonly string[],
  placed: SectionCut | null,
): readonly SectionCut[] {
  const lead: MountedHeater | undefined =
    layout.heaters.find(({ id }) => id === selected[0]) ?? layout.heaters[2] ?? layout.heaters[0]
  if (!lead) return placed ? [placed] : []
  return [cutAlong(site, 'A', 'y', lead.x, 1), placed ?? cutAlong(site, 'B', 'x', lead.y, 1)]
}

interface SectionsProps {
  readonly site: Site
  readonly layout: Layout
  readonly models: ReadonlyMap<string, HeaterModel>
  readonly rules: HouseRules
  readonly cuts: readonly SectionCut[]
  readonly scale: QuantityScale
  readonly sections: SectionsView | null
  readonly selected: readonly string[]
  readonly nearest: readonly NearestPair[]
  /** Puts and changes a line of one’s own. */
  readonly line: ReactNode
}

const pen = screenPen('dusk')
/** Narrower than this the sections stand under each other, px; each is then at least this large, px per m. */
const narrow = 560
const leastScale = 28

/** Views of the cuts beside each other at one scale; under each other, where there is no room, each at its own. */
function viewsOf(site: Site, cuts: readonly SectionCut[], width: number, height: number): SectionView[] {
  if (width < narrow)
    return cuts.map((cut) => {
      const fitting = sectionViewOf(site, cut, { width })
      if (fitting.scale >= leastScale) return fitting
      const [low, high] = cutExtent(cut)
      const wide = width + (leastScale - fitting.scale) * (high - low)
      return sectionViewOf(site, cut, { width: wide, scale: leastScale })
    })
  const lengths = cuts.map((cut) => {
    const [low, high] = cutExtent(cut)
    return Math.max(0.5, high - low)
  })
  const fixed = 150
  const whole = lengths.reduce((sum, length) => sum + length, 0)
  const widths = lengths.map((length) => fixed + ((width - fixed * cuts.length) * length) / whole)
  const room = { height: height - 26 }
  const loose = cuts.map((cut, i) => sectionViewOf(site, cut, { ...room, width: widths[i] ?? width }))
  return cuts.map((cut, i) =>
    sectionViewOf(site, cut, { ...room, width: widths[i] ?? width, scale: commonScale(loose) }),
  )
}

/** Two sections beside each other at one scale, on a phone under each other. */
export const Sections = memo(function Sections(props: SectionsProps) {
  const { site, layout, models, rules, cuts, scale, sections, selected } = props
  const box = useRef<HTMLDivElement>(null)
  const { width, height } = useSize(box, { width: 1000, height: 220 })
  const chosen = useMemo(() => new Set(selected), [selected])
  const views = useMemo(() => viewsOf(site, cuts, width, height), [site, cuts, width, height])
  const same = sections?.question.cuts === cuts
  return (
    <div className="relative h-full min-h-0">
      <div
        ref={box}
        className="flex h-full min-h-0 overflow-hidden bg-dusk-ground max-tablet:flex-col max-tablet:gap-2 max-tablet:pb-14"
      >
        {views.map((view, i) => (
          <figure
            key={view.cut.letter}
            {...(view.width > width ? { tabIndex: 0, 'aria-label': sectionTitle(layout, view.cut) } : {})}
            className="m-0 flex-none max-tablet:overflow-x-auto"
          >
            <SectionDrawing
              name={`section-${view.cut.letter}`}
              label={sectionTitle(layout, view.cut)}
              {...{ site, layout, models, rules, view, pen }}
              quantity={scale}
              picture={same ? (sections?.pictures[i] ?? null) : null}
              selected={chosen}
              nearest={props.nearest}
            />
            <figcaption className="h-6 pl-13 text-xs text-dusk-line opacity-80">
              {sectionTitle(layout, view.cut)}
            </figcaption>
          </figure>
        ))}
      </div>
      <div className="absolute right-3 bottom-1.5 print:hidden">{props.line}</div>
    </div>
  )
})
