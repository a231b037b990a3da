import type { Emitter } from '#app/domain/flux/emitter.ts'
import { irradianceByEmitter } from '#app/domain/flux/irradiance.ts'
import { coverHeightAt } from '#app/domain/site/cover.ts'
import { isInside } from '#app/domain/site/geometry.ts'
import type { Site } from '#app/domain/site/site.ts'
import type { Vec2 } from '#app/domain/vector.ts'
import type { MapAnswer } from '#app/drawing/heat/map-picture.ts'
import type { QuantityScale } from '#app/drawing/heat/quantity.ts'
import { fluxText, roughLength } from '#app/editor/figures.ts'
import { usePointed, type Pointed, type PointedStore } from '#app/editor/pointed.ts'
import type { FluxUnit } from '#app/editor/view-choice.ts'

/** What is read at a place: irradiance, each heater's share, the cover. */
export interface Reading {
  readonly irradiance: number
  /** Largest first. */
  readonly shares: readonly { readonly heaterId: string; readonly share: number }[]
  readonly cover: number | null
}

/** The reading at a place of a horizontal plane; null off the floor. Exact, not read from the map. */
export function readingAt(site: Site, emitters: readonly Emitter[], plane: number, [x, y]: Vec2): Reading | null {
  if (!isInside(site.floor, x, y)) return null
  const parts = irradianceByEmitter(emitters, [x, y, plane], [0, 0, 1])
  const irradiance = parts.reduce((sum, part) => sum + part, 0)
  const shares = emitters
    .map((emitter, i) => ({ heaterId: emitter.id, share: irradiance > 0 ? (parts[i] ?? 0) / irradiance : 0 }))
    .filter(({ share }) => share >= 0.005)
    .sort((a, b) => b.share - a.share)
  const covers = site.covers.map((cover) => coverHeightAt(cover, x, y)).filter((height) => height !== null)
  return { irradiance, shares, cover: covers.length > 0 ? Math.min(...covers) : null }
}

/** Value of the map's cell at a place; null outside it. */
export function mapValueAt(answer: MapAnswer, [x, y]: Vec2): number | null {
  const { grid, values } = answer
  const column = Math.floor((x - grid.x0) / grid.cell)
  const row = Math.floor((y - grid.y0) / grid.cell)
  if (column < 0 || row < 0 || column >= grid.columns || row >= grid.rows) return null
  const value = values[row * grid.columns + column]
  return value === undefined || Number.isNaN(value) ? null : value
}

export interface ReadOutProps {
  readonly store: PointedStore
  readonly site: Site
  readonly emitters: readonly Emitter[]
  /** Height of the plane that is read, m. */
  readonly plane: number
  readonly answer: MapAnswer | null
  readonly scale: QuantityScale
  readonly mapKind: 'flux' | 'share' | 'overlap' | 'feels-like'
  readonly fluxUnit: FluxUnit
  readonly width: number
  readonly height: number
  /** ± of the cover's height, m; null when not known. */
  readonly coverTolerance: number | null
}

/** A paper tag beside the pointer or the focused seat, and the pale cross where it reads. */
export function ReadOut(props: ReadOutProps) {
  const pointed = usePointed(props.store)
  const reading = pointed ? readingAt(props.site, props.emitters, props.plane, pointed.at) : null
  if (!pointed || !reading || props.emitters.length === 0) return null
  const [x, y] = pointed.screen
  return (
    <>
      {pointed.by === 'pointer' && <Cross x={x} y={y} />}
      <Tag {...props} pointed={pointed} reading={reading} />
    </>
  )
}

function Tag(props: ReadOutProps & { pointed: Pointed; reading: Reading }) {
  const { pointed, reading, site, fluxUnit, answer, scale, mapKind, width, height } = props
  const [x, y] = pointed.screen
  const units = site.displayUnits
  const toLeft = x > width - 190
  const above = y > height - 96
  const own = answer && mapKind !== 'flux' ? mapValueAt(answer, pointed.at) : null
  const place = pointed.seatId ?? `${roughLength(pointed.at[0], units)}, ${roughLength(pointed.at[1], units)}`
  const shares = reading.shares.slice(0, 3).map(({ heaterId, share }) => `${heaterId} ${Math.round(share * 100)} %`)
  const tolerance = props.coverTolerance === null ? '' : ` ± ${roughLength(props.coverTolerance, units)}`
  return (
    <div
      aria-hidden="true"
      className="pointer-events-none absolute top-0 left-0 z-10 rounded-sm bg-[#fbf7f0] px-2 py-1 text-2xs leading-[15px] whitespace-nowrap text-[#1d2233] shadow-lift"
      style={{
        transform: `translate(${x + (toLeft ? -16 : 16)}px, ${y + (above ? -12 : 12)}px) translate(${toLeft ? '-100%' : '0'}, ${above ? '-100%' : '0'})`,
      }}
    >
      <b className="mr-2 text-xs font-strong">
        {own === null ? fluxText(reading.irradiance, fluxUnit) : `${scale.format(own)} ${scale.unit}`}
      </b>
      {place}
      <br />
      {own !== null && <>{fluxText(reading.irradiance, fluxUnit)}: </>}
      {shares.length > 0 ? shares.join(', ') : 'No heat here'}
      {reading.cover !== null && (
        <>
          <br />
          Cover {roughLength(reading.cover, units)}
          {tolerance}
        </>
      )}
    </div>
  )
}

/** White with a dark edge, 30 px. */
function Cross({ x, y }: { x: number; y: number }) {
  const d = 'M-15 0H-3M3 0H15M0 -15V-3M0 3V15'
  return (
    <svg
      aria-hidden="true"
      width="34"
      height="34"
      viewBox="-17 -17 34 34"
      className="pointer-events-none absolute top-0 left-0"
      style={{ transform: `translate(${x - 17}px, ${y - 17}px)` }}
    >
      <path d={d} stroke="#0c1322" strokeWidth="3.2" opacity="0.8" />
      <path d={d} stroke="#ffffff" strokeWidth="1.3" />
    </svg>
  )
}
