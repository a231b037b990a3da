/** Figures that no house chooses: published ones, and what is no figure of taste. SI. */
export const fixedRules = {
  /** Largest irradiance in any direction at body, head or eye height, W/m². */
  irradianceStop: {
    value: 1580,
    source: 'API Standard 521 (workers, suitably clothed, continuous; from memory); not a comfort or public limit',
  },
  /** Air temperature from which the eye's limit for near infrared is not relaxed, °C. */
  eyeRelaxedBelow: { value: 25, source: 'house rule: from 300 W/m² at 10 °C straight down to 100 at 25 °C' },
  /** Suspension points that must hold a whole heater should the other let go. */
  safetyLine: { value: 1, source: 'house rule; common practice, no source' },
  /** Standard acceleration of gravity, m/s². */
  gravity: { value: 9.80665, source: 'CGPM 1901' },
} as const
