import type { HeaterModel, Mount } from '#app/domain/heaters/heater-model.ts'
import type { MountedHeater } from '#app/domain/layout/layout.ts'
import type { Site } from '#app/domain/site/site.ts'
import { radians, type Vec2 } from '#app/domain/vector.ts'
import { heaterNameAt, heaterPlace, supportPoint, type HeaterPlace } from '#app/drawing/plan/heater-place.ts'
import { toScreen, type PlanView } from '#app/drawing/plan/plan-view.ts'
import type { Pen } from '#app/drawing/pen.ts'
import { textWidth } from '#app/drawing/text/widths.ts'
import { Words } from '#app/drawing/text/words.tsx'

const rounded = (value: number): number => Math.round(value * 10) / 10

/** Distance of the two suspension points from the middle, m: the eyes' pitch, else near the ends of the body. */
const headsOf = (model: HeaterModel | null): number =>
  model ? (model.suspensionEyePitch ?? model.body.length * 0.8) / 2 : 0.22

/** The bar with its elements and suspension points, along +x about the origin, px. */
function HeaterBar({ place, heater, model, view, pen }: BarProps) {
  const heads = headsOf(model) * view.scale
  return (
    <>
      {heater.mount === 'recess box' ? (
        <rect
          x={rounded(-place.length / 2 - 3 * pen.k)}
          y={rounded(-place.width / 2 - 3 * pen.k)}
          width={rounded(place.length + 6 * pen.k)}
          height={rounded(place.width + 6 * pen.k)}
          fill="none"
          stroke={pen.colours.line}
          strokeWidth={0.8 * pen.k}
          strokeDasharray={`${3 * pen.k} ${2 * pen.k}`}
        />
      ) : null}
      <rect
        x={rounded(-place.length / 2)}
        y={rounded(-place.width / 2)}
        width={rounded(place.length)}
        height={rounded(place.width)}
        rx={1.6 * pen.k}
        fill={pen.colours.heater}
        stroke={pen.colours.heaterEdge}
        strokeWidth={pen.k}
      />
      <Elements place={place} heater={heater} model={model} view={view} pen={pen} />
      {heater.mount === 'recess box' ? null : (
        <>
          <Head at={-heads} mount={heater.mount} pen={pen} />
          <Head at={heads} mount={heater.mount} pen={pen} />
        </>
      )}
    </>
  )
}

interface BarProps {
  readonly place: HeaterPlace
  readonly heater: MountedHeater
  readonly model: HeaterModel | null
  readonly view: PlanView
  readonly pen: Pen
}

/** One ember line per element, where the tilted body holds it. */
function Elements({ place, heater, model, view, pen }: BarProps) {
  if (!model) return null
  const half = Math.min(place.length / 2 - 2 * pen.k, (model.elementLength / 2) * view.scale)
  const pitch = model.elementPitch * Math.cos(radians(heater.tiltDeg)) * view.scale
  const most = place.width / 2 - 1.4 * pen.k
  const count = model.elementCount
  const spread = Math.min(pitch, count > 1 ? (2 * most) / (count - 1) : 0)
  return Array.from({ length: count }, (_, i) => {
    const y = rounded((i - (count - 1) / 2) * spread)
    return (
      <line
        key={i}
        x1={rounded(-half)}
        x2={rounded(half)}
        y1={y}
        y2={y}
        stroke={pen.colours.element}
        strokeWidth={1.5 * pen.k}
      />
    )
  })
}

/** Chains hang from round eyes; every rigid mount has square heads. */
function Head({ at, mount, pen }: { at: number; mount: Mount; pen: Pen }) {
  const dark = pen.theme === 'dusk'
  if (mount === 'chain')
    return (
      <circle
        cx={rounded(at)}
        cy={0}
        r={(dark ? 2.3 : 2.1) * pen.k}
        fill={dark ? pen.colours.heaterEdge : '#ffffff'}
        stroke={dark ? pen.colours.heater : pen.colours.heaterEdge}
        strokeWidth={0.9 * pen.k}
      />
    )
  const side = 4 * pen.k
  return <rect x={rounded(at - side / 2)} y={-side / 2} width={side} height={side} fill={pen.colours.heaterEdge} />
}

