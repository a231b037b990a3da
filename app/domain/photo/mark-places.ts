import type { PhotoMarks } from '#app/domain/photo/measurements.ts'

/** One mark of a photo: its dotted path in the marks, what it marks in words, where it is. */
export interface MarkPlace {
  readonly path: string
  readonly words: string
  readonly at: readonly [number, number]
}

interface Size {
  readonly width: number
  readonly height: number
}

/** Every mark of a photo, planes first. */
export function listMarks({ planes, measurements }: PhotoMarks): MarkPlace[] {
  return [
    ...planes.flatMap(({ name, corners, vertical }, k) => [
      ...corners.map((at, corner) => ({
        path: `planes.${k}.corners.${corner}`,
        words: `${name}, corner ${corner + 1}`,
        at,
      })),
      ...(vertical === null
        ? []
        : (['known', 'other'] as const).flatMap((which) => {
            const words = `${name}, ${which === 'known' ? 'known height' : 'second upright'}`
            return (['foot', 'top'] as const).map((end) => ({
              path: `planes.${k}.vertical.${which}.${end}`,
              words: `${words}, ${end}`,
              at: vertical[which][end],
            }))
          })),
    ]),
    ...measurements.flatMap((each, k) =>
      each.kind === 'length'
        ? [
            { path: `measurements.${k}.from.at`, words: `${each.label}, one end`, at: each.from.at },
            { path: `measurements.${k}.to.at`, words: `${each.label}, other end`, at: each.to.at },
          ]
        : [
            { path: `measurements.${k}.foot.at`, words: `${each.label}, foot`, at: each.foot.at },
            { path: `measurements.${k}.top`, words: `${each.label}, top`, at: each.top },
          ],
    ),
  ]
}

/** The marks with the one at a path put somewhere else; unchanged when there is none. */
export function moveMark(marks: PhotoMarks, path: string, at: readonly [number, number]): PhotoMarks {
  if (!listMarks(marks).some((mark) => mark.path === path)) return marks
  const copy = structuredClone(marks)
  let inside: unknown = copy
  for (const key of path.split('.')) inside = Reflect.get(Object(inside), key)
  if (!Array.isArray(inside)) return marks
  inside.splice(0, 2, at[0], at[1])
  return copy
}

/** What marks of a photo of some size have that cannot be: one outside it, or an id twice. Null when all can. */
export function outsideOf(
  marks: PhotoMarks,
  { width, height }: Size,
): { readonly error: string; readonly path: string } | null {
  const outside = listMarks(marks).find(({ at: [x, y] }) => x > width || y > height)
  if (outside) return { error: `The photo has ${width} × ${height} px.`, path: outside.path }
  const seen = new Set<string>()
  for (const [list, things] of [
    ['planes', marks.planes],
    ['measurements', marks.measurements],
  ] as const) {
    for (const [k, { id }] of things.entries()) {
      if (seen.has(id)) return { error: `The id ${id} is there twice.`, path: `${list}.${k}.id` }
      seen.add(id)
    }
  }
  return null
}
