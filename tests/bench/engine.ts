import { mkdirSync, writeFileSync } from 'node:fs'
import { irradianceAt } from '#app/domain/flux/irradiance.ts'
import { horizontalAtPoints, packedPoints } from '#app/domain/flux/many-points.ts'
import type { MapQuestion } from '#app/domain/flux/map-question.ts'
import { bandEdges, contoursOf, isolineLevels } from '#app/drawing/heat/contours.ts'
import { labelledLevels } from '#app/drawing/heat/scale.ts'
import { answerMap, emptyMapCache } from '#app/drawing/heat/map-picture.ts'
import { demoModels } from '#drizzle/seed/demo-sites.ts'
import { alongWalls, hung, largeSite, row, seats, terrace, things, variants } from '#tests/bench/cases.ts'
import { growthPlot, type Growth } from '#tests/bench/growth-plot.ts'

/**
 * Speed of the engine as multiples of a limit that every machine has, 1,152,000 times one square root and one division,
 * or of a plain map; what a case is compared with runs before and after it each time. Median of the ratios of 15 rounds;
 * time itself is shown beside it.
 */
const rounds = 15
let checksum = 0

function limitLoop(): void {
  let s = 0
  for (let i = 0; i < 1_152_000; i++) {
    const q = 1 + (i & 1023) * 1e-3
    s += 1 / (q * Math.sqrt(q))
  }
  checksum += s
}

const median = (values: readonly number[]) => values.toSorted((a, b) => a - b)[Math.floor(values.length / 2)] ?? NaN

function timed(work: () => unknown): number {
  const before = performance.now()
  work()
  return performance.now() - before
}

interface Timing {
  readonly ms: number
  readonly ratio: number
}

/** Milliseconds that every case runs before it is measured: until the compiler has settled, as in a drag's second moment. */
const warmUp = 400

/** Median time of `work(round)` and its ratio to the reference, which runs before and after it in each round. */
function measure(work: (round: number) => unknown, reference: () => unknown = limitLoop, count = rounds): Timing {
  const start = performance.now()
  for (let i = 0; i < 4 || performance.now() - start < warmUp; i++) {
    reference()
    work(-1 - (i % 50))
  }
  const pairs = Array.from({ length: count }, (_, i) => {
    const before = timed(reference)
    const ms = timed(() => work(i))
    return { ms, ratio: ms / ((before + timed(reference)) / 2) }
  })
  return { ms: median(pairs.map(({ ms }) => ms)), ratio: median(pairs.map(({ ratio }) => ratio)) }
}

const whole = (question: MapQuestion) => () => answerMap(question, emptyMapCache())

/** One heater of eight somewhere else each time, asked of a cache that lives on as the worker's does. */
function dragging(): (round: number) => unknown {
  const cache = emptyMapCache()
  const heaters = row(8)
  answerMap(terrace(heaters), cache)
  return (round) => {
    const moved = hung('h3', { x: 4 + round * 0.01, y: 2.4, turnDeg: 62, model: 'teasel-2-8' })
    return answerMap(terrace(heaters.map((each) => (each.id === 'h3' ? moved : each))), cache)
  }
}

function worstMapError(): number {
  let worst = 0
  for (const model of demoModels().filter(({ beam }) => beam !== null)) {
    for (const turnDeg of [0, 90, 33]) {
      for (const z of [0, 0.6, 1.1, 1.7]) {
        const emitter = hung('h', {
          x: 6.03,
          y: 2.52,
          turnDeg,
          tiltDeg: turnDeg === 0 ? 0 : (model.tiltDeg?.max ?? 0),
          model: model.code,
        })
        const { grid, values } = answerMap({ ...terrace([emitter], 3000), z }, emptyMapCache())
        const exact = Array.from(values, (value, at) => {
          if (Number.isNaN(value)) return NaN
          const x = grid.x0 + ((at % grid.columns) + 0.5) * grid.cell
          return irradianceAt(emitter, [x, grid.y0 + (Math.floor(at / grid.columns) + 0.5) * grid.cell, z], [0, 0, 1])
        })
        const peak = Math.max(...exact.filter(Number.isFinite))
        const errors = exact.map((value, at) => Math.abs(value - (values[at] ?? NaN)) / peak)
        worst = Math.max(worst, ...errors.filter(Number.isFinite))
      }
    }
  }
  return worst
}

interface Row {
  readonly name: string
  readonly ms: number
  readonly ratio: number
  /** What the ratio is to. */
  readonly of: 'limit' | 'map'
  readonly must: number
  readonly aim: number
}

