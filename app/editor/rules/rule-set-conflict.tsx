import { useSubmit } from 'react-router'
import type { TypedRuleSet } from '#app/domain/rules/read-rule-set.ts'
import { mergedRuleSet, ruleSetDifferences } from '#app/domain/rules/rule-set-differences.ts'
import { Meanwhile } from '#app/editor/rules/meanwhile.tsx'
import { fieldsOfRuleSet } from '#app/editor/rules/rule-set-fields.ts'

interface RuleSetConflictProps {
  readonly mine: TypedRuleSet
  readonly meanwhile: {
    readonly revision: number
    readonly theirs: TypedRuleSet
    readonly base: TypedRuleSet | null
    readonly changed: { readonly by: string | null; readonly at: string }
  }
}

/** A rule set that somebody kept meanwhile beside what was typed; the choice is sent on from their revision. */
export function RuleSetConflict({ mine, meanwhile }: RuleSetConflictProps) {
  const submit = useSubmit()
  const { revision, theirs, base, changed } = meanwhile
  const settle = (taken: ReadonlySet<string>) => {
    const fields = fieldsOfRuleSet(mergedRuleSet(mine, theirs, taken))
    void submit({ ...fields, revision: String(revision) }, { method: 'post' })
  }
  return <Meanwhile changed={changed} rows={ruleSetDifferences(mine, theirs, base)} onSettle={settle} />
}
