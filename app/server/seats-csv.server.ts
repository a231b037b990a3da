import type { FeelsLikePair, SeatWarmth } from '#app/domain/comfort/seat-warmth.ts'

/** Text that a spreadsheet would take for a formula gets a leading apostrophe; quotes are doubled. */
function textCell(text: string): string {
  const harmless = /^[=+\-@\t\r]/.test(text) ? `'${text}` : text
  return /[",\r\n]/.test(harmless) ? `"${harmless.replaceAll('"', '""')}"` : harmless
}

/** A figure to a fixed number of digits; empty where there is none. Figures are numbers, so never quoted or marked. */
const figureCell = (value: number | null, digits: number): string => (value === null ? '' : value.toFixed(digits))

const pairCells = ({ before, after }: FeelsLikePair): string[] => [figureCell(before, 2), figureCell(after, 2)]

const header = [
  'seat',
  'group',
  'priority',
  'x m',
  'y m',
  'body W/m²',
  'head W/m² (largest direction)',
  ...['calm', 'design', 'gust'].flatMap((wind) => [`feels-like ${wind} before °C`, `feels-like ${wind} after °C`]),
  'target',
]

function rowOf({ seat, body, head, feelsLike, target }: SeatWarmth): string[] {
  return [
    textCell(seat.id),
    textCell(seat.group),
    seat.priority,
    figureCell(seat.x, 4),
    figureCell(seat.y, 4),
    figureCell(body, 3),
    figureCell(head, 3),
    ...pairCells(feelsLike.calm),
    ...pairCells(feelsLike.design),
    ...pairCells(feelsLike.gust),
    target,
  ]
}

/** Every seat's figures as CSV (RFC 4180, UTF-8): lengths m, irradiance W/m², feels-like °C. */
export function seatsCsv(warmth: readonly SeatWarmth[]): string {
  return [header, ...warmth.map(rowOf)].map((cells) => `${cells.join(',')}\r\n`).join('')
}
