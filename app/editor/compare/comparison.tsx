import { useMemo, useRef, useState, type ReactNode } from 'react'
import type { Brief } from '#app/domain/brief/brief.ts'
import { differencesInWords } from '#app/domain/comparison/in-words.ts'
import { listPriceOf } from '#app/domain/comparison/list-price.ts'
import { comparisonRows, type ComparisonTerms } from '#app/domain/comparison/what-differs.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { Layout } from '#app/domain/layout/layout.ts'
import type { House } from '#app/domain/rules/house.ts'
import { houseFigure } from '#app/domain/rules/house-rules.ts'
import { planesOf } from '#app/domain/site/planes.ts'
import type { Site } from '#app/domain/site/site.ts'
import { formatLength, formatQuantity } from '#app/domain/units.ts'
import { farHeatersNote } from '#app/editor/map-notes.ts'
import { LegendDrawing } from '#app/drawing/heat/legend.tsx'
import { differenceScale, irradianceScale, overlapScale } from '#app/drawing/heat/quantity.ts'
import { screenPen } from '#app/drawing/pen.ts'
import { planViewOf } from '#app/drawing/plan/plan-view.ts'
import { Button, IconButton } from '#app/components/button.tsx'
import { Choice } from '#app/components/choice.tsx'
import { OutcomeMark } from '#app/components/outcome-mark.tsx'
import { ComparedMap } from '#app/editor/compare/compared-map.tsx'
import { Differences, InWords } from '#app/editor/compare/differences.tsx'
import { MapHead, RingLegend } from '#app/editor/compare/map-head.tsx'
import { SeatBySeat } from '#app/editor/compare/seat-by-seat.tsx'
import { seatSigns } from '#app/editor/compare/seat-signs.ts'
import { useComparison, type ComparedMaps } from '#app/editor/compare/use-comparison.ts'
import { useLinkedViews } from '#app/editor/compare/use-linked-views.ts'
import { pointedStore } from '#app/editor/pointed.ts'
import { useSize } from '#app/editor/use-size.ts'

/** A variant that is compared, with its title as a link to it. */
interface ChosenVariant {
  readonly number: number
  readonly title: string
  readonly link: ReactNode
  readonly heaters: Layout['heaters']
}

interface ComparisonProps {
  readonly site: Site
  readonly brief: Brief
  /** Those that the variants use. */
  readonly models: readonly HeaterModel[]
  readonly house: House
  /** Two to four; the same array for the same variants. */
  readonly chosen: readonly ChosenVariant[]
  /** The way to compare others. */
  readonly picker: ReactNode
}

const pen = screenPen('dusk')
const margins = { top: 28, right: 44, bottom: 46, left: 40 }
const gap = 18
/** Below this many px to a metre seats' figures have no room; the maps then stand one below the other. */
const leastScale = 32

/** Whether two maps fit beside each other. */
const sideBySide = (site: Site, width: number): boolean =>
  width >= 700 && planViewOf(site, (width - gap) / 2, undefined, margins).scale >= leastScale

type Show = 'irradiance' | 'overlap' | 'difference'

