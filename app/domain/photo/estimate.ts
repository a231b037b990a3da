/**
 * A figure with its error to first order: what each uncertain input adds when it is off by one standard error. Inputs
 * have names, so that two figures that rest on one input err together.
 */
export interface Estimate {
  readonly value: number
  readonly parts: ReadonlyMap<string, number>
}

/** An input: its name, its value and its standard error, in one unit. */
export interface Uncertain {
  readonly name: string
  readonly value: number
  readonly sigma: number
}

/** Standard error, the root of the sum of the squares of all parts. */
export const sigmaOf = ({ parts }: Pick<Estimate, 'parts'>): number => Math.hypot(...parts.values())

/** Standard error from those inputs alone whose name passes. */
export const sigmaFrom = ({ parts }: Estimate, passes: (name: string) => boolean): number =>
  Math.hypot(...[...parts].filter(([name]) => passes(name)).map(([, part]) => part))

/** Sum of estimates times factors, value and error. */
export function combined(estimates: readonly Estimate[], factors: readonly number[]): Estimate {
  const parts = new Map<string, number>()
  let value = 0
  estimates.forEach((estimate, k) => {
    const factor = factors[k] ?? 0
    value += factor * estimate.value
    for (const [name, part] of estimate.parts) parts.set(name, (parts.get(name) ?? 0) + factor * part)
  })
  return { value, parts }
}

/** Share of a standard error by which an input is moved to see what it does. */
const step = 0.02

/**
 * A function's value with its error, each input moved a little both ways (central differences). Null when the function
 * has none, here or close by.
 */
export function estimateOf(
  inputs: readonly Uncertain[],
  work: (values: readonly number[]) => number | null,
): Estimate | null {
  const values = inputs.map(({ value }) => value)
  const value = work(values)
  if (value === null || !Number.isFinite(value)) return null
  const parts = new Map<string, number>()
  for (const [k, { name, sigma }] of inputs.entries()) {
    if (sigma === 0) continue
    const moved = (by: number) => work(values.map((each, i) => (i === k ? each + by * sigma : each)))
    const [more, less] = [moved(step), moved(-step)]
    if (more === null || less === null) return null
    const part = (more - less) / (2 * step)
    if (!Number.isFinite(part)) return null
    parts.set(name, (parts.get(name) ?? 0) + part)
  }
  return { value, parts }
}
