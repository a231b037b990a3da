import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'
import { siteFaults } from '#app/domain/site/site-faults.ts'
import { usualTolerance } from '#app/domain/site/size-source.ts'
import { siteSchema, type Dimension, type Site, type SizeSource } from '#app/domain/site/site.ts'
import { roundLength } from '#app/domain/units.ts'
import type { Vec2 } from '#app/domain/vector.ts'

/** A size that a template asks for, m, with what it takes when nobody gives one. */
export interface TemplateSize<Key extends string = string> {
  readonly key: Key
  readonly label: string
  readonly usual: number
  readonly min: number
  readonly max: number
}

/** What one size decides of the site that a template makes. */
export type Moves = Dimension['moves']
export type Move = Moves[number]

/** A site without names of its own, and what each size decides in it. */
export interface Made<Key extends string> {
  readonly site: Omit<Site, 'name' | 'displayUnits' | 'dimensions' | 'trace'>
  readonly moves: Readonly<Record<Key, Moves>>
}

/** A kind of place to start a site from: its sizes, and the site that they make. */
export interface SiteTemplate {
  readonly key: string
  readonly name: string
  /** What it brings, in one sentence. */
  readonly says: string
  readonly sizes: readonly TemplateSize[]
  /** The site for sizes by key, m; a size that is missing is the usual one and counts as guessed. */
  readonly start: (
    given: ReadonlyMap<string, number>,
    source: SizeSource,
    base: Base,
    rules: HouseRules,
  ) => Site | { readonly error: string }
}

/** What a site keeps when it starts anew. */
type Base = Pick<Site, 'name' | 'displayUnits' | 'trace'>

/** A template from its sizes and the way it makes a site of them. */
export function templateOf<Key extends string>(
  about: Pick<SiteTemplate, 'key' | 'name' | 'says'>,
  sizes: readonly TemplateSize<Key>[],
  make: (size: (key: Key) => number) => Made<Key>,
): SiteTemplate {
  return {
    ...about,
    sizes,
    start: (given, source, { name, displayUnits, trace }, rules) => {
      const valueOf = (key: string) => given.get(key) ?? sizes.find((size) => size.key === key)?.usual ?? 0
      const { site, moves } = make(valueOf)
      const dimensions = sizes.map(({ key, label }): Dimension => {
        const from = given.has(key) ? source : 'guessed'
        const value = valueOf(key)
        const note = given.has(key) ? null : 'assumed until measured'
        const tolerance = usualTolerance(from, value, rules)
        return { id: `size-${key}`, label, value, tolerance, source: from, note, moves: moves[key] }
      })
      const made = siteSchema.safeParse({ ...site, name, displayUnits, trace, dimensions })
      if (!made.success)
        return { error: 'These sizes make more than a site can hold. Larger spacings make fewer things.' }
      const [fault] = siteFaults(made.data)
      return fault ? { error: fault.message } : made.data
    },
  }
}

export const rectangle = (length: number, depth: number): [number, number][] => [
  [0, 0],
  [length, 0],
  [length, depth],
  [0, depth],
]

/** Moves of the floor's far corners along x (0) or y (1), and whatever else ends there. */
export const floorMoves = (axis: 0 | 1, more: Moves = []): Moves => [
  ...(axis === 0 ? [1, 2] : [2, 3]).map((corner): Move => move('floor', 'floor', `${corner}.${axis}`)),
  ...more,
]

export const move = (of: Move['of'], id: string, coordinate: string, by = 1): Move => ({ of, id, coordinate, by })

/** Places from 0 to a length at a spacing; the length itself when a whole spacing ends there. */
export const placesAlong = (length: number, spacing: number): number[] =>
  Array.from({ length: Math.floor(length / spacing + 1e-6) + 1 }, (_, k) => roundLength(k * spacing))

export const at = (x: number, y: number): [number, number] => [roundLength(x), roundLength(y)]

/** A rectangular table with its middle at a place. */
export const table = (id: string, centre: Vec2, size: Vec2, height: number) => ({
  id,
  centre: at(centre[0], centre[1]),
  size: at(size[0], size[1]),
  turnDeg: 0,
  height,
  material: 'unknown' as const,
})
