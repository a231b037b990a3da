import { sigmasOfTolerance } from '#app/domain/photo/plane-inputs.ts'
import { houseRules } from '#app/domain/rules/house-rules.ts'

/** A tolerance, m, and which figure it is: the share of the length, the least of a photo, or two standard errors. */
export interface PhotoTolerance {
  readonly tolerance: number
  readonly by: 'share' | 'least' | 'marks'
}

/** The tolerance of a length measured in a photo: the greatest of the house's share and least, and two standard errors. */
export function photoTolerance(value: number, sigma: number): PhotoTolerance {
  const share = houseRules.tolerancePhotoShare.value * Math.abs(value)
  const least = houseRules.tolerancePhotoLeast.value
  const marks = sigmasOfTolerance * sigma
  if (marks > share && marks > least) return { tolerance: marks, by: 'marks' }
  return share > least ? { tolerance: share, by: 'share' } : { tolerance: least, by: 'least' }
}
