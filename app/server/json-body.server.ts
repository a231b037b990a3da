import type { z } from 'zod'
import { isRefusal, type Refusal } from '#app/server/answers.server.ts'

/** Largest JSON body, bytes. */
const maxBytes = 1_000_000
/** No body of the product nests deeper than seven. */
const maxDepth = 32

const refusal = (error: string, path: string, status: 400 | 413 = 400): Refusal => ({ status, error, path })
const tooLarge = refusal('The body is larger than 1 MB.', 'body', 413)

/** The body as text, given up as soon as it grows past the limit, whatever Content-Length says. */
export async function readText(request: Request): Promise<string | Refusal> {
  if (Number(request.headers.get('Content-Length') ?? 0) > maxBytes) return tooLarge
  const chunks: Uint8Array[] = []
  let size = 0
  const reader = request.body?.getReader()
  for (let part = await reader?.read(); part && !part.done; part = await reader?.read()) {
    size += part.value.byteLength
    if (size > maxBytes) {
      await reader?.cancel()
      return tooLarge
    }
    chunks.push(part.value)
  }
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(Buffer.concat(chunks))
  } catch {
    return refusal('The body is not UTF-8.', 'body')
  }
}

const join = (path: string, key: string): string => (path === '' ? key : `${path}.${key}`)

/** What no text of the product may hold: PostgreSQL stores neither NUL nor half a surrogate pair. */
const isStorable = (text: string): boolean => !text.includes('\u0000') && !/\p{Surrogate}/u.test(text)

function faultOf(value: unknown, path: string, depth: number): Refusal | null {
  if (depth > maxDepth) return refusal(`Nested deeper than ${maxDepth}.`, path)
  if (typeof value === 'string' && !isStorable(value)) return refusal('Characters that cannot be stored.', path)
  if (typeof value === 'number' && !Number.isFinite(value)) return refusal('Not a finite number.', path)
  return null
}

/** The first thing in a value that can never be kept, whatever its schema says; walks without recursion. */
export function findFault(root: unknown): Refusal | null {
  const open: { value: unknown; path: string; depth: number }[] = [{ value: root, path: '', depth: 0 }]
  for (let next = open.pop(); next; next = open.pop()) {
    const fault = faultOf(next.value, next.path || 'body', next.depth)
    if (fault) return fault
    if (typeof next.value !== 'object' || next.value === null) continue
    for (const [key, value] of Object.entries(next.value)) {
      if (key === '__proto__' || !isStorable(key)) return refusal('A key that is not known.', next.path || 'body')
      open.push({ value, path: join(next.path, key), depth: next.depth + 1 })
    }
  }
  return null
}

/** The parsed JSON of a request, or why it is refused (400, 413). Every text in it can be stored. */
export async function readJson(request: Request): Promise<{ readonly json: unknown } | Refusal> {
  const text = await readText(request)
  if (typeof text !== 'string') return text
  let json: unknown
  try {
    json = JSON.parse(text)
  } catch {
    return refusal('The body is not JSON.', 'body')
  }
  return findFault(json) ?? { json }
}

/** The first issue of a schema, as deep as it can be told: union members report their own. */
function deepestIssue(issue: z.core.$ZodIssue, base: readonly PropertyKey[] = []): Refusal {
  const path = [...base, ...issue.path]
  if (issue.code === 'invalid_union') {
    const inner = issue.errors.flat().toSorted((a, b) => b.path.length - a.path.length)[0]
    if (inner) return deepestIssue(inner, path)
  }
  const named = issue.code === 'unrecognized_keys' ? [...path, issue.keys[0] ?? ''] : path
  return refusal(issue.message, named.map(String).join('.').slice(0, 200) || 'body')
}

/** A value checked against a schema, or a refusal (400) that names the first wrong field by its dotted path. */
export function checked<T>(schema: z.ZodType<T>, json: unknown): { readonly value: T } | Refusal {
  const result = schema.safeParse(json)
  if (result.success) return { value: result.data }
  const [first] = result.error.issues
  return first ? deepestIssue(first) : refusal('The body does not fit.', 'body')
}

/** The checked JSON body of a request, or why it is refused (400, 413). */
export async function readBody<T>(request: Request, schema: z.ZodType<T>): Promise<{ readonly value: T } | Refusal> {
  const read = await readJson(request)
  return isRefusal(read) ? read : checked(schema, read.json)
}