/** What holds a heater that does not hang straight below its support: dotted for chains, solid for rigid mounts. */
function Leader({ heater, model, site, view, pen }: Omit<BarProps, 'place'> & { site: Site }) {
  const held = supportPoint(heater, site)
  if (!held) return null
  const aside: Vec2 = [held[0] - heater.x, held[1] - heater.y]
  const distance = Math.hypot(aside[0], aside[1])
  if (distance * view.scale < 4 * pen.k || distance > 3) return null
  const turn = radians(heater.turnDeg)
  const isPole = site.poles.some(({ id }) => id === heater.memberId)
  const heads = isPole ? [0] : [-headsOf(model), headsOf(model)]
  return heads.map((offset) => {
    const from: Vec2 = [heater.x + offset * Math.cos(turn), heater.y + offset * Math.sin(turn)]
    const [x1, y1] = toScreen(view, from)
    const [x2, y2] = toScreen(view, isPole ? held : [from[0] + aside[0], from[1] + aside[1]])
    return (
      <line
        key={offset}
        x1={rounded(x1)}
        y1={rounded(y1)}
        x2={rounded(x2)}
        y2={rounded(y2)}
        stroke={pen.colours.line}
        strokeWidth={1.5 * pen.k}
        strokeDasharray={heater.mount === 'chain' ? `${1.6 * pen.k} ${1.8 * pen.k}` : undefined}
      />
    )
  })
}

/** Double chevron beyond the end away from the name, pointing where the tilted beam goes; none when straight down. */
export function TiltChevron({ x, y, toward, pen }: { x: number; y: number; toward: Vec2; pen: Pen }) {
  const size = 4.1 * pen.k
  const [dx, dy] = toward
  const arrow = (shift: number): string => {
    const [cx, cy] = [x + dx * shift, y + dy * shift]
    const at = (along: number, aside: number): string =>
      `${rounded(cx + dx * along - dy * aside)} ${rounded(cy + dy * along + dx * aside)}`
    return `M${at(-size / 2, size)}L${at(size / 2, 0)}L${at(-size / 2, -size)}`
  }
  const path = arrow(-size * 0.6) + arrow(size * 0.6)
  return (
    <>
      <path d={path} fill="none" stroke={pen.colours.halo} strokeWidth={3.4 * pen.k} opacity={0.7} />
      <path d={path} fill="none" stroke={pen.colours.line} strokeWidth={1.5 * pen.k} strokeLinejoin="round" />
    </>
  )
}

function chevronOf(heater: MountedHeater, place: HeaterPlace, pen: Pen) {
  if (heater.tiltDeg === 0) return null
  const turn = radians(heater.turnDeg)
  const side = Math.sign(heater.tiltDeg)
  const toward: Vec2 = [-Math.sin(turn) * side, -Math.cos(turn) * side]
  const reach = place.length / 2 + 7.5 * pen.k
  return { x: place.x - place.nameEnd[0] * reach, y: place.y - place.nameEnd[1] * reach, toward }
}

/** A heater to scale: bar, elements, suspension points, leader, tilt, name, and a ring 7 px outside when selected. */
export function HeaterMark({
  heater,
  model,
  site,
  view,
  pen,
  selected = false,
  named = true,
  nameAt = null,
}: {
  heater: MountedHeater
  model: HeaterModel | null
  site: Site
  view: PlanView
  pen: Pen
  selected?: boolean
  named?: boolean
  /** Middle of the name, px; null: beyond the upper end, or the left end of a level heater. */
  nameAt?: Vec2 | null
}) {
  const place = heaterPlace(heater, model, view, pen)
  const chevron = chevronOf(heater, place, pen)
  const [nameX, nameY] = nameAt ?? heaterNameAt(place, textWidth(heater.id, pen.text, 600), pen)
  const reach = Math.max(place.length, 28)
  const depth = Math.max(place.width, 24)
  return (
    <g data-heater={heater.id}>
      <Leader heater={heater} model={model} site={site} view={view} pen={pen} />
      <g transform={`translate(${rounded(place.x)} ${rounded(place.y)}) rotate(${place.turnDeg})`}>
        <rect x={-reach / 2} y={-depth / 2} width={reach} height={depth} fill="none" pointerEvents="all" />
        {selected ? <SelectionRing length={place.length} width={place.width} pen={pen} /> : null}
        <HeaterBar place={place} heater={heater} model={model} view={view} pen={pen} />
      </g>
      {chevron ? <TiltChevron {...chevron} pen={pen} /> : null}
      {named ? (
        <Words
          x={nameX}
          y={nameY}
          centred
          anchor="middle"
          size={pen.text}
          weight={600}
          colour={pen.colours.line}
          halo={pen.colours.halo}
          haloWidth={3 * pen.k}
          haloOpacity={0.75}
        >
          {heater.id}
        </Words>
      ) : null}
    </g>
  )
}

/** The ring around something selected, 7 px outside a bar of this size about the origin. */
function SelectionRing({ length, width, pen }: { length: number; width: number; pen: Pen }) {
  const ring = {
    x: rounded(-length / 2 - 7),
    y: rounded(-width / 2 - 7),
    width: rounded(length + 14),
    height: rounded(width + 14),
    rx: 3,
    fill: 'none',
  }
  return (
    <>
      <rect {...ring} stroke={pen.colours.halo} strokeWidth={4} opacity={0.7} />
      <rect {...ring} stroke={pen.colours.selection} strokeWidth={1.8} />
    </>
  )
}
