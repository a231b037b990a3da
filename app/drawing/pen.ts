import { coloursOf, weightsOf, type DrawingColours, type Theme } from '#app/drawing/theme.ts'

/** What a drawing is drawn with: its colours, how heavy its lines and how large its words are. */
export interface Pen {
  readonly theme: Theme
  readonly colours: DrawingColours
  readonly weights: ReturnType<typeof weightsOf>
  /** Factor on every line weight: 1 on screen, 0.72 on A4 at 1:100. */
  readonly k: number
  /** Sizes of words, px: names and dimensions, figures in seats, isoline figures. */
  readonly text: number
  readonly seatText: number
  readonly lineText: number
}

/** On screen words are at least 11 px at every scale; what has no room for them is drawn without. */
export const screenPen = (theme: Theme): Pen => ({
  theme,
  colours: coloursOf(theme),
  weights: weightsOf(theme),
  k: 1,
  text: 11,
  seatText: 11,
  lineText: 11,
})

/** On A4, CSS px at 96 to the inch: words of 7 to 8 px are about 2 mm. */
export const printPen: Pen = {
  theme: 'day',
  colours: coloursOf('day'),
  weights: { ...weightsOf('day'), outline: 1.3, isoline: 0.75, targetEdge: 1.5 },
  k: 0.72,
  text: 7.6,
  seatText: 7.2,
  lineText: 7.6,
}
