/** Red, green and blue, 0 to 255. */
export type Rgb = readonly [red: number, green: number, blue: number]

/** `#rrggbb` or `rgb(r, g, b)` → its three channels; anything else is black. */
export function rgbOf(colour: string): Rgb {
  const hex = /^#([0-9a-f]{2})([0-9a-f]{2})([0-9a-f]{2})$/i.exec(colour)
  if (hex) return [parseInt(hex[1] ?? '', 16), parseInt(hex[2] ?? '', 16), parseInt(hex[3] ?? '', 16)]
  const [red = 0, green = 0, blue = 0] = (colour.match(/\d+(\.\d+)?/g) ?? []).map(Number)
  return [red, green, blue]
}

/** Three channels → `#rrggbb`. */
export const hexOf = (rgb: Rgb): string =>
  `#${rgb
    .map((channel) =>
      Math.round(Math.min(255, Math.max(0, channel)))
        .toString(16)
        .padStart(2, '0'),
    )
    .join('')}`

/** The colour at t between a (0) and b (1), channel by channel. */
export const mixed = (a: string, b: string, t: number): string => {
  const from = rgbOf(a)
  const to = rgbOf(b)
  return hexOf([from[0] + t * (to[0] - from[0]), from[1] + t * (to[1] - from[1]), from[2] + t * (to[2] - from[2])])
}
