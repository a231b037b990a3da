import type { ReactNode } from 'react'
import { formatQuantity, type DisplayUnits } from '#app/domain/units.ts'
import { Mark } from '#app/editor/compare/differences.tsx'

interface MapHeadProps {
  i: number
  number: number
  /** Its title, as the link that leads to it. */
  title: ReactNode
  less: number | null
  warmth: readonly { readonly target: string }[] | null
  /** m². */
  overlapArea: number | null
  threshold: number
  units: DisplayUnits
}

/** Above a map: which variant, how many seats stand where, or how large the overlap is. */
export function MapHead({ i, number, title, less, warmth, overlapArea, threshold, units }: MapHeadProps) {
  const count = (target: string) => warmth?.filter((seat) => seat.target === target).length ?? '–'
  return (
    <header className="flex flex-wrap items-center gap-x-2.5 gap-y-1 border-t border-ink py-2">
      <Mark i={i} />
      <h2 className="min-w-44 flex-1 truncate">
        <span className="mr-1.5 font-strong">{number}</span> {title}
        {less !== null && <span className="text-ink-2">, less variant {less}</span>}
      </h2>
      {overlapArea !== null ? (
        <p className="text-ink-2">
          <span className="font-strong text-ink">{formatQuantity(overlapArea, 'area', units)}</span> where two or more
          each give ≥ {threshold} W/m²
        </p>
      ) : (
        <p className="flex gap-4 text-ink-2">
          <Ringed kind="below">{count('below')} below</Ringed>
          <Ringed kind="in target">{count('in target')} in target</Ringed>
          <Ringed kind="above">{count('above')} above</Ringed>
        </p>
      )}
    </header>
  )
}

type RingKind = 'below' | 'in target' | 'above'

function Ringed({ kind, children }: { kind: RingKind; children: ReactNode }) {
  return (
    <span className="inline-flex items-center gap-1.5 whitespace-nowrap">
      <Ring kind={kind} />
      <span>{children}</span>
    </span>
  )
}

/** A seat's ring as on the map. */
function Ring({ kind }: { kind: RingKind }) {
  return (
    <svg
      width="14"
      height="14"
      viewBox="0 0 14 14"
      fill="none"
      stroke="currentColor"
      strokeWidth="1.4"
      aria-hidden="true"
      className="flex-none"
    >
      <circle cx="7" cy="7" r="5.6" strokeDasharray={kind === 'below' ? '2.4 2' : undefined} />
      {kind === 'above' && <circle cx="7" cy="7" r="3.2" strokeWidth="1.1" />}
    </svg>
  )
}

/** What the rings of the seats say. */
export function RingLegend() {
  return (
    <p className="flex flex-wrap gap-x-3.5 text-ink-2">
      <Ringed kind="below">below, dashed</Ringed>
      <Ringed kind="in target">in target, plain</Ringed>
      <Ringed kind="above">above, double ring</Ringed>
    </p>
  )
}