/** Variants side by side on one scale: maps under one view and pointer, seat by seat, and what differs. */
export function Comparison({ site, brief, models: list, house, chosen, picker }: ComparisonProps) {
  const [head, setHead] = useState(false)
  const [show, setShow] = useState<Show>('irradiance')
  const [attempt, setAttempt] = useState(0)
  const [pointed] = useState(pointedStore)
  const frame = useRef<HTMLDivElement>(null)
  const size = useSize(frame, { width: 1400, height: 400 })
  const wide = useMemo(() => sideBySide(site, size.width), [site, size.width])
  const columnWidth = Math.max(280, Math.floor(wide ? (size.width - gap) / 2 : size.width))
  const whole = useMemo(() => planViewOf(site, columnWidth, undefined, margins), [site, columnWidth])
  const views = useLinkedViews(whole)

  const models = useMemo(() => new Map(list.map((model) => [model.code, model])), [list])
  const layouts = useMemo(() => chosen.map(({ title, heaters }) => ({ title, heaters })), [chosen])
  const planes = useMemo(() => planesOf(site), [site])
  const plane = head ? planes.head : planes.body
  const { value: threshold, source } = houseFigure(house.rules, 'overlapThreshold')
  const subject = useMemo(
    () => ({ site, brief, models, house, layouts, plane }),
    [site, brief, models, house, layouts, plane],
  )
  const { variants: maps, state } = useComparison(subject, attempt)
  const terms: ComparisonTerms = { units: site.displayUnits, target: brief.target, overlapThreshold: threshold }
  const compared = comparedVariants({ chosen, layouts, models, brief, maps })
  const complete = compared.length === chosen.length
  const [first] = compared
  const words = first && complete ? compared.slice(1).map((other) => differencesInWords(first, other, terms)) : []
  const height = (metres: number) => formatLength(metres, site.displayUnits)
  const difference = show === 'difference'
  const far = farHeatersNote(
    maps.map(({ flux }) => flux),
    'W/m²',
  )
  const warmths = maps.map(({ figures }) => figures?.warmth ?? null)
  const signs = useMemo(() => {
    const all = maps.map(({ figures }) => figures?.warmth ?? null)
    return all.map((warmth) => seatSigns(warmth, head, show === 'difference' ? (all[0] ?? null) : null))
  }, [maps, head, show])
  const quantity = {
    irradiance: irradianceScale('dusk', brief.target),
    overlap: overlapScale('dusk', threshold),
    difference: differenceScale('dusk'),
  }[show]

  return (
    <>
      <header className="flex flex-wrap items-center gap-x-4 gap-y-2 pb-3">
        <div className="min-w-64 flex-1">
          <h1 className="text-lg font-strong">{chosen.map(({ title }) => title).join(' against ')}</h1>
          <p className="text-ink-2">
            Same scale, same seats, {formatQuantity(brief.airTemperature, 'temperature', site.displayUnits, 0)},{' '}
            {formatQuantity(brief.windDesign, 'speed', site.displayUnits)} at the seats
          </p>
        </div>
        <Choice
          label="Plane"
          showLabel
          value={head ? 'head' : 'body'}
          options={[
            { value: 'body', label: `Body ${height(planes.body)}` },
            { value: 'head', label: `Head ${height(planes.head)}` },
          ]}
          onChange={(value) => setHead(value === 'head')}
        />
        <Choice
          label="Map"
          value={show}
          options={[
            { value: 'irradiance', label: 'Both' },
            { value: 'difference', label: 'Difference' },
            { value: 'overlap', label: 'Overlap' },
          ]}
          onChange={setShow}
        />
        {picker}
      </header>
      <div ref={frame}>
        <div className={`grid gap-x-4.5 gap-y-4 ${wide ? 'grid-cols-2' : ''}`}>
          {chosen.map((variant, i) => {
            const { figures, flux, overlap, difference: lesser } = maps[i] ?? nothing
            const layout = layouts[i]
            if (!layout || (difference && i === 0)) return null
            return (
              <article key={variant.number} aria-label={`Variant ${variant.number}`} className="min-w-0">
                <MapHead
                  i={i}
                  number={variant.number}
                  title={variant.link}
                  less={difference ? (chosen[0]?.number ?? null) : null}
                  warmth={figures?.warmth ?? null}
                  overlapArea={show === 'overlap' ? (compared[i]?.overlap ?? null) : null}
                  threshold={threshold}
                  units={site.displayUnits}
                />
                <ComparedMap
                  name={`map-${variant.number}`}
                  label={`Variant ${variant.number}, ${variant.title}: ${quantity.name}`}
                  {...{ site, layout, models, plane, quantity, views, pointed }}
                  signs={signs[i] ?? noSigns}
                  answer={{ irradiance: flux, overlap, difference: lesser }[show]}
                  ownValue={show !== 'irradiance'}
                />
              </article>
            )
          })}
          {difference && wide && <DifferenceNote first={chosen[0]} />}
        </div>
      </div>
      <div className="flex flex-wrap items-center justify-between gap-x-6 gap-y-1 pt-2.5 pb-3">
        <div className="flex max-w-full flex-wrap items-center gap-x-4">
          <span className="text-ink-2">
            {quantity.name}
            {show !== 'overlap' && `, ${quantity.unit}`} at {height(plane)}
          </span>
          <LegendDrawing
            name="legend"
            quantity={quantity}
            pen={pen}
            ink="var(--color-ink)"
            width={Math.min(560, size.width)}
          />
          {far && <span className="text-xs text-ink-2">{far}</span>}
        </div>
        {show === 'irradiance' && <RingLegend />}
        <p className="flex items-center print:hidden">
          <IconButton icon="minus" label="Smaller" onClick={() => views.enlargeAt(0.8)} />
          <IconButton icon="plus" label="Larger" onClick={() => views.enlargeAt(1.25)} />
          <IconButton icon="fit" label="Whole plan" onClick={views.showAll} />
        </p>
      </div>
      <MapState state={state} maps={maps} onRetry={() => setAttempt((before) => before + 1)} />
      <p className="pb-4 text-xs text-ink-3">
        Calculated, not a thermal photograph. Overlap: the area where two or more heaters each alone give{' '}
        {formatQuantity(threshold, 'irradiance', 'metric')} or more, {source}.
      </p>
      <div className="grid items-start gap-x-7 gap-y-6 desk:grid-cols-[minmax(0,1.6fr)_minmax(0,1fr)]">
        <div className="min-w-0 space-y-5">
          <SeatBySeat
            site={site}
            target={brief.target}
            head={head}
            plane={head ? `at the head, largest direction` : `on the body plane, ${height(planes.body)}`}
            width={Math.max(320, Math.floor(size.width >= 1240 ? (size.width - 28) * 0.615 : size.width) - 8)}
            variants={chosen.map(({ number, title }, i) => ({ number, title, warmth: warmths[i] ?? null }))}
            pointed={pointed}
            views={views}
          />
          {complete && <InWords variants={chosen} words={words} />}
        </div>
        {complete ? (
          <Differences variants={chosen} rows={comparisonRows(compared, terms)} />
        ) : (
          <p className="border-t border-ink pt-2.5 text-ink-2">What differs is being worked out.</p>
        )}
      </div>
    </>
  )
}

