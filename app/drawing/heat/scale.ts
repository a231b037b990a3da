import { scaleLinear } from 'd3-scale'
import { hexOf, rgbOf, type Rgb } from '#app/drawing/heat/colour.ts'
import type { Theme } from '#app/drawing/theme.ts'

/** Where the one scale of irradiance ends and the fill saturates, W/m². Figures above it are written out. */
const saturation = 600

/** Colours of the scale every 50 W/m² from 0 to 600, the page's tokens `heat-…` and `day-…`. */
export const heatColours = {
  dusk: [
    '#0f1829',
    '#420a68',
    '#5d126e',
    '#771c6d',
    '#922568',
    '#ad305d',
    '#c63d4d',
    '#da4e3c',
    '#eb6628',
    '#f78212',
    '#fca108',
    '#fac026',
    '#f4e156',
  ],
  day: [
    '#ffffff',
    '#fefaf3',
    '#fdf4e6',
    '#fcedd8',
    '#fbe6c9',
    '#faddb8',
    '#f8d3a6',
    '#f5c795',
    '#f2bb84',
    '#eead75',
    '#e99f66',
    '#e2915b',
    '#db8350',
  ],
} as const satisfies Record<Theme, readonly string[]>

const stops = heatColours.dusk.map((_, i) => i * 50)

const rampOf = (theme: Theme) => scaleLinear<string>().domain(stops).range(heatColours[theme]).clamp(true)
const ramps = { dusk: rampOf('dusk'), day: rampOf('day') }

/** Colour of an irradiance, W/m², on the one scale; below 0 and above 600 it stays at the ends. */
export const colourOf = (irradiance: number, theme: Theme): string => hexOf(rgbOf(ramps[theme](irradiance)))

/** Colour that fills a band between two irradiances: that of its middle; an open last band has the scale's end. */
export const bandColour = (from: number, to: number, theme: Theme): string =>
  colourOf(from >= saturation ? saturation : (from + to) / 2, theme)

const squared = (a: Rgb, b: Rgb): number => (a[0] - b[0]) ** 2 + (a[1] - b[1]) ** 2 + (a[2] - b[2]) ** 2

/** The place on the straight line from a to b (0 to 1) that is nearest to p, and its squared distance. */
function nearestOnLine(p: Rgb, a: Rgb, b: Rgb): { t: number; distance: number } {
  const along = (p[0] - a[0]) * (b[0] - a[0]) + (p[1] - a[1]) * (b[1] - a[1]) + (p[2] - a[2]) * (b[2] - a[2])
  const t = Math.min(1, Math.max(0, along / squared(a, b)))
  const foot: Rgb = [a[0] + t * (b[0] - a[0]), a[1] + t * (b[1] - a[1]), a[2] + t * (b[2] - a[2])]
  return { t, distance: squared(p, foot) }
}

/**
 * The irradiance a colour stands for, W/m², read back along the scale; null for a colour that is not on it (a line, a
 * figure, a dot). 600 means 600 or more. `tolerance`: how far off the scale a colour may lie, in steps of 255.
 */
export function irradianceOfColour(colour: string | Rgb, theme: Theme, tolerance = 3): number | null {
  const p = typeof colour === 'string' ? rgbOf(colour) : colour
  const ends = heatColours[theme].map(rgbOf)
  const found = ends.slice(1).map((b, i) => ({ i, ...nearestOnLine(p, ends[i] ?? b, b) }))
  const best = found.reduce((a, b) => (b.distance < a.distance ? b : a))
  return best.distance > tolerance ** 2 ? null : (best.i + best.t) * 50
}

/** The band the body should lie in, W/m²; the house rule is 150 to 350. */
export interface Target {
  readonly low: number
  readonly high: number
}

/** Where an irradiance lies against the target: plain, dotted and hatched on the drawing. */
export type Zone = 'below' | 'in target' | 'above'

/** Zone of an irradiance; both limits belong to the target. */
export const zoneOf = (irradiance: number, target: Target): Zone =>
  irradiance < target.low ? 'below' : irradiance > target.high ? 'above' : 'in target'

/** Isolines whose figure is written on them, W/m². */
export const labelledLevels: readonly number[] = [100, 150, 200, 300, 350, 400]
