import type { Dimension, Site } from '#app/domain/site/site.ts'
import { formatLength } from '#app/domain/units.ts'

type DisplayUnits = Site['displayUnits']

/** A length on a drawing: metres to the centimetre without a unit, or feet and inches to the half inch. */
export function dimensionText(metres: number, displayUnits: DisplayUnits): string {
  if (displayUnits === 'metric') return metres.toFixed(2)
  const halfInch = 0.0254 / 2
  return formatLength(Math.round(metres / halfInch) * halfInch, 'imperial')
    .replace(' ft', '′')
    .replace(' in', '″')
}

/** A length with its tolerance after it: "13.20 ± 0.02". */
export function toleratedText(dimension: Dimension, metres: number, displayUnits: DisplayUnits): string {
  if (dimension.tolerance === 0) return dimensionText(metres, displayUnits)
  const tolerance =
    displayUnits === 'metric'
      ? dimension.tolerance.toFixed(dimension.tolerance < 0.01 ? 3 : 2)
      : `${Math.max(0.125, Math.round((dimension.tolerance / 0.0254) * 8) / 8)}″`
  return `${dimensionText(metres, displayUnits)} ± ${tolerance}`
}

/** The size of the site that is the floor's whole length along x (0) or y (1); null when none is named. */
export const floorDimension = (site: Site, axis: 0 | 1, metres: number): Dimension | null =>
  site.dimensions.find(
    (dimension) =>
      Math.abs(dimension.value - metres) < 0.005 &&
      dimension.moves.some((move) => move.of === 'floor' && move.coordinate.endsWith(String(axis))),
  ) ?? null
