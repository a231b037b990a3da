import { beamInWords } from '#app/domain/heaters/beam-in-words.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { HeaterChange } from '#app/domain/layout/edits.ts'
import type { MountedHeater } from '#app/domain/layout/layout.ts'
import { suppliesOf } from '#app/domain/layout/model-choice.ts'
import type { Brief } from '#app/domain/brief/brief.ts'
import type { Site } from '#app/domain/site/site.ts'
import { parseLength } from '#app/domain/length-parser.ts'
import { Button } from '#app/components/button.tsx'
import { CheckField, SelectField } from '#app/components/field.tsx'
import { LengthField } from '#app/components/length-field.tsx'
import { AngleField } from '#app/editor/panels/angle-field.tsx'
import { alongLabel, fieldLength, fromLabel } from '#app/editor/panels/axis-words.ts'
import { hangs, modelChange, modelOptions, mountChange, mountOptions } from '#app/editor/panels/heater-choices.ts'
import { beamSide, limitsNote, supportsFor, wrongHeight, wrongTilt } from '#app/editor/panels/heater-limits.ts'

interface HeaterFieldsProps {
  /** The heaters chosen; never none. */
  readonly heaters: readonly MountedHeater[]
  readonly models: ReadonlyMap<string, HeaterModel>
  readonly site: Site
  readonly brief: Brief
  readonly readOnly: boolean
  readonly hold: boolean
  readonly onHold: (hold: boolean) => void
  readonly onChange: (change: HeaterChange, said: string) => void
  readonly onRemove: () => void
}

/** The value that all heaters share; null where they differ. */
function shared<T>(heaters: readonly MountedHeater[], of: (heater: MountedHeater) => T): T | null {
  const [first, ...rest] = heaters.map(of)
  return first !== undefined && rest.every((each) => each === first) ? first : null
}

/** Every value of the chosen heaters; several at once show what they share and are set together. */
export function HeaterFields(props: HeaterFieldsProps) {
  const { heaters, models, site, brief, readOnly, hold, onHold, onChange, onRemove } = props
  const [first] = heaters
  if (!first) return null
  const model = models.get(first.model)
  const single = heaters.length === 1
  const units = site.displayUnits
  const set = (change: HeaterChange) => onChange(change, `${heaters.map(({ id }) => id).join(', ')} set`)
  const height = (metres: number) => (model ? wrongHeight(metres, first, model, units) : null)
  return (
    <section aria-labelledby="heater-title" className="px-4.5 py-3.5">
      <header className="mb-2 flex items-baseline gap-2.5">
        <h2 id="heater-title" className="text-sm font-strong">
          {single ? `Heater ${first.id}` : `${heaters.length} heaters`}
        </h2>
        <p className="min-w-0 flex-1 truncate text-ink-2">{single ? (model?.name ?? first.model) : 'set together'}</p>
        {!readOnly && (
          <Button kind="text" size="small" onClick={onRemove} className="-my-1">
            Remove
          </Button>
        )}
      </header>
      {single && model?.beam?.kind === 'table' && (
        <p className="mb-2 text-2xs text-ink-3">Beam {beamInWords(model.beam)}</p>
      )}
      <fieldset disabled={readOnly} className="m-0 border-0 p-0">
        <legend className="sr-only">Place and aim</legend>
        <div
          className={`grid grid-cols-2 gap-2 tablet:grid-cols-4 desk:grid-cols-2 ${units === 'metric' ? 'wide:grid-cols-4' : ''}`}
        >
          <PlaceField label={alongLabel(site)} of="x" {...{ heaters, site, set }} />
          <PlaceField label={fromLabel(site)} of="y" {...{ heaters, site, set }} />
          <LengthField
            label="Lowest point"
            unit={units === 'metric' ? 'm' : ''}
            value={shared(heaters, (heater) => heater.lowestPoint)}
            show={(metres) => fieldLength(metres, units)}
            read={(text) => checkedLength(text, units, { min: 0, max: 30 }, height)}
            onCommit={(lowestPoint) => set({ lowestPoint })}
            placeholder="differ"
          />
          <TiltField {...{ heaters, model, set }} />
        </div>
        <div className="mt-2 grid grid-cols-2 gap-2 tablet:grid-cols-3">
          <SelectField
            label="Model"
            value={shared(heaters, (heater) => heater.model) ?? ''}
            onChange={(event) => set(modelChange(event.target.value, first, models, brief))}
            options={modelOptions(first, models)}
          />
          <SelectField
            label="Mount"
            value={shared(heaters, (heater) => heater.mount) ?? ''}
            onChange={(event) => set(mountChange(event.target.value, model))}
            options={mountOptions(first, model)}
          />
          <SelectField
            label="Support"
            value={shared(heaters, (heater) => heater.memberId) ?? ''}
            onChange={(event) => set({ memberId: event.target.value || null })}
            options={[
              { value: '', label: 'None' },
              ...supportsFor(first.mount, site).map(({ id, name }) => ({ value: id, label: name })),
            ]}
          />
        </div>
        {heaters.every(({ mount }) => hangs(mount)) && (
          <CheckField
            label="Splayed: each eye hangs from two members"
            checked={heaters.every(({ splayed }) => splayed)}
            onChange={(event) => set({ splayed: event.target.checked })}
            className="mt-1.5"
          />
        )}
        <SupplyFields {...{ heaters, model, brief, set }} />
      </fieldset>
      <div className="mt-1.5 flex flex-wrap items-baseline gap-x-4 gap-y-1">
        {!readOnly && (
          <CheckField
            label="Hold to members and spacing"
            checked={hold}
            onChange={(event) => onHold(event.target.checked)}
          />
        )}
        {single && model && <p className="text-2xs text-ink-3">{limitsNote(first, model, site, units)}</p>}
      </div>
    </section>
  )
}

