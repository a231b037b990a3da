/** Throws on a page's main thread: what weighs a layout many times is for a worker, so that the page never stands still. */
export function requireWorker(): void {
  if ('document' in globalThis) throw new Error('doubtful sizes are weighed in a worker')
}
