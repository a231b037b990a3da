import type { PlanCaution } from '#app/domain/rules/cautions-on-plan.ts'
import type { Vec2 } from '#app/domain/vector.ts'
import { isClear, patch, type Patch } from '#app/drawing/plan/occupied.ts'
import { toScreen, type PlanView } from '#app/drawing/plan/plan-view.ts'
import type { Pen } from '#app/drawing/pen.ts'
import { textWidth } from '#app/drawing/text/widths.ts'

/** One sign: all cautions about one heater or seat. */
export interface PlacedCaution {
  readonly key: string
  readonly at: Vec2
  readonly sentences: readonly string[]
  readonly words: string | null
}

/** How far from what it concerns a sign is tried, px, and in which directions. */
const outs = [16, 22, 30, 40]
const directions = 12

/** With more heaters than this the signs stand without words: the list has them. */
const mostWorded = 3

/** Cautions of one subject as one sign beside it, clear of what is taken; words only at heaters, and only with room. */
export function placeCautions(
  cautions: readonly PlanCaution[],
  view: PlanView,
  pen: Pen,
  occupied: readonly Patch[],
): PlacedCaution[] {
  const taken = [...occupied]
  const heaters = new Set(cautions.flatMap(({ subject }) => (subject.kind === 'heater' ? [subject.id] : [])))
  const withRoom = heaters.size <= mostWorded
  const bySubject = new Map<string, PlanCaution[]>()
  for (const caution of cautions) {
    const key = `${caution.subject.kind} ${caution.subject.id}`
    bySubject.set(key, [...(bySubject.get(key) ?? []), caution])
  }
  return [...bySubject].map(([key, about]): PlacedCaution => {
    const [first] = about
    const place = toScreen(view, first?.at ?? [0, 0])
    const sentences = [...new Set(about.map(sentenceOf))]
    const words = [...new Set(about.map(({ kind }) => kind))].join(', ')
    const spots = outs.flatMap((out) =>
      Array.from({ length: directions }, (_, i): Vec2 => {
        const angle = -Math.PI / 4 + (i * 2 * Math.PI) / directions
        return [place[0] + out * Math.cos(angle), place[1] + out * Math.sin(angle)]
      }),
    )
    const bare = ([x, y]: Vec2) => patch(x, y, 12 * pen.k, 12 * pen.k)
    const worded = ([x, y]: Vec2) => {
      const width = textWidth(words, pen.text, 500) + 3 * pen.k
      return patch(x + width / 2, y, width + 12 * pen.k, 12 * pen.k)
    }
    const withWords =
      withRoom && first?.subject.kind === 'heater' ? spots.find((spot) => isClear(worded(spot), taken, 1)) : undefined
    const at = withWords ?? spots.find((spot) => isClear(bare(spot), taken, 1)) ?? spots[0] ?? place
    taken.push(withWords ? worded(withWords) : bare(at))
    return { key, at, sentences, words: withWords ? words : null }
  })
}

const sentenceOf = ({ kind, subject, sentence, condition }: PlanCaution): string =>
  `${subject.id}, ${kind}: ${sentence}${condition ? ` When ${condition}.` : ''}`
