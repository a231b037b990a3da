import type { Page } from '@playwright/test'
import { z } from 'zod'

/** What a page was seen to do while something was dragged, ms. */
export interface Watched {
  /** From a pointer's event to the first task after the frame that it brought was drawn and painted. */
  readonly steps: readonly number[]
  /** From one frame to the next. */
  readonly frames: readonly number[]
}

/** Keeps the times of a page's steps and frames while something is dragged. */
export const watchFrames = (on: Page) =>
  on.evaluate(() => {
    const watched: { steps: number[]; frames: number[] } = { steps: [], frames: [] }
    Object.assign(globalThis, { watched })
    const painted = new MessageChannel()
    let event: number | null = null
    let before: number | null = null
    painted.port1.onmessage = () => {
      if (event !== null) watched.steps.push(performance.now() - event)
      event = null
    }
    // A method, because named functions are wrapped by what runs this script, and the page knows no wrapper.
    const frames = {
      follow(now: number) {
        if (before === null) return
        watched.frames.push(now - before)
        before = now
        requestAnimationFrame((next) => frames.follow(next))
      },
    }
    addEventListener(
      'pointermove',
      ({ buttons, timeStamp }: PointerEvent) => {
        if (buttons !== 1 || event !== null) return
        event = timeStamp
        requestAnimationFrame((now) => {
          painted.port2.postMessage(null)
          if (before !== null) return
          before = now
          requestAnimationFrame((next) => frames.follow(next))
        })
      },
      true,
    )
    addEventListener('pointerup', () => (before = null), true)
  })

/** What was seen since it was last taken. */
export async function takeWatched(on: Page): Promise<Watched> {
  const found: unknown = await on.evaluate(() => {
    const { watched } = globalThis as unknown as { watched: { steps: number[]; frames: number[] } }
    return { steps: watched.steps.splice(0), frames: watched.frames.splice(0) }
  })
  return z.object({ steps: z.array(z.number()), frames: z.array(z.number()) }).parse(found)
}

/** Median, p95 and the longest of times, ms. */
export function spread(times: readonly number[]): { p95: number; words: string } {
  const sorted = times.toSorted((a, b) => a - b)
  const at = (part: number) => sorted[Math.min(sorted.length - 1, Math.floor(part * sorted.length))] ?? Number.NaN
  const text = (part: number) => `${at(part).toFixed(1)} ms`
  return { p95: at(0.95), words: `median ${text(0.5)}, p95 ${text(0.95)}, longest ${text(1)}` }
}
