/** Dusk: the terrace in the evening, on screen. Day: paper, on screen and in print. */
export type Theme = 'dusk' | 'day'

/** Colours of everything on a drawing that is not heat; the names and values are those of the page's tokens. */
export interface DrawingColours {
  readonly ground: string
  readonly floor: string
  readonly line: string
  readonly secondLine: string
  readonly selection: string
  readonly wall: string
  readonly wallHatch: string
  readonly water: string
  readonly halo: string
  readonly figure: string
  readonly seat: string
  readonly heater: string
  readonly heaterEdge: string
  readonly element: string
  readonly isoline: string
  /** Behind an isoline's figure; by day off the heat scale, so that nobody reads a heat in it. */
  readonly isolineHalo: string
  readonly dots: string
  readonly hatch: string
}

const dusk: DrawingColours = {
  ground: '#0c1322',
  floor: '#0f1829',
  line: '#efe6d6',
  secondLine: '#93a0bd',
  selection: '#ffb27a',
  wall: '#2a3550',
  wallHatch: '#8c9ab8',
  water: '#33486e',
  halo: '#0c1322',
  figure: '#f7efe0',
  seat: '#0c1322',
  heater: '#fff4df',
  heaterEdge: '#0c1322',
  element: '#d2581f',
  isoline: '#fff0da',
  isolineHalo: '#0c1322',
  dots: '#fff1d8',
  hatch: '#160b18',
}

const day: DrawingColours = {
  ground: '#ffffff',
  floor: '#ffffff',
  line: '#1d2233',
  secondLine: '#5a6072',
  selection: '#b4471a',
  wall: '#ffffff',
  wallHatch: '#1d2233',
  water: '#9aa7bd',
  halo: '#ffffff',
  figure: '#1d2233',
  seat: '#ffffff',
  heater: '#ffffff',
  heaterEdge: '#1d2233',
  element: '#b4471a',
  isoline: '#5c3317',
  isolineHalo: '#edf1f8',
  dots: '#7a4a22',
  hatch: '#7c2d12',
}

/** The colours of a theme. */
export const coloursOf = (theme: Theme): DrawingColours => (theme === 'dusk' ? dusk : day)

/** How strongly each line of a theme is drawn: isolines and zones are quieter than the outline. */
export const weightsOf = (theme: Theme) =>
  theme === 'dusk'
    ? { outline: 1.3, isoline: 0.75, isolineOpacity: 0.5, targetEdge: 1.5, dotOpacity: 0.6, hatchOpacity: 0.62 }
    : { outline: 0.95, isoline: 0.54, isolineOpacity: 0.65, targetEdge: 1.1, dotOpacity: 0.62, hatchOpacity: 0.55 }

/** Family of every word on a drawing; pages and the picture renderer ship it. */
export const fontFamily = 'Work Sans'
