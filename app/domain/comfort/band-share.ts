/** Second radiation constant hc/k, µm·K (CODATA). */
const secondRadiationConstant = 14387.77

/**
 * Share of a black body's radiation below a wavelength, by the product λT in µm·K: F(0→λT) = 15/π⁴ Σ e^(−nx)
 * (x³/n + 3x²/n² + 6x/n³ + 6/n⁴) with x = c₂/λT. Terms are added until they are below 1e-12.
 */
export function shareBelow(wavelengthTemperature: number): number {
  if (!(wavelengthTemperature > 0)) return 0
  const x = secondRadiationConstant / wavelengthTemperature
  let sum = 0
  for (let n = 1; n <= 10_000; n++) {
    const term = Math.exp(-n * x) * (x ** 3 / n + (3 * x ** 2) / n ** 2 + (6 * x) / n ** 3 + 6 / n ** 4)
    sum += term
    if (term < 1e-12) break
  }
  return Math.min(1, (15 / Math.PI ** 4) * sum)
}

/**
 * Share of an element's radiation in the near infrared that reaches the inner eye and the lens, 0.78 to 3 µm, for an
 * element at `temperature` °C taken as a grey body. Filters and reflectors are not modelled.
 */
export function nearInfraredShare(temperature: number): number {
  const absolute = temperature + 273.15
  return absolute <= 0 ? 0 : shareBelow(3 * absolute) - shareBelow(0.78 * absolute)
}
