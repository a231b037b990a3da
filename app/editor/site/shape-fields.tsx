import type { Shape, Site } from '#app/domain/site/site.ts'
import { roundLength } from '#app/domain/units.ts'
import { PickInput } from '#app/editor/site/fact-inputs.tsx'
import { SizeInput } from '#app/editor/site/size-input.tsx'

interface ShapeFieldsProps {
  readonly shape: Shape
  /** Said before each label: which state the shape is of. */
  readonly of?: string
  readonly edit: (site: Site, shape: Shape) => Site
}

const kinds = [
  { value: 'box', label: 'box' },
  { value: 'cylinder', label: 'round' },
  { value: 'prism', label: 'any outline' },
] as const

/** The same room as another kind of shape: about the same middle and of the same extent. */
export function shapeAs(shape: Shape, kind: Shape['kind']): Shape {
  if (shape.kind === kind) return shape
  const { x, y } = extentOfShape(shape)
  const { z } = shape
  if (kind === 'box') return { kind, x, y, z }
  if (kind === 'prism') return { kind, outline: [[x[0], y[0]], [x[1], y[0]], [x[1], y[1]], [x[0], y[1]]], z } // prettier-ignore
  const radius = roundLength(Math.max(x[1] - x[0], y[1] - y[0]) / 2)
  return { kind, centre: [roundLength((x[0] + x[1]) / 2), roundLength((y[0] + y[1]) / 2)], radius, z }
}

type Range = [number, number]

function extentOfShape(shape: Shape): { x: Range; y: Range } {
  switch (shape.kind) {
    case 'box':
      return { x: shape.x, y: shape.y }
    case 'cylinder': {
      const around = (middle: number): Range => [roundLength(middle - shape.radius), roundLength(middle + shape.radius)]
      return { x: around(shape.centre[0]), y: around(shape.centre[1]) }
    }
    case 'prism': {
      const range = (axis: 0 | 1): Range => {
        const values = shape.outline.map((corner) => corner[axis])
        return [Math.min(...values), Math.max(...values)]
      }
      return { x: range(0), y: range(1) }
    }
  }
}

/** The sizes of a box, a round thing or a prism; the corners of a prism have fields of their own. */
export function ShapeFields({ shape, of = '', edit }: ShapeFieldsProps) {
  const end = (axis: 'x' | 'y' | 'z', which: 0 | 1, label: string, range: Range) => (
    <SizeInput
      label={`${of}${label}`}
      value={range[which]}
      edit={(old, metres) => edit(old, { ...shape, [axis]: which === 0 ? [metres, range[1]] : [range[0], metres] })}
    />
  )
  return (
    <>
      <PickInput
        label={`${of}Shape`}
        value={shape.kind}
        options={kinds}
        edit={(old, kind) => edit(old, shapeAs(shape, kind))}
      />
      {shape.kind === 'box' && (
        <>
          {end('x', 0, 'From x', shape.x)}
          {end('x', 1, 'To x', shape.x)}
          {end('y', 0, 'From y', shape.y)}
          {end('y', 1, 'To y', shape.y)}
        </>
      )}
      {shape.kind === 'cylinder' && (
        <>
          <SizeInput
            label={`${of}Middle x`}
            value={shape.centre[0]}
            edit={(old, x) => edit(old, { ...shape, centre: [x, shape.centre[1]] })}
          />
          <SizeInput
            label={`${of}Middle y`}
            value={shape.centre[1]}
            edit={(old, y) => edit(old, { ...shape, centre: [shape.centre[0], y] })}
          />
          <SizeInput
            label={`${of}Across`}
            value={2 * shape.radius}
            min={0.002}
            max={100}
            edit={(old, across) => edit(old, { ...shape, radius: across / 2 })}
          />
        </>
      )}
      {end('z', 0, 'Foot', shape.z)}
      {end('z', 1, 'Top', shape.z)}
    </>
  )
}
