import { coverHeightAt } from '#app/domain/site/cover.ts'
import { isInside } from '#app/domain/site/geometry.ts'
import type { Site } from '#app/domain/site/site.ts'
import { formatLength } from '#app/domain/units.ts'
import { usePointed, type PointedStore } from '#app/editor/pointed.ts'

/** Where the pointer is, and how high every cover and raised floor is there. */
export function PointedHeights({ store, site }: { store: PointedStore; site: Site }) {
  const pointed = usePointed(store)
  if (!pointed) return null
  const [x, y] = pointed.at
  const length = (metres: number) => formatLength(metres, site.displayUnits)
  const covers = site.covers.flatMap((cover) => {
    const height = coverHeightAt(cover, x, y)
    return height === null ? [] : [`${cover.name} at ${length(height)}`]
  })
  const levels = site.levels
    .filter(({ outline }) => isInside(outline, x, y))
    .map(({ name, height }) => `${name} at ${length(height)}`)
  return (
    <p className="pointer-events-none absolute bottom-1.5 left-2 rounded-sm bg-paper-raised/90 px-1.5 text-xs text-ink-2">
      {[`${length(x)}, ${length(y)}`, ...covers, ...levels].join(' · ')}
    </p>
  )
}
