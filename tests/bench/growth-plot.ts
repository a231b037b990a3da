/** Time against size, as multiples of the limit, on doubly logarithmic axes. */
export interface Growth {
  readonly name: string
  readonly points: readonly { readonly size: number; readonly ratio: number }[]
}

const width = 720
const height = 420
const left = 64
const right = 190
const top = 24
const bottom = 48
const colours = ['#b5532a', '#1f6f78', '#6b5b95', '#7a8b2f']

const decades = (from: number, to: number) =>
  Array.from({ length: Math.round(to - from) + 1 }, (_, i) => 10 ** (from + i))

/** The plot of how the map's time grows: size relative to the standard case, time relative to the limit. */
export function growthPlot(growths: readonly Growth[], standard: ReadonlyMap<string, number>): string {
  const all = growths.flatMap(({ name, points }) =>
    points.map((p) => ({ x: p.size / (standard.get(name) ?? 1), y: p.ratio })),
  )
  const edge = (pick: (...v: number[]) => number, round: (v: number) => number, values: number[]) =>
    round(Math.log10(pick(...values)))
  const xs = all.map(({ x }) => x)
  const ys = all.map(({ y }) => y)
  const [x1, x2] = [edge(Math.min, Math.floor, xs), edge(Math.max, Math.ceil, xs)]
  const [y1, y2] = [edge(Math.min, Math.floor, ys), edge(Math.max, Math.ceil, ys)]
  const px = (x: number) => left + ((Math.log10(x) - x1) / (x2 - x1)) * (width - left - right)
  const py = (y: number) => height - bottom - ((Math.log10(y) - y1) / (y2 - y1)) * (height - top - bottom)
  const grid = [
    ...decades(x1, x2).map(
      (x) =>
        `<path d="M${px(x)} ${top}V${height - bottom}" stroke="#ddd"/><text x="${px(x)}" y="${height - bottom + 18}" text-anchor="middle">×${x}</text>`,
    ),
    ...decades(y1, y2).map(
      (y) =>
        `<path d="M${left} ${py(y)}H${width - right}" stroke="#ddd"/><text x="${left - 8}" y="${py(y) + 4}" text-anchor="end">${y}</text>`,
    ),
  ]
  const lines = growths.map(({ name, points }, i) => {
    const colour = colours[i % colours.length]
    const places = points.map((p) => [px(p.size / (standard.get(name) ?? 1)), py(p.ratio)] as const)
    const last = points.at(-1)
    const d = places.map(([x, y], k) => `${k === 0 ? 'M' : 'L'}${x.toFixed(1)} ${y.toFixed(1)}`).join('')
    const dots = places
      .map(([x, y]) => `<circle cx="${x.toFixed(1)}" cy="${y.toFixed(1)}" r="3" fill="${colour}"/>`)
      .join('')
    const label = `<text x="${width - right + 12}" y="${top + 20 + i * 20}" fill="${colour}">${name} (×1 = ${standard.get(name)}, to ${last?.size})</text>`
    return `<path d="${d}" fill="none" stroke="${colour}" stroke-width="1.5"/>${dots}${label}`
  })
  return [
    `<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 ${width} ${height}" font-family="'Work Sans', sans-serif" font-size="12" fill="#333">`,
    `<rect width="${width}" height="${height}" fill="#fff"/>`,
    ...grid,
    ...lines,
    `<text x="${left}" y="${height - 10}">size against the standard map</text>`,
    `<text x="${left}" y="${top - 8}">time of a whole map, multiples of the limit</text>`,
    '</svg>',
    '',
  ].join('\n')
}
