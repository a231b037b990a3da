import { useRef, useState } from 'react'
import { mostMegabytes } from '#app/domain/photo/photo-limits.ts'

/** What became of one file that was chosen. */
type Sent = { readonly kind: 'kept' } | { readonly kind: 'refused'; readonly reason: string }

/** Sends one file; the page brings the address. `key` names the effect: the same is kept once. */
export type SendPhoto = (file: File, key: string, signal: AbortSignal) => Promise<Sent>

interface Uploads {
  /** Files on their way: which one of how many; null when none is. */
  readonly underway: { readonly at: number; readonly of: number } | null
  /** What was not kept, by file, in words. */
  readonly problems: readonly { readonly name: string; readonly reason: string }[]
}

const isPdf = (file: File): boolean => file.type === 'application/pdf' || /\.pdf$/i.test(file.name)

/** A page of a PDF as a picture; the part that draws it is loaded when it is needed. */
async function pictureOf(file: File, page: number): Promise<File | { readonly error: string }> {
  if (!isPdf(file)) return file
  const { drawPdfPage } = await import('#app/editor/photo/pdf-page.ts')
  const drawn = await drawPdfPage(file, page)
  return 'error' in drawn ? drawn : drawn.picture
}

/** Sends chosen files one after the other, tells which were not kept and why, and can be stopped in between. */
export function usePhotoUploads(send: SendPhoto, onDone: () => void) {
  const [state, setState] = useState<Uploads>({ underway: null, problems: [] })
  const stop = useRef<AbortController | null>(null)

  const sendOne = async (file: File, page: number, signal: AbortSignal): Promise<string | null> => {
    const picture = await pictureOf(file, page)
    if ('error' in picture) return picture.error
    if (picture.size > mostMegabytes * 1_000_000) return `A photo is at most ${mostMegabytes} MB.`
    const sent = await send(picture, crypto.randomUUID(), signal)
    return sent.kind === 'refused' ? sent.reason : null
  }
  const start = async (files: readonly File[], page: number) => {
    const control = new AbortController()
    stop.current = control
    const problems: { name: string; reason: string }[] = []
    for (const [k, file] of files.entries()) {
      if (control.signal.aborted) break
      setState({ underway: { at: k + 1, of: files.length }, problems: [...problems] })
      const reason = await sendOne(file, page, control.signal)
      if (reason) problems.push({ name: file.name, reason })
    }
    setState({ underway: null, problems })
    onDone()
  }
  return { ...state, start, stop: () => stop.current?.abort() }
}
