import type { Brief } from '#app/domain/brief/brief.ts'
import { coverHeightAt } from '#app/domain/site/cover.ts'
import type { Seat, Site } from '#app/domain/site/site.ts'

/** What surrounds a seat without heaters. */
export interface Surroundings {
  /** Mean radiant temperature, °C. */
  readonly temperature: number
  readonly underCover: boolean
  /** The air temperature stands in for a figure that nobody has given: an assumption until it is entered. */
  readonly assumed: boolean
}

/** A seat is under a cover when its body lies below one. */
const isUnderCover = (seat: Seat, site: Site): boolean =>
  site.covers.some((cover) => {
    const underside = coverHeightAt(cover, seat.x, seat.y)
    return underside !== null && underside > seat.bodyHeight
  })

/**
 * Surroundings of a seat: as warm as the air under a cover; under open sky the brief's figure, or the air temperature
 * as an assumption (a clear sky is colder, so the assumption errs on the warm side).
 */
export function surroundingsAt(seat: Seat, site: Site, brief: Brief): Surroundings {
  if (isUnderCover(seat, site)) return { temperature: brief.airTemperature, underCover: true, assumed: false }
  const given = brief.surroundingsTemperature
  return { temperature: given ?? brief.airTemperature, underCover: false, assumed: given === null }
}
