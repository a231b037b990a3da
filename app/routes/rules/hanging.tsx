import { can } from '#app/domain/access/roles.ts'
import { hangingSources } from '#app/domain/layout/hanging-data.ts'
import { plainHanging } from '#app/domain/layout/plain-hanging.ts'
import { hangingFields, hangingValues, readHanging } from '#app/domain/layout/hanging-fields.ts'
import { formatLength } from '#app/domain/units.ts'
import { PageFrame } from '#app/components/page-frame.tsx'
import { DecisionForm } from '#app/editor/rules/decision-form.tsx'
import { hangingDecision } from '#app/server/data/decisions.server.ts'
import { keepDecision, openDecision } from '#app/server/decision-form.server.ts'
import { requireMay } from '#app/server/session.server.ts'
import { viewerOf } from '#app/server/viewer.server.ts'
import type { Route } from './+types/hanging'

export const meta: Route.MetaFunction = () => [{ title: 'Hanging · Rules · Inglefield' }]

const written = {
  show: (data: typeof plainHanging) => hangingValues(data, 'metric'),
  read: (values: Readonly<Record<string, string>>) => readHanging(values, 'metric'),
}

export async function loader({ request }: Route.LoaderArgs) {
  const member = await requireMay(request, 'view')
  const kept = await openDecision(member, hangingDecision, written)
  return { viewer: viewerOf(member), kept, mayEdit: can(member.role, 'edit-rules') }
}

export async function action({ request }: Route.ActionArgs) {
  const member = await requireMay(request, 'edit-rules')
  return keepDecision(request, member, hangingDecision, written)
}

const groups = {
  Hanging: hangingFields.map(({ name, label, meaning }) => ({
    name,
    label,
    unit: '',
    hint: `${meaning} By default ${formatLength(plainHanging[name], 'metric', 'fine')}: ${hangingSources[name]}.`,
  })),
}

export default function HangingPage({ loaderData: { viewer, kept, mayEdit }, actionData }: Route.ComponentProps) {
  return (
    <PageFrame viewer={viewer}>
      <DecisionForm
        title="Hanging"
        lead="How chain and rods are made here. Every hang schedule goes by these figures, and so do the findings about hangers. Links are the whole number nearest to drop less fittings over pitch; the turnbuckle takes up the rest."
        savedWords="Hang schedules go by it from now on."
        answer={actionData}
        {...{ groups, kept, mayEdit }}
      />
    </PageFrame>
  )
}
