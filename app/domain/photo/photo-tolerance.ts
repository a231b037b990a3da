import { sigmasOfTolerance } from '#app/domain/photo/plane-inputs.ts'

/** House rule: a length scaled from a photo is good to 3 %, and never to better than 50 mm. */
export const photoShare = 0.03
export const photoLeast = 0.05

/** A tolerance, m, and which of the three figures it is. */
export interface PhotoTolerance {
  readonly tolerance: number
  readonly by: '3 % of the length' | '50 mm' | 'twice the standard error'
}

/** The tolerance of a length measured in a photo: the greatest of 3 %, 50 mm and two standard errors. */
export function photoTolerance(value: number, sigma: number): PhotoTolerance {
  const share = photoShare * Math.abs(value)
  const marks = sigmasOfTolerance * sigma
  if (marks > share && marks > photoLeast) return { tolerance: marks, by: 'twice the standard error' }
  return share > photoLeast ? { tolerance: share, by: '3 % of the length' } : { tolerance: photoLeast, by: '50 mm' }
}
