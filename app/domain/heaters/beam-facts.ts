import { beamOf, type Beam } from '#app/domain/flux/beam.ts'
import type { BeamData } from '#app/domain/heaters/heater-model.ts'
import { halfAnglesOf } from '#app/domain/layout/beam-reach.ts'

/** What a beam comes to, to be read by a person. */
export interface BeamFacts {
  /** Angles between which a beam has half its peak or more, in words: "76°, from −38° to 38°". */
  readonly across: string
  readonly along: string
  /** Exponents of the cosine across and along; null for a table. */
  readonly exponents: { readonly across: number; readonly along: number } | null
  /** Largest share of the peak at an edge of a table short of ±90°, beyond which it counts as dark. */
  readonly cutOff: number
}

const degrees = (radians: number): string => {
  const text = String(Number(((radians * 180) / Math.PI).toFixed(1)) + 0)
  return `${text.replace('-', '−')}°`
}

const spanInWords = ([from, to]: readonly [number, number]): string =>
  `${degrees(to - from)}, from ${degrees(from)} to ${degrees(to)}`

const isShort = (angle: number | undefined): boolean => Math.abs(angle ?? 0) < Math.PI / 2 - 1e-9

function cutOffOf(beam: Beam): number {
  if (beam.kind === 'cosine') return 0
  const { across, along, intensity } = beam
  const largest = (values: readonly number[]) => values.reduce((most, value) => Math.max(most, value), 0)
  const column = (j: number) => intensity.map((row) => row[j] ?? 0)
  const edges = [
    isShort(across[0]) ? largest(intensity[0] ?? []) : 0,
    isShort(across.at(-1)) ? largest(intensity.at(-1) ?? []) : 0,
    isShort(along[0]) ? largest(column(0)) : 0,
    isShort(along.at(-1)) ? largest(column(along.length - 1)) : 0,
  ]
  return largest(edges) / largest(intensity.map(largest))
}

/** The facts of a beam as it is radiated. */
export function beamFacts(data: BeamData): BeamFacts {
  const beam = beamOf(data)
  const { across, along } = halfAnglesOf(data)
  return {
    across: spanInWords(across),
    along: spanInWords(along),
    exponents: beam.kind === 'cosine' ? { across: beam.across, along: beam.along } : null,
    cutOff: cutOffOf(beam),
  }
}
