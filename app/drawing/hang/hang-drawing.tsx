import { bodyOf } from '#app/domain/layout/body.ts'
import type { HungHeater } from '#app/domain/layout/hang-sheet.ts'
import type { Hanger } from '#app/domain/layout/hanging.ts'
import type { Vec2 } from '#app/domain/vector.ts'
import { screenPen, type Pen } from '#app/drawing/pen.ts'
import { coloursOf, fontFamily } from '#app/drawing/theme.ts'
import { Words } from '#app/drawing/text/words.tsx'

/** Drawn in the colour of the text around it, so that it is read on light, dark and printed paper alike. */
const inkPen: Pen = {
  ...screenPen('day'),
  colours: { ...coloursOf('day'), line: 'currentColor', secondLine: 'currentColor', ground: 'none', element: 'currentColor' }, // prettier-ignore
}

/** How lengths and heights are written on the drawing. */
export interface HangWords {
  /** A hanger's length: whole millimetres or inches. */
  readonly length: (metres: number) => string
  readonly height: (metres: number) => string
}

/** One hanger on a drawing: along it and up, m. */
interface Strand {
  readonly hanger: Hanger
  readonly eye: Vec2
  readonly top: Vec2
}

/** A view of a heater square to something: its strands, its body's half width and its heights, m. */
interface HangView {
  readonly title: string
  readonly strands: readonly Strand[]
  readonly half: number
  readonly bottom: number
  readonly top: number
}

const size = { width: 250, height: 168 }
const margin = { side: 46, top: 26, bottom: 30 }

/** Along the element for plumb hangers; across it at each end for splayed ones. */
function viewsOf({ heater, model, schedule }: HungHeater): HangView[] {
  if (!model || !schedule) return []
  const body = bodyOf(heater, model)
  const rise = body.half.u * Math.abs(body.u[2]) + body.half.v * Math.abs(body.v[2]) + body.half.w * Math.abs(body.w[2])
  const heights = { bottom: heater.lowestPoint, top: heater.lowestPoint + 2 * rise }
  const { hangers } = schedule
  if (hangers.every(({ sideways }) => sideways === 0)) {
    const along = ({ eye }: Hanger) => (eye[0] - heater.x) * body.u[0] + (eye[1] - heater.y) * body.u[1]
    const strands = hangers.map((hanger): Strand => {
      const s = along(hanger)
      return { hanger, eye: [s, hanger.eye[2]], top: [s, hanger.underside] }
    })
    return [{ title: 'Along the element', strands, half: body.half.u, ...heights }]
  }
  const across = body.half.v * Math.hypot(body.v[0], body.v[1]) + body.half.w * Math.hypot(body.w[0], body.w[1])
  return ([0, 1] as const).map((end) => {
    const strands = hangers
      .filter((hanger) => hanger.end === end)
      .map((hanger, i): Strand => {
        const aside = i === 0 ? -hanger.sideways : hanger.sideways
        return { hanger, eye: [0, hanger.eye[2]], top: [aside, hanger.underside] }
      })
    return { title: end === 0 ? 'Across, eye 1' : 'Across, eye 2', strands, half: across, ...heights }
  })
}

const rounded = (value: number): number => Math.round(value * 10) / 10

/** A heater under its members with the lengths of its hangers; nothing for one that is not hung. */
export function HangDrawings({ hung, words, pen = inkPen }: { hung: HungHeater; words: HangWords; pen?: Pen }) {
  return viewsOf(hung).map((view) => <HangDrawing key={view.title} {...{ hung, view, words, pen }} />)
}

interface DrawingProps {
  readonly hung: HungHeater
  readonly view: HangView
  readonly words: HangWords
  readonly pen: Pen
}

