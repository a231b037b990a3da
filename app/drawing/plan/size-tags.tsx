import { isAssumed } from '#app/domain/site/size-source.ts'
import { listOf } from '#app/domain/site/edits.ts'
import type { Dimension, Site } from '#app/domain/site/site.ts'
import type { Vec2 } from '#app/domain/vector.ts'
import { floorDimension, toleratedText } from '#app/drawing/plan/dimension-text.ts'
import { isClear, patch, type Patch } from '#app/drawing/plan/occupied.ts'
import { extentOf, toScreen, type PlanView } from '#app/drawing/plan/plan-view.ts'
import type { Pen } from '#app/drawing/pen.ts'
import { clippedText, textWidth } from '#app/drawing/text/widths.ts'
import { Words } from '#app/drawing/text/words.tsx'

/** What a size says on the plan: its name, value ± tolerance and source; a told or guessed one says that it is assumed. */
export function sizeText(size: Dimension, units: Site['displayUnits']): string {
  const source = isAssumed(size) ? `${size.source}, assumed` : size.source
  return `${size.label} ${toleratedText(size, size.value, units)}, ${source}`
}

interface Tag {
  readonly id: string
  readonly text: string
  readonly x: number
  readonly y: number
  /** The point it is about, px; null for a size that decides nothing drawn. */
  readonly about: Vec2 | null
}

const most = 300
const patchOf = (x: number, y: number, text: string, pen: Pen): Patch =>
  patch(x + textWidth(text, pen.text, 500) / 2, y - pen.text * 0.35, textWidth(text, pen.text, 500) + 6, pen.text + 5)

/** Where each size's words stand: near what it decides, clear of each other, within the drawing. */
export function placeSizeTags(site: Site, view: PlanView, pen: Pen, all: boolean): Tag[] {
  const { x, y } = extentOf(site.floor)
  const onLine = new Set([floorDimension(site, 0, x[1] - x[0])?.id, floorDimension(site, 1, y[1] - y[0])?.id])
  const taken: Patch[] = []
  return site.dimensions
    .filter((size) => (all ? !onLine.has(size.id) || isAssumed(size) : isAssumed(size)))
    .flatMap((size, i): Tag[] => {
      const text = clippedText(sizeText(size, site.displayUnits), most * pen.k, pen.text, 500)
      const about = placeOf(site, size)
      const at = about && toScreen(view, about)
      const [left, top] = at ?? [16, 24 + 16 * i]
      const width = textWidth(text, pen.text, 500)
      const spots = Array.from({ length: 24 }, (_, k): Vec2 => {
        const down = k % 2 === 0 ? -9 - (k / 2) * (pen.text + 6) : 19 + ((k - 1) / 2) * (pen.text + 6)
        return [Math.max(6, Math.min(left + 10, view.width - width - 6)), Math.max(14, top + down * pen.k)]
      })
      const spot = spots.find(([sx, sy]) => isClear(patchOf(sx, sy, text, pen), taken, 1)) ?? spots[0]
      if (!spot) return []
      taken.push(patchOf(spot[0], spot[1], text, pen))
      return [{ id: size.id, text, x: spot[0], y: spot[1], about: at }]
    })
}

/** The middle of the first thing that a size decides, in plan; a corner's own place for the height of a corner. */
function placeOf(site: Site, { moves }: Dimension): Vec2 | null {
  const [first] = moves
  if (!first) return null
  const numbers = first.coordinate.split('.').map(Number)
  if (first.of === 'floor') return site.floor[numbers[0] ?? 0] ?? null
  const thing = site[listOf[first.of]].find(({ id }) => id === first.id)
  if (!thing) return null
  if ('corners' in thing) {
    const corner = thing.corners[numbers[1] ?? 0] ?? thing.corners[0]
    return corner ? [corner[0], corner[1]] : null
  }
  if ('from' in thing) return first.coordinate.startsWith('to') ? thing.to : middle([thing.from, thing.to])
  if ('at' in thing) return thing.at
  if ('centre' in thing) return thing.centre
  if ('shape' in thing) {
    const { shape } = thing
    if (shape.kind === 'cylinder') return shape.centre
    if (shape.kind === 'prism') return middle(shape.outline)
    return [(shape.x[0] + shape.x[1]) / 2, (shape.y[0] + shape.y[1]) / 2]
  }
  return [thing.x, thing.y]
}

const middle = (points: readonly Vec2[]): Vec2 => [
  points.reduce((sum, [x]) => sum + x, 0) / points.length,
  points.reduce((sum, [, y]) => sum + y, 0) / points.length,
]

/** A drawing narrower than this has no room for the assumed sizes one by one, px. */
const narrow = 560

/** Sizes on the plan with their tolerance and source: all of them, or those alone that nobody measured. */
export function SizeTags({ site, view, pen, all }: { site: Site; view: PlanView; pen: Pen; all: boolean }) {
  const look = { size: pen.text, colour: pen.colours.selection, halo: pen.colours.halo, haloWidth: 3.4 }
  const assumed = site.dimensions.filter(isAssumed).length
  if (!all && view.width < narrow * pen.k)
    return assumed === 0 ? null : (
      <Words x={10} y={18} {...look}>
        {`${assumed} ${assumed === 1 ? 'size' : 'sizes'} assumed`}
      </Words>
    )
  return (
    <g data-sizes={all ? 'all' : 'assumed'}>
      {placeSizeTags(site, view, pen, all).map(({ id, text, x, y, about }) => (
        <g key={id}>
          {about ? <circle cx={about[0]} cy={about[1]} r={2.2} fill={pen.colours.selection} /> : null}
          <Words x={x} y={y} {...look}>
            {text}
          </Words>
        </g>
      ))}
    </g>
  )
}
