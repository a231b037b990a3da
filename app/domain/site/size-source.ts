import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'
import type { Dimension, Site, SizeSource } from '#app/domain/site/site.ts'
import { formatLength, roundLength, type DisplayUnits } from '#app/domain/units.ts'

/** The tolerance of a size by where it comes from, m, until a better one is known (house rules). */
export function usualTolerance(source: SizeSource, value: number, rules: HouseRules): number {
  const size = Math.abs(value)
  switch (source) {
    case 'laser':
      return rules.toleranceLaser
    case 'tape':
      return rules.toleranceTape
    case 'drawing':
      return rules.toleranceDrawing
    case 'photo':
      return roundLength(Math.max(rules.tolerancePhotoShare * size, rules.tolerancePhotoLeast))
    case 'told':
    case 'guessed':
      return roundLength(rules.toleranceGuessShare * size)
  }
}

/** A size that nobody measured: told or guessed. It stays visible as assumed wherever it counts. */
export const isAssumed = ({ source }: Pick<Dimension, 'source'>): boolean => source === 'told' || source === 'guessed'

/** The sizes of a site that nobody measured. */
export const assumedSizes = (site: Pick<Site, 'dimensions'>): Dimension[] => site.dimensions.filter(isAssumed)

/** Sizes that are named one by one; the rest are counted. */
const namedSizes = 3

/** The assumed sizes of a site in words, each with its tolerance: the first by name, the rest by number. */
export function assumedInWords(site: Pick<Site, 'dimensions'>, units: DisplayUnits): string[] {
  const sizes = assumedSizes(site)
  const named = sizes.slice(0, namedSizes).map(({ label, value, tolerance }) => {
    return `${label} ${formatLength(value, units)} ± ${formatLength(tolerance, units)}`
  })
  const rest = sizes.length - namedSizes
  return rest > 0 ? [...named, `${rest} more ${rest === 1 ? 'size' : 'sizes'} of the site`] : named
}
