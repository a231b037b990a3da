/**
 * What the things of a site hide of an element from a cell: the hidden share of each of the pieces along it. Cells hold
 * the number of a pattern; number 0 hides nothing.
 */
interface ShadePattern {
  /** Hidden share of each piece along u, 0 … 1. */
  readonly hidden: readonly number[]
  /**
   * What is seen all the same: stretches, flat, each as where on the element it begins and ends (shares of its length
   * along u) and the share of its radiation that arrives.
   */
  readonly seen: readonly number[]
  /** Number of the pattern behind an opaque thing besides, by the pieces that this hides (a bit each); −1: not met yet. */
  readonly opaque: Int32Array
}

/** The patterns met so far and which follows from which behind another thing. */
export interface ShadePatterns {
  /** Where the element is cut into pieces, with its ends: 0 … 1 along u. */
  readonly cuts: readonly number[]
  readonly list: ShadePattern[]
  /** For what is not opaque: by number · masks + mask, for each transmittance. */
  readonly following: Map<number, Map<number, number>>
  readonly numbers: Map<string, number>
}

function patternOf(hidden: readonly number[], cuts: readonly number[]): ShadePattern {
  const pieces = hidden.length
  const seen: number[] = []
  for (let from = 0, piece = 1; piece <= pieces; piece++) {
    if (piece < pieces && hidden[piece] === hidden[from]) continue
    const share = 1 - (hidden[from] ?? 0)
    if (share > 0) seen.push(cuts[from] ?? 0, cuts[piece] ?? 1, share)
    from = piece
  }
  return { hidden, seen, opaque: new Int32Array(1 << pieces).fill(-1) }
}

/** Patterns of an element that is cut there, with only number 0. */
export function emptyPatterns(cuts: readonly number[]): ShadePatterns {
  const hidden = cuts.slice(1).map(() => 0)
  return { cuts, list: [patternOf(hidden, cuts)], following: new Map(), numbers: new Map([[hidden.join(), 0]]) }
}

function numberOf({ list, numbers, cuts }: ShadePatterns, hidden: readonly number[]): number {
  const key = hidden.join()
  const known = numbers.get(key)
  if (known !== undefined) return known
  numbers.set(key, list.length)
  return list.push(patternOf(hidden, cuts)) - 1
}

function behind(patterns: ShadePatterns, { hidden }: ShadePattern, mask: number, transmittance: number): number {
  return numberOf(
    patterns,
    hidden.map((share, piece) => (mask & (1 << piece) ? 1 - (1 - share) * transmittance : share)),
  )
}

/** Number of the pattern that a cell of pattern `number` has when a thing hides the pieces of `mask` besides. */
export function patternBehind(patterns: ShadePatterns, number: number, mask: number, transmittance: number): number {
  const pattern = patterns.list[number]
  if (!pattern) return number
  if (transmittance === 0) {
    const found = pattern.opaque[mask] ?? -1
    return found >= 0 ? found : (pattern.opaque[mask] = behind(patterns, pattern, mask, 0))
  }
  let following = patterns.following.get(transmittance)
  if (!following) patterns.following.set(transmittance, (following = new Map<number, number>()))
  const key = number * pattern.opaque.length + mask
  const known = following.get(key) ?? behind(patterns, pattern, mask, transmittance)
  following.set(key, known)
  return known
}
