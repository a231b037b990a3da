/** Alive: this process answers. Says nothing of the database. */
export function loader() {
  return new Response('ok\n', { headers: { 'Content-Type': 'text/plain; charset=utf-8', 'Cache-Control': 'no-store' } })
}
