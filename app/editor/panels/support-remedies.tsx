import { useId, useState, type ReactNode } from 'react'
import type { LayoutChange } from '#app/domain/comparison/changed-seats.ts'
import type { Remedies } from '#app/domain/layout/remedies.ts'
import { memberLength } from '#app/domain/site/member.ts'
import type { Member, Site } from '#app/domain/site/site.ts'
import { formatLength, type DisplayUnits } from '#app/domain/units.ts'
import { Button } from '#app/components/button.tsx'
import { fluxFigure, noFigure } from '#app/editor/figures.ts'
import type { FluxUnit } from '#app/editor/view-choice.ts'

interface SupportRemediesProps {
  readonly heaterId: string
  readonly remedies: Remedies
  readonly site: Site
  readonly fluxUnit: FluxUnit
  /** What moving it would do to the seats; worked out when it is asked for. */
  readonly changeOf: () => LayoutChange
  readonly onMove: () => void
  /** Adds the rails to the site; gives why it could not, null when it did. */
  readonly onRails: () => Promise<string | null>
}

/** A verb that names a support may be longer than its column. */
const wrapping = 'h-auto! min-h-7 flex-initial! py-1 text-left whitespace-normal! pointer-coarse:min-h-11'

type Open = 'move' | 'rails' | null

/** What may be done about a heater that nothing holds: two remedies, each shown with what it does before it is done. */
export function SupportRemedies(props: SupportRemediesProps) {
  const { heaterId, remedies } = props
  const [open, setOpen] = useState<Open>(null)
  const { move, rails } = remedies
  if (!move && !rails) return null
  const toggle = (what: Open) => () => setOpen(open === what ? null : what)
  return (
    <div className="pb-2 pl-5.5">
      <div className="flex flex-wrap gap-1.5">
        {move && (
          <Button size="small" aria-expanded={open === 'move'} onClick={toggle('move')} className={wrapping}>
            Move {heaterId} to {move.supportName}
          </Button>
        )}
        {rails && (
          <Button size="small" aria-expanded={open === 'rails'} onClick={toggle('rails')}>
            Add {rails.rails.length === 1 ? 'a rail' : 'two rails'} over {heaterId}
          </Button>
        )}
      </div>
      {open === 'move' && move && <MoveFirst {...props} {...{ move }} onLeave={() => setOpen(null)} />}
      {open === 'rails' && rails && <RailsFirst {...props} rails={rails.rails} onLeave={() => setOpen(null)} />}
    </div>
  )
}

interface PanelProps extends SupportRemediesProps {
  readonly onLeave: () => void
}

function Panel({ title, children }: { title: string; children: ReactNode }) {
  const id = useId()
  return (
    <section aria-labelledby={id} className="mt-1.5 rounded-md border border-rule bg-paper px-3 py-2">
      <h3 id={id} className="font-strong">
        {title}
      </h3>
      {children}
    </section>
  )
}

/** Seats shown before the rest is only counted. */
const seatsShown = 5

