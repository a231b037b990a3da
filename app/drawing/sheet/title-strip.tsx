import { printPen } from '#app/drawing/pen.ts'
import { ScaleBar } from '#app/drawing/plan/scale-bar.tsx'
import { sheetInk } from '#app/drawing/plot/plot-ink.ts'
import type { ComparisonSheetProps } from '#app/drawing/sheet/sheet-facts.ts'
import { PrintedMark } from '#app/drawing/sheet/mark.tsx'
import type { Box } from '#app/drawing/sheet/sheet-layout.ts'
import { listText } from '#app/drawing/sheet/sheet-words.ts'
import { textWidth, wrapText } from '#app/drawing/text/widths.ts'
import { Words } from '#app/drawing/text/words.tsx'

const large = 9.2
const small = 7.8

interface Cell {
  readonly name: string
  readonly lines: readonly string[]
}

/** A cell's words in at most two lines; what is longer ends in an ellipsis. */
function cell(name: string, text: string, width: number): Cell {
  const lines = wrapText(text, width, large, 600)
  return { name, lines: lines.length > 2 ? [lines[0] ?? '', `${lines[1]}…`] : lines }
}

/** The title strip: job, sheet, scale, what the picture is, who drew it and when, whether it is checked, versions. */
export function TitleStrip({
  box,
  denominator,
  scale,
  site,
  variants,
  organisation,
  date,
  checked = null,
}: ComparisonSheetProps & { box: Box; denominator: number; scale: number }) {
  const numbers = listText(variants.map(({ number }) => String(number)))
  const versions = listText(variants.map(({ number, revision }) => `${number}.${revision}`))
  const barAt = box.x + 322
  const cells: { x: number; cell: Cell }[] = [
    { x: box.x + 118, cell: cell('Job', site.name.split(',')[0] ?? site.name, 88) },
    { x: box.x + 222, cell: cell('Sheet', `Variants ${numbers}`, 80) },
    { x: box.x + 556, cell: cell('Picture', 'Calculated, not a thermal photograph', 104) },
    { x: box.x + 676, cell: cell('Drawn', organisation, 138) },
    { x: box.x + 826, cell: cell('Checked', checked ?? 'Not yet checked', 92) },
    { x: box.x + 930, cell: cell('Version', versions, 116) },
  ]
  return (
    <g>
      {[box.y, box.y + box.height].map((y) => (
        <line key={y} x1={box.x} x2={box.x + box.width} y1={y} y2={y} stroke={sheetInk.ink} strokeWidth={1.2} />
      ))}
      <PrintedMark x={box.x} y={box.y + 13} size={28} ink={sheetInk.ink} ember={sheetInk.ember} />
      <Words x={box.x + 34} y={box.y + 32} size={14} weight={600} colour={sheetInk.ink}>
        Inglefield
      </Words>
      {[...cells.map(({ x }) => x), barAt].map((x) => (
        <line
          key={x}
          x1={x - 9}
          x2={x - 9}
          y1={box.y}
          y2={box.y + box.height}
          stroke={sheetInk.rule}
          strokeWidth={0.9}
        />
      ))}
      {cells.map(({ x, cell: { name, lines } }) => (
        <g key={name}>
          <Words x={x} y={box.y + 14} size={small} weight={400} colour={sheetInk.quiet}>
            {name}
          </Words>
          {(name === 'Drawn' ? [...lines.slice(0, 1), date] : lines).map((line, i) => (
            <Words key={line} x={x} y={box.y + 28 + i * 12.5} size={large} weight={600} colour={sheetInk.ink}>
              {line}
            </Words>
          ))}
        </g>
      ))}
      <ScaleCell x={barAt} {...{ box, denominator, scale }} displayUnits={site.displayUnits} />
    </g>
  )
}

function ScaleCell({
  x,
  box,
  denominator,
  scale,
  displayUnits,
}: {
  x: number
  box: Box
  denominator: number
  scale: number
  displayUnits: 'metric' | 'imperial'
}) {
  const text = `1 : ${denominator} on A4, dimensions in ${displayUnits === 'metric' ? 'm' : 'feet and inches'}`
  return (
    <>
      <Words x={x} y={box.y + 14} size={small} weight={400} colour={sheetInk.quiet}>
        {text}
      </Words>
      <ScaleBar
        x={x + textWidth('0', printPen.text, 500)}
        y={box.y + 29}
        anchor="left"
        most={206}
        parts={5}
        {...{ scale, displayUnits }}
        pen={printPen}
      />
    </>
  )
}
