import { readFileSync } from 'node:fs'
import { interpolateInferno } from 'd3-scale-chromatic'
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { rgbOf, type Rgb } from '#app/drawing/heat/colour.ts'
import { legendBands } from '#app/drawing/heat/legend.tsx'
import { differenceScale, feelsLikeScale, irradianceScale, overlapScale } from '#app/drawing/heat/quantity.ts'
import { bandColour, colourOf, heatColours, irradianceOfColour, zoneOf } from '#app/drawing/heat/scale.ts'

const linear = (channel: number): number =>
  channel / 255 <= 0.04045 ? channel / 255 / 12.92 : ((channel / 255 + 0.055) / 1.055) ** 2.4

/** L* of linear sRGB, D65 (IEC 61966-2-1 luminance weights, CIE 1976 L*). */
function lightness([red, green, blue]: readonly number[]): number {
  const y = 0.2126 * red! + 0.7152 * green! + 0.0722 * blue!
  return y > 216 / 24389 ? 116 * Math.cbrt(y) - 16 : (24389 / 27) * y
}

/** Colour deficiency at full severity: Machado, Oliveira, Fernandes, IEEE TVCG 15 (2009), table of matrices. */
const deficiencies = {
  none: [1, 0, 0, 0, 1, 0, 0, 0, 1],
  protan: [0.152286, 1.052583, -0.204868, 0.114503, 0.786281, 0.099216, -0.003882, -0.048116, 1.051998],
  deutan: [0.367322, 0.860646, -0.227968, 0.280085, 0.672501, 0.047413, -0.01182, 0.04294, 0.968881],
  tritan: [1.255528, -0.076749, -0.178779, -0.078411, 0.930809, 0.147602, 0.004733, 0.691367, 0.3039],
}
const seen = (colour: string, matrix: readonly number[]): number => {
  const rgb = rgbOf(colour).map(linear)
  const row = (i: number) => [0, 1, 2].reduce((sum, k) => sum + matrix[3 * i + k]! * rgb[k]!, 0)
  return lightness([row(0), row(1), row(2)].map((v) => Math.min(1, Math.max(0, v))))
}

const steps = Array.from({ length: 61 }, (_, i) => i * 10)

describe('the one scale', () => {
  it.each(Object.entries(deficiencies))('grows lighter by dusk at every 10 W/m² (%s)', (_, matrix) => {
    const values = steps.map((w) => seen(colourOf(w, 'dusk'), matrix))
    for (const [i, value] of values.slice(1).entries()) expect(value).toBeGreaterThan(values[i]!)
  })
  it.each(Object.entries(deficiencies))('grows darker by day at every 10 W/m² (%s)', (_, matrix) => {
    const values = steps.map((w) => seen(colourOf(w, 'day'), matrix))
    for (const [i, value] of values.slice(1).entries()) expect(value).toBeLessThan(values[i]!)
  })
  it('has the lightness that the look states', () => {
    const stated = { 0: 8, 100: 23, 150: 29, 200: 35, 300: 47, 350: 53, 400: 59, 500: 74, 600: 89 }
    for (const [w, value] of Object.entries(stated))
      expect(Math.abs(seen(colourOf(Number(w), 'dusk'), deficiencies.none) - value)).toBeLessThan(1)
  })
  it('is the inferno ramp from 0.135 on', () => {
    const at = (t: number) => rgbOf(interpolateInferno(t))
    const distance = (a: Rgb, b: Rgb) => Math.hypot(a[0] - b[0], a[1] - b[1], a[2] - b[2])
    for (const colour of heatColours.dusk.slice(1)) {
      const nearest = Math.min(...Array.from({ length: 787 }, (_, i) => distance(rgbOf(colour), at(0.134 + i / 1000))))
      expect(nearest).toBeLessThan(3)
    }
  })
  it('has the colours of the page, token by token', () => {
    const css = readFileSync('app/app.css', 'utf8')
    for (const [prefix, colours] of [
      ['heat', heatColours.dusk],
      ['day', heatColours.day],
    ] as const) {
      const tokens = colours.map(
        (_, i) => new RegExp(`--color-${prefix}-${i * 50}:\\s*(#[0-9a-f]{6})`, 'i').exec(css)?.[1],
      )
      expect(tokens).toEqual([...colours])
    }
  })
  it('stays at its ends outside 0 to 600', () => {
    expect(colourOf(-50, 'dusk')).toBe(heatColours.dusk[0])
    expect(colourOf(5000, 'dusk')).toBe(heatColours.dusk.at(-1))
    expect(bandColour(600, 610, 'day')).toBe(heatColours.day.at(-1))
  })
  it.each([
    ['dusk', 2],
    ['day', 4],
  ] as const)('is read back from its own colours (%s)', (theme, within) => {
    fc.assert(
      fc.property(fc.double({ min: 0, max: 600, noNaN: true }), (w) => {
        expect(Math.abs((irradianceOfColour(colourOf(w, theme), theme) ?? NaN) - w)).toBeLessThan(within)
      }),
    )
  })
  it('does not read a figure out of a line, a word or a dot', () => {
    for (const colour of ['#1d2233', '#5c3317', '#7a4a22', '#5a6072'])
      expect(irradianceOfColour(colour, 'day')).toBeNull()
    for (const colour of ['#efe6d6', '#93a0bd', '#fff4df']) expect(irradianceOfColour(colour, 'dusk')).toBeNull()
  })
  it('has both limits of the target in the target', () => {
    const target = { low: 150, high: 350 }
    expect([149.99, 150, 350, 350.01].map((w) => zoneOf(w, target))).toEqual([
      'below',
      'in target',
      'in target',
      'above',
    ])
  })
})

describe('scales of the other quantities', () => {
  it.each(['dusk', 'day'] as const)('tell every step of overlap and feels-like apart by lightness (%s)', (theme) => {
    for (const scale of [overlapScale(theme, 80), feelsLikeScale(theme)]) {
      const values = legendBands(scale).map(({ fill }) => seen(fill, deficiencies.none))
      const rising = values.slice(1).map((value, i) => Math.sign(value - values[i]!))
      expect(new Set(rising).size, scale.name).toBe(1)
    }
  })
  it.each(['dusk', 'day'] as const)('make a difference of either sign stronger with its size (%s)', (theme) => {
    const scale = differenceScale(theme)
    const strength = (d: number) => {
      const fill = scale.fill(d - 15, d + 15)
      return Math.abs(seen(fill, deficiencies.none) - seen(scale.fill(-15, 15), deficiencies.none))
    }
    for (const sign of [-1, 1]) {
      const sizes = [30, 90, 150, 210, 270].map((d) => strength(sign * d))
      for (const [i, value] of sizes.slice(1).entries()) expect(value).toBeGreaterThan(sizes[i]!)
    }
    expect(scale.fill(135, 165)).not.toBe(scale.fill(-165, -135))
  })
  it('show in the legend exactly the colours of the map', () => {
    for (const fine of [true, false]) {
      const scale = irradianceScale('day', { low: 150, high: 350 }, fine)
      const bands = legendBands(scale)
      expect(bands.map(({ fill }) => fill)).toEqual(bands.map(({ from, to }) => bandColour(from, to, 'day')))
      expect(bands[0]?.from).toBe(0)
      expect(bands.at(-1)?.to).toBe(600)
    }
  })
})
