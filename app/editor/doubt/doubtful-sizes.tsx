import { useMemo, useState, type ReactNode } from 'react'
import type { FiguresQuestion } from '#app/domain/comparison/layout-figures.ts'
import { measureLines, smallLength } from '#app/domain/doubt/in-words.ts'
import { rankEffects, type RankedBy } from '#app/domain/doubt/ranking.ts'
import { settlings } from '#app/domain/doubt/settling.ts'
import type { SizeEffects } from '#app/domain/doubt/size-effects.ts'
import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'
import type { SizeSource } from '#app/domain/site/site.ts'
import { Choice } from '#app/components/choice.tsx'
import { CheckField } from '#app/components/field.tsx'
import { EffectsList, type PhotoLink } from '#app/editor/doubt/effects-list.tsx'
import { MeasureList } from '#app/editor/doubt/measure-list.tsx'
import { RunState } from '#app/editor/doubt/run-state.tsx'
import { TurningStrip, TurningTable } from '#app/editor/doubt/turning-table.tsx'
import { useDoubt } from '#app/editor/doubt/use-doubt.ts'
import { AtError, ErrorField, ErrorSlider } from '#app/editor/doubt/wrong-by.tsx'

const sorts = [
  { value: 'overall', label: 'Overall' },
  { value: 'coldest', label: 'Coldest seat' },
  { value: 'head', label: 'Hottest head' },
  { value: 'margin', label: 'Margin' },
] satisfies { value: RankedBy; label: string }[]

const ranges = {
  photo: ['photo'],
  rough: ['photo', 'told', 'guessed'],
} satisfies Record<string, SizeSource[]>

interface DoubtfulSizesProps {
  readonly question: FiguresQuestion
  /** The variant, as a link back to it, and in plain words. */
  readonly variant: ReactNode
  readonly listTitle: string
  readonly photoLink: PhotoLink
}

/** Which rough size matters most, what to measure next, and how wrong a photo may be. */
export function DoubtfulSizes({ question, variant, listTitle, photoLink }: DoubtfulSizesProps) {
  const [by, setBy] = useState<RankedBy>('overall')
  const [unstated, setUnstated] = useState(false)
  const [range, setRange] = useState<keyof typeof ranges>('photo')
  const [error, setError] = useState(0)
  const units = question.site.displayUnits
  const { rules } = question.house
  const sources = ranges[range]
  const doubt = useDoubt({ question, unstated, sources, error })
  const found = doubt.effects.made
  const { photo, rough } = useMemo(() => countSources(question), [question])
  return (
    <div className="mx-auto max-w-7xl">
      <header className="mb-3 flex flex-wrap items-baseline gap-x-3 gap-y-1">
        <h1 className="text-xl font-strong">Measure these next</h1>
        <p className="text-ink-2">{variant}</p>
      </header>
      <div className="grid items-start gap-x-10 gap-y-6 *:min-w-0 desk:grid-cols-[minmax(0,1fr)_24rem]">
        <section aria-labelledby="effects-title" className="border-t border-ink pt-2 print:hidden">
          <div className="mb-2 flex flex-wrap items-center gap-x-4 gap-y-2">
            <h2 id="effects-title" className="flex-1 text-base font-strong whitespace-nowrap">
              Which size matters most
            </h2>
            <Choice label="Ranked by" options={sorts} value={by} onChange={setBy} />
          </div>
          <p className="mb-2 text-xs text-ink-2">
            Each size less (hollow) and more (filled) by its tolerance. {rankedWords[by]}
          </p>
          <RunState
            run={doubt.effects}
            what="Weighing each size"
            onStop={() => doubt.stop('effects')}
            onRetry={doubt.retry}
          />
          {found && <Effects found={found} {...{ by, units, rules, photoLink }} />}
          <CheckField
            label={`Also what nobody stated, at ± ${smallLength(rules.toleranceUnstated, units)}; this takes longer`}
            checked={unstated}
            onChange={(event) => setUnstated(event.target.checked)}
            className="mt-2"
          />
          {found && found.leftOut > 0 && (
            <p className="text-xs text-ink-2">Too many: {found.leftOut} things were left out.</p>
          )}
        </section>
        <div className="border-t border-ink pt-2 print:border-0">
          {found && <List found={found} {...{ units, rules, listTitle }} />}
        </div>
        <section aria-labelledby="wrong-title" className="border-t border-ink pt-2 desk:col-span-2 print:hidden">
          <div className="mb-2 flex flex-wrap items-center gap-x-4 gap-y-2">
            <h2 id="wrong-title" className="flex-1 text-base font-strong">
              {range === 'photo' ? 'If the photo is wrong by …' : 'If all rough sizes are wrong by …'}
            </h2>
            <ErrorField error={error} onError={setError} />
            <Choice
              label="Sizes that are wrong"
              options={[
                { value: 'photo', label: `Photo (${photo})` },
                { value: 'rough', label: `Photo, told, guessed (${rough})` },
              ]}
              value={range}
              onChange={setRange}
            />
          </div>
          <div className="grid gap-x-10 gap-y-4 *:min-w-0 desk:grid-cols-2">
            <div>
              <TurningStrip points={doubt.turns.made} error={error} />
              <ErrorSlider error={error} onError={setError} />
              <p className="mt-1 mb-3 text-xs text-ink-2">
                All of them longer or shorter by one share. Filled marks turn a check for the worse, hollow ones for the
                better.
              </p>
              {doubt.wrong && <AtError wrong={doubt.wrong} units={units} />}
            </div>
            <div>
              <RunState
                run={doubt.turns}
                what="Looking for where checks turn"
                onStop={() => doubt.stop('turns')}
                onRetry={doubt.retry}
              />
              {doubt.turns.made && <TurningTable points={doubt.turns.made} />}
            </div>
          </div>
        </section>
      </div>
    </div>
  )
}

