import { describe, expect, it } from 'vitest'
import { nearInfraredShare, shareBelow } from '#app/domain/comfort/band-share.ts'

const absoluteZero = -273.15

/** Planck's law by the midpoint rule over x = c₂/λT, normalised by π⁴/15: independent of the series. */
function planckByQuadrature(wavelengthTemperature: number): number {
  const from = 14387.77 / wavelengthTemperature
  const steps = 200_000
  const width = (from + 60 - from) / steps
  let sum = 0
  for (let i = 0; i < steps; i++) {
    const x = from + (i + 0.5) * width
    sum += x ** 3 / Math.expm1(x)
  }
  return (sum * width * 15) / Math.PI ** 4
}

describe('share of a black body’s radiation below a wavelength', () => {
  // B1–B3. Figures: series and numerical integration by independent code, 1e-6 (the last digit given).
  it.each([
    ['B1', 1000, 0.000321],
    ['B1', 1400, 0.00779],
    ['B1', 2000, 0.06673],
    ['B1', 2400, 0.140257],
    ['B2', 2898, 0.250106],
    ['B2', 3000, 0.273229],
    ['B2', 4000, 0.480865],
    ['B3', 6000, 0.737789],
    ['B3', 10_000, 0.914157],
    ['B3', 20_000, 0.985554],
  ])('%s: F(0→%d µm·K) = %d', (_, product, share) => {
    expect(Math.abs(shareBelow(product) - share)).toBeLessThanOrEqual(1e-6)
  })

  // B1–B3 against the table of Incropera, Fundamentals of Heat and Mass Transfer (from memory), whose older constants
  // differ: 5e-5 for B1 and B2, 6e-5 for B3.
  it.each([
    ['B1', 1000, 0.000321, 5e-5],
    ['B1', 1400, 0.00779, 5e-5],
    ['B1', 2000, 0.066728, 5e-5],
    ['B1', 2400, 0.140256, 5e-5],
    ['B2', 2898, 0.250108, 5e-5],
    ['B2', 3000, 0.273232, 5e-5],
    ['B2', 4000, 0.480877, 5e-5],
    ['B3', 6000, 0.737818, 6e-5],
    ['B3', 10_000, 0.914199, 6e-5],
    ['B3', 20_000, 0.985602, 6e-5],
  ])('%s: agrees with the printed table at %d µm·K: %d within %d', (_, product, share, tolerance) => {
    expect(Math.abs(shareBelow(product) - share)).toBeLessThanOrEqual(tolerance)
  })

  it('agrees with Planck’s law integrated numerically to 1e-9', () => {
    for (const product of [500, 1234, 2000, 3670, 8000, 20_000, 90_000]) {
      expect(Math.abs(shareBelow(product) - planckByQuadrature(product))).toBeLessThan(1e-9)
    }
  })

  it('rises from nothing to one', () => {
    let before = 0
    for (let product = 200; product < 2e6; product *= 1.3) {
      const share = shareBelow(product)
      expect(share).toBeGreaterThanOrEqual(before)
      expect(share).toBeLessThanOrEqual(1)
      before = share
    }
    expect(before).toBeGreaterThan(0.9999)
    expect(shareBelow(0)).toBe(0)
    expect(shareBelow(-5)).toBe(0)
    expect(shareBelow(Number.NaN)).toBe(0)
  })

  // Wien's displacement: a quarter of the radiation lies below the wavelength of the peak, λT = 2897.77 µm·K.
  it('puts a quarter of the radiation below the peak wavelength', () => {
    expect(shareBelow(2897.77)).toBeCloseTo(0.25, 3)
  })
})

describe('near-infrared share of an element, 0.78–3 µm', () => {
  // B4: by independent code, to the last digit given.
  it.each([
    [1050, 0.307],
    [1150, 0.372],
    [1300, 0.462],
    [2200, 0.753],
    [2400, 0.771],
  ])('B4: at %d K it is %d', (kelvin, share) => {
    expect(Math.abs(nearInfraredShare(kelvin + absoluteZero) - share)).toBeLessThanOrEqual(0.001)
  })

  it('is nothing at absolute zero and never more than one', () => {
    expect(nearInfraredShare(absoluteZero)).toBe(0)
    expect(nearInfraredShare(absoluteZero - 10)).toBe(0)
    for (let celsius = -50; celsius < 4000; celsius += 50) {
      expect(nearInfraredShare(celsius)).toBeGreaterThanOrEqual(0)
      expect(nearInfraredShare(celsius)).toBeLessThan(1)
    }
  })
})
