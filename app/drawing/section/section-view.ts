import type { Site } from '#app/domain/site/site.ts'
import type { Vec2, Vec3 } from '#app/domain/vector.ts'
import { alongDirection, cutLength, type SectionCut } from '#app/drawing/plan/section-cut.tsx'

/**
 * Where a section stands on its drawing: a point of the site is at x0 + scale × (its way along the cut from the left end)
 * and y0 − scale × z.
 */
export interface SectionView {
  readonly cut: SectionCut
  readonly scale: number
  readonly x0: number
  readonly y0: number
  readonly width: number
  readonly height: number
}

/** Room around the cut floor for heights, names and the ground, px; wider for feet and inches and for a sloping cover. */
function marginsOf(site: Site, cut: SectionCut) {
  const words = site.displayUnits === 'metric' ? 66 : 92
  const slopes = site.covers.some(({ corners }) =>
    corners.some((a) =>
      corners.some((b) => Math.abs(alongCut(cut, a) - alongCut(cut, b)) > 0.01 && Math.abs(a[2] - b[2]) > 0.005),
    ),
  )
  return { top: 26, right: words + (slopes ? 22 : 0), bottom: 12, left: 52 }
}

/** How far a point lies along the cut from its left end, m; seen square to the cut. */
export const alongCut = (cut: SectionCut, point: readonly number[]): number =>
  alongDirectionOf(cut, [(point[0] ?? 0) - cut.from[0], (point[1] ?? 0) - cut.from[1]])

/** How far a direction goes along the cut for each of its units. */
export function alongDirectionOf(cut: SectionCut, direction: readonly number[]): number {
  const [ux, uy] = alongDirection(cut)
  return (direction[0] ?? 0) * ux + (direction[1] ?? 0) * uy
}

/** How far a point lies behind the cut in the direction of view, m; negative in front of it. */
export function behindCut(cut: SectionCut, point: readonly number[]): number {
  const [ux, uy] = alongDirection(cut)
  return ((point[1] ?? 0) - cut.from[1]) * ux - ((point[0] ?? 0) - cut.from[0]) * uy
}

/** The point of the cut at a place along it, m in plan. */
export function pointOfCut(cut: SectionCut, along: number): Vec2 {
  const [ux, uy] = alongDirection(cut)
  return [cut.from[0] + along * ux, cut.from[1] + along * uy]
}

/** From the left end to the right end, m along the cut. */
export const cutExtent = (cut: SectionCut): readonly [number, number] => [0, cutLength(cut)]

/** Whether a place along the cut lies between its ends, or no farther than `beyond` outside them, m. */
export const isBetweenEnds = (cut: SectionCut, along: number, beyond = 0): boolean =>
  along >= -beyond && along <= cutLength(cut) + beyond

/** Highest thing that a section must show, m: covers, walls, poles and heaters. */
export function topOf(site: Site, heaterTops: readonly number[]): number {
  const covers = site.covers.flatMap(({ corners }) => corners.map((corner) => corner[2]))
  const walls = site.walls.flatMap(({ top }) => (top === null ? [] : [top]))
  return Math.max(2.4, ...covers, ...walls, ...site.poles.map(({ top }) => top), ...heaterTops)
}

/**
 * A view of a section in `width` and, where given, `height` px at one scale for both directions; `scale` fixes it, so
 * that two sections beside each other stand at the same one.
 */
export function sectionViewOf(
  site: Site,
  cut: SectionCut,
  room: { width: number; height?: number; scale?: number; top?: number },
): SectionView {
  const [low, high] = cutExtent(cut)
  const top = (room.top ?? topOf(site, [])) + 0.12
  const margins = marginsOf(site, cut)
  const inner = room.width - margins.left - margins.right
  const byWidth = inner / Math.max(0.1, high - low)
  const byHeight = room.height === undefined ? Infinity : (room.height - margins.top - margins.bottom) / top
  const scale = room.scale ?? Math.max(1, Math.min(byWidth, byHeight))
  const spare = Math.max(0, (inner - scale * (high - low)) / 2)
  const start = margins.left + spare
  const height = room.height ?? scale * top + margins.top + margins.bottom
  return { cut, scale, x0: start, y0: height - margins.bottom, width: room.width, height }
}

/** The scale at which sections of given rooms all fit, px per m. */
export const commonScale = (views: readonly SectionView[]): number => Math.min(...views.map(({ scale }) => scale))

/** A place along the section and a height, m, on its drawing, px. */
export const onSection = (view: SectionView, along: number, z: number): Vec2 => [
  view.x0 + view.scale * along,
  view.y0 - view.scale * z,
]

/** A point of the site projected onto the section's drawing, px. */
export const projected = (view: SectionView, point: Vec3): Vec2 => onSection(view, alongCut(view.cut, point), point[2])

/** SVG transform from the section's metres (along, z up) to its drawing. */
export const sectionTransform = (view: SectionView): string =>
  `matrix(${view.scale} 0 0 ${-view.scale} ${view.x0} ${view.y0})`
