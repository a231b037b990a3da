const segments = 6

interface StageBarProps {
  /** Segments filled, 1 to 6. */
  filled: number
  /** A chevron turned back, or a signature stroke on a full bar. */
  end?: 'returned' | 'accepted' | undefined
  /** The word of the stage. */
  label: string
}

/** How far a thing has come, as a hanging bar of six segments; the word beside it says the same. */
export function StageBar({ filled, end, label }: StageBarProps) {
  const width = end ? 74 : 57
  return (
    <span className="inline-flex items-center gap-3.5">
      <svg width={width} height="15" viewBox={`0 0 ${width} 15`} aria-hidden="true" className="flex-none">
        {Array.from({ length: segments }, (_, index) =>
          index < filled ? (
            <rect key={index} x={1 + 9.2 * index} y="7" width="7.6" height="6" fill="currentColor" />
          ) : (
            <rect
              key={index}
              x={1.5 + 9.2 * index}
              y="7.5"
              width="6.6"
              height="5"
              fill="none"
              stroke="var(--color-rule-strong)"
            />
          ),
        )}
        <path d="M9.4 .5V6M46.4 .5V6" stroke="currentColor" strokeWidth="1.1" />
        {end === 'returned' && (
          <path
            d="M67 6l-4.5 4 4.5 4"
            fill="none"
            stroke="var(--color-clay)"
            strokeWidth="2.1"
            strokeLinecap="round"
            strokeLinejoin="round"
          />
        )}
        {end === 'accepted' && (
          <path
            d="M59 13c2.2-6.5 4.4-11 5.7-10 1.2 1.1-2.6 9.3-1.6 10 1.1.6 2.8-5 4.1-4.7 1 .3-.6 4 .5 4.3 1.2.2 2-1.6 4.6-2"
            fill="none"
            stroke="currentColor"
            strokeWidth="1.4"
            strokeLinecap="round"
            strokeLinejoin="round"
          />
        )}
      </svg>
      <span className="font-strong">{label}</span>
    </span>
  )
}
