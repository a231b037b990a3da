import { sigmasOfTolerance } from '#app/domain/photo/plane-inputs.ts'
import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'

/** A tolerance, m, and which figure it is: the share of the length, the least of a photo, or two standard errors. */
export interface PhotoTolerance {
  readonly tolerance: number
  readonly by: 'share' | 'least' | 'marks'
}

/** The tolerance of a length measured in a photo: the greatest of the house's share and least, and two standard errors. */
export function photoTolerance(value: number, sigma: number, rules: HouseRules): PhotoTolerance {
  const share = rules.tolerancePhotoShare * Math.abs(value)
  const least = rules.tolerancePhotoLeast
  const marks = sigmasOfTolerance * sigma
  if (marks > share && marks > least) return { tolerance: marks, by: 'marks' }
  return share > least ? { tolerance: share, by: 'share' } : { tolerance: least, by: 'least' }
}
