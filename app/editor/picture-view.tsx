import { useMemo, useRef, useState } from 'react'
import type { Brief } from '#app/domain/brief/brief.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { Layout } from '#app/domain/layout/layout.ts'
import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'
import type { Site } from '#app/domain/site/site.ts'
import { formatLength } from '#app/domain/units.ts'
import { buttonClass } from '#app/components/button.tsx'
import { Choice } from '#app/components/choice.tsx'
import { SelectField } from '#app/components/field.tsx'
import { AxonometricDrawing } from '#app/drawing/axonometric/axonometric-drawing.tsx'
import { corners, downDeg, turnedDeg, type Corner } from '#app/drawing/axonometric/projection.ts'
import type { HeatPicture } from '#app/drawing/heat/contours.ts'
import { screenPen } from '#app/drawing/pen.ts'
import type { Theme } from '#app/drawing/theme.ts'
import { scaleOf } from '#app/editor/map-questions.ts'
import { useSize } from '#app/editor/use-size.ts'
import { planeHeight, type ViewChoice } from '#app/editor/view-choice.ts'

interface PictureViewProps {
  readonly site: Site
  readonly brief: Brief
  readonly layout: Layout
  readonly models: ReadonlyMap<string, HeaterModel>
  readonly rules: HouseRules
  readonly choice: ViewChoice
  /** The map as it is chosen; null without heat and while it is computed. */
  readonly picture: HeatPicture | null
  /** What stands beside the map's scale. */
  readonly notes: readonly string[]
  /** Address of the picture as a file, without its ending; null for who may not take one away. */
  readonly exports: string | null
}

const isCorner = (text: string): text is Corner => corners.some((corner) => corner === text)

/** Site, heaters and map in space, from a corner to choose. */
export default function PictureView({
  site,
  brief,
  layout,
  models,
  rules,
  choice,
  picture,
  notes,
  exports,
}: PictureViewProps) {
  const [corner, setCorner] = useState<Corner>('lower left')
  const [theme, setTheme] = useState<Theme>('dusk')
  const box = useRef<HTMLDivElement>(null)
  const { width, height } = useSize(box, { width: 1000, height: 560 })
  const quantity = useMemo(() => scaleOf(choice, brief, site.displayUnits, theme), [choice, brief, site, theme])
  const pen = useMemo(() => screenPen(theme), [theme])
  const plane = formatLength(planeHeight(choice.plane, site), site.displayUnits)
  const file = (ending: string) => `${exports}.${ending}?${new URLSearchParams({ corner, theme })}`
  return (
    <section aria-label="Picture" className="flex min-h-0 flex-1 flex-col">
      <div className="flex flex-wrap items-center gap-x-4 gap-y-2 border-b border-rule bg-paper px-4 py-1.5 print:hidden">
        <span className="flex items-center gap-2">
          <span aria-hidden="true" className="text-ink-2">
            From the
          </span>
          <SelectField
            label="Seen from the corner of the plan"
            className="w-36 [&>label]:sr-only"
            value={corner}
            onChange={(event) => isCorner(event.target.value) && setCorner(event.target.value)}
            options={corners.map((each) => ({ value: each, label: each }))}
          />
        </span>
        <Choice
          label="Light"
          options={[
            { value: 'dusk', label: 'Dusk' },
            { value: 'day', label: 'Daylight' },
          ]}
          value={theme}
          onChange={setTheme}
        />
        <span className="flex-1" />
        {exports && (
          <span className="flex gap-2">
            <a href={file('svg')} download className={buttonClass('outline', 'small')}>
              SVG
            </a>
            <a href={file('png')} download className={buttonClass('outline', 'small')}>
              PNG
            </a>
          </span>
        )}
      </div>
      <div
        ref={box}
        className={`min-h-64 flex-1 overflow-hidden max-tablet:h-[70vw] max-tablet:flex-none ${theme === 'dusk' ? 'bg-dusk-ground' : 'bg-white'}`}
      >
        <AxonometricDrawing
          name="picture"
          label={`Picture of ${site.name} from the ${corner} of the plan, ${layout.heaters.length} heaters, ${quantity.name} laid on the floor`}
          {...{ site, layout, models, rules, picture, quantity, corner, pen, width, height }}
        />
      </div>
      <p className="border-t border-rule bg-paper px-4 py-1.5 text-xs text-ink-2">
        {quantity.name} at {plane}, laid on the floor. Parallel projection: turned {turnedDeg}° and seen from {downDeg}°
        above; walls in front are dashed. {notes.join(' ')}
      </p>
    </section>
  )
}
