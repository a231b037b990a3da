import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { clippedText, textWidth, wrapText } from '#app/drawing/text/widths.ts'
import { pictureFonts } from '#app/server/render/fonts.server.ts'

/** Advance width of a letter in a TrueType file, in ems: tables cmap (format 4), hhea, hmtx of the OpenType standard. */
function advance(file: string, letter: string): number {
  const font = readFileSync(file)
  const tables = new Map(
    Array.from({ length: font.readUInt16BE(4) }, (_, i) => {
      const at = 12 + i * 16
      return [font.toString('latin1', at, at + 4), font.readUInt32BE(at + 8)] as const
    }),
  )
  const table = (name: string): number => tables.get(name)!
  const cmap = table('cmap')
  const encodings = Array.from(
    { length: font.readUInt16BE(cmap + 2) },
    (_, i) => cmap + font.readUInt32BE(cmap + 8 + i * 8),
  )
  const map = encodings.find((at) => font.readUInt16BE(at) === 4)!
  const segments = font.readUInt16BE(map + 6) / 2
  const code = letter.codePointAt(0)!
  const i = Array.from({ length: segments }, (_, k) => k).find((k) => code <= font.readUInt16BE(map + 14 + 2 * k))!
  const [start, delta, offsetAt] = [16 + 2 * segments, 16 + 4 * segments, 16 + 6 * segments].map(
    (at) => map + at + 2 * i,
  )
  const offset = font.readUInt16BE(offsetAt!)
  const found = offset === 0 ? code : font.readUInt16BE(offsetAt! + offset + 2 * (code - font.readUInt16BE(start!)))
  const glyph = (found + font.readUInt16BE(delta!)) & 0xffff
  const last = font.readUInt16BE(table('hhea') + 34) - 1
  return font.readUInt16BE(table('hmtx') + 4 * Math.min(glyph, last)) / font.readUInt16BE(table('head') + 18)
}

describe('widths of words', () => {
  it.each([400, 500, 600] as const)('are those of the font that is shipped (%d)', (weight) => {
    const file = pictureFonts[[400, 500, 600].indexOf(weight)]!
    for (const letter of 'AaHhRrWwmil0123456789.,²°±–→€/( %')
      expect(Math.abs(textWidth(letter, 1000, weight) - advance(file, letter) * 1000), letter).toBeLessThan(1)
  })
  it('break words into lines that fit and lose none', () => {
    const text = 'Nothing that burns nearer than 0.45 m from a heater end, 1.30 in front.'
    const lines = wrapText(text, 120, 9)
    expect(lines.join(' ')).toBe(text)
    for (const line of lines) expect(textWidth(line, 9)).toBeLessThanOrEqual(120)
  })
  it('cut what is too long with an ellipsis', () => {
    const cut = clippedText('Two rows on all six beams, ends tilted in', 100, 10)
    expect(cut.endsWith('…')).toBe(true)
    expect(textWidth(cut, 10)).toBeLessThanOrEqual(100)
    expect(clippedText('Short', 100, 10)).toBe('Short')
  })
})
