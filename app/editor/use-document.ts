import { useEffect, useState, useSyncExternalStore } from 'react'
import { z } from 'zod'
import {
  openDocument,
  type DocumentKeeping,
  type DocumentState,
  type Kept,
  type OpenDocument,
} from '#app/editor/document.ts'

interface DocumentAddress<T> {
  /** Where it is saved by PUT, with the revision in If-Match and the save's id in Idempotency-Key. */
  readonly url: string
  /** The name under which answers carry the body: `{ revision, [name]: body }`. */
  readonly name: string
  readonly schema: z.ZodType<T>
}

/** A document that the page edits: its state, and the verbs. Unsaved changes survive a reload on this device. */
export function useDocument<T>(initial: Kept<T>, address: DocumentAddress<T>): [DocumentState<T>, OpenDocument<T>] {
  const [document] = useState(() => openDocument(initial, keepingAt(address)))
  const state = useSyncExternalStore(document.subscribe, document.state, document.state)
  useEffect(() => {
    const copy = findOnDevice(address)
    if (copy) document.resume(copy)
    const again = () => document.retry()
    window.addEventListener('online', again)
    return () => {
      window.removeEventListener('online', again)
      document.stop()
    }
    // One document per page: the address does not change under it.
    // eslint-disable-next-line react-hooks/exhaustive-deps
  }, [document])
  return [state, document]
}

const deviceKey = (url: string) => `unsaved:${url}`

const keptSchema = <T>(schema: z.ZodType<T>) => z.object({ revision: z.number(), body: schema })

function findOnDevice<T>({ url, schema }: DocumentAddress<T>): Kept<T> | null {
  try {
    return keptSchema(schema).parse(JSON.parse(localStorage.getItem(deviceKey(url)) ?? 'null'))
  } catch {
    return null
  }
}

function keepOnDevice<T>(url: string, copy: Kept<T> | null): void {
  try {
    if (copy) localStorage.setItem(deviceKey(url), JSON.stringify(copy))
    else localStorage.removeItem(deviceKey(url))
  } catch {
    // A device that keeps nothing still saves to the server.
  }
}

const refusalSchema = z.object({ error: z.string(), current: z.unknown() })

function keepingAt<T>({ url, name, schema }: DocumentAddress<T>): DocumentKeeping<T> {
  const current = (json: unknown): Kept<T> => {
    const found = z.looseObject({ revision: z.number() }).parse(json)
    return { revision: found.revision, body: schema.parse(found[name]) }
  }
  return {
    newSaveId: () => crypto.randomUUID(),
    keepOnDevice: (copy) => keepOnDevice(url, copy),
    save: async (body, revision, saveId) => {
      const headers = { 'Content-Type': 'application/json', 'If-Match': `"${revision}"`, 'Idempotency-Key': saveId }
      try {
        const response = await fetch(url, { method: 'PUT', headers, body: JSON.stringify(body) })
        if (response.status >= 500) return { kind: 'unreachable' }
        const json: unknown = await response.json()
        if (response.ok)
          return { kind: 'saved', revision: z.looseObject({ revision: z.number() }).parse(json).revision }
        const refusal = refusalSchema.parse(json)
        if (response.status === 412) return { kind: 'conflict', current: current(refusal.current) }
        return { kind: 'refused', reason: refusal.error }
      } catch {
        return { kind: 'unreachable' }
      }
    },
  }
}
