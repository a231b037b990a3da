/** Asks one question at a time of something slow. */
export interface Asking<Question> {
  /** Asks, or waits behind the question in flight; a newer question takes the place of the one that waits. */
  ask: (question: Question) => void
  /** Forgets the waiting question; the answer in flight will not be heard. */
  cancel: () => void
}

/** What is heard of the asking. */
export interface Heard<Question, Answer> {
  answered: (answer: Answer, question: Question) => void
  failed: (reason: unknown) => void
}

/** One question in flight, only the newest waits, a cancelled answer is never heard. */
export function askOneAtATime<Question, Answer>(
  send: (question: Question) => Promise<Answer>,
  heard: Heard<Question, Answer>,
): Asking<Question> {
  let inFlight = false
  let waiting: { question: Question } | null = null
  let round = 0

  const next = (question: Question) => {
    inFlight = true
    const asked = round
    const settle = (tell: () => void) => {
      inFlight = false
      if (asked === round) tell()
      if (!waiting) return
      const { question: newest } = waiting
      waiting = null
      next(newest)
    }
    send(question).then(
      (answer) => settle(() => heard.answered(answer, question)),
      (reason: unknown) => settle(() => heard.failed(reason)),
    )
  }

  return {
    ask(question) {
      if (inFlight) waiting = { question }
      else next(question)
    },
    cancel() {
      round += 1
      waiting = null
    },
  }
}
