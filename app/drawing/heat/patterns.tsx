import type { Pen } from '#app/drawing/pen.ts'

/** Ids of the patterns of one drawing; `name` is unique in the page. */
export const patternIds = (name: string) =>
  ({ dots: `${name}-dots`, hatch: `${name}-hatch`, wall: `${name}-wall`, clip: `${name}-floor` }) as const

/**
 * Zone and wall patterns: dots on an 8 px grid turned 30°, hatch at 45°. `scale` px per unit of the user space in which
 * the zones are filled (1 on the drawing itself), so that they look the same at every scale.
 */
export function ZonePatterns({ name, pen, scale = 1 }: { name: string; pen: Pen; scale?: number }) {
  const ids = patternIds(name)
  const k = pen.k < 1 ? 0.8 : 1
  const shrink = scale === 1 ? '' : `scale(${1 / scale} ${-1 / scale}) `
  const [dot, gap, band] = [8 * k, 6 * k, 5 * k]
  return (
    <>
      <pattern
        id={ids.dots}
        width={dot}
        height={dot}
        patternUnits="userSpaceOnUse"
        patternTransform={`${shrink}rotate(30)`}
      >
        <circle cx={2 * k} cy={2 * k} r={0.85 * k} fill={pen.colours.dots} opacity={pen.weights.dotOpacity} />
      </pattern>
      <pattern
        id={ids.hatch}
        width={gap}
        height={gap}
        patternUnits="userSpaceOnUse"
        patternTransform={`${shrink}rotate(45)`}
      >
        <line
          x1={0}
          y1={0}
          x2={0}
          y2={gap}
          stroke={pen.colours.hatch}
          strokeWidth={(pen.theme === 'dusk' ? 2 : 1.6) * k}
          opacity={pen.weights.hatchOpacity}
        />
      </pattern>
      <pattern id={ids.wall} width={band} height={band} patternUnits="userSpaceOnUse" patternTransform="rotate(45)">
        <line
          x1={0}
          y1={0}
          x2={0}
          y2={band}
          stroke={pen.colours.wallHatch}
          strokeWidth={0.7 * pen.k}
          opacity={pen.theme === 'dusk' ? 0.7 : 0.6}
        />
      </pattern>
    </>
  )
}
