import { expose, type Endpoint } from 'comlink'
import type { FiguresQuestion } from '#app/domain/comparison/layout-figures.ts'
import { sizeEffects, type Progress, type SizeEffects } from '#app/domain/doubt/size-effects.ts'
import { turningPoints, type TurningPoints } from '#app/domain/doubt/turning-points.ts'
import { figuresAtErrors, wrongFigures, type FiguresAt, type WrongFigures } from '#app/domain/doubt/wrong-sizes.ts'
import type { SizeSource } from '#app/domain/site/site.ts'

/** Milliseconds of work between two pauses, in which messages are heard. */
const stretch = 40

type Heard = (progress: Progress) => void
type Work = 'effects' | 'turns'
const rounds: Record<Work, number> = { effects: 0, turns: 0 }

/** Lets steps run with pauses; null when they were stopped or asked for anew meanwhile. */
async function paused<Made>(work: Work, steps: Generator<Progress, Made>, heard: Heard): Promise<Made | null> {
  const round = ++rounds[work]
  let rested = performance.now()
  for (;;) {
    const step = steps.next()
    if (step.done) return step.value
    if (performance.now() - rested < stretch) continue
    heard(step.value)
    await new Promise((resolve) => setTimeout(resolve))
    if (round !== rounds[work]) return null
    rested = performance.now()
  }
}

const atErrors = new Map<string, FiguresAt>()

/** Layouts at errors are kept for the layout and sources asked about last. */
function figuresAt(question: FiguresQuestion, sources: readonly SizeSource[]): FiguresAt {
  const key = JSON.stringify([question.site, question.brief, question.layout, [...question.models], sources])
  const known = atErrors.get(key) ?? figuresAtErrors(question, sources)
  atErrors.clear()
  atErrors.set(key, known)
  return known
}

const worker = {
  /** What each doubtful size changes; null when it was stopped. */
  sizeEffects(question: FiguresQuestion, unstated: boolean, heard: Heard): Promise<SizeEffects | null> {
    return paused('effects', sizeEffects(question, unstated), heard)
  },
  /** At which error of all sizes of these sources each check turns; null when it was stopped. */
  turningPoints(
    question: FiguresQuestion,
    sources: readonly SizeSource[],
    heard: Heard,
  ): Promise<TurningPoints | null> {
    return paused('turns', turningPoints(figuresAt(question, sources)), heard)
  },
  /** The figures when all sizes of these sources are wrong by one share. */
  wrongFigures(question: FiguresQuestion, sources: readonly SizeSource[], error: number): WrongFigures {
    return wrongFigures(figuresAt(question, sources), error)
  },
  stop(work: Work): void {
    rounds[work] += 1
  },
}

/** What a page may ask the worker about doubtful sizes. */
export type DoubtWorker = typeof worker

const endpoint: Endpoint = {
  postMessage: (message, transferred) => self.postMessage(message, { transfer: transferred ?? [] }),
  addEventListener: (type, listener) => self.addEventListener(type, listener),
  removeEventListener: (type, listener) => self.removeEventListener(type, listener),
}

expose(worker, endpoint)
