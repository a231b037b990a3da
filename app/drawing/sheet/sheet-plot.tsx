import type { Brief } from '#app/domain/brief/brief.ts'
import type { Site } from '#app/domain/site/site.ts'
import { printPen } from '#app/drawing/pen.ts'
import { plotSeats } from '#app/drawing/plot/seat-groups.ts'
import { sheetInk } from '#app/drawing/plot/plot-ink.ts'
import { SeatPlot, type PlotSeries } from '#app/drawing/plot/seat-plot.tsx'
import { markOf, VariantMark } from '#app/drawing/plot/variant-mark.tsx'
import type { SheetVariant } from '#app/drawing/sheet/sheet-facts.ts'
import type { Box } from '#app/drawing/sheet/sheet-layout.ts'
import { clippedText, textWidth } from '#app/drawing/text/widths.ts'
import { Words } from '#app/drawing/text/words.tsx'

/** Above this many seats a row of strokes would be a smear: the plot is drawn without the words. */
const mostWorded = 60

const heatedSeats = ({ seats }: Site) => seats.filter(({ priority }) => priority !== 'not heated')

/** Whether the plot has rows of discs that say how each seat feels. */
export const hasWarmthRows = (site: Site): boolean => heatedSeats(site).length <= mostWorded

/** Seat by seat: the irradiance of each variant at every seat that is to be heated, and its warmth in strokes below. */
export function SheetPlot({
  box,
  site,
  brief,
  variants,
}: {
  box: Box
  site: Site
  brief: Brief
  variants: readonly SheetVariant[]
}) {
  const seats = plotSeats(heatedSeats(site))
  const series = variants.map((variant, i): PlotSeries => {
    const bySeat = new Map(variant.warmth.map((one) => [one.seat.id, one]))
    const at = seats.map(({ id }) => bySeat.get(id))
    const words = at.map((one) => one?.sensation.calm.after?.word ?? null)
    return {
      mark: markOf(i),
      label: variant.title,
      values: at.map((one) => one?.body ?? null),
      ...(hasWarmthRows(site) ? { words } : {}),
    }
  })
  return (
    <g>
      <Words x={box.x} y={box.y + 9} size={10.2} weight={600} colour={sheetInk.ink}>
        Seat by seat, W/m²
      </Words>
      <Marks box={box} variants={variants} />
      <SeatPlot
        name="sheet-plot"
        {...{ seats, series }}
        target={brief.target}
        pen={{ ...printPen, text: 8 }}
        ink={sheetInk}
        x={box.x}
        y={box.y + 20}
        width={box.width}
        height={box.height - 20}
      />
    </g>
  )
}

function Marks({ box, variants }: { box: Box; variants: readonly SheetVariant[] }) {
  const room = (box.width - 130) / variants.length - 26
  const texts = variants.map(({ number, title }) => clippedText(`${number} ${title}`, room, 9.2, 400))
  return texts.map((text, i) => {
    const before = texts.slice(0, i).reduce((sum, one) => sum + textWidth(one, 9.2, 400) + 26, 0)
    const x = box.x + 122 + before
    return (
      <g key={text}>
        <VariantMark kind={markOf(i)} x={x} y={box.y + 5.4} r={4.6} pen={printPen} />
        <Words x={x + 10} y={box.y + 9} size={9.2} weight={400} colour={sheetInk.ink}>
          {text}
        </Words>
      </g>
    )
  })
}
