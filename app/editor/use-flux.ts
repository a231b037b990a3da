import { wrap, type Remote } from 'comlink'
import { useEffect, useRef, useState } from 'react'
import type { MapQuestion } from '#app/domain/flux/map-question.ts'
import type { MapAnswer } from '#app/drawing/heat/map-picture.ts'
import type { SectionQuestion } from '#app/drawing/heat/section-answer.ts'
import type { SectionPicture } from '#app/drawing/section/section-values.ts'
import { askOneAtATime, type Asking } from '#app/editor/asking.ts'
import type { FluxWorker } from '#workers/flux.worker.ts'

/** The map as far as it is known. */
export interface FluxView {
  /** The newest answer; null before the first one, with no heater, and when maps cannot be made. */
  readonly answer: MapAnswer | null
  /** Heat in the sections asked about, with the question it answers; null until the first one. */
  readonly sections: SectionsView | null
  /** `slow`: more than a second; `broken`: no map until somebody tries again; `stopped`: by the person. */
  readonly state: 'none' | 'working' | 'slow' | 'ready' | 'broken' | 'stopped'
  /** Ends the answer in flight within the moment; the next question starts anew. */
  stop: () => void
  /** After a break or a stop: asks the last question again. */
  retry: () => void
}

/** The heat of sections and what it was asked about. */
export interface SectionsView {
  readonly question: SectionQuestion
  readonly pictures: readonly (SectionPicture | null)[]
}

interface Round {
  readonly worker: Worker
  readonly maps: Asking<MapQuestion>
  readonly sections: Asking<SectionQuestion>
}

/** Milliseconds after which a map in the making is spoken of. */
const slowAfter = 1000

/**
 * Asks the map's worker: one question in flight, the newest waits. `dropped` counts gestures that were dropped: an
 * answer asked for before is never shown. Without a worker there is no map, and everything else goes on.
 */
export function useFlux(question: MapQuestion | null, about: SectionQuestion | null, dropped: number): FluxView {
  const [answer, setAnswer] = useState<MapAnswer | null>(null)
  const [sections, setSections] = useState<SectionsView | null>(null)
  const [state, setState] = useState<'working' | 'slow' | 'ready' | 'broken' | 'stopped'>('working')
  const [attempt, setAttempt] = useState(0)
  const round = useRef<Round | null>(null)
  const slow = useRef<ReturnType<typeof setTimeout>>(undefined)

  useEffect(() => {
    const started = startRound({
      sections: (pictures, asked) => setSections({ pictures, question: asked }),
      answered: (next) => {
        clearTimeout(slow.current)
        setAnswer(next)
        setState('ready')
      },
      failed: () => {
        clearTimeout(slow.current)
        setAnswer(null)
        setSections(null)
        setState('broken')
      },
    })
    round.current = started
    return () => {
      clearTimeout(slow.current)
      started?.maps.cancel()
      started?.sections.cancel()
      started?.worker.terminate()
      round.current = null
    }
  }, [attempt])

  useEffect(() => {
    round.current?.maps.cancel()
  }, [dropped])

  useEffect(() => {
    if (!question || !round.current) return
    clearTimeout(slow.current)
    slow.current = setTimeout(() => setState('slow'), slowAfter)
    round.current.maps.ask(question)
  }, [question, attempt, dropped])

  useEffect(() => {
    if (about) round.current?.sections.ask(about)
  }, [about, attempt])

  return {
    answer: question ? answer : null,
    sections: about ? sections : null,
    state: question ? state : 'none',
    stop: () => {
      clearTimeout(slow.current)
      round.current?.maps.cancel()
      round.current?.sections.cancel()
      round.current?.worker.terminate()
      round.current = null
      setState('stopped')
    },
    retry: () => {
      setState('working')
      setAttempt((before) => before + 1)
    },
  }
}

interface RoundHeard {
  answered: (answer: MapAnswer) => void
  sections: (pictures: readonly (SectionPicture | null)[], question: SectionQuestion) => void
  failed: () => void
}

/** A worker with its questions; null, and a failure heard, where workers cannot be made. */
function startRound({ answered, sections, failed }: RoundHeard): Round | null {
  try {
    const worker = new Worker(new URL('../../workers/flux.worker.ts', import.meta.url), { type: 'module' })
    const remote: Remote<FluxWorker> = wrap<FluxWorker>(worker)
    const round: Round = {
      worker,
      maps: askOneAtATime((question: MapQuestion) => remote.answerMap(question), { answered, failed }),
      sections: askOneAtATime((question: SectionQuestion) => remote.answerSections(question), {
        answered: sections,
        failed,
      }),
    }
    const broke = () => {
      round.maps.cancel()
      round.sections.cancel()
      failed()
    }
    worker.addEventListener('error', broke)
    worker.addEventListener('messageerror', broke)
    return round
  } catch {
    queueMicrotask(failed)
    return null
  }
}
