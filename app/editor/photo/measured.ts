import { combineReadings, type Combined } from '#app/domain/photo/combine.ts'
import { sigmaFrom, sigmaOf, type Estimate } from '#app/domain/photo/estimate.ts'
import type { MarkedPhoto } from '#app/domain/photo/length-in-plane.ts'
import { measure, readingsOf } from '#app/domain/photo/measure-photo.ts'
import type { Measurement } from '#app/domain/photo/measurements.ts'
import { photoTolerance, type PhotoTolerance } from '#app/domain/photo/photo-tolerance.ts'
import { isClick } from '#app/domain/photo/plane-inputs.ts'
import { isRefused, type Refusal } from '#app/domain/photo/refusal.ts'
import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'
import { formatLength, type DisplayUnits } from '#app/domain/units.ts'

/** A figure of a photo, m: its standard error, what of it comes from clicks and from references, and its tolerance. */
export interface Figure extends PhotoTolerance {
  readonly value: number
  readonly sigma: number
  readonly clicks: number
  readonly references: number
}

/** What a measurement gives, alone and together with the other readings of the same thing. */
export interface Measured {
  readonly measurement: Measurement
  readonly own: Figure | Refusal
  /** Null with fewer than two readings. */
  readonly mean: (Figure & Pick<Combined, 'count' | 'warning'>) | null
  /** Photos that the mean's readings are in. */
  readonly photos: number
}

function figureOf(estimate: Estimate, rules: HouseRules): Figure {
  const sigma = sigmaOf(estimate)
  return {
    value: estimate.value,
    sigma,
    clicks: sigmaFrom(estimate, isClick),
    references: sigmaFrom(estimate, (name) => !isClick(name)),
    ...photoTolerance(estimate.value, sigma, rules),
  }
}

/** Every measurement of a photo with its figure, and its mean over all photos of the job. */
export function measuredIn(photo: MarkedPhoto, others: readonly MarkedPhoto[], rules: HouseRules): Measured[] {
  const photos = [photo, ...others]
  return photo.marks.measurements.map((measurement) => {
    const estimate = measure(photo, measurement)
    const readings = readingsOf(photos, measurement)
    const combined = readings.length > 1 ? combineReadings(readings.map((reading) => reading.estimate)) : null
    return {
      measurement,
      own: isRefused(estimate) ? estimate : figureOf(estimate, rules),
      mean: combined && { ...figureOf(combined.estimate, rules), count: combined.count, warning: combined.warning },
      photos: new Set(readings.map(({ photoId }) => photoId)).size,
    }
  })
}

/** "2.648 m ± 0.086 m". */
export const figureWords = ({ value, tolerance }: Figure, units: DisplayUnits): string =>
  `${formatLength(value, units)} ± ${formatLength(tolerance, units)}`

/** A standard error in a unit that shows it: "4.2 mm", "43 mm", "1/8 in". */
function smallWords(metres: number, units: DisplayUnits): string {
  if (units === 'imperial') return formatLength(metres, units, 'fine')
  const mm = metres * 1000
  return `${mm.toFixed(mm < 9.95 ? 1 : 0)} mm`
}

/** Where the tolerance comes from, with the standard error that the marks give. */
export function errorWords(
  { sigma, clicks, references, by }: Figure,
  units: DisplayUnits,
  { tolerancePhotoShare, tolerancePhotoLeast }: HouseRules,
): string {
  const say = (metres: number) => smallWords(metres, units)
  const rule = {
    share: `${Math.round(1000 * tolerancePhotoShare) / 10} % of it, the house rule for photos`,
    least: `${formatLength(tolerancePhotoLeast, units)}, the least for photos by house rule`,
    marks: 'twice the standard error',
  }
  return `± is ${rule[by]}. Standard error ${say(sigma)}: marks ${say(clicks)}, reference sizes ${say(references)}.`
}
