import { parentPort } from 'node:worker_threads'
import { doFluxTask, type FluxTask } from '#app/drawing/heat/flux-task.ts'
import { emptyMapCache } from '#app/drawing/heat/map-picture.ts'

const cache = emptyMapCache()

parentPort?.on('message', (task: FluxTask) => {
  const outcome = doFluxTask(task, cache)
  parentPort?.postMessage(outcome, outcome.kind === 'map' ? [outcome.answer.values.buffer] : [])
})
