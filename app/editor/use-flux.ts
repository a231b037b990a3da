import { wrap, type Remote } from 'comlink'
import { useEffect, useRef, useState } from 'react'
import type { MapQuestion } from '#app/domain/flux/map-question.ts'
import type { MapAnswer } from '#app/drawing/heat/map-picture.ts'
import { askOneAtATime, type Asking } from '#app/editor/asking.ts'
import type { FluxWorker } from '#workers/flux.worker.ts'

/** The map as far as it is known. */
export interface FluxView {
  /** The newest answer; null before the first one, with no heater, and when maps cannot be made. */
  readonly answer: MapAnswer | null
  /** `slow`: more than a second; `broken`: no map until somebody tries again; `stopped`: by the person. */
  readonly state: 'none' | 'working' | 'slow' | 'ready' | 'broken' | 'stopped'
  /** Ends the answer in flight within the moment; the next question starts anew. */
  stop: () => void
  /** After a break or a stop: asks the last question again. */
  retry: () => void
}

interface Round {
  readonly worker: Worker
  readonly asking: Asking<MapQuestion>
}

/** Milliseconds after which a map in the making is spoken of. */
const slowAfter = 1000

/**
 * Asks the map's worker: one question in flight, the newest waits. `dropped` counts gestures that were dropped: an
 * answer asked for before is never shown. Without a worker there is no map, and everything else goes on.
 */
export function useFlux(question: MapQuestion | null, dropped: number): FluxView {
  const [answer, setAnswer] = useState<MapAnswer | null>(null)
  const [state, setState] = useState<'working' | 'slow' | 'ready' | 'broken' | 'stopped'>('working')
  const [attempt, setAttempt] = useState(0)
  const round = useRef<Round | null>(null)
  const slow = useRef<ReturnType<typeof setTimeout>>(undefined)

  useEffect(() => {
    const started = startRound({
      answered: (next) => {
        clearTimeout(slow.current)
        setAnswer(next)
        setState('ready')
      },
      failed: () => {
        clearTimeout(slow.current)
        setAnswer(null)
        setState('broken')
      },
    })
    round.current = started
    return () => {
      clearTimeout(slow.current)
      started?.asking.cancel()
      started?.worker.terminate()
      round.current = null
    }
  }, [attempt])

  useEffect(() => {
    round.current?.asking.cancel()
  }, [dropped])

  useEffect(() => {
    if (!question || !round.current) return
    clearTimeout(slow.current)
    slow.current = setTimeout(() => setState('slow'), slowAfter)
    round.current.asking.ask(question)
  }, [question, attempt, dropped])

  return {
    answer: question ? answer : null,
    state: question ? state : 'none',
    stop: () => {
      clearTimeout(slow.current)
      round.current?.asking.cancel()
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

/** A worker with its questions; null, and a failure heard, where workers cannot be made. */
function startRound(heard: { answered: (answer: MapAnswer) => void; failed: () => void }): Round | null {
  try {
    const worker = new Worker(new URL('../../workers/flux.worker.ts', import.meta.url), { type: 'module' })
    const remote: Remote<FluxWorker> = wrap<FluxWorker>(worker)
    const asking = askOneAtATime<MapQuestion, MapAnswer>((question) => remote.answerMap(question), heard)
    const broke = () => {
      asking.cancel()
      heard.failed()
    }
    worker.addEventListener('error', broke)
    worker.addEventListener('messageerror', broke)
    return { worker, asking }
  } catch {
    queueMicrotask(heard.failed)
    return null
  }
}
