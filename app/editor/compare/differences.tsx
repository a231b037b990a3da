import type { ComparisonRow } from '#app/domain/comparison/what-differs.ts'
import { screenPen } from '#app/drawing/pen.ts'
import { markOf, VariantMark } from '#app/drawing/plot/variant-mark.tsx'
import { OutcomeMark } from '#app/components/outcome-mark.tsx'

const pen = screenPen('dusk')

/** The mark of the i-th variant, as on the dots. */
export function Mark({ i }: { i: number }) {
  return (
    <svg width="15" height="15" viewBox="0 0 15 15" aria-hidden="true" className="inline-block flex-none align-[-2px]">
      <VariantMark
        kind={markOf(i)}
        x={7.5}
        y={7.5}
        r={5.4}
        pen={pen}
        ink="var(--color-ink)"
        paper="var(--color-paper)"
        ember="var(--color-ember)"
      />
    </svg>
  )
}

interface Named {
  readonly number: number
  readonly title: string
}

/** What differs in sentences, for each variant but the first. */
export function InWords({ variants, words }: { variants: readonly Named[]; words: readonly (readonly string[])[] }) {
  const [first] = variants
  return (
    <section aria-labelledby="in-words" className="border-t border-rule pt-2.5">
      <h2 id="in-words" className="mb-1 text-sm font-strong">
        In words
      </h2>
      {words.map((sentences, i) => {
        const other = variants[i + 1]
        if (!other || !first) return null
        return (
          <p key={other.number} className="mb-1.5 max-w-3xl text-ink-2">
            <Mark i={i + 1} /> <span className="font-medium text-ink">{other.number}</span> against <Mark i={0} />{' '}
            <span className="font-medium text-ink">{first.number}</span>:{' '}
            {sentences.length > 0 ? sentences.join(' ') : 'nothing differs.'}
          </p>
        )
      })}
    </section>
  )
}

/** The figures side by side, the better in bold; what is the same comes last. */
export function Differences({ variants, rows }: { variants: readonly Named[]; rows: readonly ComparisonRow[] }) {
  const different = rows.filter(({ same }) => !same)
  const same = rows.length - different.length
  return (
    <section aria-labelledby="differs" className="min-w-0 border-t border-ink pt-2.5">
      <header className="mb-2 flex items-baseline justify-between gap-3">
        <h2 id="differs" className="text-sm font-strong">
          What differs
        </h2>
        <p className="text-ink-2">
          {same > 0 ? `${same} ${same === 1 ? 'row' : 'rows'} the same, better in bold` : 'Better in bold'}
        </p>
      </header>
      <div className="overflow-x-auto" tabIndex={0} role="region" aria-label="Figures side by side">
        <table className="w-full border-collapse">
          <caption className="sr-only">Figures of the variants side by side</caption>
          <thead>
            <tr>
              <th scope="col" className="w-24 pb-1.5 text-left text-2xs font-medium text-ink-3 tablet:w-36">
                Figure
              </th>
              {variants.map(({ number, title }, i) => (
                <th key={number} scope="col" className="px-2 pb-1.5 text-left align-bottom text-xs font-strong">
                  <Mark i={i} /> {number} {title}
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {[...different, ...rows.filter((row) => row.same)].map((row) => (
              <Row key={row.name} row={row} />
            ))}
          </tbody>
        </table>
      </div>
    </section>
  )
}

function Row({ row: { name, cells, same } }: { row: ComparisonRow }) {
  return (
    <tr className={`border-t border-rule ${same ? 'text-ink-3' : ''}`}>
      <th scope="row" className="py-1.5 pr-2 text-left align-top font-regular text-ink-2">
        {name}
      </th>
      {cells.map(({ text, outcome, better }, i) => (
        <td key={i} className={`px-2 py-1.5 align-top ${better ? 'font-strong' : ''}`}>
          {outcome && outcome !== 'pass' && (
            <span className="mr-1.5 inline-block align-[-2px]">
              <OutcomeMark outcome={outcome} size={12} />
              <span className="sr-only">{outcome}: </span>
            </span>
          )}
          {text}
          {better && <span className="sr-only"> (better)</span>}
        </td>
      ))}
    </tr>
  )
}
