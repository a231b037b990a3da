import { degrees, radians } from '#app/domain/vector.ts'

/** How a guest sits or stands; the body's projected areas are tabulated for these two. */
export type Posture = 'seated' | 'standing'

/** Share of the body's surface that exchanges radiation with its surroundings (ASHRAE Handbook, Fundamentals). */
export const effectiveAreaShare: Readonly<Record<Posture, number>> = { seated: 0.696, standing: 0.725 }

/**
 * Projected area factors: rows by azimuth from the front, 0 to 180° in 15° steps; columns by altitude, 0, 15 … 90°.
 * ASHRAE 55 Appendix C as carried by jsthermalcomfort (Center for the Built Environment, UC Berkeley, MIT licence).
 */
const seated = [
  [0.29, 0.324, 0.305, 0.303, 0.262, 0.224, 0.177],
  [0.292, 0.328, 0.294, 0.288, 0.268, 0.227, 0.177],
  [0.288, 0.332, 0.298, 0.29, 0.264, 0.222, 0.177],
  [0.274, 0.326, 0.294, 0.289, 0.252, 0.214, 0.177],
  [0.254, 0.308, 0.28, 0.276, 0.241, 0.202, 0.177],
  [0.23, 0.282, 0.262, 0.26, 0.233, 0.193, 0.177],
  [0.216, 0.26, 0.248, 0.244, 0.22, 0.186, 0.177],
  [0.234, 0.258, 0.236, 0.227, 0.208, 0.18, 0.177],
  [0.262, 0.26, 0.224, 0.208, 0.196, 0.176, 0.177],
  [0.28, 0.26, 0.21, 0.192, 0.184, 0.17, 0.177],
  [0.298, 0.256, 0.194, 0.174, 0.168, 0.168, 0.177],
  [0.306, 0.25, 0.18, 0.156, 0.156, 0.166, 0.177],
  [0.3, 0.24, 0.168, 0.152, 0.152, 0.164, 0.177],
]
const standing = [
  [0.35, 0.35, 0.314, 0.258, 0.206, 0.144, 0.082],
  [0.342, 0.342, 0.31, 0.252, 0.2, 0.14, 0.082],
  [0.33, 0.33, 0.3, 0.244, 0.19, 0.132, 0.082],
  [0.31, 0.31, 0.275, 0.228, 0.175, 0.124, 0.082],
  [0.283, 0.283, 0.251, 0.208, 0.16, 0.114, 0.082],
  [0.252, 0.252, 0.228, 0.188, 0.15, 0.108, 0.082],
  [0.23, 0.23, 0.214, 0.18, 0.148, 0.108, 0.082],
  [0.242, 0.242, 0.222, 0.18, 0.153, 0.112, 0.082],
  [0.274, 0.274, 0.245, 0.203, 0.165, 0.116, 0.082],
  [0.304, 0.304, 0.27, 0.22, 0.174, 0.121, 0.082],
  [0.328, 0.328, 0.29, 0.234, 0.183, 0.125, 0.082],
  [0.344, 0.344, 0.304, 0.244, 0.19, 0.128, 0.082],
  [0.347, 0.347, 0.308, 0.246, 0.191, 0.128, 0.082],
]
const tables = { seated, standing } as const
const step = 15

/**
 * Share of the effective body surface that a beam from this direction strikes, bilinear in the table. Altitude above
 * the horizontal and azimuth from the direction in which the person looks, rad. The table is symmetric left and right;
 * a source below the horizontal is taken at the horizontal, which the table does not go below.
 */
export function projectedAreaFactor(posture: Posture, altitude: number, azimuth: number): number {
  const turn = Math.abs(degrees(azimuth)) % 360
  const row = (turn > 180 ? 360 - turn : turn) / step
  const column = Math.min(90, Math.max(0, degrees(altitude))) / step
  const [i, j] = [Math.min(11, Math.floor(row)), Math.min(5, Math.floor(column))]
  const [near, far] = [tables[posture][i], tables[posture][i + 1]]
  const along = (values: readonly number[] | undefined) => {
    const [low = 0, high = 0] = [values?.[j], values?.[j + 1]]
    return low + (high - low) * (column - j)
  }
  return along(near) + (along(far) - along(near)) * (row - i)
}

/** The projected area factor averaged over all directions in which the person may look. */
export function meanProjectedAreaFactor(posture: Posture, altitude: number): number {
  const inner = Array.from({ length: 11 }, (_, i) => (i + 1) * step)
  const at = (azimuthDeg: number) => projectedAreaFactor(posture, altitude, radians(azimuthDeg))
  return (at(0) / 2 + at(180) / 2 + inner.reduce((sum, azimuthDeg) => sum + at(azimuthDeg), 0)) / 12
}
