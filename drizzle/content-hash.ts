import { createHash } from 'node:crypto'

function sorted(value: unknown): unknown {
  if (Array.isArray(value)) return value.map(sorted)
  if (typeof value !== 'object' || value === null) return value
  return Object.fromEntries(
    Object.entries(value)
      .filter(([, inner]) => inner !== undefined)
      .toSorted(([a], [b]) => (a < b ? -1 : 1))
      .map(([key, inner]) => [key, sorted(inner)]),
  )
}

/** JSON with sorted keys: the same content gives the same text, however it was written. */
export const canonicalJson = (value: unknown): string => JSON.stringify(sorted(value))

/** SHA-256 of the canonical JSON, hex. */
export const contentHash = (value: unknown): string => createHash('sha256').update(canonicalJson(value)).digest('hex')
