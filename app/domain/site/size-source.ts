import { houseRules } from '#app/domain/rules/house-rules.ts'
import type { Dimension, Site, SizeSource } from '#app/domain/site/site.ts'
import { roundLength } from '#app/domain/units.ts'

/** The tolerance of a size by where it comes from, m, until a better one is known (house rules). */
export function usualTolerance(source: SizeSource, value: number): number {
  const size = Math.abs(value)
  switch (source) {
    case 'laser':
      return houseRules.toleranceLaser.value
    case 'tape':
      return houseRules.toleranceTape.value
    case 'drawing':
      return houseRules.toleranceDrawing.value
    case 'photo':
      return roundLength(Math.max(houseRules.tolerancePhotoShare.value * size, houseRules.tolerancePhotoLeast.value))
    case 'told':
    case 'guessed':
      return roundLength(houseRules.toleranceGuessShare.value * size)
  }
}

/** A size that nobody measured: told or guessed. It stays visible as assumed wherever it counts. */
export const isAssumed = ({ source }: Pick<Dimension, 'source'>): boolean => source === 'told' || source === 'guessed'

/** The sizes of a site that nobody measured. */
export const assumedSizes = (site: Site): Dimension[] => site.dimensions.filter(isAssumed)