const rankedWords: Record<RankedBy, string> = {
  overall:
    'Ranked by the largest of three shares: of the coldest seat, of the hottest head, and of the tightest margin or its tolerance.',
  coldest: 'Ranked by the change at the coldest seat.',
  head: 'Ranked by the change at the hottest head.',
  margin: 'Ranked by the change of the tightest clearance or height.',
}

function Effects({
  found,
  by,
  units,
  rules,
  photoLink,
}: {
  found: SizeEffects
  by: RankedBy
  units: FiguresQuestion['site']['displayUnits']
  rules: HouseRules
  photoLink: PhotoLink
}) {
  // prettier-ignore
  const ranked = useMemo(() => rankEffects(found.effects, found.nominal, by, rules), [found, by, rules])
  const settled = useMemo(() => settlings(found.nominal.checks, found.effects, rules.toleranceLaser), [found, rules])
  if (ranked.length === 0)
    return <p className="text-ink-2">No size of this site has a tolerance yet. Give them on the Site page.</p>
  return <EffectsList {...{ found, ranked, settled, units, photoLink }} />
}

function List({
  found,
  units,
  rules,
  listTitle,
}: {
  found: SizeEffects
  units: FiguresQuestion['site']['displayUnits']
  rules: HouseRules
  listTitle: string
}) {
  // prettier-ignore
  const lines = useMemo(
    () => {
      const settled = settlings(found.nominal.checks, found.effects, rules.toleranceLaser)
      return measureLines(found.effects, found.nominal, settled, { units, rules })
    },
    [found, units, rules],
  )
  return <MeasureList lines={lines} title={listTitle} />
}

/** How many dimensions are from a photo, and how many are rough in any way. */
function countSources({ site }: FiguresQuestion): { photo: number; rough: number } {
  const count = (wanted: readonly SizeSource[]) =>
    site.dimensions.filter(({ source }) => wanted.includes(source)).length
  return { photo: count(ranges.photo), rough: count(ranges.rough) }
}