function listRows(): Row[] {
  const map = whole(terrace(row(8)))
  const walls = whole(terrace(row(8, alongWalls)))
  const ofLimit = (work: () => unknown) => ({ ...measure(work), of: 'limit' as const })
  const ofMap = (work: (round: number) => unknown, reference = map) => ({
    ...measure(work, reference),
    of: 'map' as const,
  })
  const obstructions = things(20)
  const layouts = variants(1000)
  const points = packedPoints(seats)
  const traced = answerMap(terrace(row(8)), emptyMapCache())
  return [
    { name: 'map: 24,000 cells × 8 heaters × 2 elements, each at its own turn', ...ofLimit(map), must: 2.5, aim: 1.2 },
    {
      name: 'the same, turned 0 and 90°',
      ...ofLimit(walls),
      must: 2.5,
      aim: 1.2,
    },
    { name: 'drag: one of eight again, and the sum', ...ofMap(dragging()), must: 1 / 4, aim: 1 / 6 },
    {
      name: '1,000 layouts × 60 seats × 16 elements, to 1e-4',
      ...ofLimit(() => layouts.forEach((emitters) => (checksum += horizontalAtPoints(emitters, points)[0] ?? 0))),
      must: 6,
      aim: 3,
    },
    { name: '100 × 60 m, 100 heaters, 0.25 m', ...ofMap(whole(largeSite())), must: 4, aim: 2 },
    {
      name: 'the same, turned 0 and 90°, to that map',
      ...ofMap(whole(largeSite(alongWalls)), walls),
      must: 4,
      aim: 2,
    },
    {
      name: '20 obstacles',
      ...ofMap(whole(terrace(row(8), 24_000, { obstructions }))),
      must: 2,
      aim: 1.3,
    },
    {
      name: 'the same, turned 0 and 90°, to that map',
      ...ofMap(whole(terrace(row(8, alongWalls), 24_000, { obstructions })), walls),
      must: 2,
      aim: 1.3,
    },
    {
      name: 'isolines and fill of 24,000 cells',
      ...ofMap(() => contoursOf(traced.values, traced.grid, isolineLevels, bandEdges, labelledLevels)),
      must: 1,
      aim: 1,
    },
  ]
}

function listGrowths(): Growth[] {
  const over = (name: string, sizes: readonly number[], questionOf: (size: number) => MapQuestion): Growth => ({
    name,
    points: sizes.map((size) => ({ size, ratio: measure(whole(questionOf(size)), limitLoop, 9).ratio })),
  })
  const withElements = (count: number) =>
    row(8).map((emitter) => {
      const [first] = emitter.elements
      if (!first) throw new Error('a heater without elements')
      return {
        ...emitter,
        elements: Array.from({ length: count }, () => ({ ...first, radiantPower: first.radiantPower / count })),
      }
    })
  return [
    over('cells', [3000, 6000, 12_000, 24_000, 48_000, 96_000, 192_000], (cells) => terrace(row(8), cells)),
    over('heaters', [1, 2, 4, 8, 16, 32, 64], (heaters) => terrace(row(heaters))),
    over('elements', [1, 2, 4, 8, 12], (elements) => terrace(withElements(elements))),
    over('obstacles', [5, 10, 20, 40, 80], (obstacles) => terrace(row(8), 24_000, { obstructions: things(obstacles) })),
  ]
}

const rows = listRows()
const mapError = worstMapError()
const large = answerMap(largeSite(), emptyMapCache())
const growths = listGrowths()
const limit = median(Array.from({ length: rounds }, () => timed(limitLoop)))

const standard = new Map([
  ['cells', 24_000],
  ['heaters', 8],
  ['elements', 2],
  ['obstacles', 20],
])
writeFileSync(new URL('../../public/engine-growth.svg', import.meta.url), growthPlot(growths, standard))

const percent = (value: number) => `${(100 * value).toFixed(4)} %`
console.log(`limit: ${limit.toFixed(2)} ms; median of ${rounds} rounds; s = ${checksum}`)
console.log('| case | ms | ratio | must | aim | |\n|---|---|---|---|---|---|')
for (const { name, ms, ratio, of, must, aim } of rows) {
  const verdict = ratio <= aim ? 'aim' : ratio <= must ? 'must' : 'over'
  console.log(
    `| ${name} | ${ms.toFixed(2)} | ${ratio.toFixed(3)} × ${of} | ≤${must.toFixed(2)} | ≤${aim.toFixed(2)} | ${verdict} |`,
  )
}
console.log(`map error over all demo models: ${percent(mapError)} of the peak (must: 0.1 %)`)
console.log(`100 × 60 m: nothing is left out beyond ${large.errorBound.toFixed(2)} W/m² at any cell`)
const json = JSON.stringify({ limit, rows, mapError, largeErrorBound: large.errorBound, growths }, null, 1)
const folder = new URL('../../.data/bench/', import.meta.url)
mkdirSync(folder, { recursive: true })
writeFileSync(new URL('engine.json', folder), json)
console.log(json)
