import { expose, transfer, type Endpoint } from 'comlink'
import type { FiguresQuestion, LayoutFigures } from '#app/domain/comparison/layout-figures.ts'
import type { Grid } from '#app/domain/flux/grid.ts'
import type { MapQuestion } from '#app/domain/flux/map-question.ts'
import { contoursOf, type HeatPicture } from '#app/drawing/heat/contours.ts'
import { answerMap, emptyMapCache, type MapAnswer } from '#app/drawing/heat/map-picture.ts'
import { answerSections, type SectionQuestion } from '#app/drawing/heat/section-answer.ts'

const cache = emptyMapCache()

const worker = {
  /** The map of a question; its values are handed over, not copied. */
  answerMap(question: MapQuestion): MapAnswer {
    const answer = answerMap(question, cache)
    return transfer(answer, [answer.values.buffer])
  },
  /** Seats, totals and findings of a layout, for pages that show several at once; the rules are loaded when asked for. */
  async answerFigures(input: FiguresQuestion): Promise<LayoutFigures> {
    const { layoutFigures } = await import('#app/domain/comparison/layout-figures.ts')
    return layoutFigures(input)
  },
  /** Fills and isolines of values that the page made of two maps of one grid. */
  answerPicture(values: Float32Array, grid: Grid, levels: readonly number[], edges: readonly number[]): HeatPicture {
    return contoursOf(values, grid, levels, edges)
  },
  /** Fills and isolines of the heat in sections. */
  answerSections(question: SectionQuestion) {
    return answerSections(question)
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
