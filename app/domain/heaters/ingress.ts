/**
 * Second numeral (water) of the first ingress protection code in a text: "IP54 (face), IP20 (void)" is 4, "IPX4" is 4.
 * Null when there is none, also for "IP5X".
 */
export function waterNumeral(text: string | null): number | null {
  const digit = /\bIP\s?[0-6X]([0-9])/i.exec(text ?? '')?.[1]
  return digit === undefined ? null : Number(digit)
}

/** Whether a location note allows rain; null when it says nothing about it. */
export function allowsRain(note: string | null): boolean | null {
  if (note === null) return null
  if (/\b(cover|covered|indoors?|soffit|dry)\b.*\bonly\b/i.test(note)) return false
  return /\brain\b|\brain-|open sky/i.test(note) ? true : null
}
