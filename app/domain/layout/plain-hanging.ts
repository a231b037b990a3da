import type { HangingData } from '#app/domain/layout/hanging-data.ts'

/** Chain of 28 mm pitch with the usual fittings. */
export const plainHanging: HangingData = {
  linkPitch: 0.028,
  hardwareAllowance: 0.095,
  shortens: 0.04,
  lengthens: 0.04,
  rodStep: 0.005,
  safetySlack: 0.1,
  orderStep: 1,
}
