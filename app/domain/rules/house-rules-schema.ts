import { z } from 'zod'
import { fixedRules } from '#app/domain/rules/fixed-rules.ts'

const figure = (least: number, most: number) => z.number().min(least).max(most)
const stop = fixedRules.irradianceStop.value

/** Figures that no manual and no published source gives, as an organisation decides them. SI; shares of 1. */
export const houseRulesSchema = z
  .strictObject({
    /** Tolerance of a coordinate that no size decides, m. */
    toleranceUnstated: figure(0.001, 0.25),
    /** Tolerance of a size by where it comes from, m, or a share of the size. */
    toleranceLaser: figure(0.0005, 0.05),
    toleranceTape: figure(0.001, 0.1),
    toleranceDrawing: figure(0.001, 0.25),
    /** Of a size scaled from a photo the greater of a share and a length, m. */
    tolerancePhotoShare: figure(0.005, 0.25),
    tolerancePhotoLeast: figure(0.005, 0.3),
    /** A told size is as good as a guess. */
    toleranceGuessShare: figure(0.01, 0.5),
    /** Band of horizontal irradiance on the body plane that a new job starts with, W/m². */
    targetLow: figure(20, 1000),
    targetHigh: figure(20, 1000),
    /** Largest irradiance in any direction at the head, W/m², for a long and a short stay: no more than the stop line. */
    headCautionLongStay: figure(100, stop),
    headCautionShortStay: figure(100, stop),
    /** A stay of at least this many minutes is a long one. */
    longStayMinutes: figure(1, 240),
    /** Threshold of spread and overlap, W/m². */
    overlapThreshold: figure(10, 1000),
    /** A bright glow nearer than this to a step is told of, m. */
    glowNearStep: figure(0, 20),
    /** How far sideways of its member an eye may be for a chain to hang plumb, m. */
    chainSideways: figure(0, 0.2),
    /** How far in plan each member of a splayed pair may be from its eye, m. */
    splayReach: figure(0.05, 3),
    /** Largest angle of a splayed hanger from plumb, degrees. */
    splayAngleDeg: figure(1, 60),
    /** Supply over rated voltage beyond which an option may not be used. */
    supplyOverRated: figure(1, 1.1),
    /** Least second numeral of the ingress protection under open sky or an opening roof, and under a closed cover. */
    ingressOpenSky: z.int().min(4).max(9),
    ingressUnderCover: z.int().min(3).max(9),
  })
  .refine(({ targetLow, targetHigh }) => targetLow < targetHigh, {
    path: ['targetHigh'],
    message: 'The target ends above where it starts.',
  })
  .refine(({ headCautionLongStay, headCautionShortStay }) => headCautionLongStay <= headCautionShortStay, {
    path: ['headCautionShortStay'],
    message: 'No less than for a long stay.',
  })
  .refine(({ ingressUnderCover, ingressOpenSky }) => ingressUnderCover <= ingressOpenSky, {
    path: ['ingressOpenSky'],
    message: 'No less than under a closed cover.',
  })
export type HouseRules = z.infer<typeof houseRulesSchema>
