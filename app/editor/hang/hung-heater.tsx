import type { HungHeater } from '#app/domain/layout/hang-sheet.ts'
import { hangerTolerance } from '#app/domain/layout/hanger-tolerance.ts'
import type { Hanger, HangSchedule } from '#app/domain/layout/hanging.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { HeaterCaution } from '#app/domain/rules/cautions-of-heater.ts'
import type { House } from '#app/domain/rules/house.ts'
import type { Site } from '#app/domain/site/site.ts'
import { formatLength } from '#app/domain/units.ts'
import { HangDrawings } from '#app/drawing/hang/hang-drawing.tsx'
import { OutcomeMark } from '#app/components/outcome-mark.tsx'
import { DataTable, type Column } from '#app/components/table.tsx'
import {
  asideText,
  cutText,
  fixedText,
  forceText,
  nameOf,
  outcomeText,
  placeText,
  takeUpText,
  tiltText,
} from '#app/editor/hang/hang-words.ts'

interface HungHeaterProps {
  readonly hung: HungHeater
  readonly site: Site
  readonly house: House
  /** Why it may not be hung as drawn: the title of its finding. */
  readonly unsupported: string | null
  readonly cautions: readonly HeaterCaution[]
}

/** One heater as it is hung: its drawing, its hangers and how level they leave it. */
export function HungHeaterSection({ hung, site, house, unsupported, cautions }: HungHeaterProps) {
  const { heater, model, support, schedule } = hung
  const units = site.displayUnits
  return (
    <section aria-label={`Heater ${heater.id}`} className="border-t border-rule py-3">
      <h2 className="text-sm font-strong">
        {heater.id}
        <span className="ml-2.5 font-regular text-ink-2">
          {model?.name ?? heater.model}, {heater.mount}
          {heater.splayed && schedule ? ', splayed' : ''}. Lowest point {formatLength(heater.lowestPoint, units)}
          {heater.tiltDeg === 0 ? '' : `, tilt ${Math.abs(heater.tiltDeg)}°`}
        </span>
      </h2>
      {unsupported && (
        <p className="mt-1 text-clay">
          <span className="mr-1.5 inline-block align-[-2px]">
            <OutcomeMark outcome="fails" />
          </span>
          {unsupported}. Not to be hung as drawn.
        </p>
      )}
      <Cautions cautions={cautions} heaterId={heater.id} />
      {!schedule && !unsupported && support && (
        <p className="mt-1 text-ink-2">
          {support.outcome === 'cannot tell' ? 'How it is held cannot be told. ' : ''}Fixed to{' '}
          {fixedText(support, site)}. Set level with a spirit level.
        </p>
      )}
      {schedule && model && (
        <div className="mt-1 flex flex-wrap items-start gap-x-4 gap-y-2 print:flex-nowrap print:gap-x-1">
          <div className="flex flex-wrap print:flex-none print:flex-col print:[&_svg]:h-28 print:[&_svg]:w-auto">
            <HangDrawings
              hung={hung}
              words={{ length: (m) => cutText(m, units), height: (m) => formatLength(m, units) }}
            />
          </div>
          <div className="min-w-0 flex-1 basis-120 print:basis-0 print:text-2xs print:[&_td]:px-0.5 print:[&_th]:px-0.5">
            <Hangers {...{ hung, site, house, schedule }} />
            <Levelness {...{ schedule, model, mount: heater.mount }} />
            {asideText(hung, units) && <p className="mt-1 text-ink-2">{asideText(hung, units)}</p>}
            {schedule.hangers.map((hanger, i) => {
              const text = outcomeText(hanger, heater.mount, units)
              return text ? (
                <p key={i} className="mt-1 text-clay">
                  {text}
                </p>
              ) : null
            })}
          </div>
        </div>
      )}
    </section>
  )
}

/** What concerns this heater alone, beside it; nothing when nothing does. */
function Cautions({ cautions, heaterId }: { cautions: readonly HeaterCaution[]; heaterId: string }) {
  if (cautions.length === 0) return null
  return (
    <ul aria-label={`Cautions of ${heaterId}`} className="mt-1 space-y-0.5">
      {cautions.map(({ kind, outcome, sentence }) => (
        <li key={`${kind} ${sentence}`} className="flex gap-1.5">
          <span className="mt-0.5 w-3 flex-none">{outcome && <OutcomeMark outcome={outcome} />}</span>
          <span>
            <b className="inline-block font-medium first-letter:uppercase">{kind}</b>: {sentence}
          </span>
        </li>
      ))}
    </ul>
  )
}

interface HangersProps {
  readonly hung: HungHeater
  readonly site: Site
  readonly house: House
  readonly schedule: HangSchedule
}

