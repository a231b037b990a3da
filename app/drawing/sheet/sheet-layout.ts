import { extentOf, planViewOf, type PlanMargins, type PlanView } from '#app/drawing/plan/plan-view.ts'
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
const figuresHeight = { roomy: 54, tight: 34 }

/** Room around the floor on a sheet's plan: what lies beyond above it, the wall and the spacings below. */
function marginsAt(site: Site, scale: number): PlanMargins {
  const hasBeyond = site.beyond.length > 0
  const hasWall = site.walls.length > 0
  return { top: hasBeyond ? 24 : 12, right: 6.5, bottom: (hasWall ? wallBand * scale : 0) + 29, left: 6.5 }
}

/** Layout of the sheet: plans at one scale, 1 : 100 when they fit, two beside each other. */
export function sheetLayoutOf(site: Site, count: number): SheetLayout {
  const inner = sheetSize.width - 2 * margin.side
  const top = margin.top + header
  const stripTop = sheetSize.height - margin.bottom - strip
  const column = (inner - gutter) / 2
  const rows = Math.max(1, Math.ceil(count / 2))
  const figures = rows === 1 ? figuresHeight.roomy : figuresHeight.tight
  const least = rows === 1 ? 226 : 168
  const room = (stripTop - top - least) / rows - headingHeight - figures - 8
  const { x, y } = extentOf(site.floor)
  const pxPerMetre = (n: number) => (1000 * perMillimetre) / n
  const fits = (n: number): boolean => {
    const scale = pxPerMetre(n)
    const around = marginsAt(site, scale)
    const isWide = (x[1] - x[0]) * scale + around.left + around.right <= column + 0.5
    return isWide && (y[1] - y[0]) * scale + around.top + around.bottom <= room
  }
  const denominator = scales.find(fits) ?? 1000
  const scale = pxPerMetre(denominator)
  const around = marginsAt(site, scale)
  const planHeight = (y[1] - y[0]) * scale + around.top + around.bottom
  const blockHeight = headingHeight + planHeight + figures + 8
  const fitted = planViewOf(site, column, planHeight, around)
  const view: PlanView = {
    ...fitted,
    scale,
    x0: (column - scale * (x[1] - x[0])) / 2 - scale * x[0],
    y0: around.top + scale * y[1],
  }
  const variants = Array.from({ length: count }, (_, i) => {
    const left = margin.side + (i % 2) * (column + gutter)
    const blockTop = top + Math.floor(i / 2) * blockHeight
    return {
      heading: { x: left, y: blockTop, width: column, height: headingHeight },
      plan: { x: left, y: blockTop + headingHeight, width: column, height: planHeight },
      view,
      figures: { x: left, y: blockTop + headingHeight + planHeight, width: column, height: figures },
    }
  })
  const lower = top + rows * blockHeight + 10
  const lowerHeight = stripTop - 16 - lower
  const plotWidth = 620
  return {
    denominator,
    header: { x: margin.side, y: margin.top, width: inner, height: header },
    legend: { x: margin.side + inner - 366, y: margin.top + 17, width: 354, height: 8.1 },
    variants,
    plot: { x: margin.side, y: lower, width: plotWidth, height: Math.min(lowerHeight, 330) },
    cautions: { x: margin.side + plotWidth + 22, y: lower, width: 254, height: lowerHeight },
    key: { x: margin.side + inner - 126, y: lower, width: 126, height: lowerHeight },
    strip: { x: margin.side, y: stripTop, width: inner, height: strip },
  }
}
