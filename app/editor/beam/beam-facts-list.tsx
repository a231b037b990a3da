import { beamFacts } from '#app/domain/heaters/beam-facts.ts'
import type { BeamData } from '#app/domain/heaters/heater-model.ts'

/** Below this share of the peak a table may end, as nearly nothing is lost beyond its edge. */
const slight = 0.05

/** The angles of a beam between its half-intensity directions, its exponents, and what its table leaves dark. */
export function BeamFactsList({ beam }: { beam: BeamData }) {
  const { across, along, exponents, cutOff } = beamFacts(beam)
  return (
    <>
      <dl className="grid grid-cols-[auto_1fr] gap-x-4 gap-y-1">
        <dt className="text-ink-2">Beam angle across</dt>
        <dd>{across}</dd>
        <dt className="text-ink-2">Beam angle along</dt>
        <dd>{along}</dd>
        {exponents && (
          <>
            <dt className="text-ink-2">Powers of the cosine</dt>
            <dd>
              {exponents.across.toFixed(2)} across, {exponents.along.toFixed(2)} along
            </dd>
          </>
        )}
      </dl>
      {cutOff > slight && (
        <p className="mt-2 max-w-2xl rounded-md border border-rule-strong bg-paper-sunk px-3 py-2">
          At its edge the table still has {Math.round(cutOff * 100)} % of the peak. What lies beyond the edge counts as
          dark, so the heat within comes out too high.
        </p>
      )}
    </>
  )
}
