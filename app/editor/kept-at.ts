import type { DeviceCopy, Kept, Keeping } from '#app/editor/keeping.ts'
import type { KeptParsing } from '#app/editor/parse-kept.ts'

/** Where something is kept and how what comes from there is read. */
export interface KeptAddress<T> {
  /** Where it is saved by PUT, with the revision in If-Match and the save's id in Idempotency-Key. */
  readonly url: string
  readonly parsing: () => KeptParsing<T> | Promise<KeptParsing<T>>
  readonly onSaved?: (kept: Kept<T>) => void | Promise<void>
}

/** Keeps something at a URL of the API and, until it is there, on this device. */
export function keptAt<T>({ url, parsing, onSaved }: KeptAddress<T>): Keeping<T> {
  const device = `unsaved:${url}`
  return {
    newSaveId: () => crypto.randomUUID(),
    keepOnDevice: (copy) => keepOnDevice(device, copy),
    async findOnDevice() {
      try {
        const text = localStorage.getItem(device)
        return text === null ? null : (await parsing()).deviceCopy(text)
      } catch {
        return null
      }
    },
    async save({ body, revision, saveId }) {
      const headers = { 'Content-Type': 'application/json', 'If-Match': `"${revision}"`, 'Idempotency-Key': saveId }
      try {
        const response = await fetch(url, { method: 'PUT', headers, body: JSON.stringify(body) })
        if (response.status >= 500) return { kind: 'unreachable' }
        const json: unknown = await response.json()
        const read = await parsing()
        if (response.ok) {
          const saved = read.kept(json)
          await onSaved?.(saved)
          return { kind: 'saved', revision: saved.revision }
        }
        const { error, current, changed } = read.refusal(json)
        if (response.status !== 412) return { kind: 'refused', reason: error }
        return { kind: 'conflict', current: read.kept(current), by: changed?.by ?? null, at: changed?.at ?? null }
      } catch {
        return { kind: 'unreachable' }
      }
    },
  }
}

function keepOnDevice<T>(key: string, copy: DeviceCopy<T> | null): void {
  try {
    if (copy) localStorage.setItem(key, JSON.stringify(copy))
    else localStorage.removeItem(key)
  } catch {
    // A device that keeps nothing still saves to the server.
  }
}
