import type { Refusal } from '#app/server/answers.server.ts'

/** The key under which a request is carried out once: 1 to 200 visible ASCII characters. */
export function readKey(request: Request): { readonly key: string } | Refusal {
  const key = request.headers.get('Idempotency-Key')
  if (key !== null && /^[\x21-\x7e]{1,200}$/.test(key)) return { key }
  const error = key === null ? 'An Idempotency-Key is needed.' : 'An Idempotency-Key has 1 to 200 visible characters.'
  return { status: 400, error, path: 'Idempotency-Key' }
}

/** The revision that the request expects, from `If-Match: "7"`; null when the header is absent. */
export function readExpected(request: Request): { readonly expected: number | null } | Refusal {
  const header = request.headers.get('If-Match')
  if (header === null) return { expected: null }
  const revision = /^"(\d{1,9})"$/.exec(header.trim())?.[1]
  if (revision !== undefined) return { expected: Number(revision) }
  return { status: 400, error: 'If-Match holds one revision in quotes, as the ETag gives it.', path: 'If-Match' }
}
