import { Choice } from '#app/components/choice.tsx'

/** How a layout is looked at: from above with its sections, or in space. */
export type SeenAs = 'plan' | 'picture'

/** The plan to work on, or the picture for people who do not read plans. */
export function SeenAsChoice({ seen, onSeen }: { seen: SeenAs; onSeen: (seen: SeenAs) => void }) {
  return (
    <Choice
      label="Seen as"
      options={[
        { value: 'plan', label: 'Plan' },
        { value: 'picture', label: 'Picture' },
      ]}
      value={seen}
      onChange={onSeen}
    />
  )
}
