import type { ReactNode } from 'react'

/** The four outcomes of a check; each has its own shape and word, so that colour never speaks alone. */
export type OutcomeWord = 'pass' | 'measure first' | 'fails' | 'cannot tell'

const looks: Record<OutcomeWord, { colour: string; shape: ReactNode }> = {
  pass: {
    colour: 'text-moss',
    shape: <path d="M2.6 7.6l3 3 5.8-6.8" strokeWidth="1.9" fill="none" strokeLinejoin="round" />,
  },
  'measure first': {
    colour: 'text-amber',
    shape: (
      <>
        <path d="M5.2 1v12" strokeWidth="1.8" />
        <path d="M1 7h12M1 4.7v4.6M13 4.7v4.6" strokeWidth="1.3" />
      </>
    ),
  },
  fails: {
    colour: 'text-clay',
    shape: <path d="M7 .8L13.2 7 7 13.2.8 7z" fill="currentColor" stroke="none" />,
  },
  'cannot tell': {
    colour: 'text-slate',
    shape: <rect x="2" y="2" width="10" height="10" fill="none" strokeWidth="1.4" strokeLinecap="butt" />,
  },
}

/** The shape of an outcome alone; put its word beside it. */
export function OutcomeMark({ outcome, size = 14 }: { outcome: OutcomeWord; size?: number }) {
  const look = looks[outcome]
  return (
    <svg
      width={size}
      height={size}
      viewBox="0 0 14 14"
      stroke="currentColor"
      strokeLinecap="round"
      aria-hidden="true"
      className={`inline-block flex-none ${look.colour}`}
    >
      {look.shape}
    </svg>
  )
}
