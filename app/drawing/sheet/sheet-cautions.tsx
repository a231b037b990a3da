import { sheetInk } from '#app/drawing/plot/plot-ink.ts'
import type { Box } from '#app/drawing/sheet/sheet-layout.ts'
import { wrapText } from '#app/drawing/text/widths.ts'
import { Words } from '#app/drawing/text/words.tsx'

const size = 8.8
const lineHeight = 12.2
const indent = 12

/** The cautions that fit in a height, each as lines, and how many are left out. */
export function fitCautions(
  cautions: readonly string[],
  width: number,
  height: number,
): { lines: string[][]; left: number } {
  const lines: string[][] = []
  let used = 0
  for (const caution of cautions) {
    const wrapped = wrapText(caution, width - indent, size, 400)
    const isLast = lines.length === cautions.length - 1
    const rest = isLast ? 0 : lineHeight
    if (used + wrapped.length * lineHeight + rest > height) break
    lines.push(wrapped)
    used += wrapped.length * lineHeight + 2.5
  }
  return { lines, left: cautions.length - lines.length }
}

/** Numbered cautions; what has no room is counted, never silently dropped. */
export function SheetCautions({ box, cautions }: { box: Box; cautions: readonly string[] }) {
  const { lines, left } = fitCautions(cautions, box.width, box.height - 18)
  const starts = lines.map((_, i) =>
    lines.slice(0, i).reduce((sum, one) => sum + one.length * lineHeight + 2.5, box.y + 24),
  )
  const end = (starts.at(-1) ?? box.y + 24 - lineHeight) + (lines.at(-1)?.length ?? 1) * lineHeight + 2.5
  return (
    <g>
      <Words x={box.x} y={box.y + 9} size={10.2} weight={600} colour={sheetInk.ink}>
        Cautions
      </Words>
      {lines.map((caution, i) => (
        <g key={i}>
          <Words x={box.x} y={starts[i] ?? box.y} size={size} weight={400} colour={sheetInk.ink}>
            {`${i + 1}.`}
          </Words>
          {caution.map((line, row) => (
            <Words
              key={row}
              x={box.x + indent}
              y={(starts[i] ?? box.y) + row * lineHeight}
              size={size}
              weight={400}
              colour={sheetInk.ink}
            >
              {line}
            </Words>
          ))}
        </g>
      ))}
      {left > 0 ? (
        <Words x={box.x} y={end} size={size} weight={500} colour={sheetInk.ink}>
          {`And ${left} more: ask for the full list.`}
        </Words>
      ) : null}
    </g>
  )
}
