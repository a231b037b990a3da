import type { Vec2 } from '#app/domain/vector.ts'
import type { Pen } from '#app/drawing/pen.ts'
import { Words } from '#app/drawing/text/words.tsx'

/** A caution where it changes placement: a small triangle, with its kinds as words where there is room. */
export function CautionSign({
  at: [x, y],
  sentences,
  words,
  pen,
}: {
  /** Middle of the sign, px. */
  readonly at: Vec2
  readonly sentences: readonly string[]
  /** "fire, shock"; null where there is no room for them. */
  readonly words: string | null
  readonly pen: Pen
}) {
  const s = 5.5 * pen.k
  return (
    <g role="img" aria-label={sentences.join(' ')}>
      <title>{sentences.join('\n')}</title>
      <path
        d={`M${x} ${y - s}L${x + s} ${y + s * 0.8}L${x - s} ${y + s * 0.8}Z`}
        fill={pen.colours.halo}
        stroke={pen.colours.line}
        strokeWidth={1.1 * pen.k}
        strokeLinejoin="round"
      />
      <path d={`M${x} ${y - s * 0.3}v${s * 0.5}`} stroke={pen.colours.line} strokeWidth={1.2 * pen.k} />
      <circle cx={x} cy={y + s * 0.5} r={0.7 * pen.k} fill={pen.colours.line} />
      {words === null ? null : (
        <Words
          x={x + s + 3 * pen.k}
          y={y + s * 0.1}
          centred
          size={pen.text}
          colour={pen.colours.line}
          halo={pen.colours.halo}
        >
          {words}
        </Words>
      )}
    </g>
  )
}
