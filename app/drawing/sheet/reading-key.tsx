import type { ReactElement } from 'react'
import type { Site } from '#app/domain/site/site.ts'
import { printPen } from '#app/drawing/pen.ts'
import { TiltChevron } from '#app/drawing/plan/heater.tsx'
import { sawTooth } from '#app/drawing/plan/obstacle.tsx'
import { SeatRing, WarmthDisc, warmthWords, type SeatOutcome } from '#app/drawing/plan/seat.tsx'
import { sheetInk } from '#app/drawing/plot/plot-ink.ts'
import type { SheetVariant } from '#app/drawing/sheet/sheet-facts.ts'
import type { Box } from '#app/drawing/sheet/sheet-layout.ts'
import { hasWarmthRows } from '#app/drawing/sheet/sheet-plot.tsx'
import { Words } from '#app/drawing/text/words.tsx'

interface Entry {
  readonly word: string
  /** The mark about (x, y); without one the word heads what follows. */
  readonly mark?: (x: number, y: number) => ReactElement
}

const pen = printPen
const { line, element, heater } = pen.colours

function bar(x: number, y: number, eyes: boolean): ReactElement {
  return (
    <>
      <rect x={x - 13} y={y - 3.6} width={26} height={7.2} rx={1.2} fill={heater} stroke={line} strokeWidth={0.72} />
      <line x1={x - 10.5} x2={x + 10.5} y1={y} y2={y} stroke={element} strokeWidth={1.1} />
      {[-9.5, 9.5].map((at) =>
        eyes ? (
          <circle key={at} cx={x + at} cy={y} r={1.5} fill="#ffffff" stroke={line} strokeWidth={0.65} />
        ) : (
          <rect key={at} x={x + at - 1.4} y={y - 1.4} width={2.8} height={2.8} fill={line} />
        ),
      )}
    </>
  )
}

const ring = (outcome: SeatOutcome) => (x: number, y: number) => (
  <SeatRing x={x} y={y} r={5.4} outcome={outcome} pen={pen} />
)

/** The entries that occur on this sheet. */
function entriesOf(site: Site, variants: readonly SheetVariant[]): Entry[] {
  const heaters = variants.flatMap(({ layout }) => layout.heaters)
  const outcomes = new Set(variants.flatMap(({ warmth }) => warmth.map(({ target }) => target)))
  const words = new Set(
    variants.flatMap(({ warmth }) => warmth.flatMap(({ sensation }) => sensation.calm.after?.word ?? [])),
  )
  const has = {
    chain: heaters.some(({ mount }) => mount === 'chain'),
    rigid: heaters.some(({ mount }) => mount !== 'chain' && mount !== 'recess box'),
    tilt: heaters.some(({ tiltDeg }) => tiltDeg !== 0),
    burns: site.obstacles.some(({ material }) => material !== 'non-combustible'),
  }
  const seats: [SeatOutcome, string][] = [
    ['below', 'Seat below target'],
    ['in target', 'Seat in target'],
    ['above', 'Seat above target'],
  ]
  return [
    ...(has.chain ? [{ word: 'Heater on chains', mark: (x: number, y: number) => bar(x, y, true) }] : []),
    ...(has.rigid ? [{ word: 'Heater on a rigid mount', mark: (x: number, y: number) => bar(x, y, false) }] : []),
    ...(has.tilt
      ? [
          {
            word: 'Tilted this way',
            mark: (x: number, y: number) => <TiltChevron x={x} y={y} toward={[1, 0]} pen={pen} />,
          },
        ]
      : []),
    ...seats.filter(([outcome]) => outcomes.has(outcome)).map(([outcome, word]) => ({ word, mark: ring(outcome) })),
    ...(has.burns
      ? [
          {
            word: 'Combustible edge',
            mark: (x: number, y: number) => (
              <path d={sawTooth([x - 12, y], [x + 12, y], 6.5, 4)} fill="none" stroke={line} strokeWidth={0.7} />
            ),
          },
        ]
      : []),
    ...(hasWarmthRows(site) && words.size > 0 ? [{ word: 'Rows below, out of the wind' }] : []),
    ...warmthWords
      .filter((word) => hasWarmthRows(site) && words.has(word))
      .map((word) => ({
        word: `Feels ${word}`,
        mark: (x: number, y: number) => <WarmthDisc x={x} y={y} r={5.4} word={word} pen={pen} />,
      })),
  ]
}

/** How to read the sheet: the marks that occur on it, each with its word. */
export function ReadingKey({ box, site, variants }: { box: Box; site: Site; variants: readonly SheetVariant[] }) {
  const entries = entriesOf(site, variants)
  const pitch = Math.min(16, (box.height - 20) / Math.max(1, entries.length))
  return (
    <g>
      <Words x={box.x} y={box.y + 9} size={10.2} weight={600} colour={sheetInk.ink}>
        How to read it
      </Words>
      {entries.map(({ word, mark }, i) => {
        const y = box.y + 25 + i * pitch
        return (
          <g key={word}>
            {mark?.(box.x + 14, y - 3)}
            <Words x={mark ? box.x + 36 : box.x} y={y} size={8.2} weight={mark ? 400 : 500} colour={sheetInk.ink}>
              {word}
            </Words>
          </g>
        )
      })}
    </g>
  )
}
