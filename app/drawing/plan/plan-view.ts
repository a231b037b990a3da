import type { Site } from '#app/domain/site/site.ts'
import type { Vec2 } from '#app/domain/vector.ts'

/**
 * Where the site stands on the drawing: site (x, y) in m, y up, is at (x0 + scale x, y0 − scale y) in px, y down.
 * `scale` px per m; `width` and `height` are the drawing's size in px.
 */
export interface PlanView {
  readonly scale: number
  readonly x0: number
  readonly y0: number
  readonly width: number
  readonly height: number
}

/** Room around the floor for walls, names, dimensions and the scale bar, px. */
export interface PlanMargins {
  readonly top: number
  readonly right: number
  readonly bottom: number
  readonly left: number
}

/** Room for everything the working plan says around the floor. */
export const workingMargins: PlanMargins = { top: 60, right: 54, bottom: 104, left: 56 }

/** The rectangle around the floor, m. */
export interface Extent {
  readonly x: readonly [number, number]
  readonly y: readonly [number, number]
}

/** The rectangle around the floor's corners, m. */
export function extentOf(outline: readonly Vec2[]): Extent {
  const xs = outline.map((corner) => corner[0])
  const ys = outline.map((corner) => corner[1])
  return { x: [Math.min(...xs), Math.max(...xs)], y: [Math.min(...ys), Math.max(...ys)] }
}

/**
 * A view that shows the whole floor at one scale inside `width` and, where given, `height` px; without a height the
 * drawing is as high as the floor and its margins need. The floor stands in the middle of the room it has.
 */
export function planViewOf(
  site: Pick<Site, 'floor'>,
  width: number,
  height?: number,
  margins: PlanMargins = workingMargins,
): PlanView {
  const { x, y } = extentOf(site.floor)
  const across = Math.max(0.1, x[1] - x[0])
  const deep = Math.max(0.1, y[1] - y[0])
  const room = Math.max(1, width - margins.left - margins.right)
  const fit = room / across
  const scale = height === undefined ? fit : Math.min(fit, Math.max(1, height - margins.top - margins.bottom) / deep)
  const full = height ?? scale * deep + margins.top + margins.bottom
  const left = margins.left + (room - scale * across) / 2
  const top = margins.top + (full - margins.top - margins.bottom - scale * deep) / 2
  return { scale, x0: left - scale * x[0], y0: top + scale * y[1], width, height: full }
}

/** Site m → drawing px. */
export const toScreen = (view: PlanView, [x, y]: Vec2): Vec2 => [view.x0 + view.scale * x, view.y0 - view.scale * y]

/** Drawing px → site m. */
export const toSite = (view: PlanView, [x, y]: Vec2): Vec2 => [(x - view.x0) / view.scale, (view.y0 - y) / view.scale]

/** SVG transform from site m (y up) to drawing px; a stroke of w px is w / scale wide inside it. */
export const siteTransform = (view: PlanView): string =>
  `matrix(${view.scale} 0 0 ${-view.scale} ${view.x0} ${view.y0})`
