import { whatIsMissing } from '#app/server/readiness.server.ts'

/** Ready: the database answers with the right role and has every migration; 503 otherwise. */
export async function loader() {
  const missing = await whatIsMissing()
  const headers = { 'Content-Type': 'text/plain; charset=utf-8', 'Cache-Control': 'no-store' }
  return new Response(missing === null ? 'ready\n' : `${missing}\n`, { status: missing === null ? 200 : 503, headers })
}
