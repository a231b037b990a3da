import type { Pole, Table } from '#app/domain/site/site.ts'
import { toScreen, type PlanView } from '#app/drawing/plan/plan-view.ts'
import type { Pen } from '#app/drawing/pen.ts'
import { textWidth } from '#app/drawing/text/widths.ts'
import { Words } from '#app/drawing/text/words.tsx'

/** A table to scale with its name where that fits inside; by day without a fill, so that the heat under it can be read. */
export function TableMark({ table, view, pen }: { table: Table; view: PlanView; pen: Pen }) {
  const [x, y] = toScreen(view, table.centre)
  const width = table.size[0] * view.scale
  const height = table.size[1] * view.scale
  const fits =
    textWidth(table.id, pen.text, 500) + 6 < Math.max(width, height) && Math.min(width, height) > pen.text + 3
  const look = {
    fill: pen.theme === 'dusk' ? pen.colours.ground : 'none',
    fillOpacity: pen.theme === 'dusk' ? 0.22 : undefined,
    stroke: pen.colours.line,
    strokeWidth: 0.8 * pen.k,
    opacity: 0.9,
  }
  return (
    <g data-table={table.id}>
      {table.form === 'round' ? (
        <circle cx={x} cy={y} r={width / 2} {...look} />
      ) : (
        <rect
          x={x - width / 2}
          y={y - height / 2}
          width={width}
          height={height}
          rx={0.07 * view.scale}
          transform={table.turnDeg ? `rotate(${-table.turnDeg} ${x} ${y})` : undefined}
          {...look}
        />
      )}
      {fits ? (
        <Words
          x={x}
          y={y}
          centred
          anchor="middle"
          size={pen.text}
          colour={pen.colours.line}
          halo={pen.colours.halo}
          haloWidth={2.4 * pen.k}
          haloOpacity={0.6}
        >
          {table.id}
        </Words>
      ) : null}
    </g>
  )
}

/** A pole: a filled disc to scale, never so small that it is lost. */
export function PoleMark({ pole, view, pen }: { pole: Pole; view: PlanView; pen: Pen }) {
  const [x, y] = toScreen(view, pole.at)
  const r = Math.max(2.6 * pen.k, (pole.diameter / 2) * view.scale)
  return (
    <g data-pole={pole.id}>
      <circle cx={x} cy={y} r={r + 1.5 * pen.k} fill={pen.colours.ground} opacity={0.7} />
      <circle cx={x} cy={y} r={r} fill={pen.colours.line} />
    </g>
  )
}
