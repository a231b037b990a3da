/** Longest side of a page when it is drawn, px. */
const longest = 3000

/** A page of a PDF as a picture, or why there is none; the page's number starts at 1. */
export async function drawPdfPage(
  file: File,
  page: number,
): Promise<{ readonly picture: File; readonly pages: number } | { readonly error: string }> {
  const [{ getDocument, GlobalWorkerOptions }, { default: worker }] = await Promise.all([
    import('pdfjs-dist'),
    import('pdfjs-dist/build/pdf.worker.min.mjs?url'),
  ])
  GlobalWorkerOptions.workerSrc = worker
  const data = new Uint8Array(await file.arrayBuffer())
  // Neither eval nor fonts nor compiled parts: nothing that our pages’ security policy refuses.
  const task = getDocument({
    data,
    isEvalSupported: false,
    disableFontFace: true,
    useWasm: false,
    useSystemFonts: false,
  })
  try {
    const whole = await task.promise
    if (!(page >= 1 && page <= whole.numPages)) return { error: `The PDF has ${whole.numPages} pages.` }
    const one = await whole.getPage(page)
    const [, , width = 0, height = 0] = one.view
    const viewport = one.getViewport({ scale: longest / Math.max(width, height, 1) })
    const canvas = document.createElement('canvas')
    canvas.width = Math.ceil(viewport.width)
    canvas.height = Math.ceil(viewport.height)
    await one.render({ canvas, viewport, background: '#ffffff' }).promise
    const blob = await new Promise<Blob | null>((resolve) => canvas.toBlob(resolve, 'image/png'))
    if (!blob) return { error: 'The page cannot be drawn in this browser.' }
    const name = `${file.name.replace(/\.pdf$/i, '')}, page ${page}.png`
    return { picture: new File([blob], name, { type: 'image/png' }), pages: whole.numPages }
  } catch {
    return { error: 'The PDF cannot be read. Save the page as a picture.' }
  } finally {
    await task.destroy()
  }
}
