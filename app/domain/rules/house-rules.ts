/** A house rule: the figure, in SI, and where it comes from. */
interface HouseRule {
  readonly value: number
  readonly source: string
}

const rule = (value: number, source = 'house rule, no published source'): HouseRule => ({ value, source })

/** Figures that no manual states. Defaults; an engineer may set others. */
export const houseRules = {
  /** Band of horizontal irradiance on the body plane, W/m². */
  targetLow: rule(150),
  targetHigh: rule(350),
  /** Largest irradiance in any direction at the head, W/m², for a long and a short stay. */
  headCautionLongStay: rule(600, 'house caution; no published limit was found'),
  headCautionShortStay: rule(1000, 'house caution; no published limit was found'),
  /** A stay of at least this many minutes is a long one. */
  longStayMinutes: rule(30),
  /** Largest irradiance in any direction at body, head or eye height, W/m². */
  irradianceStop: rule(
    1580,
    'API Standard 521 (workers, suitably clothed, continuous; from memory); not a comfort or public limit',
  ),
  /** Air temperature from which the eye's limit for near infrared is not relaxed, °C. */
  eyeRelaxedBelow: rule(25, 'house rule: from 300 W/m² at 10 °C straight down to 100 at 25 °C'),
  /** A bright glow nearer than this to a step is told of, m. */
  glowNearStep: rule(2),
  /** Threshold of spread and overlap, W/m². */
  overlapThreshold: rule(80),
  /** Tolerance of a coordinate that no dimension moves, m. */
  tolerance: rule(0.025),
  /** Tolerance of a size by where it comes from: fixed, m, or a share of the size. A told size is as good as a guess. */
  toleranceLaser: rule(0.005),
  toleranceTape: rule(0.01),
  toleranceDrawing: rule(0.025),
  /** Of a size scaled from a photo the greater of a share and a length, m. */
  tolerancePhotoShare: rule(0.03),
  tolerancePhotoLeast: rule(0.05),
  toleranceGuessShare: rule(0.1),
  /** How far sideways of its member an eye may be for a chain to hang plumb, m. */
  chainSidewaysLimit: rule(0.02),
  /** How far in plan each member of a splayed pair may be from its eye, m. */
  splayReach: rule(1, 'house rule; common practice, no source'),
  /** Largest angle of a splayed hanger from plumb, degrees. */
  splayAngleDeg: rule(45, 'house rule; common practice, no source'),
  /** Suspension points that must hold a whole heater should the other let go. */
  safetyLine: rule(1, 'house rule; common practice, no source'),
  /** Supply over rated voltage beyond which an option may not be used. */
  supplyOverRated: rule(1.1),
  /** Least second numeral of the ingress protection under open sky or an opening roof, and under a closed cover. */
  ingressOpenSky: rule(5),
  ingressUnderCover: rule(4),
  /** Standard acceleration of gravity, m/s². */
  gravity: rule(9.80665, 'CGPM 1901'),
} as const
