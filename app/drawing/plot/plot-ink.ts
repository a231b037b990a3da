/** Colours of a plot: those of the page or the sheet it stands on (CSS values). */
export interface PlotInk {
  readonly ink: string
  readonly quiet: string
  readonly rule: string
  readonly paper: string
  readonly ember: string
}

/** Colours of a plot on a printed sheet. */
export const sheetInk: PlotInk = {
  ink: '#1d2233',
  quiet: '#5a6072',
  rule: '#d9d2c6',
  paper: '#ffffff',
  ember: '#b4471a',
}
