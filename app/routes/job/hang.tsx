import { assumptionsOf } from '#app/domain/brief/assumptions.ts'
import { hangSheet, type HangSheet } from '#app/domain/layout/hang-sheet.ts'
import type { HangingData } from '#app/domain/layout/hanging-data.ts'
import { cautionsOfHeater } from '#app/domain/rules/cautions-of-heater.ts'
import { conditionsOfUse } from '#app/domain/rules/conditions-of-use.ts'
import { checkLayout } from '#app/domain/rules/check-layout.ts'
import type { Site } from '#app/domain/site/site.ts'
import { formatLength } from '#app/domain/units.ts'
import { Button, ButtonLink } from '#app/components/button.tsx'
import { JobFrame } from '#app/components/page-frame.tsx'
import { CarriedTable } from '#app/editor/hang/carried-table.tsx'
import { cutTextWithUnit } from '#app/editor/hang/hang-words.ts'
import { HungHeaterSection } from '#app/editor/hang/hung-heater.tsx'
import { requireJob } from '#app/server/data/jobs.server.ts'
import { requireLaidOut } from '#app/server/data/laid-out.server.ts'
import { viewerOf } from '#app/server/viewer.server.ts'
import type { Route } from './+types/hang'

export const meta: Route.MetaFunction = ({ loaderData }) => [
  { title: `Hang schedule · ${loaderData?.variant.title ?? 'Variant'}, ${loaderData?.job.name ?? 'job'} · Inglefield` },
]

export async function loader({ request, params }: Route.LoaderArgs) {
  const job = await requireJob(request, params.jobId, 'view')
  const { variant, site, siteRevision, brief, models, house } = await requireLaidOut(job, params.variantId)
  const { heaters, number, title, revision, id } = variant
  const findings = checkLayout({ site, brief, layout: { heaters }, models, warmth: [], house })
  const unsupported = findings.flatMap(({ rule, outcome, subject, title: why }) =>
    (rule === 'supported' || rule === 'mount-offered') && outcome === 'fails' ? [{ id: subject.id, why }] : [],
  )
  return {
    viewer: viewerOf(job.member),
    job: { id: job.id, name: job.name },
    variant: { id, number, title, revision },
    site,
    siteRevision,
    sheet: hangSheet(site, heaters, models, house),
    unsupported,
    cautions: heaters.map(({ id: heaterId, model }) => ({
      heaterId,
      cautions: cautionsOfHeater(heaterId, models.get(model), findings),
    })),
    conditions: conditionsOfUse(findings),
    house,
    assumed: assumptionsOf(brief, site),
    date: new Date().toISOString().slice(0, 10),
  }
}

export default function HangPage({ loaderData }: Route.ComponentProps) {
  const { viewer, job, variant, site, sheet, unsupported, cautions, house } = loaderData
  const tools = (
    <>
      <ButtonLink to={`/jobs/${job.id}/variants/${variant.id}`}>Layout</ButtonLink>
      <Button kind="primary" onClick={() => window.print()}>
        Print
      </Button>
    </>
  )
  const whyNot = (id: string) => unsupported.find((each) => each.id === id)?.why ?? null
  return (
    <JobFrame viewer={viewer} job={job} current="variants" tools={tools}>
      <header className="pb-2 print:hidden">
        <h1 className="text-xl font-strong">Hang schedule</h1>
        <Head {...loaderData} />
      </header>
      <table role="presentation" className="w-full table-fixed">
        <thead className="hidden print:table-header-group">
          <tr>
            <td className="pb-2">
              <b className="font-strong">Hang schedule</b> {job.name}
              <Head {...loaderData} />
            </td>
          </tr>
        </thead>
        <tbody>
          <Row>
            <Cautions {...loaderData} />
          </Row>
          {sheet.heaters.map((hung) => (
            <Row key={hung.heater.id}>
              <HungHeaterSection
                {...{ hung, site, house }}
                unsupported={whyNot(hung.heater.id)}
                cautions={cautions.find(({ heaterId }) => heaterId === hung.heater.id)?.cautions ?? []}
              />
            </Row>
          ))}
          {sheet.heaters.length === 0 && (
            <Row>
              <p className="border-t border-rule py-3 text-ink-2">
                No heaters yet. Place one on a member in the layout.
              </p>
            </Row>
          )}
          <Row>
            <section aria-labelledby="loads" className="border-t border-rule py-3">
              <h2 id="loads" className="mb-1.5 text-sm font-strong">
                Load per point
              </h2>
              <CarriedTable carried={sheet.carried} site={site} />
            </section>
          </Row>
          <Row>
            <Order sheet={sheet} site={site} hanging={house.hanging} />
          </Row>
        </tbody>
      </table>
    </JobFrame>
  )
}

