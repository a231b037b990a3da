import type { ReactElement } from 'react'
import { pngOf, svgDocument, svgOf } from '#app/server/render/picture.server.ts'

/** A form in which a drawing leaves the house as a file. */
export interface PictureFile {
  readonly format: 'png' | 'svg'
  readonly headers: Readonly<Record<string, string>>
  readonly write: (drawing: ReactElement) => Promise<string | Uint8Array<ArrayBuffer>>
}

/** A picture of twice the drawing's size. */
export const pngFile: PictureFile = {
  format: 'png',
  headers: { 'Content-Type': 'image/png' },
  write: async (drawing) => new Uint8Array(await pngOf(svgOf(drawing), 2)),
}

/** A drawing that stands alone; opened by itself it runs nothing and loads nothing but the fonts it carries. */
export const svgFile: PictureFile = {
  format: 'svg',
  headers: {
    'Content-Type': 'image/svg+xml; charset=utf-8',
    'Content-Security-Policy': "default-src 'none'; style-src 'unsafe-inline'; font-src data:; sandbox",
  },
  write: svgDocument,
}
