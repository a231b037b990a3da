import type { PhotoMarks } from '#app/domain/photo/measurements.ts'

interface Size {
  readonly width: number
  readonly height: number
}

/** Every mark of a photo with its dotted path. */
function listMarks({ planes, measurements }: PhotoMarks): { path: string; at: readonly [number, number] }[] {
  return [
    ...planes.flatMap(({ corners, vertical }, k) => [
      ...corners.map((at, corner) => ({ path: `planes.${k}.corners.${corner}`, at })),
      ...(vertical === null
        ? []
        : (['known', 'other'] as const).flatMap((which) => [
            { path: `planes.${k}.vertical.${which}.foot`, at: vertical[which].foot },
            { path: `planes.${k}.vertical.${which}.top`, at: vertical[which].top },
          ])),
    ]),
    ...measurements.flatMap((each, k) =>
      each.kind === 'length'
        ? [
            { path: `measurements.${k}.from.at`, at: each.from.at },
            { path: `measurements.${k}.to.at`, at: each.to.at },
          ]
        : [
            { path: `measurements.${k}.foot.at`, at: each.foot.at },
            { path: `measurements.${k}.top`, at: each.top },
          ],
    ),
  ]
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
