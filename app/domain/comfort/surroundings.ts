import type { Brief } from '#app/domain/brief/brief.ts'
import { coverHeightAt } from '#app/domain/site/cover.ts'
import type { Cover, Seat, Site } from '#app/domain/site/site.ts'

/** What surrounds a seat without heaters. */
export interface Surroundings {
  /** Mean radiant temperature, °C. */
  readonly temperature: number
  readonly underCover: boolean
  /** The air temperature stands in for a figure that nobody has given: an assumption until it is entered. */
  readonly assumed: boolean
}

/** A seat, or a guest anywhere, is under a cover when the body lies below one. */
export const isUnderCover = (seat: Pick<Seat, 'x' | 'y' | 'bodyHeight'>, covers: readonly Cover[]): boolean =>
  covers.some((cover) => {
    const underside = coverHeightAt(cover, seat.x, seat.y)
    return underside !== null && underside > seat.bodyHeight
  })

/** Surroundings under open sky, °C: the brief's figure, else the air temperature (a clear sky is colder: errs on the warm side). */
export const openSkyTemperature = (brief: Brief): number => brief.surroundingsTemperature ?? brief.airTemperature

/** Surroundings of a seat: as warm as the air under a cover; under open sky the brief's figure or what is assumed for it. */
export function surroundingsAt(seat: Seat, site: Site, brief: Brief): Surroundings {
  if (isUnderCover(seat, site.covers)) return { temperature: brief.airTemperature, underCover: true, assumed: false }
  return { temperature: openSkyTemperature(brief), underCover: false, assumed: brief.surroundingsTemperature === null }
}
