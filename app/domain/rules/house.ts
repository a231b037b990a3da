import type { HangingData } from '#app/domain/layout/hanging-data.ts'
import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'

/** What an organisation decided for itself: its rules, and how it makes hangers. */
export interface House {
  readonly rules: HouseRules
  readonly hanging: HangingData
}