function MoveFirst({
  heaterId,
  move,
  site,
  fluxUnit,
  changeOf,
  onMove,
  onLeave,
}: PanelProps & { move: NonNullable<Remedies['move']> }) {
  const [{ before, after, seats }] = useState(changeOf)
  const flux = (value: number | null | undefined) => (value === null || value === undefined ? noFigure : fluxFigure(value, fluxUnit)) // prettier-ignore
  const distance = formatLength(move.distance, site.displayUnits)
  const rest = seats.length - seatsShown
  const row = (name: string, from: ReactNode, to: ReactNode) => (
    <tr className="border-t border-rule">
      <th scope="row" className="py-0.5 pr-2 text-left font-regular">
        {name}
      </th>
      <td className="px-2 text-right">{from}</td>
      <td className="pl-2 text-right font-medium">{to}</td>
    </tr>
  )
  const seat = (of: LayoutChange['before']['coldest']) => (of ? `${flux(of.irradiance)} at ${of.seatId}` : noFigure)
  return (
    <Panel title={`${heaterId} at ${move.supportName}, ${distance} away`}>
      <table className="mt-1 w-full">
        <caption className="sr-only">Seats before and after, {fluxUnit}</caption>
        <thead className="text-2xs text-ink-3">
          <tr>
            <th scope="col" className="text-left font-medium">
              Body plane, {fluxUnit}
            </th>
            <th scope="col" className="px-2 text-right font-medium">
              Now
            </th>
            <th scope="col" className="pl-2 text-right font-medium">
              Moved
            </th>
          </tr>
        </thead>
        <tbody>
          {row('Coldest seat', seat(before.coldest), seat(after.coldest))}
          {row('Hottest head', seat(before.headMaximum), seat(after.headMaximum))}
          {row(
            'Seats in target',
            `${before.seatsInTarget} of ${before.seatsCounted}`,
            `${after.seatsInTarget} of ${after.seatsCounted}`,
          )}
          {seats.slice(0, seatsShown).map(({ seatId, ...each }) => (
            <SeatRow key={seatId} name={`Seat ${seatId}`} from={flux(each.before)} to={flux(each.after)} />
          ))}
        </tbody>
      </table>
      <p className="mt-0.5 text-2xs text-ink-2">
        {seats.length === 0 ? 'No seat changes.' : rest > 0 ? `${rest} more seats change by 1 W/m² or more.` : ''}
        {move.heater.tiltDeg === 0 ? '' : ' It keeps its tilt.'} Its height stays.
      </p>
      <div className="mt-2 flex flex-wrap gap-1.5">
        <Button size="small" onClick={onMove} className={wrapping}>
          Move {heaterId} {distance} to {move.supportName}
        </Button>
        <Button size="small" kind="text" onClick={onLeave}>
          Leave it
        </Button>
      </div>
    </Panel>
  )
}

function SeatRow({ name, from, to }: { name: string; from: string; to: string }) {
  return (
    <tr className="border-t border-rule text-ink-2">
      <th scope="row" className="py-0.5 pr-2 text-left font-regular">
        {name}
      </th>
      <td className="px-2 text-right">{from}</td>
      <td className="pl-2 text-right">{to}</td>
    </tr>
  )
}

function RailsFirst({ heaterId, rails, site, onRails, onLeave }: PanelProps & { rails: readonly Member[] }) {
  const [busy, setBusy] = useState(false)
  const [error, setError] = useState<string | null>(null)
  const add = async () => {
    setBusy(true)
    const why = await onRails()
    setBusy(false)
    setError(why)
  }
  const names = rails.map(({ name }) => name).join(' and ')
  return (
    <Panel title={`${names} over ${heaterId}`}>
      <ul className="mt-1">
        {rails.map((rail) => (
          <li key={rail.id}>{railText(rail, site.displayUnits)}</li>
        ))}
      </ul>
      <p className="mt-0.5 text-2xs text-ink-2">
        {heaterId} stays where it is, so no seat changes. What a rail carries, and its members, is for the structure’s
        engineer to confirm: until then its load cannot be told.
      </p>
      {error && (
        <p role="alert" className="mt-1 text-clay">
          {error}
        </p>
      )}
      <div className="mt-2 flex flex-wrap gap-1.5">
        <Button size="small" disabled={busy} onClick={() => void add()} className={wrapping}>
          Add {names} to the site
        </Button>
        <Button size="small" kind="text" onClick={onLeave}>
          Leave it
        </Button>
      </div>
    </Panel>
  )
}

function railText(rail: Member, units: DisplayUnits): string {
  const [from, to] = 'from' in rail.underside ? [rail.underside.from, rail.underside.to] : [0, 0]
  const heights = from === to ? formatLength(from, units) : `${formatLength(from, units)} to ${formatLength(to, units)}`
  return `${rail.name}: span ${formatLength(memberLength(rail), units)}, underside ${heights}. Span and load to be confirmed.`
}
