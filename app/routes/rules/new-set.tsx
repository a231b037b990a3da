import { data, redirect, useNavigation } from 'react-router'
import { readRuleSet, typedRuleSet } from '#app/domain/rules/read-rule-set.ts'
import { PageFrame } from '#app/components/page-frame.tsx'
import { RuleSetForm } from '#app/editor/rules/rule-set-form.tsx'
import { createRuleSet, findRuleSet } from '#app/server/data/rule-sets.server.ts'
import { readFields } from '#app/server/form-fields.server.ts'
import { typedFromFields } from '#app/server/rule-set-form.server.ts'
import { requireMay } from '#app/server/session.server.ts'
import { viewerOf } from '#app/server/viewer.server.ts'
import type { Route } from './+types/new-set'

export const meta: Route.MetaFunction = () => [{ title: 'New rule set · Inglefield' }]

const blank = { name: '', place: '', edition: '', articles: [] }

export async function loader({ request }: Route.LoaderArgs) {
  const member = await requireMay(request, 'edit-rules')
  const copyOf = new URL(request.url).searchParams.get('copy')
  const copied = copyOf === null ? null : await findRuleSet(member, copyOf)
  const typed = copied ? { ...typedRuleSet(copied.ruleSet), edition: '' } : blank
  return { viewer: viewerOf(member), typed }
}

export async function action({ request }: Route.ActionArgs) {
  const member = await requireMay(request, 'edit-rules')
  const typed = typedFromFields(await readFields(request))
  const read = readRuleSet(typed)
  if ('errors' in read) return data({ errors: read.errors, typed }, 400)
  return redirect(`/rules/sets/${await createRuleSet(member, read.ruleSet)}`)
}

export default function NewRuleSetPage({ loaderData, actionData }: Route.ComponentProps) {
  const sending = useNavigation().state === 'submitting'
  return (
    <PageFrame viewer={loaderData.viewer}>
      <h1 className="pt-1 text-xl font-strong">New rule set</h1>
      <p className="mt-0.5 mb-4 max-w-2xl text-ink-2">
        The articles of one place in one edition. Jobs that choose it take their figures from it.
      </p>
      <RuleSetForm
        typed={actionData?.typed ?? loaderData.typed}
        revision={null}
        errors={actionData?.errors ?? {}}
        sending={sending}
      />
    </PageFrame>
  )
}
