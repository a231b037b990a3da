import { Legend } from '#app/drawing/heat/legend.tsx'
import { printPen } from '#app/drawing/pen.ts'
import { markOf } from '#app/drawing/plot/variant-mark.tsx'
import { ReadingKey } from '#app/drawing/sheet/reading-key.tsx'
import { SheetCautions } from '#app/drawing/sheet/sheet-cautions.tsx'
import { sheetLayoutOf, sheetSize, type Box } from '#app/drawing/sheet/sheet-layout.ts'
import { sheetScale, type ComparisonSheetProps } from '#app/drawing/sheet/sheet-facts.ts'
import { SheetPlot } from '#app/drawing/sheet/sheet-plot.tsx'
import { sheetSubtitle } from '#app/drawing/sheet/sheet-words.ts'
import { TitleStrip } from '#app/drawing/sheet/title-strip.tsx'
import { VariantBlock } from '#app/drawing/sheet/variant-block.tsx'
import { sheetInk } from '#app/drawing/plot/plot-ink.ts'
import { fontFamily } from '#app/drawing/theme.ts'
import { clippedText } from '#app/drawing/text/widths.ts'
import { Words } from '#app/drawing/text/words.tsx'

/** The customer's comparison sheet, A4 landscape, in daylight. */
export function ComparisonSheet(props: ComparisonSheetProps) {
  const { site, brief, variants } = props
  const layout = sheetLayoutOf(site, variants.length)
  const quantity = sheetScale(brief)
  const { width, height } = sheetSize
  return (
    <svg
      xmlns="http://www.w3.org/2000/svg"
      width={width}
      height={height}
      viewBox={`0 0 ${width} ${height}`}
      role="img"
      aria-label={`Comparison of variants ${variants.map(({ number }) => number).join(', ')} of ${site.name}`}
      fontFamily={fontFamily}
    >
      <rect width={width} height={height} fill={sheetInk.paper} />
      <SheetHeader box={layout.header} legend={layout.legend} {...props} />
      {variants.map((variant, i) => {
        const box = layout.variants[i]
        return box ? (
          <VariantBlock
            key={variant.number}
            {...{ variant, box, site, brief, quantity }}
            models={props.models}
            mark={markOf(i)}
            tight={variants.length > 2}
          />
        ) : null
      })}
      <SheetPlot box={layout.plot} site={site} brief={brief} variants={variants} />
      <SheetCautions box={layout.cautions} cautions={props.cautions} />
      <ReadingKey box={layout.key} site={site} variants={variants} />
      <TitleStrip
        box={layout.strip}
        denominator={layout.denominator}
        scale={layout.variants[0]?.view.scale ?? 1}
        {...props}
      />
    </svg>
  )
}

function SheetHeader({
  box,
  legend,
  site,
  brief,
  variants,
  planeHeight,
}: ComparisonSheetProps & { box: Box; legend: Box }) {
  const room = legend.x - box.x - 30
  const height =
    site.displayUnits === 'metric' ? `${planeHeight.toFixed(2)} m` : `${Math.round(planeHeight / 0.0254)} in`
  return (
    <>
      <Words x={box.x} y={box.y + 19} size={20.5} weight={600} colour={sheetInk.ink}>
        {clippedText(site.name, room, 20.5, 600)}
      </Words>
      <Words x={box.x} y={box.y + 39} size={11.5} weight={400} colour={sheetInk.quiet}>
        {clippedText(sheetSubtitle(brief, site.displayUnits, variants.length), room, 11.5, 400)}
      </Words>
      <Legend
        name="sheet-legend"
        quantity={sheetScale(brief)}
        pen={printPen}
        x={legend.x}
        y={legend.y}
        width={legend.width}
        ink={sheetInk.ink}
      />
      <Words x={box.x + box.width} y={legend.y + 32} anchor="end" size={8.6} weight={400} colour={sheetInk.quiet}>
        {`Irradiance at body height ${height}, W/m²`}
      </Words>
    </>
  )
}
