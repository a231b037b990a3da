import { useMemo, useState } from 'react'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { Brief } from '#app/domain/brief/brief.ts'
import { listModelChoices, suppliesOf, type ModelChoice } from '#app/domain/layout/model-choice.ts'
import type { Site } from '#app/domain/site/site.ts'
import { formatLength } from '#app/domain/units.ts'
import { Button } from '#app/components/button.tsx'

interface PlacePanelProps {
  readonly models: readonly HeaterModel[]
  readonly site: Site
  readonly brief: Brief
  /** Model that the next click on the plan places. */
  readonly placing: string | null
  readonly onPlacing: (code: string | null) => void
  /** Places one without pointing: in the middle of a member or of the floor. */
  readonly onPlaceAt: (choice: ModelChoice, memberId: string | null) => void
  readonly onClose: () => void
}

/** The catalogue for this site, the supply first: what can be placed, and why not for everything else. */
export function PlacePanel({ models, site, brief, placing, onPlacing, onPlaceAt, onClose }: PlacePanelProps) {
  const choices = useMemo(() => listModelChoices(models, site, brief), [models, site, brief])
  const fitting = choices.filter((choice) => choice.whyNot.length === 0)
  const excluded = choices.filter((choice) => choice.whyNot.length > 0)
  return (
    <section aria-labelledby="place-title" className="px-4.5 py-3.5">
      <header className="mb-1 flex items-baseline justify-between gap-2">
        <h2 id="place-title" className="text-sm font-strong">
          Place a heater
        </h2>
        <Button kind="text" size="small" onClick={onClose}>
          Close
        </Button>
      </header>
      <p className="mb-2 text-ink-2">
        Supply {suppliesOf(brief).join(' or ')} V. {fitting.length} of {choices.length} models can be placed here.
      </p>
      <ul>
        {fitting.map((choice) => (
          <li key={choice.model.code} className="border-t border-rule py-1.5">
            <FittingModel
              choice={choice}
              site={site}
              placing={placing === choice.model.code}
              onPlacing={onPlacing}
              onPlaceAt={onPlaceAt}
            />
          </li>
        ))}
      </ul>
      {fitting.length === 0 && <p className="text-ink-2">No model of the catalogue fits this supply and site.</p>}
      <details className="border-t border-rule">
        <summary className="min-h-8 cursor-pointer py-1.5 text-ink-2 hover:text-ink pointer-coarse:min-h-11">
          Why not the other {excluded.length}
        </summary>
        <ul>
          {excluded.map(({ model, whyNot }) => (
            <li key={model.code} className="border-t border-rule py-1.5">
              <p className="font-medium text-ink-2">{model.name}</p>
              <p className="text-2xs text-ink-2">{whyNot.join(' ')}</p>
            </li>
          ))}
        </ul>
      </details>
    </section>
  )
}

interface FittingModelProps extends Pick<PlacePanelProps, 'site' | 'onPlacing' | 'onPlaceAt'> {
  readonly choice: ModelChoice
  readonly placing: boolean
}

function FittingModel({ choice, site, placing, onPlacing, onPlaceAt }: FittingModelProps) {
  const { model, supplyVoltage, mounts } = choice
  const [memberId, setMemberId] = useState(site.members[0]?.id ?? '')
  const height = model.mountingHeight.min
  const facts = [
    `${model.stages.at(-1) ?? 0} W at ${supplyVoltage ?? '–'} V`,
    height === null ? null : `from ${formatLength(height, site.displayUnits)}`,
    mounts.join(', '),
  ]
  return (
    <>
      <div className="flex items-center justify-between gap-3">
        <div className="min-w-0">
          <p className="font-medium">{model.name}</p>
          <p className="truncate text-2xs text-ink-3">{facts.filter(Boolean).join(' · ')}</p>
        </div>
        <Button
          size="small"
          aria-pressed={placing}
          className={placing ? 'border-ink bg-paper-sunk' : ''}
          onClick={() => onPlacing(placing ? null : model.code)}
        >
          {placing ? 'Stop' : 'Place'}
        </Button>
      </div>
      {placing && (
        <div className="mt-1 flex flex-wrap items-center gap-2 text-2xs text-ink-2">
          <span>Click the plan, or without pointing:</span>
          {site.members.length > 0 && (
            <select
              aria-label="Support to place it under"
              value={memberId}
              onChange={(event) => setMemberId(event.target.value)}
              className="h-7 rounded-md border border-rule-strong bg-paper-raised px-1.5 text-ink pointer-coarse:h-11"
            >
              {site.members.map((member) => (
                <option key={member.id} value={member.id}>
                  {member.name}
                </option>
              ))}
            </select>
          )}
          <Button size="small" onClick={() => onPlaceAt(choice, memberId || null)}>
            Place in the middle
          </Button>
        </div>
      )}
    </>
  )
}
