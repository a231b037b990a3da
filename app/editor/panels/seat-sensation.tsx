import { windNames, type SeatFigures, type WindName } from '#app/domain/comfort/seat-warmth.ts'
import { noFigure, signedFigure } from '#app/editor/figures.ts'
import { ExplainedRows } from '#app/editor/panels/explained-rows.tsx'

const windWords: Readonly<Record<WindName, string>> = { calm: 'Calm', design: 'Design wind', gust: 'Gust' }

/** How a guest of this seat would rate it at each wind, heaters off and on, and the head against the body. */
export function SeatSensation({ headToBody, sensation }: Pick<SeatFigures, 'headToBody' | 'sensation'>) {
  const sensed = windNames.map((wind) => {
    const { before, after } = sensation[wind]
    return [windWords[wind], `${before.word} → ${after?.word ?? noFigure}`, after ? voteWords(after.vote) : ''] as const
  })
  return (
    <>
      <ExplainedRows caption="Sensation, heaters off → on" rows={sensed} />
      <p className="mt-2 text-ink-2">
        Head to body, horizontal irradiance:{' '}
        <span className="font-medium text-ink">{headToBody === null ? noFigure : headToBody.toFixed(2)}</span>
      </p>
    </>
  )
}

const voteWords = (vote: number | null): string =>
  vote === null ? 'outside the range of the vote' : `vote (PMV) ${signedFigure(vote, 1)}`
