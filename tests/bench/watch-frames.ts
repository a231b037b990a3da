import type { Page } from '@playwright/test'

/**
 * Keeps the times of a page's frames in `dragTimes` while something is dragged, ms: from the event's time stamp to the
 * first task after the frame that it brought was drawn and painted.
 */
export const watchFrames = (on: Page) =>
  on.evaluate(() => {
    const times: number[] = []
    Object.assign(globalThis, { dragTimes: times })
    const painted = new MessageChannel()
    let since: number | null = null
    painted.port1.onmessage = () => {
      if (since !== null) times.push(performance.now() - since)
      since = null
    }
    addEventListener(
      'pointermove',
      (event: PointerEvent) => {
        if (event.buttons !== 1 || since !== null) return
        since = event.timeStamp
        requestAnimationFrame(() => painted.port2.postMessage(null))
      },
      true,
    )
  })
