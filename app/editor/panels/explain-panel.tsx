import { useMemo, useState } from 'react'
import { explainSeat, type ExplainInput } from '#app/domain/comfort/explain.ts'
import type { SeatFigures } from '#app/domain/comfort/seat-warmth.ts'
import type { SeatFigure } from '#app/domain/comfort/uncertainty.ts'
import type { HouseRules } from '#app/domain/rules/house-rules-schema.ts'
import type { DisplayUnits } from '#app/domain/units.ts'
import { Button } from '#app/components/button.tsx'
import { SelectField } from '#app/components/field.tsx'
import { ExplainedFigure } from '#app/editor/panels/explained-figure.tsx'
import { SeatSensation } from '#app/editor/panels/seat-sensation.tsx'
import type { FluxUnit } from '#app/editor/view-choice.ts'

const figures = {
  body: { label: 'Irradiance on the body plane', of: { quantity: 'body' } },
  bodyLargest: { label: 'Largest irradiance at the body', of: { quantity: 'body-largest' } },
  head: { label: 'Largest irradiance at the head', of: { quantity: 'head' } },
  eye: { label: 'Near infrared at the eye', of: { quantity: 'near-infrared' } },
  ratio: { label: 'Head to body', of: { quantity: 'head-to-body' } },
  calm: { label: 'Feels like, calm', of: { quantity: 'feels-like', wind: 'calm' } },
  design: { label: 'Feels like, design wind', of: { quantity: 'feels-like', wind: 'design' } },
  gust: { label: 'Feels like, gust', of: { quantity: 'feels-like', wind: 'gust' } },
  sensed: { label: 'Sensation, calm', of: { quantity: 'sensation', wind: 'calm' } },
  sensedDesign: { label: 'Sensation, design wind', of: { quantity: 'sensation', wind: 'design' } },
  sensedGust: { label: 'Sensation, gust', of: { quantity: 'sensation', wind: 'gust' } },
} satisfies Record<string, { label: string; of: SeatFigure }>
type FigureName = keyof typeof figures
const isFigure = (name: string): name is FigureName => name in figures

interface ExplainPanelProps {
  readonly input: ExplainInput
  readonly rules: HouseRules
  readonly seatId: string
  /** As the page shows them; null before it shows any. */
  readonly warmth: SeatFigures | null
  readonly units: DisplayUnits
  readonly fluxUnit: FluxUnit
  readonly onClose: () => void
}

/** A seat’s sensation and the head against the body, and any of its figures taken apart. */
export default function ExplainPanel({ input, rules, seatId, warmth, units, fluxUnit, onClose }: ExplainPanelProps) {
  const [name, setName] = useState<FigureName>('body')
  const explained = useMemo(() => explainSeat(input, seatId, figures[name].of, rules), [input, seatId, name, rules])
  return (
    <section aria-labelledby="explain-title" className="px-4.5 py-3.5">
      <header className="mb-2 flex items-baseline justify-between gap-2">
        <h2 id="explain-title" className="text-sm font-strong">
          Seat {seatId}
        </h2>
        <Button kind="text" size="small" onClick={onClose}>
          Close
        </Button>
      </header>
      {warmth && <SeatSensation {...warmth} />}
      <div className="mt-3">
        <SelectField
          label="Figure"
          value={name}
          onChange={(event) => isFigure(event.target.value) && setName(event.target.value)}
          options={Object.entries(figures).map(([value, { label }]) => ({ value, label }))}
        />
      </div>
      {explained && <ExplainedFigure {...{ explained, units, fluxUnit }} site={input.site} />}
    </section>
  )
}
