import type { Explanation } from '#app/domain/comfort/explain.ts'
import type { SeenHeater } from '#app/domain/comfort/seen-heaters.ts'
import type { Shade } from '#app/domain/comfort/shade.ts'
import type { Site } from '#app/domain/site/site.ts'
import { obstacleName } from '#app/domain/site/solids.ts'
import { ExplainedRows } from '#app/editor/panels/explained-rows.tsx'

const shadeWords: Readonly<Record<Shade, string>> = {
  none: 'Without shade: nothing is taken to stand in the way. Tick Shade at the map to count it.',
  'in-place': 'With shade. Movable things are in place, each filling all that it sweeps.',
  away: 'With shade. Movable things are away.',
}

/** The share of each heater that the seat sees, and past what; without shade, that the figures are so. */
export function SeenHeaters({ shade, seen, site }: Pick<Explanation, 'shade' | 'seen'> & { readonly site: Site }) {
  const shown = (seen ?? []).filter(({ ofUnshaded }) => ofUnshaded >= 0.0005)
  return (
    <>
      <p className="mt-2 text-ink-2">{shadeWords[shade]}</p>
      {(['body', 'head'] as const).map((at) => (
        <ExplainedRows
          key={at}
          caption={`Seen of each heater from the ${at}’s height`}
          rows={shown
            .filter((each) => each.at === at)
            .toSorted((a, b) => b.ofUnshaded - a.ofUnshaded)
            .map((each) => [each.heaterId, seenFigure(each), wayWords(each, site)])}
        />
      ))}
    </>
  )
}

/** Never 100 % with something in the way, nor 0 % while some is seen. */
function seenFigure({ seen, past }: SeenHeater): string {
  if (past.length === 0) return '100 %'
  if (seen === 0) return '0 %'
  return `${Math.min(99.9, Math.max(0.1, seen * 100)).toFixed(1)} %`
}

function wayWords({ seen, past }: SeenHeater, site: Site): string {
  if (past.length === 0) return 'nothing in the way'
  return `${seen === 0 ? 'hidden by' : 'past'} ${past.map((id) => thingName(site, id)).join(', ')}`
}

function thingName(site: Site, id: string): string {
  const obstacle = site.obstacles.find((each) => each.id === id)
  if (obstacle) return obstacleName(site, obstacle)
  if (site.tables.some((table) => table.id === id)) return `table ${id}`
  return site.poles.find((pole) => pole.id === id)?.name ?? id
}
