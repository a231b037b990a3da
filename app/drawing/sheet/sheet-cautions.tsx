import { sheetInk } from '#app/drawing/plot/plot-ink.ts'
import type { Box } from '#app/drawing/sheet/sheet-layout.ts'
import { wrapText } from '#app/drawing/text/widths.ts'
import { Words } from '#app/drawing/text/words.tsx'

/** Sizes the words may have, px: the largest at which all cautions fit is taken. */
const sizes = [8.8, 8.2, 7.6, 7]
const indent = 12
const between = 2.5
const lineHeightOf = (size: number): number => 1.386 * size

interface FittedCautions {
  readonly size: number
  readonly lines: string[][]
  /** How many are left out. */
  readonly left: number
}

/** The cautions that fit in a height, each as lines, in the largest words at which the fewest are left out. */
export function fitCautions(cautions: readonly string[], width: number, height: number): FittedCautions {
  const all = sizes.map((size) => fitAt(size, cautions, width, height))
  const fewest = Math.min(...all.map(({ left }) => left))
  return all.find(({ left }) => left === fewest) ?? { size: 7, lines: [], left: cautions.length }
}

function fitAt(size: number, cautions: readonly string[], width: number, height: number): FittedCautions {
  const lineHeight = lineHeightOf(size)
  const lines: string[][] = []
  let used = 0
  for (const caution of cautions) {
    const wrapped = wrapText(caution, width - indent, size, 400)
    const isLast = lines.length === cautions.length - 1
    const rest = isLast ? 0 : lineHeight
    if (used + wrapped.length * lineHeight + rest > height) break
    lines.push(wrapped)
    used += wrapped.length * lineHeight + between
  }
  return { size, lines, left: cautions.length - lines.length }
}

/** Numbered cautions; what has no room is counted, never silently dropped. */
export function SheetCautions({ box, cautions }: { box: Box; cautions: readonly string[] }) {
  const { size, lines, left } = fitCautions(cautions, box.width, box.height - 18)
  const lineHeight = lineHeightOf(size)
  const starts = lines.map((_, i) =>
    lines.slice(0, i).reduce((sum, one) => sum + one.length * lineHeight + between, box.y + 24),
  )
  const end = (starts.at(-1) ?? box.y + 24 - lineHeight) + (lines.at(-1)?.length ?? 1) * lineHeight + between
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
