import type { SeatFigure } from '#app/domain/comfort/uncertainty.ts'

interface Explained {
  readonly formula: string
  readonly source: string
}

/** How each figure is made, and where that comes from. */
export const formulas: Readonly<Record<SeatFigure['quantity'], Explained>> = {
  body: {
    formula:
      'E = Σ elements I0 f(α) / (L h) · [n_h C(β) − n_u cos^(b+1) β / (b+1)], I0 = η_r P / (W(a) W(b+1)), n straight up at the body’s height',
    source:
      'Closed form for a tubular element with a separable beam; tabulated beams by the same integral of their table.',
  },
  'body-largest': {
    formula: 'The sum of the body plane at the same height, n the direction in which it is largest',
    source:
      'Irradiance is convex in the direction of the plane; its largest value is found by turning to the net flux.',
  },
  head: {
    formula: 'The same sum at the head’s height, n the direction in which it is largest',
    source:
      'Irradiance is convex in the direction of the plane; its largest value is found by turning to the net flux.',
  },
  'near-infrared': {
    formula:
      'E = Σ elements F E_n at the head’s height, n the level direction in which it is largest; F = F(0→3 µm · T) − F(0→0.78 µm · T), F(0→λT) = 15/π⁴ Σ e^(−nx) (x³/n + 3x²/n² + 6x/n³ + 6/n⁴), x = 14,387.77 µm·K / λT',
    source:
      'Planck’s law at the element’s temperature, taken as a grey body without filters; a guest looks level, so on vertical planes.',
  },
  'head-to-body': {
    formula: 'Horizontal irradiance at the head ÷ horizontal irradiance on the body plane',
    source:
      'Closed form for a tubular element, twice. Heights of ISO 7726 where a seat has none of its own (from memory). No limit is set: that of a warm ceiling is for indoors.',
  },
  'feels-like': {
    formula:
      't_eq = 33 − (33 − t_o) · (R_cl + 1/(f_cl (3.1 + h_r))) / (R_cl + 1/(f_cl (h_c + h_r))), t_o = (h_c t_a + h_r t_r + Σ elements α f_eff Σ f_p E_n) / (h_c + h_r)',
    source:
      'ASHRAE 55 Appendix C (effective radiant field, projected areas), ASHRAE Fundamentals (h_c = 8.3 v^0.6, at least 3.1), ISO 9920 (clothing).',
  },
  sensation: {
    formula:
      'PMV = (0.303 e^(−0.036 M) + 0.028) · L; L: what the body gains and loses in still air (0.1 m/s) when air and surroundings are at what it feels like; PPD = 1 − 0.95 e^(−0.03353 PMV⁴ − 0.2179 PMV²)',
    source:
      'ISO 7730: the vote and its seven words; it holds from 10 to 30 °C, below 1 m/s, 0.8 to 4 met, at most 2 clo and for votes from −2 to 2 (the last three from memory).',
  },
}

/** What shade adds to a formula. */
export const shadedFormula =
  'With shade, of every element only the stretches that are seen count, each times the share that is let through.'