const noSigns = new Map<string, never>()
const nothing: ComparedMaps = { figures: null, flux: null, overlap: null, overlapArea: null, difference: null }

interface Known extends Pick<ComparisonProps, 'chosen' | 'brief'> {
  layouts: readonly Layout[]
  models: ReadonlyMap<string, HeaterModel>
  maps: readonly ComparedMaps[]
}

/** The variants whose figures are known. */
function comparedVariants({ chosen, layouts, models, brief, maps }: Known) {
  return chosen.flatMap(({ number, title }, i) => {
    const [layout, known] = [layouts[i], maps[i]]
    if (!layout || !known?.figures) return []
    const price = listPriceOf(layout, models, brief.energy?.currency ?? 'EUR')
    return [{ number, title, layout, models, ...known.figures, price, overlap: known.overlapArea }]
  })
}

function DifferenceNote({ first }: { first: ChosenVariant | undefined }) {
  return (
    <p className="max-w-sm self-center text-base text-ink-2">
      Orange: more irradiance than in variant {first?.number}, {first?.title}. Purple: less. The middle of the scale is
      no difference. Seats show how much more or less they get; their rings, how they stand in this variant.
    </p>
  )
}

function MapState({ state, maps, onRetry }: { state: string; maps: readonly ComparedMaps[]; onRetry: () => void }) {
  const done = maps.filter(({ figures }) => figures !== null).length
  return (
    <div role="status" className="text-xs text-ink-2 print:hidden">
      {state === 'working' && done < maps.length && `Variants, ${done} of ${maps.length}`}
      {state === 'broken' && (
        <span className="flex items-center gap-2 text-clay">
          <OutcomeMark outcome="fails" />
          The maps could not be made. The saved variants are safe.
          <Button size="small" onClick={onRetry}>
            Try again
          </Button>
        </span>
      )}
    </div>
  )
}
