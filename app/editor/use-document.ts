import { useEffect, useState, useSyncExternalStore } from 'react'
import type { z } from 'zod'
import { openDocument, type DocumentState, type OpenDocument } from '#app/editor/document.ts'
import { keptAt } from '#app/editor/kept-at.ts'
import type { Kept } from '#app/editor/keeping.ts'
import { sameData } from '#app/domain/same-data.ts'

interface DocumentAddress<T> {
  /** Where it is saved. */
  readonly url: string
  /** The name under which answers carry the body: `{ revision, [name]: body }`. */
  readonly name: string
  readonly schema: z.ZodType<T>
}

/** A document that the page edits: its state, and the verbs. Unsaved changes survive a reload on this device. */
export function useDocument<T>(
  initial: Kept<T>,
  { url, name, schema }: DocumentAddress<T>,
): [DocumentState<T>, OpenDocument<T>] {
  const [{ document, keeping }] = useState(() => {
    const keeping = keptAt({
      url,
      parsing: async () => (await import('#app/editor/parse-kept.ts')).documentParsing(name, schema),
    })
    return { keeping, document: openDocument(initial, keeping, sameData) }
  })
  const state = useSyncExternalStore(document.subscribe, document.state, document.state)
  useEffect(() => {
    let open = true
    void keeping.findOnDevice().then((copy) => {
      if (open && copy) document.resume(copy)
    })
    const again = () => document.retry()
    window.addEventListener('online', again)
    return () => {
      open = false
      window.removeEventListener('online', again)
      document.stop()
    }
  }, [document, keeping])
  return [state, document]
}
