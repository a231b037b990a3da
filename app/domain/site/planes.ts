import type { Site } from '#app/domain/site/site.ts'

/** Heights of the planes that figures are given for, m above finished floor. */
export interface Planes {
  readonly body: number
  readonly head: number
}

/** Seated heights of ISO 7726 (from memory), for a site without seats. */
const seated: Planes = { body: 0.6, head: 1.1 }

/** The height most seats have; the lower of two that are equally common. */
function commonHeight(heights: readonly number[], otherwise: number): number {
  const counts = new Map<number, number>()
  for (const height of heights) counts.set(height, (counts.get(height) ?? 0) + 1)
  const [most] = [...counts].toSorted(([a, many], [b, more]) => more - many || a - b)
  return most?.[0] ?? otherwise
}

/** The body and head planes of a site: a map shows one height, each seat's own figures keep their own. */
export function planesOf({ seats }: Site): Planes {
  return {
    body: commonHeight(
      seats.map(({ bodyHeight }) => bodyHeight),
      seated.body,
    ),
    head: commonHeight(
      seats.map(({ headHeight }) => headHeight),
      seated.head,
    ),
  }
}
