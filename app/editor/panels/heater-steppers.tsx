import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { MountedHeater } from '#app/domain/layout/layout.ts'
import type { Site } from '#app/domain/site/site.ts'
import { degreesFigure } from '#app/editor/figures.ts'
import { alongLabel, fieldLength, fromLabel } from '#app/editor/panels/axis-words.ts'
import { heightAside } from '#app/editor/panels/heater-limits.ts'
import { Stepper } from '#app/editor/panels/stepper.tsx'
import type { Nudge } from '#app/editor/tools/nudge.ts'

interface HeaterSteppersProps {
  readonly heater: MountedHeater
  readonly model: HeaterModel | undefined
  readonly site: Site
  readonly readOnly: boolean
  readonly onNudge: (nudge: Nudge) => void
}

/** The chosen heater by touch: 50 mm and 1° steps for everything that a drag does. */
export function HeaterSteppers({ heater, model, site, readOnly, onNudge }: HeaterSteppersProps) {
  const units = site.displayUnits
  const unit = units === 'metric' ? 'm' : ''
  const by = units === 'metric' ? 0.05 : 0.0508
  const step = { disabled: readOnly }
  const limits = model?.tiltDeg
  return (
    <div className="grid grid-cols-2 gap-x-4 gap-y-3 tablet:grid-cols-5">
      <Stepper
        {...step}
        label={alongLabel(site)}
        shown={fieldLength(heater.x, units)}
        unit={unit}
        onStep={(way) => onNudge({ kind: 'nudge', dx: way * by, dy: 0 })}
      />
      <Stepper
        {...step}
        label={fromLabel(site)}
        shown={fieldLength(heater.y, units)}
        unit={unit}
        onStep={(way) => onNudge({ kind: 'nudge', dx: 0, dy: way * by })}
      />
      <Stepper
        {...step}
        label="Lowest point"
        aside={heightAside(model, units)}
        shown={fieldLength(heater.lowestPoint, units)}
        unit={unit}
        onStep={(way) => onNudge({ kind: 'raise', by: way * by })}
      />
      <Stepper
        {...step}
        label="Tilt"
        {...(limits ? { aside: `${limits.min}–${limits.max}` } : {})}
        shown={degreesFigure(heater.tiltDeg)}
        unit="°"
        onStep={(way) => onNudge({ kind: 'tilt', by: way })}
      />
      <Stepper
        {...step}
        label="Turn"
        shown={degreesFigure(heater.turnDeg)}
        unit="°"
        onStep={(way) => onNudge({ kind: 'turn', by: way * 5 })}
      />
    </div>
  )
}
