import { houseRules } from '#app/domain/rules/house-rules.ts'
import { formatLength, formatQuantity } from '#app/domain/units.ts'
import { ButtonLink } from '#app/components/button.tsx'
import { PageFrame } from '#app/components/page-frame.tsx'
import { DataTable, type Column } from '#app/components/table.tsx'
import { requireMay } from '#app/server/session.server.ts'
import { viewerOf } from '#app/server/viewer.server.ts'
import type { Route } from './+types/list'

export const meta: Route.MetaFunction = () => [{ title: 'Rules · Inglefield' }]

export async function loader({ request }: Route.LoaderArgs) {
  const member = await requireMay(request, 'view')
  return { viewer: viewerOf(member) }
}

interface RuleRow {
  readonly name: string
  readonly figure: string
  readonly source: string
  readonly meaning: string
}

const flux = (value: number) =>
  `${formatQuantity(value, 'irradiance', 'metric')} (${formatQuantity(value, 'irradiance', 'imperial')})`

const warmth: readonly RuleRow[] = [
  {
    name: 'Target',
    figure: `${houseRules.targetLow.value} to ${flux(houseRules.targetHigh.value)}`,
    source: houseRules.targetLow.source,
    meaning: 'Irradiance on the horizontal body plane of every seat that counts. A brief may set its own band.',
  },
  {
    name: 'Head caution, long stay',
    figure: flux(houseRules.headCautionLongStay.value),
    source: houseRules.headCautionLongStay.source,
    meaning: `Largest irradiance in any direction at the head, for a stay of ${houseRules.longStayMinutes.value} minutes or more.`,
  },
  {
    name: 'Head caution, short stay',
    figure: flux(houseRules.headCautionShortStay.value),
    source: houseRules.headCautionShortStay.source,
    meaning: 'The same for a shorter stay.',
  },
  {
    name: 'Stop',
    figure: flux(houseRules.irradianceStop.value),
    source: houseRules.irradianceStop.source,
    meaning: 'A layout that reaches it at body, head or eye height cannot be submitted.',
  },
  {
    name: 'Spread and overlap',
    figure: flux(houseRules.overlapThreshold.value),
    source: houseRules.overlapThreshold.source,
    meaning: 'Spread: the area where one heater alone gives it. Overlap: where two or more each alone do.',
  },
]

const hanging: readonly RuleRow[] = [
  {
    name: 'Tolerance of a size nobody named',
    figure: `± ${formatLength(houseRules.tolerance.value, 'metric')}`,
    source: houseRules.tolerance.source,
    meaning: 'Counts for every coordinate that no measured size decides. Placed heights have none.',
  },
  {
    name: 'Tolerance of a size by its source',
    figure: [
      `laser ± ${formatLength(houseRules.toleranceLaser.value, 'metric')}`,
      `tape ± ${formatLength(houseRules.toleranceTape.value, 'metric')}`,
      `drawing ± ${formatLength(houseRules.toleranceDrawing.value, 'metric')}`,
      `photo ${100 * houseRules.tolerancePhotoShare.value} %, at least ± ${formatLength(houseRules.tolerancePhotoLeast.value, 'metric')}`,
      `told or guessed ± ${100 * houseRules.toleranceGuessShare.value} %`,
    ].join(', '),
    source: houseRules.toleranceLaser.source,
    meaning:
      'Taken when a source is named, until somebody says better. Told and guessed sizes stay visible as assumed.',
  },
  {
    name: 'Chain beside its member',
    figure: formatLength(houseRules.chainSidewaysLimit.value, 'metric'),
    source: houseRules.chainSidewaysLimit.source,
    meaning: 'How far sideways of the member an eye may be for a chain to hang plumb.',
  },
  {
    name: 'Splayed hanger, reach',
    figure: formatLength(houseRules.splayReach.value, 'metric'),
    source: houseRules.splayReach.source,
    meaning: 'How far in plan each member of a splayed pair may be from its eye.',
  },
  {
    name: 'Splayed hanger, angle',
    figure: `${houseRules.splayAngleDeg.value}° from plumb`,
    source: houseRules.splayAngleDeg.source,
    meaning: 'The flattest that a splayed hanger may lie.',
  },
  {
    name: 'One point alone',
    figure: 'a whole heater',
    source: houseRules.safetyLine.source,
    meaning: 'What a suspension point should hold where its load is known, should the other hanger let go.',
  },
  {
    name: 'Supply above rated voltage',
    figure: `× ${houseRules.supplyOverRated.value}`,
    source: houseRules.supplyOverRated.source,
    meaning: 'An option whose rated voltage the supply passes by more than this may not be used.',
  },
  {
    name: 'Ingress protection, open sky',
    figure: `second numeral ≥ ${houseRules.ingressOpenSky.value}`,
    source: houseRules.ingressOpenSky.source,
    meaning: 'And a location note that allows rain. The same under a roof that opens.',
  },
  {
    name: 'Ingress protection, closed cover',
    figure: `second numeral ≥ ${houseRules.ingressUnderCover.value}`,
    source: houseRules.ingressUnderCover.source,
    meaning: 'A recess box hangs under a closed cover only. Without data: cannot tell.',
  },
]

const columns: readonly Column<RuleRow>[] = [
  { key: 'name', heading: 'Rule', names: true, cell: ({ name }) => name },
  { key: 'figure', heading: 'Figure', cell: ({ figure }) => figure },
  { key: 'meaning', heading: 'What it is for', cell: ({ meaning }) => <span className="text-ink-2">{meaning}</span> },
  { key: 'source', heading: 'Source', cell: ({ source }) => <span className="text-ink-2">{source}</span> },
]

export default function RulesPage({ loaderData: { viewer } }: Route.ComponentProps) {
  const table = (caption: string, rows: readonly RuleRow[]) => (
    <section className="mt-6 overflow-x-auto" tabIndex={0} aria-label={caption}>
      <DataTable
        caption={caption}
        showCaption
        columns={columns}
        rows={rows}
        rowKey={({ name }) => name}
        rowProps={() => ({ className: 'border-t border-rule [&>*]:py-2 [&>*]:align-top' })}
      />
    </section>
  )
  return (
    <PageFrame viewer={viewer}>
      <h1 className="pt-1 text-xl font-strong">Rules</h1>
      <p className="mt-0.5 max-w-2xl text-ink-2">
        House rules, where no manual and no standard gives the figure. Clearances, heights and tilt come from the manual
        of each model and stand in Heaters. A figure never approves: a licensed electrician, the structure’s engineer
        and the fire authority do.
      </p>
      {table('Warmth and cautions', warmth)}
      {table('Hanging, supply and weather', hanging)}
      <p className="mt-3">
        <ButtonLink to="/rules/hanging">Hanging data: chain, rods and fittings</ButtonLink>
      </p>
    </PageFrame>
  )
}
