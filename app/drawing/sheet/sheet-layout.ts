import { extentOf, type PlanMargins, type PlanView } from '#app/drawing/plan/plan-view.ts'
import { wallBand } from '#app/drawing/plan/wall.tsx'
import type { Site } from '#app/domain/site/site.ts'

/** A rectangle on the sheet, px at 96 to the inch. */
export interface Box {
  readonly x: number
  readonly y: number
  readonly width: number
  readonly height: number
}

/** px per mm on paper. */
export const perMillimetre = 96 / 25.4

/** A4, landscape. */
export const sheetSize = { width: 297 * perMillimetre, height: 210 * perMillimetre }

const margin = { top: 8 * perMillimetre, side: 10 * perMillimetre, bottom: 7 * perMillimetre }
const strip = 15 * perMillimetre
const header = 62
const gutter = 21

/** Scales a sheet may have, the largest that fits is taken: 1 : n. */
const scales = [100, 125, 150, 200, 250, 300, 400, 500, 750, 1000]

/** Room of one variant on the sheet: its heading, its plan and its figures. */
export interface VariantBox {
  readonly heading: Box
  readonly plan: Box
  /** The plan's view in its own px; add the plan's x and y for the sheet's. */
  readonly view: PlanView
  readonly figures: Box
}

/** Where everything stands on a sheet of two to four variants. */
export interface SheetLayout {
  /** All plans stand at 1 : denominator. */
  readonly denominator: number
  readonly header: Box
  /** The legend's bar. */
  readonly legend: Box
  readonly variants: readonly VariantBox[]
  readonly plot: Box
  readonly cautions: Box
  readonly key: Box
  readonly strip: Box
}

const headingHeight = 25
/** Figures stand below a plan on a sheet of two, beside it on a sheet of three or four. */
const figuresBelow = 54
const figuresBeside = 160

/** Room around the floor on a sheet's plan: what lies beyond above it, the wall and the spacings below. */
function marginsAt(site: Site, scale: number, isTight: boolean): PlanMargins {
  const above = site.beyond.length > 0 ? (isTight ? 20 : 24) : 12
  const wall = site.walls.length > 0 ? wallBand * scale : 0
  return { top: above, right: 6.5, bottom: wall + (isTight ? 24 : 29), left: 6.5 }
}

/** The largest of the scales at which a plan and its margins have no more than the room, 1 : n. */
function denominatorFor(site: Site, width: number, height: number, isTight: boolean): number {
  const { x, y } = extentOf(site.floor)
  const fits = (n: number): boolean => {
    const scale = pxPerMetre(n)
    const around = marginsAt(site, scale, isTight)
    const isNarrow = (x[1] - x[0]) * scale + around.left + around.right <= width + 0.5
    return isNarrow && (y[1] - y[0]) * scale + around.top + around.bottom <= height
  }
  return scales.find(fits) ?? 1000
}

const pxPerMetre = (denominator: number): number => (1000 * perMillimetre) / denominator

/** Layout of the sheet: plans at one scale, 1 : 100 when they fit, two beside each other. */
export function sheetLayoutOf(site: Site, count: number): SheetLayout {
  const inner = sheetSize.width - 2 * margin.side
  const top = margin.top + header
  const stripTop = sheetSize.height - margin.bottom - strip
  const column = (inner - gutter) / 2
  const isTight = count > 2
  const rows = isTight ? 2 : 1
  const least = isTight ? 182 : 218
  const fixed = headingHeight + (isTight ? 4 : figuresBelow + 8)
  const room = (stripTop - top - least) / rows - fixed
  const denominator = denominatorFor(site, isTight ? column - figuresBeside : column, room, isTight)
  const view = sheetView(site, denominator, column, isTight)
  const block = fixed + view.height
  const variants = Array.from({ length: count }, (_, i) => {
    const left = margin.side + (i % 2) * (column + gutter)
    return variantBox(left, top + Math.floor(i / 2) * block, column, view, isTight)
  })
  const lower = top + rows * block + 10
  const lowerHeight = stripTop - 16 - lower
  const isThree = count === 3
  const plotWidth = isThree ? inner : 614
  const notes = isThree
    ? { x: margin.side + column + gutter, y: top + block, width: column, height: block - 6 }
    : { x: margin.side + plotWidth + 22, y: lower, width: inner - plotWidth - 22, height: lowerHeight }
  const keyWidth = 139
  return {
    denominator,
    header: { x: margin.side, y: margin.top, width: inner, height: header },
    legend: { x: margin.side + inner - 366, y: margin.top + 17, width: 354, height: 8.1 },
    variants,
    plot: { x: margin.side, y: lower, width: plotWidth, height: Math.min(lowerHeight, 330) },
    cautions: { ...notes, width: notes.width - keyWidth - 20 },
    key: { ...notes, x: notes.x + notes.width - keyWidth, width: keyWidth },
    strip: { x: margin.side, y: stripTop, width: inner, height: strip },
  }
}

/** The view of every plan on the sheet: in the middle of its column, or at its left where figures stand beside it. */
function sheetView(site: Site, denominator: number, column: number, isTight: boolean): PlanView {
  const { x, y } = extentOf(site.floor)
  const scale = pxPerMetre(denominator)
  const around = marginsAt(site, scale, isTight)
  const width = isTight ? column - figuresBeside : column
  return {
    scale,
    width,
    height: (y[1] - y[0]) * scale + around.top + around.bottom,
    x0: (width - scale * (x[1] - x[0])) / 2 - scale * x[0],
    y0: around.top + scale * y[1],
  }
}

function variantBox(x: number, y: number, column: number, view: PlanView, isTight: boolean): VariantBox {
  const plan = { x, y: y + headingHeight, width: view.width, height: view.height }
  const below = { x, y: plan.y + plan.height, width: column, height: figuresBelow }
  const beside = { x: x + view.width + 12, y: plan.y + 6, width: figuresBeside - 12, height: view.height - 6 }
  return { heading: { x, y, width: column, height: headingHeight }, plan, view, figures: isTight ? beside : below }
}
