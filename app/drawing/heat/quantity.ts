import { scaleDiverging, scaleLinear, scaleSequential } from 'd3-scale'
import {
  interpolateCividis,
  interpolateOranges,
  interpolatePuOr,
  interpolatePurples,
  interpolateViridis,
  interpolateYlGnBu,
} from 'd3-scale-chromatic'
import { hexOf, mixed, rgbOf } from '#app/drawing/heat/colour.ts'
import { bandEdges, fineBandEdges, isolineLevels } from '#app/drawing/heat/contours.ts'
import { bandColour, labelledLevels, type Target } from '#app/drawing/heat/scale.ts'
import { coloursOf, type Theme } from '#app/drawing/theme.ts'

/** How a quantity on the map is coloured, stepped and written. Values in the quantity's own unit. */
export interface QuantityScale {
  /** What the legend calls it. */
  readonly name: string
  readonly unit: string
  /** Ends of the legend's bar. */
  readonly domain: readonly [number, number]
  /** Lower edges of the fill's bands. */
  readonly edges: readonly number[]
  /** Isolines; `heavy` are drawn strong, `labelled` carry their figure. */
  readonly levels: readonly number[]
  readonly heavy: readonly number[]
  readonly labelled: readonly number[]
  /** Figures under the legend's bar. */
  readonly ticks: readonly number[]
  /** Band that is dotted, hatched above it; null where the quantity has no target. */
  readonly target: Target | null
  /** Whether the highest points above the last band carry their figure. */
  readonly writesPeaks: boolean
  /** Fill of the band from … to. */
  readonly fill: (from: number, to: number) => string
  readonly format: (value: number) => string
}

const whole = (value: number): string => String(Math.round(value)).replace('-', '−')
const steps = (from: number, to: number, by: number): number[] =>
  Array.from({ length: Math.round((to - from) / by) + 1 }, (_, i) => from + i * by)

/**
 * Irradiance in W/m² on the one scale, 0 to 600, with the target's zones. `fine` steps the fill every 10 W/m² for a
 * picture from which figures are read back, else every 25.
 */
export function irradianceScale(theme: Theme, target: Target, fine = false): QuantityScale {
  return {
    name: 'Irradiance',
    unit: 'W/m²',
    domain: [0, 600],
    edges: fine ? fineBandEdges : bandEdges,
    levels: [...new Set([...isolineLevels, target.low, target.high])].sort((a, b) => a - b),
    heavy: [target.low, target.high],
    labelled: [...new Set([...labelledLevels, target.low, target.high])],
    ticks: [...new Set([0, 100, target.low, 200, 300, target.high, 400, 500, 600])].sort((a, b) => a - b),
    target,
    writesPeaks: true,
    fill: (from, to) => bandColour(from, to, theme),
    format: whole,
  }
}

/** One heater's share of the irradiance, W/m²: the one scale again, without a target. */
export const shareScale = (theme: Theme): QuantityScale => ({
  ...irradianceScale(theme, { low: 150, high: 350 }),
  name: 'Share of one heater',
  heavy: [],
  labelled: [50, 100, 200, 300, 400],
  ticks: [0, 100, 200, 300, 400, 500, 600],
  target: null,
})

/** How many heaters each alone give at least the threshold: 0, 1, 2, 3, 4 and more. */
export function overlapScale(theme: Theme, threshold: number): QuantityScale {
  const floor = coloursOf(theme).floor
  const ramp =
    theme === 'dusk'
      ? scaleSequential(interpolateViridis).domain([0.2, 4.6])
      : scaleSequential(interpolateYlGnBu).domain([-0.6, 7.5])
  return {
    name: `Heaters that alone give ${whole(threshold)} W/m² or more`,
    unit: '',
    domain: [0, 5],
    edges: [0.5, 1.5, 2.5, 3.5],
    levels: [0.5, 1.5, 2.5, 3.5],
    heavy: [1.5],
    labelled: [],
    ticks: [0, 1, 2, 3, 4],
    target: null,
    writesPeaks: false,
    fill: (from) => (from < 0.5 ? floor : hexOf(rgbOf(ramp(Math.round(from + 0.5))))),
    format: (value) => (value >= 4 ? '4 or more' : whole(value)),
  }
}

/** Still-air temperature that feels the same, °C, on a fixed scale from −10 to 30. */
export function feelsLikeScale(theme: Theme, displayUnits: 'metric' | 'imperial' = 'metric'): QuantityScale {
  const ramp = scaleSequential(
    theme === 'dusk' ? interpolateCividis : (t: number) => interpolateYlGnBu(0.72 - 0.72 * t),
  )
    .domain([-10, 30])
    .clamp(true)
  const fahrenheit = displayUnits === 'imperial'
  return {
    name: 'Feels like',
    unit: fahrenheit ? '°F' : '°C',
    domain: [-10, 30],
    edges: [-40, ...steps(-9, 29, 1), 30],
    levels: steps(-8, 28, 2),
    heavy: [],
    labelled: steps(-8, 28, 2),
    ticks: steps(-10, 30, 5),
    target: null,
    writesPeaks: false,
    fill: (from, to) => hexOf(rgbOf(ramp(from <= -40 ? -10 : (from + to) / 2))),
    format: (value) => whole(fahrenheit ? value * 1.8 + 32 : value),
  }
}

/**
 * Irradiance of one variant less that of another, W/m², −300 to 300 about a quiet middle. Purple is less, orange more:
 * told apart in every common colour deficiency, and lightness (dusk) or depth (day) grows with the size of the difference.
 */
export function differenceScale(theme: Theme): QuantityScale {
  const floor = coloursOf(theme).floor
  const arm = scaleLinear().domain([0, 1]).range([1, 0.3])
  const dusk = (t: number): string => {
    const size = Math.abs(2 * t - 1)
    const tint = (2 * t < 1 ? interpolatePurples : interpolateOranges)(arm(size))
    return mixed(floor, hexOf(rgbOf(tint)), Math.min(1, 0.15 + 1.7 * size))
  }
  const ramp = scaleDiverging(theme === 'dusk' ? dusk : (t: number) => interpolatePuOr(1 - t))
    .domain([-300, 0, 300])
    .clamp(true)
  return {
    name: 'Difference',
    unit: 'W/m²',
    domain: [-300, 300],
    edges: [-2000, ...steps(-285, 285, 30)],
    levels: steps(-300, 300, 50).filter((level) => level !== 0),
    heavy: [],
    labelled: [-200, -100, -50, 50, 100, 200],
    ticks: steps(-300, 300, 100),
    target: null,
    writesPeaks: false,
    fill: (from, to) => hexOf(rgbOf(ramp(from <= -2000 ? -300 : (from + to) / 2))),
    format: (value) => (value > 0 ? `+${whole(value)}` : whole(value)),
  }
}
