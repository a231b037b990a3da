import { describe, expect, it } from 'vitest'
import { emitterOf } from '#app/domain/flux/emitter.ts'
import { electricalPower } from '#app/domain/heaters/power.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { MountedHeater } from '#app/domain/layout/layout.ts'
import { demoModels } from '#drizzle/seed/demo-sites.ts'

const base = demoModels().find((model) => model.code === 'sanicle-4-8')!
const metal = (voltage: number, ratedPower: number, phases: 1 | 3 = 1): HeaterModel => ({
  ...base,
  stages: [ratedPower / 2, ratedPower],
  powerVoltageExponent: 2,
  supplyOptions: [{ voltage, phases, ratedPower, ratedCurrent: ratedPower / voltage }],
})
const on = (supplyVoltage: number, more: Partial<MountedHeater> = {}): MountedHeater => ({
  id: 'h',
  model: base.code,
  supplyVoltage,
  x: 0,
  y: 0,
  lowestPoint: 2.5,
  turnDeg: 0,
  tiltDeg: 0,
  mount: 'chain',
  memberId: null,
  ...more,
})

describe('power on another voltage', () => {
  // P ∝ V² for a resistance that does not change; Ohm's law.
  it.each([
    [240, 4000, 208, 3004.4],
    [240, 4000, 220, 3361.1],
    [240, 4000, 230, 3673.6],
    [230, 2000, 240, 2177.7],
  ])('rated %d V and %d W, on %d V: %d W', (rated, ratedPower, supply, power) => {
    expect(Math.abs(electricalPower(on(supply), metal(rated, ratedPower)).power - power)).toBeLessThan(0.1)
  })

  // A lamp's power goes with about V^1.54 (from memory; the exponent is the model's own figure).
  it('a lamp: exponent 1.54', () => {
    const lamp = { ...metal(230, 2000), powerVoltageExponent: 1.54 }
    expect(electricalPower(on(207), lamp).power).toBeCloseTo(2000 * 0.9 ** 1.54, 9)
  })
})

describe('current', () => {
  it.each([
    [metal(240, 4000), 240, 16.67],
    [metal(208, 4000), 208, 19.23],
    [metal(240, 4000), 208, 14.44],
    [metal(277, 4000), 277, 14.44],
    // Three-phase balanced: P / (√3 V).
    [metal(480, 24000, 3), 480, 28.87],
    [metal(208, 12000, 3), 208, 33.31],
  ])('is P/V, or P/(√3 V) on three phases (%#)', (model, supply, current) => {
    expect(Math.abs(electricalPower(on(supply), model).current - current)).toBeLessThan(0.005)
  })
})

describe('the option and the stage', () => {
  const options = [208, 240, 277, 400]
  it('is the listed one, else the nearest, else the one ordered', () => {
    expect(base.supplyOptions.map(({ voltage }) => voltage)).toEqual(options)
    expect(electricalPower(on(240), base)).toMatchObject({ ratedVoltage: 240, power: 4800, voltageDiffers: false })
    expect(electricalPower(on(230), base)).toMatchObject({ ratedVoltage: 240, voltageDiffers: true })
    const ordered = electricalPower(on(208, { ratedVoltage: 240 }), base)
    expect(ordered).toMatchObject({ ratedVoltage: 240, ratedPower: 4800, voltageDiffers: true })
    expect(ordered.power).toBeCloseTo(4800 * (208 / 240) ** 2, 9)
  })

  it('is the last stage unless one is chosen', () => {
    expect(electricalPower(on(240), base).power).toBe(4800)
    expect(electricalPower(on(240, { stage: 1 }), base).power).toBe(2400)
    expect(electricalPower(on(240, { stage: 2 }), base).power).toBe(4800)
    expect(electricalPower(on(240, { stage: 9 }), base).power).toBe(4800)
  })
})

describe('the emitter of a mounted heater', () => {
  const total = (heater: MountedHeater, model: HeaterModel, efficiency: 'low' | 'nominal' | 'high' = 'nominal') =>
    emitterOf(heater, model, efficiency)!.elements.reduce((sum, { radiantPower }) => sum + radiantPower, 0)

  it('radiates its efficiency’s share of the power, equally from all elements, at every stage', () => {
    const elements = emitterOf(on(240, { stage: 1 }), base)!.elements
    expect(elements).toHaveLength(2)
    for (const { radiantPower } of elements) expect(radiantPower).toBeCloseTo((2400 * base.radiantEfficiency) / 2, 9)
  })

  it('takes the low and the high figure of the data sheet’s range; the single one when there is no range', () => {
    const ranged = { ...base, radiantEfficiencyRange: { low: 0.6, high: 0.8 } }
    expect(total(on(240), ranged, 'low')).toBeCloseTo(0.6 * 4800, 9)
    expect(total(on(240), ranged, 'high')).toBeCloseTo(0.8 * 4800, 9)
    const single = { ...base, radiantEfficiencyRange: null }
    expect(total(on(240), single, 'high')).toBe(total(on(240), single))
  })

  it('is none without beam data', () => {
    expect(emitterOf(on(240), { ...base, beam: null })).toBeNull()
  })

  it('shares one beam object between heaters of a model', () => {
    expect(emitterOf(on(240), base)!.beam).toBe(emitterOf(on(208), base)!.beam)
  })
})