function HangDrawing({ hung, view, words, pen }: DrawingProps) {
  const { strands, half } = view
  const wide = Math.max(half, ...strands.map(({ top }) => Math.abs(top[0])))
  const high = Math.max(view.top, ...strands.map(({ top }) => top[1]))
  const scale = Math.min(
    (size.width - 2 * margin.side) / (2 * wide),
    (size.height - margin.top - margin.bottom) / (high - view.bottom),
  )
  const at = ([x, z]: Vec2): Vec2 => [rounded(size.width / 2 + x * scale), rounded(margin.top + (high - z) * scale)]
  const chain = hung.heater.mount === 'chain'
  const [left, bottom] = at([-half, view.bottom])
  const [right, top] = at([half, view.top])
  const label = `${hung.heater.id}, ${view.title.toLowerCase()}: ${strands.map(({ hanger }) => words.length(hanger.length)).join(' and ')}`
  return (
    <svg
      viewBox={`0 0 ${size.width} ${size.height}`}
      width={size.width}
      height={size.height}
      role="img"
      aria-label={label}
      fontFamily={fontFamily}
    >
      <Overhead strands={strands} at={at} pen={pen} />
      {strands.map((strand, i) => (
        <StrandLine key={i} {...{ strand, at, chain, words, pen }} isLeft={i === 0} />
      ))}
      <rect
        x={left}
        y={top}
        width={rounded(right - left)}
        height={rounded(bottom - top)}
        fill="none"
        stroke={pen.colours.line}
        strokeWidth={1.3 * pen.k}
      />
      <Words
        x={size.width / 2}
        y={(top + bottom) / 2 + 4}
        anchor="middle"
        size={pen.text}
        weight={600}
        colour={pen.colours.line}
      >
        {bottom - top > 13 ? hung.heater.id : ''}
      </Words>
      <Words x={size.width / 2} y={bottom + 13} anchor="middle" size={pen.text} colour={pen.colours.line}>
        {`lowest point ${words.height(view.bottom)}`}
      </Words>
      <Words x={size.width / 2} y={bottom + 26} anchor="middle" size={pen.text} colour={pen.colours.line}>
        {view.title}
      </Words>
    </svg>
  )
}

/** The underside over the strands: one line where they share a member, else a mark over each. */
function Overhead({ strands, at, pen }: { strands: readonly Strand[]; at: (point: Vec2) => Vec2; pen: Pen }) {
  const [a, b] = strands
  const line = { stroke: pen.colours.line, strokeWidth: 1.6 * pen.k }
  if (a && b && a.hanger.memberId === b.hanger.memberId) {
    const [p, q] = [at(a.top), at(b.top)]
    const over = 22 / Math.max(1, Math.abs(q[0] - p[0]))
    const [dx, dy] = [(q[0] - p[0]) * over, (q[1] - p[1]) * over]
    return <line x1={rounded(p[0] - dx)} y1={rounded(p[1] - dy)} x2={rounded(q[0] + dx)} y2={rounded(q[1] + dy)} {...line} /> // prettier-ignore
  }
  return strands.map(({ top }, i) => {
    const [x, y] = at(top)
    return <path key={i} d={`M${x - 6} ${y}h12M${x - 6} ${y}v-8M${x + 6} ${y}v-8`} fill="none" {...line} />
  })
}

interface StrandProps {
  readonly strand: Strand
  readonly at: (point: Vec2) => Vec2
  readonly chain: boolean
  readonly words: HangWords
  readonly pen: Pen
  readonly isLeft: boolean
}

function StrandLine({ strand: { hanger, eye, top }, at, chain, words, pen, isLeft }: StrandProps) {
  const [a, b] = [at(eye), at(top)]
  const beside = isLeft ? -5 : 5
  const text = { anchor: isLeft ? ('end' as const) : ('start' as const), size: pen.text, colour: pen.colours.line }
  return (
    <g>
      <line
        x1={a[0]}
        y1={a[1]}
        x2={b[0]}
        y2={b[1]}
        stroke={pen.colours.line}
        strokeWidth={1.4 * pen.k}
        strokeDasharray={chain ? '2.6 1.7' : undefined}
      />
      <circle cx={a[0]} cy={a[1]} r={2} fill={pen.colours.line} />
      <Words x={(a[0] + b[0]) / 2 + beside} y={(a[1] + b[1]) / 2 + 4} {...text}>
        {words.length(hanger.length)}
      </Words>
      <Words x={b[0]} y={b[1] - 9} {...text} anchor="middle">
        {words.height(hanger.underside)}
      </Words>
    </g>
  )
}