/** A part of the sheet that stays together on paper. */
const Row = ({ children }: { children: React.ReactNode }) => (
  <tr>
    <td>{children}</td>
  </tr>
)

type Loaded = Route.ComponentProps['loaderData']

function Head({ variant, siteRevision, date }: Loaded) {
  const [year, month, day] = date.split('-').map(Number)
  return (
    <p className="mt-0.5 text-ink-2">
      {variant.title}, variant {variant.number}.{variant.revision}, site revision {siteRevision}. {day}{' '}
      {months[(month ?? 1) - 1]} {year}. Not yet checked. Heights from finished floor.
    </p>
  )
}

const months = ['January', 'February', 'March', 'April', 'May', 'June', 'July', 'August', 'September', 'October', 'November', 'December'] // prettier-ignore

function Cautions({ variant, siteRevision, assumed, conditions }: Loaded) {
  return (
    <section aria-labelledby="cautions" className="border-t border-rule py-3">
      <h2 id="cautions" className="text-sm font-strong">
        Before anything is hung
      </h2>
      <ul className="mt-1 list-disc space-y-0.5 pl-4.5">
        <li>
          Falling heater: each has its secondary safety line, led to structure apart from its hangers, before it is let
          go.
        </li>
        <li>Work at height: two people on a platform or tower, nobody below.</li>
        <li>
          Structure: nothing is hung from a support before its maker or the structure’s engineer confirms the load; what
          is not confirmed yet stands at its heater.
        </li>
        <li>Shock and burn: supply off and locked before a heater is touched; wait until it is cold.</li>
        <li>Measure each underside before cutting: heights carry the tolerances shown.</li>
        {conditions.map((condition) => (
          <li key={condition}>Condition of use: {condition}.</li>
        ))}
        {assumed.length > 0 && <li>Assumed: {assumed.join('; ')}.</li>}
      </ul>
      <p className="mt-1.5 text-ink-2">
        Calculated from variant {variant.number}.{variant.revision} and site revision {siteRevision}, and not yet
        checked. Not a substitute for the heater’s manual, a licensed electrician, the structure’s engineer, or the fire
        authority.
      </p>
    </section>
  )
}

function Order({ sheet, site, hanging }: { sheet: HangSheet; site: Site; hanging: HangingData }) {
  const units = site.displayUnits
  const { chain, rods, turnbuckles, safetyLines } = sheet.order
  const cut = (metres: number) => cutTextWithUnit(metres, units)
  const lines = [
    ...(chain > 0 ? [`Chain of ${cut(hanging.linkPitch)} pitch: ${formatLength(chain, units)}, in whole lengths of ${formatLength(hanging.orderStep, units)} per order.`] : []), // prettier-ignore
    ...(rods.length > 0 ? [`Rods as cut, to the nearest ${cut(hanging.rodStep)}: ${rods.map(cut).join(', ')}.`] : []),
    ...(turnbuckles > 0 ? [`Turnbuckles, clamps and pairs of screw links: ${turnbuckles}, one to each hanger; together ${cut(hanging.hardwareAllowance)} long at rest, ${cut(hanging.shortens)} shorter to ${cut(hanging.lengthens)} longer.`] : []), // prettier-ignore
    ...(safetyLines > 0 ? [`Secondary safety lines: ${safetyLines}, one to each heater at either eye, ${cut(hanging.safetySlack)} longer than its hanger so that it stays slack.`] : []), // prettier-ignore
  ]
  return (
    <section aria-labelledby="order" className="border-t border-rule py-3">
      <h2 id="order" className="text-sm font-strong">
        To order
      </h2>
      <ul className="mt-1 list-disc space-y-0.5 pl-4.5">
        {lines.length === 0 && <li>Nothing is hung.</li>}
        {lines.map((line) => (
          <li key={line}>{line}</li>
        ))}
      </ul>
    </section>
  )
}
