import type { Dimension, Site } from '#app/domain/site/site.ts'
import { formatLength } from '#app/domain/units.ts'

type DisplayUnits = Site['displayUnits']

/** A length on a drawing: metres to the centimetre without a unit, or feet and inches to the half inch. */
export function dimensionText(metres: number, displayUnits: DisplayUnits): string {
  if (displayUnits === 'metric') return metres.toFixed(2)
  const halfInch = 0.0254 / 2
  return withSigns(formatLength(Math.round(metres / halfInch) * halfInch, 'imperial'))
}

const withSigns = (length: string): string => length.replace(' ft', '′').replace(' in', '″')

/** Below this, m, a centimetre or half an inch is too coarse: a joist is 45 mm wide. */
const small = 0.5

/** A named size: a small one to the millimetre or the eighth of an inch. */
function valueText(metres: number, displayUnits: DisplayUnits): string {
  if (Math.abs(metres) >= small) return dimensionText(metres, displayUnits)
  return withSigns(formatLength(metres, displayUnits)).replace(' m', '')
}

/** A named size with its tolerance after it: "13.20 ± 0.02", "0.045 ± 0.005". */
export function toleratedText(dimension: Dimension, metres: number, displayUnits: DisplayUnits): string {
  if (dimension.tolerance === 0) return valueText(metres, displayUnits)
  const tolerance =
    displayUnits === 'metric'
      ? dimension.tolerance.toFixed(dimension.tolerance < 0.01 ? 3 : 2)
      : `${Math.max(0.125, Math.round((dimension.tolerance / 0.0254) * 8) / 8)}″`
  return `${valueText(metres, displayUnits)} ± ${tolerance}`
}

/** The size of the site that is the floor's whole length along x (0) or y (1); null when none is named. */
export const floorDimension = (site: Site, axis: 0 | 1, metres: number): Dimension | null =>
  site.dimensions.find(
    (dimension) =>
      Math.abs(dimension.value - metres) < 0.005 &&
      dimension.moves.some((move) => move.of === 'floor' && move.coordinate.endsWith(String(axis))),
  ) ?? null
