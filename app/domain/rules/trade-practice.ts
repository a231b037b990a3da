/** What the trade does where a manual is silent: advice, never a figure to pass by. */
interface TradePractice {
  /** m. */
  readonly value: number
  readonly source: string
  readonly sentence: string
}

const source = 'common practice, no source'

export const tradePractice = {
  /** Distance of combustible edges from a heater. */
  combustibleEdge: {
    value: 0.4572,
    source,
    sentence: 'Common practice, no source: 18 in (0.46 m) to a combustible edge.',
  },
  /** Height of undersides above the floor. */
  underside: {
    value: 2.4384,
    source,
    sentence: 'Common practice, no source: undersides not below about 8 ft (2.44 m).',
  },
} as const satisfies Record<string, TradePractice>
