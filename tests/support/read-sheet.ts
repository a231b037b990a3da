import type { Page } from '@playwright/test'
import type { PNG } from 'pngjs'

/** A place on the sheet in the SVG's own units. */
export interface Place {
  readonly x: number
  readonly y: number
}

/** What a reader finds on a comparison sheet: where the legend's bands lie and where each plan's seats are drawn. */
export interface SheetReading {
  readonly width: number
  readonly legend: { readonly from: Place; readonly to: Place; readonly low: number; readonly high: number }
  /** Per plan, seats by id. */
  readonly plans: ReadonlyMap<string, Place>[]
}

/** Opens the sheet as a drawing and measures it as a person with a ruler would. */
export async function readSheet(page: Page, svg: string): Promise<SheetReading> {
  await page.setContent(`<body style="margin:0">${svg}</body>`)
  const raw = await page.evaluate(() => {
    const sheet = document.querySelector('svg')!
    const unit = sheet.viewBox.baseVal.width / sheet.getBoundingClientRect().width
    const middle = (element: Element) => {
      const box = element.getBoundingClientRect()
      return { x: (box.x + box.width / 2) * unit, y: (box.y + box.height / 2) * unit }
    }
    const tickOf = (text: string) =>
      [...document.querySelectorAll('text')].filter((each) => each.textContent?.trim() === text).map(middle)
    const seats = [...document.querySelectorAll('svg svg')].map((plan) =>
      [...plan.querySelectorAll('[data-seat]')].map((seat) => ({
        id: seat.getAttribute('data-seat')!,
        ...middle(seat.querySelector('circle')!),
      })),
    )
    return { width: sheet.viewBox.baseVal.width, zeros: tickOf('0'), ends: tickOf('600+'), seats }
  })
  const end = raw.ends[0]!
  const zero = raw.zeros.find((each) => Math.abs(each.y - end.y) < 1)!
  return {
    width: raw.width,
    legend: { from: zero, to: end, low: 0, high: 600 },
    plans: raw.seats
      .filter((seats) => seats.length > 0)
      .map((seats) => new Map(seats.map(({ id, x, y }) => [id, { x, y }]))),
  }
}

/** The straight map from metres to the sheet that seats at known places show (least squares of each axis). */
export function fitPlan(
  seats: readonly { id: string; x: number; y: number }[],
  drawn: ReadonlyMap<string, Place>,
): (x: number, y: number) => Place {
  const line = (pairs: readonly (readonly [number, number])[]) => {
    const mean = (k: 0 | 1) => pairs.reduce((sum, pair) => sum + pair[k], 0) / pairs.length
    const [mx, my] = [mean(0), mean(1)]
    const slope =
      pairs.reduce((sum, [a, b]) => sum + (a - mx) * (b - my), 0) / pairs.reduce((sum, [a]) => sum + (a - mx) ** 2, 0)
    return (value: number) => my + slope * (value - mx)
  }
  const known = seats.flatMap((seat) => {
    const place = drawn.get(seat.id)
    return place ? [{ seat, place }] : []
  })
  const toX = line(known.map(({ seat, place }) => [seat.x, place.x] as const))
  const toY = line(known.map(({ seat, place }) => [seat.y, place.y] as const))
  return (x, y) => ({ x: toX(x), y: toY(y) })
}

const keyAt = (png: PNG, x: number, y: number): number => {
  const i = (Math.round(y) * png.width + Math.round(x)) * 4
  return ((png.data[i] ?? 0) << 16) | ((png.data[i + 1] ?? 0) << 8) | (png.data[i + 2] ?? 0)
}

/**
 * The legend's scale as a table from colour to the irradiances it covers, read pixel by pixel along the bar: at each
 * place the colour that fills most of the bar's height, so that dots, hatch and ticks do not count.
 */
export function legendTable(png: PNG, legend: SheetReading['legend'], unit: number): Map<number, [number, number]> {
  const table = new Map<number, [number, number]>()
  const [x0, x1] = [legend.from.x * unit, legend.to.x * unit]
  const rows = Array.from({ length: 60 }, (_, i) => (legend.from.y - 22) * unit + i * 0.5 * unit)
  for (let x = Math.ceil(x0); x < x1; x++) {
    const value = legend.low + ((x - x0) / (x1 - x0)) * (legend.high - legend.low)
    for (const y of rows) {
      const key = keyAt(png, x, y)
      const known = table.get(key)
      table.set(key, known ? [Math.min(known[0], value), Math.max(known[1], value)] : [value, value])
    }
  }
  return new Map([...table].filter(([key, [low, high]]) => key !== 0xffffff && high - low < 25))
}

/** The irradiance that the picture shows at a place, by the legend; null where lines and figures cover the fill. */
export function shownIrradiance(png: PNG, table: ReadonlyMap<number, [number, number]>, x: number, y: number) {
  const seen = new Map<number, number>()
  for (let dy = -2; dy <= 2; dy++)
    for (let dx = -2; dx <= 2; dx++) {
      const key = keyAt(png, x + dx, y + dy)
      if (table.has(key)) seen.set(key, (seen.get(key) ?? 0) + 1)
    }
  const best = [...seen].toSorted((a, b) => b[1] - a[1])[0]
  return best && best[1] >= 10 ? table.get(best[0])! : null
}
