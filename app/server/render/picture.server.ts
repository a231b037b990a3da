import { renderAsync } from '@resvg/resvg-js'
import type { ReactElement } from 'react'
import { renderToStaticMarkup } from 'react-dom/server'
import { fontFamily } from '#app/drawing/theme.ts'
import { embeddedFont, pictureFonts } from '#app/server/render/fonts.server.ts'

/** A drawing (an `svg` element) as markup of its own, with the namespace that a file needs. */
export function svgOf(drawing: ReactElement): string {
  const markup = renderToStaticMarkup(drawing)
  return markup.includes('xmlns=') ? markup : markup.replace('<svg', '<svg xmlns="http://www.w3.org/2000/svg"')
}

/**
 * A drawing's markup as PNG bytes, `scale` pixels to each of its own. Runs beside the event loop; uses the shipped fonts
 * and none of the system's.
 */
export async function pngOf(svg: string, scale = 2): Promise<Buffer> {
  const image = await renderAsync(svg, {
    font: {
      loadSystemFonts: false,
      fontFiles: [...pictureFonts],
      defaultFontFamily: fontFamily,
      sansSerifFamily: fontFamily,
    },
    fitTo: { mode: 'zoom', value: scale },
    textRendering: 2,
  })
  return image.asPng()
}

/** A drawing as an SVG document that stands alone: it carries the two weights of its words. */
export async function svgDocument(drawing: ReactElement): Promise<string> {
  const faces = await Promise.all([embeddedFont(fontFamily, 500), embeddedFont(fontFamily, 600)])
  const markup = svgOf(drawing)
  const start = markup.indexOf('>') + 1
  const style = `<style>${faces.join('')}</style>`
  return `<?xml version="1.0" encoding="UTF-8"?>\n${markup.slice(0, start)}${style}${markup.slice(start)}`
}
