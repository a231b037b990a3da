import type { Layout } from '#app/domain/layout/layout.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'
import type { Site } from '#app/domain/site/site.ts'
import type { Vec2 } from '#app/domain/vector.ts'

/** What a gesture keeps from pointer-down: every step is worked out from it and the pointer's place now. */
export interface GestureStart {
  readonly site: Site
  readonly models: ReadonlyMap<string, HeaterModel>
  readonly rules: HouseRules
  /** As it was; Escape goes back to it. */
  readonly layout: Layout
  /** The heaters that follow. */
  readonly ids: readonly string[]
  /** The one under the pointer. */
  readonly leadId: string
  /** Where the pointer went down, site m. */
  readonly from: Vec2
  /** How near a line must be to hold, m. */
  readonly pull: number
  /** Height of the plane the map shows, m. */
  readonly plane: number
  /** Writes a length in the person's unit. */
  readonly say: (metres: number) => string
}

/** What a gesture makes of the pointer's place: the layout to show, why it stands so, and the lines that hold it. */
export interface GestureStep {
  readonly layout: Layout
  readonly reason: string | null
  readonly lines: readonly { readonly from: Vec2; readonly to: Vec2 }[]
}

/** A gesture: pure, from the start and the pointer's place; `free` lets go of everything that holds. */
export type Gesture = (start: GestureStart, to: Vec2, free: boolean) => GestureStep
