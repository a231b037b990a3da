import { combined, sigmaOf, type Estimate } from '#app/domain/photo/estimate.ts'

/** Readings of one length that are farther from each other than this many standard errors do not fit (1 in 20 by chance). */
const fits = 2

/** One length from several readings: the mean, and how far apart the two are that fit least. */
export interface Combined {
  readonly estimate: Estimate
  readonly count: number
  /** Of the two readings that fit least: which, their difference, m, and its standard error. */
  readonly worst: {
    readonly between: readonly [number, number]
    readonly difference: number
    readonly sigma: number
  } | null
  /** In words, when readings do not fit: null when they do. */
  readonly warning: string | null
}

/**
 * Mean of several readings of one length, each weighed by 1/σ². Its error takes into account that readings of one photo
 * share their reference's corners and sizes, so it never shrinks below what they share. Null without readings.
 */
export function combineReadings(readings: readonly Estimate[]): Combined | null {
  if (readings.length === 0) return null
  const weights = readings.map((reading) => 1 / Math.max(sigmaOf(reading), 1e-9) ** 2)
  const total = weights.reduce((sum, weight) => sum + weight, 0)
  const estimate = combined(
    readings,
    weights.map((weight) => weight / total),
  )
  const worst = worstPair(readings)
  const apart = worst && worst.difference > fits * worst.sigma
  return { estimate, count: readings.length, worst, warning: apart ? apartWords(worst) : null }
}

function worstPair(readings: readonly Estimate[]): Combined['worst'] {
  const pairs = readings.flatMap((one, i) =>
    readings.slice(i + 1).map((other, k) => {
      const difference = combined([one, other], [1, -1])
      return {
        between: [i, i + 1 + k] as const,
        difference: Math.abs(difference.value),
        sigma: Math.max(sigmaOf(difference), 1e-9),
      }
    }),
  )
  return pairs.toSorted((a, b) => b.difference / b.sigma - a.difference / a.sigma)[0] ?? null
}

const apartWords = ({ difference, sigma }: NonNullable<Combined['worst']>): string =>
  `Two readings are ${(difference / sigma).toFixed(1)} standard errors apart: a mark or a reference is wrong. Check them before this is used.`
