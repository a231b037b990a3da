import { setImmediate as nextTurn } from 'node:timers/promises'
import type { PointFluxes } from '#app/drawing/heat/flux-task.ts'

/** Figures written in one turn of the event loop. */
const atOnce = 20_000

async function* pieces({ irradiance, byHeater }: PointFluxes, warnings: readonly string[]): AsyncGenerator<string> {
  yield `{"irradiance":${JSON.stringify(irradiance)},"warnings":${JSON.stringify(warnings)},"byHeater":[`
  const rows = Math.max(1, Math.floor(atOnce / Math.max(1, byHeater[0]?.length ?? 1)))
  for (let from = 0; from < byHeater.length; from += rows) {
    const part = JSON.stringify(byHeater.slice(from, from + rows)).slice(1, -1)
    yield from === 0 ? part : `,${part}`
    await nextTurn()
  }
  yield ']}'
}

/** The JSON answer to a flux question; a million figures are written bit by bit, so that others are served between. */
export function fluxResponse(fluxes: PointFluxes, warnings: readonly string[]): Response {
  const written = pieces(fluxes, warnings)
  const encoder = new TextEncoder()
  const body = new ReadableStream<Uint8Array>({
    async pull(controller) {
      const next = await written.next()
      if (next.done) controller.close()
      else controller.enqueue(encoder.encode(next.value))
    },
  })
  return new Response(body, { headers: { 'Content-Type': 'application/json' } })
}
