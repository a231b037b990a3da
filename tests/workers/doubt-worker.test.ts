import '@vitest/web-worker'
import { proxy, wrap, type Remote } from 'comlink'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { Progress } from '#app/domain/doubt/size-effects.ts'
import { coverAt, coverMoves, dimension, oneHeater } from '#tests/domain/doubt/small-doubt.ts'
import { seat, site } from '#tests/domain/comfort/terrace.ts'
import type { DoubtWorker } from '#workers/doubt.worker.ts'

const question = oneHeater([dimension('roof', coverAt, 0.05, coverMoves)])
/** So many unstated sizes that it takes a while. */
const long = oneHeater([], { site: site(Array.from({ length: 100 }, (_, i) => seat(`S${i}`, { x: i / 50 }))) })

describe('the worker of doubtful sizes, through comlink', () => {
  let worker: Worker
  let doubt: Remote<DoubtWorker>
  beforeAll(() => {
    worker = new Worker(new URL('../../workers/doubt.worker.ts', import.meta.url), { type: 'module' })
    doubt = wrap<DoubtWorker>(worker)
  })
  afterAll(() => worker.terminate())

  it('weighs every size', async () => {
    const made = await doubt.sizeEffects(question, false, proxy(() => undefined)) // prettier-ignore
    expect(made!.effects[0]!.margin.lower).toBeCloseTo(-0.05, 9)
    expect(made!.nominal.checks.size).toBeGreaterThan(5)
  })

  it('finds where a check turns and the figures of an error', async () => {
    const points = await doubt.turningPoints(question, ['photo'], proxy(() => undefined)) // prettier-ignore
    const roof = points!.checks.find(({ check }) => check.startsWith('clearance-above'))!
    expect(roof.shorter).toBeCloseTo((2.8 + 0.05) / coverAt - 1, 4)
    const wrong = await doubt.wrongFigures(question, ['photo'], -0.1)
    expect(wrong.tightest!.margin).toBeCloseTo(0.9 * coverAt - 2.8, 9)
  })

  it('tells its progress, hears other questions meanwhile and stops when it is told to', async () => {
    const told: Progress[] = []
    let wrongMeanwhile = false
    const stopped = doubt.sizeEffects(long, true, proxy(async (progress) => {
      told.push(progress)
      if (told.length !== 1) return
      await doubt.wrongFigures(question, ['photo'], 0.01)
      wrongMeanwhile = true
      await doubt.stop('effects')
    })) // prettier-ignore
    expect(await stopped).toBeNull()
    expect(told[0]!.total).toBeGreaterThan(400)
    expect(told.at(-1)!.done).toBeLessThan(told[0]!.total)
    expect(wrongMeanwhile).toBe(true)
  })

  it('answers the newer of two questions of a kind and leaves the older', async () => {
    const older = doubt.sizeEffects(long, true, proxy(() => undefined)) // prettier-ignore
    const newer = doubt.sizeEffects(question, false, proxy(() => undefined)) // prettier-ignore
    expect(await older).toBeNull()
    expect((await newer)!.effects.length).toBeGreaterThan(0)
  })

  it('says what it refuses and keeps answering', async () => {
    const wrong = { ...question, layout: { ...question.layout, heaters: [{ ...question.layout.heaters[0]!, lowestPoint: Number.NaN }] } } // prettier-ignore
    await expect(doubt.sizeEffects(wrong, false, proxy(() => undefined))).rejects.toThrow() // prettier-ignore
    expect(await doubt.wrongFigures(question, ['photo'], 0)).toMatchObject({ turned: [] })
  })
})

describe('on a page', () => {
  it('nothing is weighed', async () => {
    const { sizeEffects } = await import('#app/domain/doubt/size-effects.ts')
    const { turningPoints } = await import('#app/domain/doubt/turning-points.ts')
    const { figuresAtErrors } = await import('#app/domain/doubt/wrong-sizes.ts')
    Reflect.set(globalThis, 'document', {})
    try {
      expect(() => sizeEffects(question, false).next()).toThrow('in a worker')
      expect(() => turningPoints(figuresAtErrors(question, ['photo'])).next()).toThrow('in a worker')
    } finally {
      Reflect.deleteProperty(globalThis, 'document')
    }
  })
})
