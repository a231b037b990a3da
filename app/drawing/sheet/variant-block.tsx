import type { Brief } from '#app/domain/brief/brief.ts'
import type { SeatWarmth } from '#app/domain/comfort/seat-warmth.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { Site } from '#app/domain/site/site.ts'
import type { QuantityScale } from '#app/drawing/heat/quantity.ts'
import { printPen } from '#app/drawing/pen.ts'
import { Plan, type PlanDetail } from '#app/drawing/plan/plan-drawing.tsx'
import type { SeatSign } from '#app/drawing/plan/seat.tsx'
import { sheetInk } from '#app/drawing/plot/plot-ink.ts'
import { VariantMark, type VariantMarkKind } from '#app/drawing/plot/variant-mark.tsx'
import type { SheetVariant } from '#app/drawing/sheet/sheet-facts.ts'
import type { Box, VariantBox } from '#app/drawing/sheet/sheet-layout.ts'
import { sheetFigures, type SheetFigure } from '#app/drawing/sheet/sheet-words.ts'
import { clippedText, textWidth } from '#app/drawing/text/widths.ts'
import { Words } from '#app/drawing/text/words.tsx'

const detail: PlanDetail = { names: false, spacings: 'level', overall: false, scaleBar: false, lineFigures: true }

/** What each seat's disc says: its irradiance on the body plane and its ring; empty without a figure. */
function seatSigns(
  warmth: readonly SeatWarmth[],
  format: (irradiance: number) => string,
): ReadonlyMap<string, SeatSign> {
  return new Map(
    warmth.map(({ seat, body, target }): [string, SeatSign] => [
      seat.id,
      { kind: 'figure', text: body === null ? '–' : format(body), outcome: target },
    ]),
  )
}

/** One variant on the sheet: its heading, its plan to scale, its figures. */
export function VariantBlock({
  variant,
  box,
  site,
  brief,
  models,
  quantity,
  mark,
  tight,
}: {
  variant: SheetVariant
  box: VariantBox
  site: Site
  brief: Brief
  models: ReadonlyMap<string, HeaterModel>
  quantity: QuantityScale
  mark: VariantMarkKind
  /** Figures stand in a column beside the plan. */
  tight: boolean
}) {
  const figures = sheetFigures(variant.warmth, variant.totals, brief, site.displayUnits, variant.priceWithTax ?? null)
  return (
    <g>
      <VariantHeading box={box.heading} variant={variant} mark={mark} />
      <svg x={box.plan.x} y={box.plan.y} width={box.plan.width} height={box.plan.height}>
        <Plan
          name={`sheet-${variant.number}`}
          {...{ site, models, quantity, detail }}
          layout={variant.layout}
          view={box.view}
          pen={printPen}
          picture={variant.picture}
          signs={seatSigns(variant.warmth, quantity.format)}
        />
      </svg>
      {tight ? <FigureColumn box={box.figures} figures={figures} /> : <FigureRow box={box.figures} figures={figures} />}
    </g>
  )
}

function VariantHeading({ box, variant, mark }: { box: Box; variant: SheetVariant; mark: VariantMarkKind }) {
  const base = box.y + 17
  const name = `Variant ${variant.number}`
  const left = box.x + 20
  const titleAt = left + textWidth(name, 10.5, 600) + 8
  return (
    <>
      <line x1={box.x} x2={box.x + box.width} y1={box.y} y2={box.y} stroke={sheetInk.ink} strokeWidth={1.1} />
      <VariantMark kind={mark} x={box.x + 7} y={base - 3.8} r={5} pen={printPen} />
      <Words x={left} y={base} size={10.5} weight={600} colour={sheetInk.ink}>
        {name}
      </Words>
      <Words x={titleAt} y={base} size={10.5} weight={400} colour={sheetInk.ink}>
        {clippedText(variant.title, box.x + box.width - titleAt, 10.5, 400)}
      </Words>
    </>
  )
}

/** Widths of the columns of a row of figures: as each needs, the rest shared out. */
function columnsOf(figures: readonly SheetFigure[], width: number, small: number, large: number): number[] {
  const needed = figures.map(({ name, lines }) =>
    Math.max(textWidth(name, small, 400), ...lines.map((line) => textWidth(line, large, 600))),
  )
  const spare = (width - needed.reduce((sum, one) => sum + one, 0)) / figures.length
  return needed.map((one) => one + spare)
}

function FigureRow({ box, figures }: { box: Box; figures: readonly SheetFigure[] }) {
  const widths = columnsOf(figures, box.width, 7.8, 9.2)
  const bottom = box.y + box.height - 2
  return (
    <>
      <line x1={box.x} x2={box.x + box.width} y1={box.y} y2={box.y} stroke={sheetInk.rule} strokeWidth={0.9} />
      <line x1={box.x} x2={box.x + box.width} y1={bottom} y2={bottom} stroke={sheetInk.rule} strokeWidth={0.9} />
      {figures.map((figure, i) => {
        const x = box.x + widths.slice(0, i).reduce((sum, one) => sum + one, 0) + (i === 0 ? 0 : 8)
        return (
          <g key={figure.name}>
            {i === 0 ? null : (
              <line x1={x - 8} x2={x - 8} y1={box.y} y2={bottom} stroke={sheetInk.rule} strokeWidth={0.9} />
            )}
            <Figure x={x} y={box.y + 13} figure={figure} small={7.8} large={9.2} />
          </g>
        )
      })}
    </>
  )
}

/** The figures one below the other; those that have no more room are left out from the end. */
function FigureColumn({ box, figures }: { box: Box; figures: readonly SheetFigure[] }) {
  const heights = figures.map(({ lines }) => 15 + lines.length * 10.5)
  const tops = heights.map((_, i) => heights.slice(0, i).reduce((sum, one) => sum + one, box.y))
  return (
    <>
      <line
        x1={box.x - 8}
        x2={box.x - 8}
        y1={box.y}
        y2={box.y + box.height - 8}
        stroke={sheetInk.rule}
        strokeWidth={0.9}
      />
      {figures.map((figure, i) => {
        const y = tops[i] ?? box.y
        const fits = y + (heights[i] ?? 0) <= box.y + box.height + 4
        return fits ? <Figure key={figure.name} x={box.x} y={y + 8} figure={figure} small={7.2} large={8.2} /> : null
      })}
    </>
  )
}

function Figure({
  x,
  y,
  figure,
  small,
  large,
}: {
  x: number
  y: number
  figure: SheetFigure
  small: number
  large: number
}) {
  return (
    <>
      <Words x={x} y={y} size={small} weight={400} colour={sheetInk.quiet}>
        {figure.name}
      </Words>
      {figure.lines.map((line, row) => (
        <Words
          key={line}
          x={x}
          y={y + large * 1.35 + row * large * 1.35}
          size={large}
          weight={600}
          colour={sheetInk.ink}
        >
          {line}
        </Words>
      ))}
    </>
  )
}