type Units = Site['displayUnits']

function checkedLength(
  text: string,
  units: Units,
  range: { min: number; max: number },
  wrong: (metres: number) => string | null,
) {
  const reading = parseLength(text, units, range)
  if ('error' in reading) return { error: reading.error }
  const error = wrong(reading.metres)
  return error ? { error } : { ...reading }
}

interface PartProps {
  readonly heaters: readonly MountedHeater[]
  readonly set: (change: HeaterChange) => void
}

function PlaceField({ label, of, heaters, site, set }: PartProps & { label: string; of: 'x' | 'y'; site: Site }) {
  const units = site.displayUnits
  const range = rangeOf(site, of === 'x' ? 0 : 1)
  return (
    <LengthField
      label={label}
      unit={units === 'metric' ? 'm' : ''}
      value={shared(heaters, (heater) => heater[of])}
      show={(metres) => fieldLength(metres, units)}
      read={(text) => checkedLength(text, units, range, () => null)}
      onCommit={(metres) => set(of === 'x' ? { x: metres } : { y: metres })}
      placeholder="differ"
    />
  )
}

/** A heater may hang at most 3 m off the floor's rectangle. */
function rangeOf(site: Site, axis: 0 | 1) {
  const values = site.floor.map((corner) => corner[axis])
  return { min: Math.min(...values) - 3, max: Math.max(...values) + 3 }
}

function TiltField({ heaters, model, set }: PartProps & { model: HeaterModel | undefined }) {
  const [first] = heaters
  const tilt = shared(heaters, (heater) => heater.tiltDeg)
  if (!first) return null
  const side = tilt === null ? null : beamSide(first)
  const sign = tilt !== null && tilt < 0 ? -1 : 1
  return (
    <div className="min-w-0">
      <AngleField
        label="Tilt"
        {...(model?.tiltDeg ? { aside: `${model.tiltDeg.min}–${model.tiltDeg.max}` } : {})}
        value={tilt === null ? null : Math.abs(tilt)}
        check={(degrees) => (model ? wrongTilt(degrees, model) : null)}
        onCommit={(degrees) => set({ tiltDeg: degrees < 0 ? degrees : sign * degrees || 0 })}
      />
      {side && (
        <button
          type="button"
          onClick={() => set({ tiltDeg: -(tilt ?? 0) })}
          className="min-h-6 cursor-pointer text-left text-2xs text-ink-2 underline hover:text-ink pointer-coarse:min-h-11"
        >
          {side}: other side
        </button>
      )}
    </div>
  )
}

/** Turn, and what the heater is fed with. */
function SupplyFields({ heaters, model, brief, set }: PartProps & { model: HeaterModel | undefined; brief: Brief }) {
  const [first] = heaters
  if (!first) return null
  const offered = model?.supplyOptions.map((option) => option.voltage) ?? []
  const voltages = [...new Set([...suppliesOf(brief), first.supplyVoltage])].sort((a, b) => a - b)
  const stages = model?.stages ?? []
  return (
    <div className="mt-2 grid grid-cols-2 gap-2 tablet:grid-cols-4">
      <AngleField
        label="Turn"
        value={shared(heaters, (heater) => heater.turnDeg)}
        check={(degrees) => (Math.abs(degrees) > 360 ? 'Between −360 and 360°.' : null)}
        onCommit={(turnDeg) => set({ turnDeg })}
      />
      <SelectField
        label="Supply"
        value={`${shared(heaters, (heater) => heater.supplyVoltage) ?? ''}`}
        onChange={(event) => set({ supplyVoltage: Number(event.target.value) })}
        options={voltages.map((volts) => ({
          value: `${volts}`,
          label: offered.includes(volts) ? `${volts} V` : `${volts} V, not listed`,
        }))}
      />
      <SelectField
        label="Made for"
        value={`${shared(heaters, (heater) => heater.ratedVoltage ?? '') ?? ''}`}
        onChange={(event) => set({ ratedVoltage: event.target.value === '' ? null : Number(event.target.value) })}
        options={[
          { value: '', label: 'As supplied' },
          ...offered.map((volts) => ({ value: `${volts}`, label: `${volts} V` })),
        ]}
      />
      {stages.length > 1 && (
        <SelectField
          label="Stage"
          value={`${shared(heaters, (heater) => heater.stage ?? '') ?? ''}`}
          onChange={(event) => set({ stage: event.target.value === '' ? null : Number(event.target.value) })}
          options={[
            { value: '', label: 'Full power' },
            ...stages.map((watts, i) => ({ value: `${i + 1}`, label: `${i + 1}: ${watts} W` })),
          ]}
        />
      )}
    </div>
  )
}
