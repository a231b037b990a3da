/** How many variants a comparison shows. */
export const fewestCompared = 2
export const mostCompared = 4

/**
 * The numbers that an address asks to compare, `1,3`: those that exist, each once, at most four, in the order asked.
 * Fewer than two are filled up with the lowest others; a job with fewer than two variants compares none.
 */
export function chosenVariants(asked: string | null, existing: readonly number[]): number[] {
  const wanted = (asked ?? '')
    .split(',')
    .map((part) => (/^\d{1,6}$/.test(part.trim()) ? Number(part) : NaN))
    .filter((number) => existing.includes(number))
  const chosen = [...new Set(wanted)].slice(0, mostCompared)
  const others = existing.filter((number) => !chosen.includes(number)).toSorted((a, b) => a - b)
  const filled = [...chosen, ...others.slice(0, Math.max(0, fewestCompared - chosen.length))]
  return filled.length < fewestCompared ? [] : filled
}

/** The part of the address that asks for these variants. */
export const askFor = (numbers: readonly number[]): string => `variants=${numbers.join(',')}`
