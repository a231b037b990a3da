import { can } from '#app/domain/access/roles.ts'
import { houseRuleGroups, houseRuleRow, houseRuleValues, readHouseRules } from '#app/domain/rules/house-rule-fields.ts'
import { plainHouseRules } from '#app/domain/rules/house-rules.ts'
import { PageFrame } from '#app/components/page-frame.tsx'
import { DecisionForm } from '#app/editor/rules/decision-form.tsx'
import { rulesDecision } from '#app/server/data/decisions.server.ts'
import { keepDecision, openDecision } from '#app/server/decision-form.server.ts'
import { requireMay } from '#app/server/session.server.ts'
import { viewerOf } from '#app/server/viewer.server.ts'
import type { Route } from './+types/house'

export const meta: Route.MetaFunction = () => [{ title: 'House rules · Rules · Inglefield' }]

const written = { show: houseRuleValues, read: readHouseRules }

export async function loader({ request }: Route.LoaderArgs) {
  const member = await requireMay(request, 'view')
  const kept = await openDecision(member, rulesDecision, written)
  return { viewer: viewerOf(member), kept, mayEdit: can(member.role, 'edit-rules') }
}

export async function action({ request }: Route.ActionArgs) {
  const member = await requireMay(request, 'edit-rules')
  return keepDecision(request, member, rulesDecision, written)
}

const groups = Object.fromEntries(
  Object.entries(houseRuleGroups).map(([group, fields]) => [
    group,
    fields.map((field) => {
      const { figure, source } = houseRuleRow(field, plainHouseRules)
      const { name, label, meaning, kind } = field
      return { name, label, unit: kind.unit, hint: `${meaning} By default ${figure}: ${source}.` }
    }),
  ]),
)

export default function HouseRulesPage({ loaderData: { viewer, kept, mayEdit }, actionData }: Route.ComponentProps) {
  return (
    <PageFrame viewer={viewer}>
      <DecisionForm
        title="House rules"
        lead="What no manual, no rule set and no published source decides, this organisation decides for itself. Every finding, figure and proposal goes by it, in jobs that are there already too. A size that has a tolerance and a brief that has a target keep theirs."
        savedWords="Findings and proposals go by it from now on."
        answer={actionData}
        {...{ groups, kept, mayEdit }}
      />
    </PageFrame>
  )
}
