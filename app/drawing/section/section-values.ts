import type { Emitter } from '#app/domain/flux/emitter.ts'
import type { Grid } from '#app/domain/flux/grid.ts'
import { irradianceAt } from '#app/domain/flux/irradiance.ts'
import { isInside } from '#app/domain/site/geometry.ts'
import type { Site } from '#app/domain/site/site.ts'
import type { Vec3 } from '#app/domain/vector.ts'
import { contoursOf, type HeatPicture } from '#app/drawing/heat/contours.ts'
import type { QuantityScale } from '#app/drawing/heat/quantity.ts'
import { cutExtent, pointOfCut } from '#app/drawing/section/section-view.ts'
import type { SectionCut } from '#app/drawing/plan/section-cut.tsx'

/** Horizontal irradiance, W/m², on a grid that stands upright in a section: its x runs along the cut, its y is z. */
export interface SectionField {
  readonly grid: Grid
  readonly values: Float32Array
}

const up: Vec3 = [0, 0, 1]

/**
 * Irradiance of horizontal planes over a section, from the floor to just below the lowest point of the highest heater, at
 * no more than `most` points; null without emitters. Unshaded.
 */
export function sectionValues(
  emitters: readonly Emitter[],
  site: Site,
  cut: SectionCut,
  most = 2000,
): SectionField | null {
  const heights = emitters.flatMap(({ elements }) => elements.map(({ centre }) => centre[2]))
  if (heights.length === 0) return null
  const [low, high] = cutExtent(cut)
  const top = Math.max(1.4, Math.max(...heights) - 0.04)
  const cell = Math.max(0.05, Math.sqrt(((high - low) * top) / most))
  const columns = Math.max(1, Math.floor((high - low) / cell))
  const rows = Math.max(1, Math.floor(top / cell))
  const grid: Grid = { x0: low, y0: 0, cell, columns, rows, z: 0, inside: new Uint8Array(columns * rows) }
  const values = new Float32Array(columns * rows)
  for (let j = 0; j < rows; j++) {
    for (let i = 0; i < columns; i++) {
      const [x, y] = pointOfCut(cut, low + (i + 0.5) * cell)
      if (!isInside(site.floor, x, y)) continue
      grid.inside[j * columns + i] = 1
      const point: Vec3 = [x, y, (j + 0.5) * cell]
      values[j * columns + i] = emitters.reduce((sum, emitter) => sum + irradianceAt(emitter, point, up), 0)
    }
  }
  return { grid, values }
}

/** Near a heater irradiance grows without limit; its logarithm stays smooth, so lines are found in it. */
const logarithm = (value: number): number => Math.log1p(Math.max(-0.9, value / 20))

/** A picture in metres along the section and up; its lines are known up to `top`. */
export interface SectionPicture extends HeatPicture {
  readonly top: number
}

/** Fills and isolines of a section's field. */
export function sectionPicture(field: SectionField, quantity: Pick<QuantityScale, 'levels' | 'edges'>): SectionPicture {
  const picture = contoursOf(
    field.values.map(logarithm),
    field.grid,
    quantity.levels.map(logarithm),
    quantity.edges.map(logarithm),
    [],
  )
  const valueOf = (levels: readonly number[], found: number) =>
    levels.reduce((best, level) =>
      Math.abs(logarithm(level) - found) < Math.abs(logarithm(best) - found) ? level : best,
    )
  const edgeAfter = (from: number) => quantity.edges[quantity.edges.indexOf(from) + 1] ?? from
  return {
    bands: picture.bands.map((band) => {
      const from = valueOf(quantity.edges, band.from)
      return { ...band, from, to: edgeAfter(from) }
    }),
    lines: picture.lines.map((line) => ({ ...line, level: valueOf(quantity.levels, line.level) })),
    peaks: [],
    top: (field.grid.rows - 0.5) * field.grid.cell,
  }
}
