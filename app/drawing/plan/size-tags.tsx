import { isAssumed } from '#app/domain/site/size-source.ts'
import { listOf } from '#app/domain/site/edits.ts'
import type { Dimension, Site } from '#app/domain/site/site.ts'
import type { Vec2 } from '#app/domain/vector.ts'
import { floorDimension, toleratedText } from '#app/drawing/plan/dimension-text.ts'
import { isClear, patch, type Patch } from '#app/drawing/plan/occupied.ts'
import { extentOf, toScreen, type PlanView } from '#app/drawing/plan/plan-view.ts'
import type { Pen } from '#app/drawing/pen.ts'
import { takenByWords } from '#app/drawing/plan/taken.ts'
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

const most = 340
/** More sizes than these keep clear of each other alone: there is no room left, and looking for it takes long. */
const mostKeptClear = 60

/** The size in words of at most a width: its name is cut, its figure and source never. */
function fittingText(size: Dimension, units: Site['displayUnits'], pen: Pen): string {
  const rest = textWidth(sizeText({ ...size, label: '' }, units), pen.text, 500)
  const label = clippedText(size.label, Math.max(40, most - rest) * pen.k, pen.text, 500)
  return sizeText({ ...size, label }, units)
}

const patchOf = ([x, y]: Vec2, width: number, pen: Pen): Patch =>
  patch(x + width / 2, y - pen.text * 0.35, width + 6, pen.text + 4)

/** Places for words of a width about a point, the nearest first: to its right, its left and over it, line by line. */
function spotsAround([left, top]: Vec2, width: number, view: PlanView, pen: Pen): Vec2[] {
  const line = pen.text + 6
  const lines = Array.from({ length: 15 }, (_, k) => (k % 2 === 0 ? -1 : 1) * Math.ceil(k / 2) * line)
  return lines.flatMap((down) =>
    [left + 9, left - width - 9, left - width / 2].map((x): Vec2 => {
      const y = top + down + pen.text * 0.35
      return [Math.max(6, Math.min(x, view.width - width - 6)), Math.max(pen.text + 3, Math.min(y, view.height - 6))]
    }),
  )
}

/**
 * Where each size's words stand: near what it decides, clear of each other and, where there is room, of all else that
 * the plan says and of `beside`. What a size decides outside the drawing is not told of.
 */
export function placeSizeTags(
  site: Site,
  view: PlanView,
  pen: Pen,
  all: boolean,
  beside: readonly Patch[] = [],
): Tag[] {
  const { x, y } = extentOf(site.floor)
  const onLine = new Set([floorDimension(site, 0, x[1] - x[0])?.id, floorDimension(site, 1, y[1] - y[0])?.id])
  const sizes = site.dimensions.flatMap((size) => {
    const place = placeOf(site, size)
    const about = place && toScreen(view, place)
    const told = isAssumed(size) || (all && !onLine.has(size.id))
    return told && (!about || isWithin(about, view)) ? [{ size, about }] : []
  })
  const few = sizes.length > 0 && sizes.length <= mostKeptClear
  const said = few ? [...takenByWords(site, view, pen), ...beside] : beside
  const taken: Patch[] = []
  return sizes.flatMap(({ size, about }, i): Tag[] => {
    const text = fittingText(size, site.displayUnits, pen)
    const width = textWidth(text, pen.text, 500)
    const spots = spotsAround(about ?? [7, 18 + 16 * i], width, view, pen)
    const clear = (spot: Vec2, others: readonly Patch[]) => isClear(patchOf(spot, width, pen), others, 1)
    const spot =
      spots.find((one) => clear(one, taken) && clear(one, said)) ?? spots.find((one) => clear(one, taken)) ?? spots[0]
    if (!spot) return []
    taken.push(patchOf(spot, width, pen))
    return [{ id: size.id, text, x: spot[0], y: spot[1], about }]
  })
}

const isWithin = ([x, y]: Vec2, { width, height }: PlanView): boolean => x >= 0 && x <= width && y >= 0 && y <= height

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

interface SizeTagsProps {
  readonly site: Site
  readonly view: PlanView
  readonly pen: Pen
  readonly all: boolean
  /** Room that something else takes over the drawing, px. */
  readonly beside?: readonly Patch[]
}

const noPatches: readonly Patch[] = []

/** Sizes on the plan with their tolerance and source: all of them, or those alone that nobody measured. */
export function SizeTags({ site, view, pen, all, beside = noPatches }: SizeTagsProps) {
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
      {placeSizeTags(site, view, pen, all, beside).map(({ id, text, x, y, about }) => (
        <g key={id}>
          {about ? <Leader about={about} at={[x, y]} width={textWidth(text, pen.text, 500)} pen={pen} /> : null}
          <Words x={x} y={y} {...look}>
            {text}
          </Words>
        </g>
      ))}
    </g>
  )
}

/** The point that words are about, and a line to them where they stand farther off. */
function Leader({ about: [px, py], at: [x, y], width, pen }: { about: Vec2; at: Vec2; width: number; pen: Pen }) {
  const middle = y - pen.text * 0.35
  const end = Math.min(x + width, Math.max(x, px))
  const [edge, far] = [middle + Math.sign(py - middle) * pen.text * 0.6, Math.hypot(end - px, middle - py)]
  return (
    <>
      <circle cx={px} cy={py} r={2.2} fill={pen.colours.selection} />
      {far > 1.2 * pen.text ? (
        <line x1={px} y1={py} x2={end} y2={edge} stroke={pen.colours.selection} strokeWidth={0.7} opacity={0.7} />
      ) : null}
    </>
  )
}
