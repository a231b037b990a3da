import type { Site } from '#app/domain/site/site.ts'
import { formatLength, type DisplayUnits } from '#app/domain/units.ts'

/** A length as a field shows it: a bare number of metres, or feet and inches. */
export const fieldLength = (metres: number, units: DisplayUnits): string =>
  units === 'metric' ? formatLength(metres, units, 'fine').replace(' m', '') : formatLength(metres, units, 'fine')

/** "Along river", "From wall": the two axes in the words of the site. */
export const alongLabel = (site: Site): string => {
  const name = site.beyond[0]?.name ?? site.walls[0]?.name
  return name && name.length <= 8 ? `Along ${name.toLowerCase()}` : 'Along'
}
export const fromLabel = (site: Site): string => (site.walls.length > 0 ? 'From wall' : 'Across')
