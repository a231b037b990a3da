import { isInside } from '#app/domain/site/geometry.ts'
import type { Vec2 } from '#app/domain/vector.ts'
import type { HeatPicture } from '#app/drawing/heat/contours.ts'
import type { QuantityScale } from '#app/drawing/heat/quantity.ts'
import { isClear, meets, patch, type Patch } from '#app/drawing/plan/occupied.ts'
import { toScreen, toSite, type PlanView } from '#app/drawing/plan/plan-view.ts'
import type { Pen } from '#app/drawing/pen.ts'
import { textWidth } from '#app/drawing/text/widths.ts'
import { Words } from '#app/drawing/text/words.tsx'

/** A figure on an isoline: its middle, px, and its turn, degrees clockwise. */
export interface LineLabel {
  readonly level: number
  readonly text: string
  readonly x: number
  readonly y: number
  readonly turnDeg: number
}

/** Figures stay this far from everything else on the plan, px; at most three a level, and apart from each other. */
const clear = 9
const mostPerLevel = 3
const apart = 150
/** A line that turns more than this under its figure carries none, degrees. */
const mostBend = 80

/**
 * Places the isolines' figures: on the line, turned with it, where it is straightest and clear of everything else, all
 * inside the floor; what has no clear place is left out. The target's edges are placed first.
 */
export function placeLineLabels(
  picture: HeatPicture,
  quantity: QuantityScale,
  outline: readonly Vec2[],
  view: PlanView,
  pen: Pen,
  occupied: readonly Patch[],
): LineLabel[] {
  const taken = [...occupied]
  const isHeavy = (level: number) => (quantity.heavy.includes(level) ? 0 : 1)
  return [...picture.lines]
    .filter((line) => quantity.labelled.includes(line.level))
    .sort((a, b) => isHeavy(a.level) - isHeavy(b.level) || a.level - b.level)
    .flatMap((line) => {
      const text = quantity.format(line.level)
      const chosen: LineLabel[] = []
      for (const place of line.labels) {
        if (chosen.length === mostPerLevel || place.bend > mostBend) break
        const [x, y] = toScreen(view, [place.x, place.y])
        const box = patch(x, y, textWidth(text, pen.lineText, 600), pen.lineText * 0.75, -place.angleDeg)
        if (chosen.some((other) => Math.hypot(other.x - x, other.y - y) < apart * pen.k)) continue
        if (!isClear(box, taken, clear * pen.k) || !isWithin(box, outline, view)) continue
        chosen.push({ level: line.level, text, x, y, turnDeg: -place.angleDeg })
        taken.push(box)
      }
      return chosen
    })
}

function isWithin(box: Patch, outline: readonly Vec2[], view: PlanView): boolean {
  const turn = (box.turnDeg * Math.PI) / 180
  return [-1, 1].every((u) =>
    [-1, 1].every((v) => {
      const [a, b] = [u * (box.halfWidth + 2), v * (box.halfHeight + 2)]
      const corner: Vec2 = [
        box.x + a * Math.cos(turn) - b * Math.sin(turn),
        box.y + a * Math.sin(turn) + b * Math.cos(turn),
      ]
      return isInside(outline, ...toSite(view, corner))
    }),
  )
}

/** The isolines' figures with a halo. */
export function LineLabels({
  labels,
  quantity,
  pen,
}: {
  labels: readonly LineLabel[]
  quantity: QuantityScale
  pen: Pen
}) {
  return (
    <g>
      {labels.map((label) => (
        <Words
          key={`${label.level} ${label.x} ${label.y}`}
          x={label.x}
          y={label.y}
          turn={label.turnDeg}
          centred
          anchor="middle"
          size={pen.lineText}
          weight={quantity.heavy.includes(label.level) ? 600 : 500}
          colour={pen.colours.isoline}
          halo={pen.colours.isolineHalo}
          haloWidth={pen.lineText * 0.34}
          haloOpacity={pen.theme === 'dusk' ? 0.72 : 1}
        >
          {label.text}
        </Words>
      ))}
    </g>
  )
}

/** Figures of the highest points above the scale's end: on the floor, beside the point where there is room. */
export function placePeaks(
  picture: HeatPicture,
  quantity: QuantityScale,
  outline: readonly Vec2[],
  view: PlanView,
  pen: Pen,
  occupied: readonly Patch[],
) {
  const taken = [...occupied]
  if (!quantity.writesPeaks) return []
  return picture.peaks.flatMap((peak) => {
    const text = quantity.format(peak.value)
    const [cx, cy] = toScreen(view, [peak.x, peak.y])
    const width = textWidth(text, pen.text, 600)
    for (const reach of [0, 14, 20, 27, 35, 44]) {
      for (const turn of [0, 180, 90, 270, 45, 135, 225, 315]) {
        const x = cx + reach * 1.5 * pen.k * Math.cos((turn * Math.PI) / 180)
        const y = cy + reach * pen.k * Math.sin((turn * Math.PI) / 180)
        const box = patch(x, y, width, pen.text)
        if (!isWithin(box, outline, view) || taken.some((other) => meets(box, other, 3 * pen.k))) continue
        taken.push(box)
        return [{ text, x, y }]
      }
    }
    return []
  })
}
