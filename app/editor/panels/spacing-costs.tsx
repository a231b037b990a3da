import { formatLength, formatQuantity } from '#app/domain/units.ts'
import { Button } from '#app/components/button.tsx'
import { fluxFigure, noFigure } from '#app/editor/figures.ts'
import { useSpacingCosts, type SpacingSubject } from '#app/editor/use-spacing-costs.ts'

/** The spacings that members allow about the wanted one, with what each costs; nothing where members allow any. */
export function SpacingCosts({ onTake, ...subject }: SpacingSubject & { onTake: (spacing: number) => void }) {
  const costs = useSpacingCosts(subject)
  if (costs.length === 0) return null
  const { site, rules } = subject
  const area = (overlap: number | null) =>
    overlap === null ? noFigure : formatQuantity(overlap, 'area', site.displayUnits)
  return (
    <section aria-labelledby="spacings-title" className="mb-2 overflow-x-auto">
      <table className="w-full">
        <caption id="spacings-title" className="pb-1 text-left font-strong">
          Spacings that the members allow
        </caption>
        <thead className="text-2xs text-ink-3">
          <tr>
            {['Spacing', 'Coldest seat, W/m²', 'Evenness', `Overlap ≥ ${rules.overlapThreshold} W/m²`].map((head) => (
              <th key={head} scope="col" className="px-1.5 text-left align-bottom font-medium first:pl-0">
                {head}
              </th>
            ))}
            <th scope="col">
              <span className="sr-only">Take it</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {costs.map(({ spacing, place, totals, overlap }) => (
            <tr key={`${spacing} ${place}`} className="border-t border-rule">
              <th scope="row" className="py-1 pr-1.5 text-left font-medium">
                {formatLength(spacing, site.displayUnits)}
                <span className="block text-2xs font-regular text-ink-2">{place}</span>
              </th>
              <td className="px-1.5">
                {totals.coldest ? fluxFigure(totals.coldest.irradiance, 'W/m²') : noFigure}
                <span className="block text-2xs text-ink-2">{totals.coldest?.seatId}</span>
              </td>
              <td className="px-1.5">{totals.evenness === null ? noFigure : totals.evenness.toFixed(2)}</td>
              <td className="px-1.5">{area(overlap)}</td>
              <td className="text-right">
                <Button
                  size="small"
                  aria-label={`Take ${formatLength(spacing, site.displayUnits)}`}
                  onClick={() => onTake(spacing)}
                >
                  Take
                </Button>
              </td>
            </tr>
          ))}
        </tbody>
      </table>
      <p className="text-2xs text-ink-3">Centre to centre of the members: common practice, no source.</p>
    </section>
  )
}
