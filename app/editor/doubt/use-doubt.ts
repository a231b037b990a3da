import { proxy, wrap, type Remote } from 'comlink'
import { useEffect, useRef, useState } from 'react'
import type { FiguresQuestion } from '#app/domain/comparison/layout-figures.ts'
import type { Progress, SizeEffects } from '#app/domain/doubt/size-effects.ts'
import type { TurningPoints } from '#app/domain/doubt/turning-points.ts'
import type { WrongFigures } from '#app/domain/doubt/wrong-sizes.ts'
import type { SizeSource } from '#app/domain/site/site.ts'
import { askOneAtATime, type Asking } from '#app/editor/asking.ts'
import type { DoubtWorker } from '#workers/doubt.worker.ts'

/** A long computation as far as it has come. */
export interface Run<Made> {
  readonly state: 'working' | 'ready' | 'stopped' | 'broken'
  readonly progress: Progress | null
  readonly made: Made | null
}

type Kept<Made> = Run<Made> & { readonly of: string }

const working = { state: 'working', progress: null, made: null } as const

/** What is asked about a layout's doubtful sizes. */
export interface DoubtAsked {
  readonly question: FiguresQuestion
  /** Also the sizes that nobody stated. */
  readonly unstated: boolean
  /** Sources whose sizes are wrong, and by which share. */
  readonly sources: readonly SizeSource[]
  readonly error: number
}

/** What the worker found, and the ways to end and to begin again. */
export interface Doubt {
  readonly effects: Run<SizeEffects>
  readonly turns: Run<TurningPoints>
  /** At the newest error that was answered; null before the first. */
  readonly wrong: WrongFigures | null
  stop: (work: 'effects' | 'turns') => void
  retry: () => void
}

interface Session {
  readonly worker: Worker
  readonly remote: Remote<DoubtWorker>
  readonly wrong: Asking<{ sources: readonly SizeSource[]; error: number }>
}

/** Asks the worker of doubtful sizes, with progress; what was stopped or asked anew is never heard. */
export function useDoubt({ question, unstated, sources, error }: DoubtAsked): Doubt {
  const [attempt, setAttempt] = useState(0)
  const [effects, setEffects] = useState<Kept<SizeEffects> | null>(null)
  const [turns, setTurns] = useState<Kept<TurningPoints> | null>(null)
  const [wrong, setWrong] = useState<WrongFigures | null>(null)
  const session = useRef<Session | null>(null)
  const ofEffects = `${attempt} ${unstated}`
  const ofTurns = `${attempt} ${sources.join()}`

  useEffect(() => {
    session.current = startSession(question, setWrong)
    return () => {
      session.current?.wrong.cancel()
      session.current?.worker.terminate()
      session.current = null
    }
  }, [question, attempt])

  useEffect(
    () => run(ofEffects, setEffects, session.current, (remote, heard) => remote.sizeEffects(question, unstated, heard)),
    [question, unstated, ofEffects],
  )
  useEffect(
    () => run(ofTurns, setTurns, session.current, (remote, heard) => remote.turningPoints(question, sources, heard)),
    [question, sources, ofTurns],
  )
  useEffect(() => session.current?.wrong.ask({ sources, error }), [question, sources, error, attempt])

  return {
    effects: effects?.of === ofEffects ? effects : working,
    turns: turns?.of === ofTurns ? turns : working,
    wrong,
    stop: (work) => void session.current?.remote.stop(work),
    retry: () => setAttempt((before) => before + 1),
  }
}

/** Lets one computation run and keeps what is heard of it; returns what ends the listening. */
function run<Made>(
  of: string,
  keep: (run: Kept<Made>) => void,
  session: Session | null,
  ask: (remote: Remote<DoubtWorker>, heard: (progress: Progress) => void) => Promise<Made | null>,
): () => void {
  let listening = true
  const hear = (heard: Run<Made>) => {
    if (listening) keep({ of, ...heard })
  }
  const broken = () => hear({ state: 'broken', progress: null, made: null })
  if (!session) queueMicrotask(broken)
  else {
    session.worker.addEventListener('error', broken)
    const heard = proxy((progress: Progress) => hear({ state: 'working', progress, made: null }))
    ask(session.remote, heard).then((made) => hear({ state: made ? 'ready' : 'stopped', progress: null, made }), broken)
  }
  return () => {
    listening = false
    session?.worker.removeEventListener('error', broken)
  }
}

/** A worker with the questions about errors; null where workers cannot be made. */
function startSession(question: FiguresQuestion, answered: (wrong: WrongFigures) => void): Session | null {
  try {
    const worker = new Worker(new URL('../../../workers/doubt.worker.ts', import.meta.url), { type: 'module' })
    const remote = wrap<DoubtWorker>(worker)
    const wrong = askOneAtATime(
      (asked: { sources: readonly SizeSource[]; error: number }) =>
        remote.wrongFigures(question, asked.sources, asked.error),
      { answered, failed: () => undefined },
    )
    return { worker, remote, wrong }
  } catch {
    return null
  }
}
