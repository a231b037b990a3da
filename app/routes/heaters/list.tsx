import { useState } from 'react'
import { Link } from 'react-router'
import { beamInWords } from '#app/domain/heaters/beam-in-words.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import { formatMoney } from '#app/domain/comparison/list-price.ts'
import { formatLength, formatQuantity, type DisplayUnits } from '#app/domain/units.ts'
import { Choice } from '#app/components/choice.tsx'
import { OutcomeMark } from '#app/components/outcome-mark.tsx'
import { PageFrame } from '#app/components/page-frame.tsx'
import { DataTable, type Column } from '#app/components/table.tsx'
import { listModels } from '#app/server/data/heaters.server.ts'
import { requireMay } from '#app/server/session.server.ts'
import { viewerOf } from '#app/server/viewer.server.ts'
import type { Route } from './+types/list'

export const meta: Route.MetaFunction = () => [{ title: 'Heaters · Inglefield' }]

export async function loader({ request }: Route.LoaderArgs) {
  const member = await requireMay(request, 'view')
  return { viewer: viewerOf(member), models: await listModels(member) }
}

const none = '–'
const degrees = (value: number) => `${value}°`

const supplyWords = ({ supplyOptions }: HeaterModel) =>
  supplyOptions.map(({ voltage, phases }) => `${voltage} V${phases === 3 ? ' three-phase' : ''}`).join(', ')

function heightWords({ mountingHeight: { min, recommendedMax } }: HeaterModel, units: DisplayUnits): string {
  if (min === null) return 'not stated'
  const from = formatLength(min, units)
  return recommendedMax === null ? `from ${from}` : `${from} to ${formatLength(recommendedMax, units)}`
}

function clearanceWords({ clearanceToCombustible: clear }: HeaterModel, units: DisplayUnits): string {
  if (!clear) return 'not stated'
  const length = (metres: number | null) => (metres === null ? none : formatLength(metres, units))
  return [clear.above, clear.side, clear.end, clear.frontOfBeam].map(length).join(', ')
}

function standing({ status, beam }: HeaterModel) {
  if (status === 'withdrawn') return { outcome: 'fails' as const, word: 'Withdrawn', why: 'Cannot be submitted' }
  if (!beam) return { outcome: 'cannot tell' as const, word: 'No beam data', why: 'Can be seen, not placed' }
  return { outcome: 'pass' as const, word: 'Current', why: '' }
}

const prices = ({ listPrice: { EUR, USD } }: HeaterModel) =>
  [EUR === undefined ? null : formatMoney(EUR, 'EUR'), USD === undefined ? null : formatMoney(USD, 'USD')]
    .filter((price) => price !== null)
    .join(' · ') || none

