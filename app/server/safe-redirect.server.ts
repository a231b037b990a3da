/**
 * A path inside this application, from something a person or a link gave; the fallback when it leads anywhere else.
 * Browsers read a backslash as a slash and skip tabs and line ends, so those never pass.
 */
export function safePath(wanted: unknown, fallback = '/jobs'): string {
  if (typeof wanted !== 'string' || wanted.length > 2000) return fallback
  if (!/^\/(?![/\\])[^\\\p{Cc}]*$/u.test(wanted)) return fallback
  const inside = 'http://inside.invalid'
  const url = URL.canParse(wanted, inside) ? new URL(wanted, inside) : null
  return url?.origin === inside ? url.pathname.replace(/^\/+/, '/') + url.search + url.hash : fallback
}
