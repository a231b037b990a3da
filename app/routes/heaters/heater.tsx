import { randomUUID } from 'node:crypto'
import { Link } from 'react-router'
import { can } from '#app/domain/access/roles.ts'
import { beamInWords } from '#app/domain/heaters/beam-in-words.ts'
import { PageFrame } from '#app/components/page-frame.tsx'
import { DataTable, type Column } from '#app/components/table.tsx'
import { When } from '#app/components/when.tsx'
import { BeamFactsList } from '#app/editor/beam/beam-facts-list.tsx'
import { BeamForm } from '#app/editor/beam/beam-form.tsx'
import { keepBeam } from '#app/server/beam-form.server.ts'
import { findHeaterWithBeam, requireHeater, type BeamRevision } from '#app/server/data/beams.server.ts'
import { missing } from '#app/server/missing.server.ts'
import { requireMay } from '#app/server/session.server.ts'
import { viewerOf } from '#app/server/viewer.server.ts'
import type { Route } from './+types/heater'

export const meta: Route.MetaFunction = ({ loaderData }) => [
  { title: `${loaderData?.name ?? 'Heater'} · Heaters · Inglefield` },
]

export async function loader({ request, params: { code } }: Route.LoaderArgs) {
  const member = await requireMay(request, 'view')
  const found = await findHeaterWithBeam({ member, code })
  if (!found) throw missing(request, 'heater')
  const { model, ...rest } = found
  return {
    viewer: viewerOf(member),
    ...rest,
    code,
    name: model.name,
    beam: model.beam,
    mayEdit: can(member.role, 'edit-beams'),
    sendingKey: randomUUID(),
  }
}

export async function action({ request, params }: Route.ActionArgs) {
  const heater = await requireHeater(request, params.code, 'edit-beams')
  return keepBeam(request, heater)
}

const revisionColumns: readonly Column<BeamRevision>[] = [
  { key: 'revision', heading: 'Revision', names: true, cell: ({ revision }) => revision },
  { key: 'when', heading: 'Kept', cell: ({ createdAt }) => <When at={createdAt} /> },
  { key: 'who', heading: 'By', cell: ({ author }) => author ?? 'An account that is gone' },
  {
    key: 'beam',
    heading: 'Beam',
    cell: ({ table }) => (table ? `table of ${table.across} × ${table.along}` : 'the data sheet’s'),
  },
  { key: 'source', heading: 'From', cell: ({ table }) => <span className="text-ink-2">{table?.source ?? '–'}</span> },
]

export default function HeaterPage({ loaderData, actionData }: Route.ComponentProps) {
  const { viewer, name, code, beam, revisions, mayEdit } = loaderData
  return (
    <PageFrame viewer={viewer}>
      <div className="max-w-4xl pt-1">
        <h1 className="text-xl font-strong">{name}</h1>
        <p className="mt-0.5 mb-5 text-ink-2">
          The beam that every map, seat and finding of this organisation rests on.{' '}
          <Link to="/heaters" className="inline-block py-0.5 underline">
            All heaters
          </Link>
        </p>
        <BeamInUse {...loaderData} />
        {beam && (
          <p className="mt-3">
            <a href={`/api/heaters/${code}/beam.csv`} download className="inline-block py-0.5 underline">
              Present beam as CSV
            </a>
            {beam.kind === 'angles' && <span className="text-ink-2">, its angles written out every 5°</span>}
          </p>
        )}
        <section aria-labelledby="measured" className="mt-8">
          <h2 id="measured" className="mb-2 text-lg font-strong">
            A beam of your own measurement
          </h2>
          {actionData?.saved && (
            <p role="status" className="mb-3 text-moss">
              {actionData.intent === 'save' ? 'Saved. ' : 'The data sheet’s beam holds again. '}
              Maps, seats and findings rest on it from now on, in jobs that are there already too.
            </p>
          )}
          {mayEdit ? (
            <Editing {...loaderData} answer={actionData} />
          ) : (
            <p className="text-ink-2">An engineer or the owner gives a heater its measured beam.</p>
          )}
        </section>
        {revisions.length > 0 && (
          <section className="mt-8 overflow-x-auto" tabIndex={0} aria-label="Revisions">
            <DataTable
              caption="Revisions"
              showCaption
              columns={revisionColumns}
              rows={revisions}
              rowKey={({ revision }) => String(revision)}
              rowProps={() => ({ className: 'border-t border-rule [&>*]:py-2 [&>*]:align-top' })}
            />
          </section>
        )}
      </div>
    </PageFrame>
  )
}

type Loaded = Route.ComponentProps['loaderData']

function BeamInUse({ beam, dataSheetBeam, measured, revision, revisions }: Loaded) {
  const [newest] = revisions
  return (
    <section aria-labelledby="beam">
      <h2 id="beam" className="mb-1 text-lg font-strong">
        {beam ? `Beam ${beamInWords(beam)}` : 'No beam data'}
      </h2>
      <p className="mb-2.5 text-ink-2">
        {beam?.source ?? 'Without a beam the heater can be seen, not placed.'}
        {measured && newest && (
          <>
            {' '}
            · revision {revision}
            {newest.author && `, by ${newest.author}`}, <When at={newest.createdAt} />. The data sheet:{' '}
            {beamInWords(dataSheetBeam)}.
          </>
        )}
      </p>
      {beam && <BeamFactsList beam={beam} />}
    </section>
  )
}

/** The form from the revision that it was sent from until it is kept. */
function Editing({ revision, measured, sendingKey, answer }: Loaded & { answer: Route.ComponentProps['actionData'] }) {
  const from = answer && !answer.saved ? answer.revision : String(revision)
  return <BeamForm key={from} revision={from} {...{ sendingKey, measured, answer }} />
}
