/**
 * What the things of a site hide of one heater from a cell: the hidden share of each piece of its elements. Cells hold
 * the number of a pattern; number 0 hides nothing.
 */
export interface ShadePattern {
  /** Hidden share of each piece, 0 … 1: the pieces of the first element, of the second … */
  readonly shares: readonly number[]
  /** The share when it is the same for all pieces, else NaN. */
  readonly whole: number
  /** Neighbouring pieces of an element that are hidden alike, flat: element, first piece, end, share. */
  readonly runs: readonly number[]
}

/** The patterns met so far and which follows from which behind another thing. */
export interface ShadePatterns {
  /** How many pieces each element is taken as. */
  readonly perElement: number
  readonly list: ShadePattern[]
  /** By number · masks + mask (a bit per hidden piece), for each transmittance. */
  readonly following: Map<number, Map<number, number>>
  readonly numbers: Map<string, number>
}

function patternOf(shares: readonly number[], perElement: number): ShadePattern {
  const [whole = 0] = shares
  const runs: number[] = []
  for (let from = 0, piece = 1; piece <= shares.length; piece++) {
    const share = shares[from] ?? 0
    if (piece % perElement !== 0 && shares[piece] === share) continue
    const first = from % perElement
    if (share > 0) runs.push(Math.floor(from / perElement), first, first + piece - from, share)
    from = piece
  }
  return { shares, whole: shares.every((share) => share === whole) ? whole : NaN, runs }
}

/** Patterns of so many elements, with only number 0. */
export function emptyPatterns(elements: number, perElement: number): ShadePatterns {
  const shares = Array.from({ length: elements * perElement }, () => 0)
  return {
    perElement,
    list: [patternOf(shares, perElement)],
    following: new Map(),
    numbers: new Map([[shares.join(), 0]]),
  }
}

function numberOf({ list, numbers, perElement }: ShadePatterns, shares: readonly number[]): number {
  const key = shares.join()
  const known = numbers.get(key)
  if (known !== undefined) return known
  numbers.set(key, list.length)
  return list.push(patternOf(shares, perElement)) - 1
}

/** Number of the pattern that a cell of pattern `number` has when a thing hides the pieces of `mask` besides. */
export function patternBehind(patterns: ShadePatterns, number: number, mask: number, transmittance: number): number {
  const shares = patterns.list[number]?.shares ?? []
  let following = patterns.following.get(transmittance)
  if (!following) patterns.following.set(transmittance, (following = new Map<number, number>()))
  const key = number * (1 << shares.length) + mask
  const known = following.get(key)
  if (known !== undefined) return known
  const behind = shares.map((share, piece) => (mask & (1 << piece) ? 1 - (1 - share) * transmittance : share))
  const found = numberOf(patterns, behind)
  following.set(key, found)
  return found
}
