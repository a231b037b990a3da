import { readFile } from 'node:fs/promises'
import { createRequire } from 'node:module'
import type { FontWeight } from '#app/drawing/text/widths.ts'

const require = createRequire(import.meta.url)

/** Font files for the picture renderer, which knows no other fonts. */
export const pictureFonts: readonly string[] = ['400Regular', '500Medium', '600SemiBold'].map((style) =>
  require.resolve(`@expo-google-fonts/work-sans/${style}/WorkSans_${style}.ttf`),
)

/** One weight of the family as a CSS rule that carries the file itself, for a document that stands alone. */
export async function embeddedFont(family: string, weight: FontWeight): Promise<string> {
  const file = require.resolve(`@fontsource/work-sans/files/work-sans-latin-${weight}-normal.woff2`)
  const data = (await readFile(file)).toString('base64')
  const source = `url(data:font/woff2;base64,${data}) format('woff2')`
  return `@font-face{font-family:'${family}';font-style:normal;font-weight:${weight};src:${source}}`
}
