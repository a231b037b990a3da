import { existsSync } from 'node:fs'
import { createRequire } from 'node:module'
import { availableParallelism } from 'node:os'
import { dirname, join } from 'node:path'
import { fileURLToPath, pathToFileURL } from 'node:url'
import { Worker } from 'node:worker_threads'
import type { explainSeat, Explanation } from '#app/domain/comfort/explain.ts'
import type { FiguresQuestion, LayoutFigures } from '#app/domain/comparison/layout-figures.ts'
import type { SeatWarmth, WarmthInput } from '#app/domain/comfort/seat-warmth.ts'
import type { Emitter } from '#app/domain/flux/emitter.ts'
import type { MapQuestion } from '#app/domain/flux/map-question.ts'
import type { FluxOutcome, FluxPoint, FluxTask, PointFluxes } from '#app/drawing/heat/flux-task.ts'
import type { MapAnswer } from '#app/drawing/heat/map-picture.ts'

/** Threads at most, tasks that may wait, and how long one may take, ms. */
const mostThreads = Math.max(1, Math.min(2, availableParallelism() - 1))
const mostWaiting = 100
const longest = 60_000

/** Thrown when too many computations wait or one takes too long: the caller answers 503. */
export class FluxBusyError extends Error {}

interface Job {
  readonly task: FluxTask
  readonly resolve: (outcome: FluxOutcome) => void
  readonly reject: (reason: Error) => void
}

interface Thread {
  readonly worker: Worker
  job: Job | null
  timer: NodeJS.Timeout | null
}

const threads = new Set<Thread>()
const waiting: Job[] = []

/** The thread's file: upwards from this module, be it source or bundle, else from the working directory. */
function threadFile(): string {
  for (const start of [dirname(fileURLToPath(import.meta.url)), process.cwd()]) {
    for (let folder = start; folder !== dirname(folder); folder = dirname(folder)) {
      const file = join(folder, 'workers', 'flux-thread.ts')
      if (existsSync(file)) return file
    }
  }
  throw new Error('workers/flux-thread.ts is missing beside the application')
}

/** A worker for a TypeScript file: a thread does not take `--import`, so it registers tsx itself before the file. */
function typescriptWorker(file: string): Worker {
  const tsx = dirname(createRequire(file).resolve('tsx/package.json'))
  const [api, entry] = [join(tsx, 'dist/esm/api/index.mjs'), file].map((path) => JSON.stringify(pathToFileURL(path)))
  return new Worker(`import(${api}).then(({ register }) => { register(); return import(${entry}) })`, { eval: true })
}

function startThread(): Thread {
  const thread: Thread = { worker: typescriptWorker(threadFile()), job: null, timer: null }
  threads.add(thread)
  thread.worker.on('message', (outcome: FluxOutcome) => {
    const { job } = thread
    release(thread)
    job?.resolve(outcome)
    startNext()
  })
  thread.worker.on('error', (error) => drop(thread, error))
  thread.worker.on('exit', () => drop(thread, new Error('a flux thread ended')))
  return thread
}

function release(thread: Thread): void {
  if (thread.timer) clearTimeout(thread.timer)
  thread.job = null
  thread.timer = null
  thread.worker.unref()
}

/** Takes a broken thread out; its job fails, the next job gets a new thread. */
function drop(thread: Thread, reason: Error): void {
  if (!threads.delete(thread)) return
  const { job } = thread
  release(thread)
  void thread.worker.terminate()
  job?.reject(reason)
  startNext()
}

function startNext(): void {
  const job = waiting.shift()
  if (!job) return
  const idle = [...threads].find((thread) => thread.job === null)
  if (!idle && threads.size >= mostThreads) {
    waiting.unshift(job)
    return
  }
  const thread = idle ?? startThread()
  thread.job = job
  thread.timer = setTimeout(() => drop(thread, new FluxBusyError('a computation took too long')), longest)
  thread.worker.ref()
  thread.worker.postMessage(job.task)
}

function outcomeOf(task: FluxTask): Promise<FluxOutcome> {
  return new Promise((resolve, reject) => {
    if (waiting.length >= mostWaiting) {
      reject(new FluxBusyError('too many computations are waiting'))
      return
    }
    waiting.push({ task, resolve, reject })
    startNext()
  })
}

function unexpected(outcome: FluxOutcome): Error {
  return outcome.kind === 'refused' ? new RangeError(outcome.message) : new Error('a flux thread answered amiss')
}

/** The map of a question, computed off the event loop. Rejects as `answerMap` throws, or with FluxBusyError. */
export async function answerMapOffThread(question: MapQuestion): Promise<MapAnswer> {
  const outcome = await outcomeOf({ kind: 'map', question })
  if (outcome.kind !== 'map') throw unexpected(outcome)
  return outcome.answer
}

/** Irradiance at points, in total and by emitter, W/m², off the event loop. A RangeError for figures not finite. */
export async function pointFluxes(emitters: readonly Emitter[], points: readonly FluxPoint[]): Promise<PointFluxes> {
  const outcome = await outcomeOf({ kind: 'points', emitters, points })
  if (outcome.kind !== 'points') throw unexpected(outcome)
  return outcome.fluxes
}

/** `seatWarmth` off the event loop, for large sites and for pictures. */
export async function seatWarmthOffThread(input: WarmthInput): Promise<SeatWarmth[]> {
  const outcome = await outcomeOf({ kind: 'warmth', input })
  if (outcome.kind !== 'warmth') throw unexpected(outcome)
  return outcome.warmth
}

/** Seats, totals and findings of a layout off the event loop. */
export async function layoutFiguresOffThread(input: FiguresQuestion): Promise<LayoutFigures> {
  const outcome = await outcomeOf({ kind: 'figures', input })
  if (outcome.kind !== 'figures') throw unexpected(outcome)
  return outcome.figures
}

/** `explainSeat` off the event loop: its tolerance asks for the figure again and again. */
export async function explainSeatOffThread(...asked: Parameters<typeof explainSeat>): Promise<Explanation | null> {
  const outcome = await outcomeOf({ kind: 'explanation', asked })
  if (outcome.kind !== 'explanation') throw unexpected(outcome)
  return outcome.explanation
}

/** Ends the threads; what is under way fails. For the server's shutdown and for tests. */
export async function stopFluxThreads(): Promise<void> {
  const all = [...threads]
  await Promise.all(all.map((thread) => thread.worker.terminate()))
}
