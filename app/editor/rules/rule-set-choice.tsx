import type { ChosenRuleSet } from '#app/domain/rules/rule-set.ts'
import { Button } from '#app/components/button.tsx'
import { SelectField } from '#app/components/field.tsx'

interface RuleSetChoiceProps {
  /** As it was when it was chosen; null: none. */
  readonly chosen: ChosenRuleSet | null
  readonly ruleSets: readonly ChosenRuleSet[]
  readonly readOnly: boolean
  readonly onChoose: (ruleSet: ChosenRuleSet | null) => void
}

const named = ({ name, edition }: ChosenRuleSet): string => `${name}, ${edition}`

/** Which rule set holds for a job. It keeps the revision it chose; a newer one is offered. */
export function RuleSetChoice({ chosen, ruleSets, readOnly, onChoose }: RuleSetChoiceProps) {
  const newest = ruleSets.find(({ id }) => id === chosen?.id)
  const isBehind = chosen && newest && newest.revision > chosen.revision
  const listed = chosen && !newest ? [chosen, ...ruleSets] : ruleSets
  return (
    <div className="mt-2 max-w-md">
      <SelectField
        label="Rule set"
        disabled={readOnly}
        value={chosen?.id ?? ''}
        options={[
          { value: '', label: 'No rule set' },
          ...listed.map((ruleSet) => ({ value: ruleSet.id, label: named(ruleSet) })),
        ]}
        hint={
          chosen
            ? `Revision ${chosen.revision}, for ${chosen.place}.`
            : 'No rule set chosen. Circuits, sprinklers and local distances are not checked.'
        }
        onChange={(event) => onChoose(listed.find(({ id }) => id === event.target.value) ?? null)}
      />
      {isBehind && (
        <p className="mt-1 text-xs text-amber">
          Revision {newest.revision} is the newest.{' '}
          {!readOnly && (
            <Button size="small" onClick={() => onChoose(newest)}>
              Take revision {newest.revision}
            </Button>
          )}
        </p>
      )}
    </div>
  )
}
