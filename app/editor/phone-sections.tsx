import type { ReactNode } from 'react'

interface PhoneSectionsProps {
  readonly wanted: boolean
  readonly onWanted: (wanted: boolean) => void
  readonly drawn: ReactNode
}

/** On a phone the sections open under the plan. */
export function PhoneSections({ wanted, onWanted, drawn }: PhoneSectionsProps) {
  return (
    <div className="border-t border-[#26324c] bg-dusk-ground">
      <button
        type="button"
        aria-expanded={wanted}
        onClick={() => onWanted(!wanted)}
        className="min-h-11 w-full px-4.5 text-left font-medium text-dusk-line underline"
      >
        {wanted ? 'Without the sections' : 'Sections'}
      </button>
      {wanted && drawn}
    </div>
  )
}
