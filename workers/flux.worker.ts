import { expose, transfer, type Endpoint } from 'comlink'
import type { MapQuestion } from '#app/domain/flux/map-question.ts'
import { answerMap, emptyMapCache, type MapAnswer } from '#app/drawing/heat/map-picture.ts'

const cache = emptyMapCache()

const worker = {
  /** The map of a question; its values are handed over, not copied. */
  answerMap(question: MapQuestion): MapAnswer {
    const answer = answerMap(question, cache)
    return transfer(answer, [answer.values.buffer])
  },
}

/** What a page may ask the flux worker. */
export type FluxWorker = typeof worker

const endpoint: Endpoint = {
  postMessage: (message, transferred) => self.postMessage(message, { transfer: transferred ?? [] }),
  addEventListener: (type, listener) => self.addEventListener(type, listener),
  removeEventListener: (type, listener) => self.removeEventListener(type, listener),
}

expose(worker, endpoint)
