import type { Site } from '#app/domain/site/site.ts'
import { edgeOnScreen, onEdge, type ScreenEdge } from '#app/drawing/plan/outline.ts'
import type { PlanView } from '#app/drawing/plan/plan-view.ts'
import type { Pen } from '#app/drawing/pen.ts'
import { textWidth } from '#app/drawing/text/widths.ts'
import { Words } from '#app/drawing/text/words.tsx'

type Place = Site['beyond'][number]

interface Stroke {
  readonly path: string
  readonly opacity: number
}

const figure = (value: number): number => Math.round(value * 10) / 10

/** Points of an edge's frame as an SVG path. */
const lineOn = (edge: ScreenEdge, points: readonly (readonly [number, number])[]): string =>
  `M${points.map(([along, outward]) => onEdge(edge, along, outward).map(figure).join(' ')).join('L')}`

function wavesOf(edge: ScreenEdge, past: number, k: number): Stroke[] {
  const waves = [
    [13, 17, 1],
    [21, 21.5, 0.7],
    [29, 26, 0.5],
  ] as const
  return waves.slice(0, k < 1 ? 2 : 3).map(([outward, pitch, opacity]) => {
    const from = -past
    const count = Math.ceil((edge.length + 2 * past) / pitch)
    const points = Array.from({ length: count * 4 + 1 }, (_, i) => {
      const along = from + (i * pitch) / 4
      return [along, (outward + 1.3 * Math.sin((i * Math.PI) / 4)) * (k < 1 ? 0.72 : 1)] as const
    })
    return { path: lineOn(edge, points), opacity }
  })
}

function ticksOf(edge: ScreenEdge, pitch: number, reach: (i: number) => number, opacity: number): Stroke[] {
  const count = Math.floor(edge.length / pitch)
  const start = (edge.length - count * pitch) / 2
  const path = Array.from({ length: count + 1 }, (_, i) => {
    const along = start + i * pitch
    return lineOn(edge, [
      [along, 5],
      [along, 5 + reach(i)],
    ])
  })
  return [{ path: path.join(''), opacity }]
}

function strokesOf(kind: Place['kind'], edge: ScreenEdge, past: number, k: number): Stroke[] {
  if (kind === 'water') return wavesOf(edge, past, k)
  if (kind === 'drop') return ticksOf(edge, 9 * k, (i) => (i % 2 ? 6 : 12) * k, 0.9)
  if (kind === 'garden') {
    const tufts = Array.from({ length: Math.floor(edge.length / (26 * k)) }, (_, i) => {
      const along = (i + 0.5) * 26 * k
      const foot = (9 + (i % 3) * 7) * k
      return [-3, 0, 3].map((lean) =>
        lineOn(edge, [
          [along + lean * 0.3 * k, foot],
          [along + lean * k, foot + (lean === 0 ? 6 : 4.6) * k],
        ]),
      )
    }).flat()
    return [{ path: tufts.join(''), opacity: 0.8 }]
  }
  return [9, 13].map((outward) => ({
    path: lineOn(edge, [
      [-past, outward * k],
      [edge.length + past, outward * k],
    ]),
    opacity: outward === 9 ? 1 : 0.6,
  }))
}

/** Where along an edge its name stands, px: nearest the middle and clear of what else stands there; null without room. */
function nameAlong(edge: ScreenEdge, width: number, avoid: readonly (readonly [number, number])[]): number | null {
  const middles = [0.5, 0.42, 0.58, 0.34, 0.26, 0.66, 0.18, 0.1].map((t) => t * edge.length)
  const clear = middles.find((along) => {
    const [x] = onEdge(edge, along, 0)
    return avoid.every(([from, to]) => x + width / 2 < from - 10 || x - width / 2 > to + 10)
  })
  return clear ?? null
}

/**
 * What lies beyond the floor's edges: water, a garden, a street or a drop, with its name. `avoid`: stretches of the
 * drawing's width, px, in which other things stand above the floor.
 */
export function Beyond({
  site,
  view,
  pen,
  named,
  avoid,
}: {
  site: Site
  view: PlanView
  pen: Pen
  named: boolean
  avoid: readonly (readonly [number, number])[]
}) {
  return (
    <g>
      {site.beyond.map((place) => {
        const edge = edgeOnScreen(site.floor, place.edge, view)
        if (!edge) return null
        const level = Math.abs(edge.along[0]) > Math.abs(edge.along[1])
        const past = level ? view.width : view.height
        const name = sentence(place.name)
        const along = level ? nameAlong(edge, textWidth(name, pen.text, 500), avoid) : edge.length / 2
        const [x, y] = onEdge(edge, along ?? 0, (level ? 29 : 22) * (pen.k < 1 ? 0.72 : 1))
        return (
          <g key={place.edge}>
            {strokesOf(place.kind, edge, past, pen.k).map((stroke, i) => (
              <path
                key={i}
                d={stroke.path}
                fill="none"
                stroke={pen.colours.water}
                strokeWidth={0.9 * pen.k}
                opacity={stroke.opacity}
              />
            ))}
            {named && along !== null ? (
              <Words
                x={x}
                y={y}
                anchor="middle"
                size={pen.text}
                colour={pen.colours.line}
                halo={pen.colours.halo}
                turn={level ? 0 : -90}
              >
                {name}
              </Words>
            ) : null}
          </g>
        )
      })}
    </g>
  )
}

const sentence = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1)