function columnsFor(units: DisplayUnits): Column<HeaterModel>[] {
  const length = (metres: number) => formatLength(metres, units)
  return [
    {
      key: 'name',
      heading: 'Model',
      names: true,
      className: 'min-w-44',
      sortBy: ({ name }) => name,
      cell: ({ code, name, note }) => (
        <>
          <Link to={`/heaters/${code}`} className="inline-flex min-h-6 items-center underline pointer-coarse:min-h-11">
            {name}
          </Link>
          {note && <span className="block max-w-56 text-2xs font-regular text-ink-3">{note}</span>}
        </>
      ),
    },
    {
      key: 'status',
      heading: 'Status',
      sortBy: (model) => standing(model).word,
      cell: (model) => {
        const { outcome, word, why } = standing(model)
        return (
          <span className="whitespace-nowrap">
            <span className="mr-1.5 inline-block align-[-2px]">
              <OutcomeMark outcome={outcome} size={12} />
            </span>
            {word}
            {why && <span className="block text-2xs text-ink-3">{why}</span>}
          </span>
        )
      },
    },
    { key: 'wave', heading: 'Infrared', sortBy: ({ wave }) => wave, cell: ({ wave }) => wave },
    {
      key: 'power',
      heading: 'Power',
      numeric: true,
      sortBy: ({ stages }) => stages.at(-1) ?? null,
      cell: ({ stages }) => `${stages.map((watts) => watts / 1000).join(' / ')} kW`,
    },
    { key: 'supply', heading: 'Supply', cell: supplyWords },
    {
      key: 'efficiency',
      heading: 'Radiant share',
      numeric: true,
      sortBy: ({ radiantEfficiency }) => radiantEfficiency,
      cell: ({ radiantEfficiency, radiantEfficiencyRange: range }) => (
        <>
          {radiantEfficiency.toFixed(2)}
          {range && (
            <span className="block text-2xs text-ink-3">
              {range.low} to {range.high}
            </span>
          )}
        </>
      ),
    },
    { key: 'beam', heading: 'Beam, across × along', cell: ({ beam }) => beamInWords(beam) },
    {
      key: 'height',
      heading: 'Mounting height',
      sortBy: ({ mountingHeight }) => mountingHeight.min,
      cell: (model) => heightWords(model, units),
    },
    {
      key: 'tilt',
      heading: 'Tilt',
      cell: ({ tiltDeg }) => (tiltDeg ? `${tiltDeg.min} to ${degrees(tiltDeg.max)}` : 'not stated'),
    },
    {
      key: 'clearance',
      heading: 'Clear of combustibles: above, side, end, front',
      cell: (model) => clearanceWords(model, units),
    },
    { key: 'mounts', heading: 'Mounts', cell: ({ mounts }) => mounts.join(', ') },
    { key: 'ip', heading: 'Weather', cell: ({ ingressProtection }) => ingressProtection ?? 'not stated' },
    {
      key: 'size',
      heading: 'Body',
      cell: ({ body }) => `${length(body.length)} × ${length(body.width)} × ${length(body.depth)}`,
    },
    {
      key: 'mass',
      heading: 'Mass',
      numeric: true,
      sortBy: ({ body }) => body.mass,
      cell: ({ body }) => formatQuantity(body.mass, 'mass', units),
    },
    { key: 'price', heading: 'List, before tax', numeric: true, cell: prices },
    {
      key: 'lead',
      heading: 'Lead time',
      numeric: true,
      sortBy: ({ leadTimeDays }) => leadTimeDays,
      cell: ({ leadTimeDays }) => `${leadTimeDays} d`,
    },
  ]
}

export default function HeatersPage({ loaderData: { viewer, models } }: Route.ComponentProps) {
  const [units, setUnits] = useState<DisplayUnits>('metric')
  return (
    <PageFrame viewer={viewer}>
      <header className="flex flex-wrap items-end justify-between gap-4 pt-1 pb-4">
        <div>
          <h1 className="text-xl font-strong">Heaters</h1>
          <p className="mt-0.5 text-ink-2">
            As the data sheets and manuals state them; a beam of your own measurement comes before the data sheet’s.
            What is not stated is never assumed: a check that needs it says “cannot tell”.
          </p>
        </div>
        <Choice
          label="Units"
          value={units}
          options={[
            { value: 'metric', label: 'm, kg' },
            { value: 'imperial', label: 'ft in, lb' },
          ]}
          onChange={setUnits}
        />
      </header>
      <div
        className="overflow-x-auto focus-visible:outline-2 focus-visible:outline-focus"
        tabIndex={0}
        role="region"
        aria-label="Table of heaters"
      >
        <div className="min-w-[112rem]">
          <DataTable
            caption="Heater models with their data-sheet figures"
            columns={columnsFor(units)}
            rows={models}
            rowKey={({ code }) => code}
            initialSort={{ key: 'name', descending: false }}
            rowProps={() => ({ className: 'border-t border-rule [&>*]:py-1.5 [&>*]:align-top' })}
          />
        </div>
      </div>
    </PageFrame>
  )
}
