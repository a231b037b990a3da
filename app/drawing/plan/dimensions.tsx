import type { MountedHeater } from '#app/domain/layout/layout.ts'
import type { Site } from '#app/domain/site/site.ts'
import type { ChainStop } from '#app/drawing/plan/chain-figures.ts'
import { DimensionChain } from '#app/drawing/plan/dimension-line.tsx'
import { dimensionText, floorDimension, toleratedText } from '#app/drawing/plan/dimension-text.ts'
import { patch, type Patch } from '#app/drawing/plan/occupied.ts'
import { extentOf, type PlanView } from '#app/drawing/plan/plan-view.ts'
import { wallCorners } from '#app/drawing/plan/wall.tsx'
import type { Pen } from '#app/drawing/pen.ts'
import { textWidth } from '#app/drawing/text/widths.ts'

/** Across a row heaters within this distance count as one row, m. */
const rowWidth = 0.15

/**
 * The row of heaters that a chain of spacings is drawn for, along x (0) or y (1): the one with a selected heater, else
 * the fullest, of equals the nearest to the chain (lowest y, highest x). Coordinates in rising order, without repeats.
 */
export function rowOf(heaters: readonly MountedHeater[], axis: 0 | 1, selected: ReadonlySet<string>): number[] {
  const along = (heater: MountedHeater) => (axis === 0 ? heater.x : heater.y)
  const across = (heater: MountedHeater) => (axis === 0 ? heater.y : -heater.x)
  const rows: MountedHeater[][] = []
  for (const heater of [...heaters].sort((a, b) => across(a) - across(b))) {
    const row = rows.at(-1)
    const first = row?.[0]
    if (row && first && across(heater) - across(first) <= rowWidth) row.push(heater)
    else rows.push([heater])
  }
  const chosen =
    rows.find((row) => row.some(({ id }) => selected.has(id))) ??
    rows.reduce<MountedHeater[]>((best, row) => (row.length > best.length ? row : best), [])
  const places = [...new Set(chosen.map((heater) => Math.round(along(heater) * 1000) / 1000))].sort((a, b) => a - b)
  return places.filter((place, i) => i === 0 || place - (places[i - 1] ?? 0) > 0.01)
}

/** Spacings along a row from edge to edge of the floor, and the floor's whole length and depth with their tolerance. */
export function PlanDimensions({
  site,
  heaters,
  selected,
  view,
  pen,
  overall = true,
  narrowEnds = 'beside',
  upright = true,
}: {
  site: Site
  heaters: readonly MountedHeater[]
  selected: ReadonlySet<string>
  view: PlanView
  pen: Pen
  /** Whether the floor's whole length and depth are drawn as well. */
  overall?: boolean
  /** What happens at the floor's edges where the figure has no room: it stands beside the chain, or both are left out. */
  narrowEnds?: 'beside' | 'left out'
  /** Whether the chain along y is drawn. */
  upright?: boolean
}) {
  const { x, y } = extentOf(site.floor)
  const below = lowestPx(site, view)
  const right = view.x0 + view.scale * x[1]
  const text = (metres: number) => dimensionText(metres, site.displayUnits)
  const onX = (metres: number): ChainStop => ({ px: view.x0 + view.scale * metres, metres })
  const onY = (metres: number): ChainStop => ({ px: view.y0 - view.scale * metres, metres })
  const chain = (axis: 0 | 1, ends: readonly [number, number]): number[] => {
    const stops = stopsOf(rowOf(heaters, axis, selected), ends)
    const hasRoom = (a = 0, b = 0) => textWidth(text(b - a), pen.text, 500) + 6 * pen.k <= (b - a) * view.scale
    if (narrowEnds === 'beside') return stops
    return stops.filter((_, i) => {
      if (i === 0) return hasRoom(stops[0], stops[1])
      return i < stops.length - 1 || hasRoom(stops[i - 1], stops[i])
    })
  }
  const stopsX = chain(0, x).map(onX)
  const stopsY = chain(1, y).map(onY).reverse()
  const hasChainX = heaters.length > 0 && stopsX.length > 1
  const hasChainY = heaters.length > 0 && stopsY.length > 1
  const isCrowded = stopsX.some(
    (stop, i) => i > 1 && i < stopsX.length - 1 && stop.px - (stopsX[i - 1]?.px ?? 0) < 34 * pen.k,
  )
  return (
    <g>
      {hasChainX ? (
        <DimensionChain
          direction="level"
          at={below + 17 * pen.k}
          stops={stopsX}
          length={view.width}
          {...{ text, pen }}
        />
      ) : null}
      {overall ? (
        <DimensionChain
          direction="level"
          at={below + (isCrowded ? 51 : hasChainX ? 38 : 17) * pen.k}
          stops={x.map(onX)}
          text={(metres) => wholeText(site, 0, metres)}
          pen={pen}
        />
      ) : null}
      {upright && hasChainY ? (
        <DimensionChain
          direction="upright"
          at={right + 19 * pen.k}
          stops={stopsY}
          length={view.height}
          {...{ text, pen }}
        />
      ) : null}
      {upright && overall ? (
        <DimensionChain
          direction="upright"
          at={right + (hasChainY ? 39 : 19) * pen.k}
          stops={y.map(onY).reverse()}
          text={(metres) => wholeText(site, 1, metres)}
          pen={pen}
        />
      ) : null}
    </g>
  )
}

/** The room that the floor's whole length and depth take on a plan without heaters, px: each line and its figure. */
export function takenByOverall(site: Site, view: PlanView, pen: Pen): Patch[] {
  const { x, y } = extentOf(site.floor)
  const [below, right] = [lowestPx(site, view) + 17 * pen.k, view.x0 + view.scale * x[1] + 19 * pen.k]
  const [across, deep] = [(x[1] - x[0]) * view.scale, (y[1] - y[0]) * view.scale]
  const [midX, midY] = [view.x0 + (view.scale * (x[0] + x[1])) / 2, view.y0 - (view.scale * (y[0] + y[1])) / 2]
  const figure = (axis: 0 | 1, metres: number) => textWidth(wholeText(site, axis, metres), pen.text, 500)
  const above = 4 * pen.k + pen.text * 0.35
  return [
    patch(midX, below, across, 4 * pen.k),
    patch(midX, below - above, figure(0, x[1] - x[0]), pen.text),
    patch(right, midY, 4 * pen.k, deep),
    patch(right - above, midY, pen.text, figure(1, y[1] - y[0])),
  ]
}

/** The whole length (0) or depth (1) of the floor, with its tolerance where a size is known. */
function wholeText(site: Site, axis: 0 | 1, metres: number): string {
  const dimension = floorDimension(site, axis, metres)
  return dimension ? toleratedText(dimension, metres, site.displayUnits) : dimensionText(metres, site.displayUnits)
}

/** Bottom of the floor and of the walls below it, px. */
function lowestPx(site: Site, view: PlanView): number {
  const floor = view.y0 - view.scale * extentOf(site.floor).y[0]
  return Math.max(floor, ...site.walls.flatMap((wall) => wallCorners(wall, view).map((corner) => corner[1])))
}

function stopsOf(row: readonly number[], [low, high]: readonly [number, number]): number[] {
  const inner = row.filter((place) => place > low + 0.01 && place < high - 0.01)
  return [low, ...inner, high]
}