function Hangers({ hung: { heater }, site, house, schedule }: HangersProps) {
  const units = site.displayUnits
  const cut = (of: (hanger: Hanger) => number) => (hanger: Hanger) => cutText(of(hanger), units)
  const splayed = schedule.hangers.some(({ sideways }) => sideways > 0)
  const chain = heater.mount === 'chain'
  const columns: Column<Hanger>[] = [
    { key: 'eye', heading: 'Eye', names: true, cell: ({ end }) => end + 1 },
    { key: 'at', heading: 'At', cell: (hanger) => placeText(hanger, units), className: 'whitespace-nowrap' },
    {
      key: 'member',
      heading: 'Member',
      cell: ({ memberId }) => nameOf(site, memberId),
      className: 'whitespace-nowrap',
    },
    {
      key: 'underside',
      heading: 'Underside',
      numeric: true,
      cell: (hanger) => {
        const tolerance = hangerTolerance(site, hanger, house.rules.toleranceUnstated)
        return `${formatLength(hanger.underside, units)}${tolerance ? ` ± ${cutText(tolerance, units)}` : ''}`
      },
    },
    { key: 'drop', heading: 'Drop', numeric: true, cell: cut(({ drop }) => drop) },
    ...(splayed
      ? [
          { key: 'aside', heading: 'Aside', numeric: true, cell: cut(({ sideways }) => sideways) },
          { key: 'length', heading: 'Length', numeric: true, cell: cut(({ length }) => length) },
        ]
      : []),
    { key: 'less', heading: 'Fittings', numeric: true, cell: () => cutText(house.hanging.hardwareAllowance, units) },
    { key: 'net', heading: 'Net', numeric: true, cell: cut(({ net }) => net) },
    ...(chain ? [{ key: 'links', heading: 'Links', numeric: true, cell: ({ links }: Hanger) => links ?? '–' }] : []),
    {
      key: 'cut',
      heading: chain ? 'Chain' : 'Rod',
      numeric: true,
      cell: ({ cutLength }) => <b className="font-strong">{cutText(cutLength, units)}</b>,
    },
    { key: 'take-up', heading: 'Turnbuckle', numeric: true, cell: (hanger) => takeUpText(hanger, units) },
    { key: 'safety', heading: 'Safety line', numeric: true, cell: cut(({ safetyLine }) => safetyLine) },
    { key: 'pull', heading: 'Pull', numeric: true, cell: ({ tension }) => forceText(tension, units) },
  ]
  const keyOf = ({ end, memberId }: Hanger) => `${end} ${memberId}`
  return (
    <>
      <div
        className="overflow-x-auto max-tablet:hidden print:block print:overflow-visible"
        tabIndex={0}
        role="region"
        aria-label={`Hangers of ${heater.id}`}
      >
        <DataTable
          caption={`Hangers of ${heater.id}${units === 'metric' ? ', mm' : ''}`}
          columns={columns}
          rows={schedule.hangers}
          rowKey={keyOf}
        />
      </div>
      <ul aria-label={`Hangers of ${heater.id}`} className="tablet:hidden print:hidden">
        {schedule.hangers.map((hanger) => (
          <li key={keyOf(hanger)} className="border-t border-rule py-2 first:border-t-0">
            <dl className="grid grid-cols-3 gap-x-3 gap-y-1.5">
              {columns.map(({ key, heading, cell }) => (
                <div key={key} className={key === 'at' ? 'col-span-2' : ''}>
                  <dt className="text-2xs text-ink-3">{heading}</dt>
                  <dd>{cell(hanger)}</dd>
                </div>
              ))}
            </dl>
          </li>
        ))}
      </ul>
    </>
  )
}

/** How level the hangers leave the element, along it and across it, against the manual's limit. */
function Levelness({ schedule, model, mount }: { schedule: HangSchedule; model: HeaterModel; mount: string }) {
  const limit = model.elementAxisLevelWithinDeg
  const left = Math.abs(schedule.tiltLeftDeg)
  const outcome = limit === null ? 'cannot tell' : left > limit ? 'fails' : 'pass'
  const alone = mount === 'chain' ? 'whole links alone' : 'rods as cut alone'
  return (
    <p className="mt-1.5 text-ink-2">
      <span className="mr-1.5 inline-block align-[-2px]">
        <OutcomeMark outcome={outcome} />
      </span>
      Along the element {tiltText(schedule.tiltLeftDeg)} after the turnbuckles ({alone}{' '}
      {tiltText(schedule.residualTiltDeg)}); across it {tiltText(schedule.tiltAcrossDeg)},{' '}
      {mount === 'chain' ? 'by its own weight' : 'set at the heads of the rods'}.{' '}
      {limit === null ? 'The manual states no limit.' : `The manual asks for level within ${limit}°.`}
    </p>
  )
}
