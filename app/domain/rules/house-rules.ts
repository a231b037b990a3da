import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'
import type { SourcedFigure } from '#app/domain/rules/sourced-figure.ts'

/** The rules of a house that has not decided otherwise. */
export const plainHouseRules: HouseRules = {
  toleranceUnstated: 0.025,
  toleranceLaser: 0.005,
  toleranceTape: 0.01,
  toleranceDrawing: 0.025,
  tolerancePhotoShare: 0.03,
  tolerancePhotoLeast: 0.05,
  toleranceGuessShare: 0.1,
  targetLow: 150,
  targetHigh: 350,
  headCautionLongStay: 600,
  headCautionShortStay: 1000,
  longStayMinutes: 30,
  overlapThreshold: 80,
  glowNearStep: 2,
  chainSideways: 0.02,
  splayReach: 1,
  splayAngleDeg: 45,
  supplyOverRated: 1.1,
  ingressOpenSky: 5,
  ingressUnderCover: 4,
}

const plain = 'house rule, no published source'
const caution = 'house caution; no published limit was found'
const practice = 'house rule; common practice, no source'

const sources: Partial<Record<keyof HouseRules, string>> = {
  headCautionLongStay: caution,
  headCautionShortStay: caution,
  splayReach: practice,
  splayAngleDeg: practice,
}

/** A house rule with where it comes from: the organisation itself where it decided otherwise than the default. */
export function houseFigure(rules: HouseRules, name: keyof HouseRules): SourcedFigure {
  const value = rules[name]
  const source = value === plainHouseRules[name] ? (sources[name] ?? plain) : 'house rule, set by this organisation'
  return { value, source }
}
