import type { Brief } from '#app/domain/brief/brief.ts'
import { absorptanceOf } from '#app/domain/comfort/sources.ts'
import { windOf } from '#app/domain/comfort/seat-warmth.ts'
import { openSkyTemperature } from '#app/domain/comfort/surroundings.ts'
import { emitterOf, type Efficiency, type Emitter } from '#app/domain/flux/emitter.ts'
import type { MapQuantity, MapQuestion } from '#app/domain/flux/map-question.ts'
import { obstructionsOf } from '#app/domain/flux/shading.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { Layout, MountedHeater } from '#app/domain/layout/layout.ts'
import { areaOf } from '#app/domain/site/geometry.ts'
import type { Site } from '#app/domain/site/site.ts'
import {
  feelsLikeScale,
  irradianceScale,
  overlapScale,
  shareScale,
  type QuantityScale,
} from '#app/drawing/heat/quantity.ts'
import type { Theme } from '#app/drawing/theme.ts'
import { fluxFigure } from '#app/editor/figures.ts'
import { planeHeight, type FluxUnit, type ViewChoice } from '#app/editor/view-choice.ts'

/** What a map is asked about. */
export interface MapSubject {
  readonly site: Site
  readonly brief: Brief
  readonly layout: Layout
  readonly models: ReadonlyMap<string, HeaterModel>
  readonly choice: ViewChoice
}

/** Cells of a map at rest and while something moves. */
const cells = { sharp: 24_000, coarse: 3_600 }

/** Side of a map's cells, m: as small as the number of cells allows, never under 20 mm. */
export function cellOf(site: Site, sharpness: keyof typeof cells): number {
  const side = Math.sqrt(Math.max(0.01, Math.abs(areaOf(site.floor))) / cells[sharpness])
  return Math.max(0.02, Math.round(side * 1000) / 1000)
}

interface Remembered {
  readonly model: HeaterModel
  readonly efficiency: Efficiency
  readonly emitter: Emitter | null
}
const remembered = new WeakMap<MountedHeater, Remembered>()

/** Emitter of a heater; the same object for the same heater, model and efficiency. */
function emitterFor(heater: MountedHeater, model: HeaterModel, efficiency: Efficiency): Emitter | null {
  const known = remembered.get(heater)
  if (known?.model === model && known.efficiency === efficiency) return known.emitter
  const emitter = emitterOf(heater, model, efficiency)
  remembered.set(heater, { model, efficiency, emitter })
  return emitter
}

/** The heaters whose heat can be told, as emitters with the low, nominal or high figure of their radiant efficiency. */
export function emittersOf(
  layout: Layout,
  models: ReadonlyMap<string, HeaterModel>,
  efficiency: Efficiency = 'nominal',
): Emitter[] {
  return layout.heaters.flatMap((heater) => {
    const model = models.get(heater.model)
    return (model && emitterFor(heater, model, efficiency)) ?? []
  })
}

/** How the chosen quantity is coloured and written; irradiance in the person's unit, an efficiency that is not nominal said. */
export function scaleOf(
  choice: ViewChoice,
  brief: Brief,
  units: Site['displayUnits'],
  theme: Theme = 'dusk',
): QuantityScale {
  const scale = quantityScale(choice, brief, units, theme)
  const { efficiency } = choice
  return efficiency === 'nominal' ? scale : { ...scale, name: `${scale.name} with ${efficiency} radiant efficiency` }
}

function quantityScale(choice: ViewChoice, brief: Brief, units: Site['displayUnits'], theme: Theme): QuantityScale {
  switch (choice.map.kind) {
    case 'flux':
      return inUnit(irradianceScale(theme, brief.target), choice.fluxUnit)
    case 'share':
      return inUnit(shareScale(theme), choice.fluxUnit)
    case 'overlap':
      return overlapScale(theme, choice.map.threshold)
    case 'feels-like':
      return feelsLikeScale(theme, units)
  }
}

const inUnit = (scale: QuantityScale, unit: FluxUnit): QuantityScale =>
  unit === 'W/m²' ? scale : { ...scale, unit, format: (value) => fluxFigure(value, unit) }

/** The question for the chosen map; null with nothing to map. */
export function mapQuestion(
  subject: MapSubject,
  scale: QuantityScale,
  sharpness: keyof typeof cells,
): MapQuestion | null {
  const { site, layout, models, choice } = subject
  const emitters = emittersOf(layout, models, choice.efficiency)
  if (emitters.length === 0) return null
  const z = planeHeight(choice.plane, site)
  return {
    emitters,
    floor: site.floor,
    z,
    cell: cellOf(site, sharpness),
    quantity: quantityOf(subject, emitters),
    levels: scale.levels,
    edges: scale.edges,
    written: scale.labelled,
    ...(choice.shade ? { obstructions: obstructionsOf(site, layout, models) } : {}),
  }
}

function quantityOf({ site, brief, layout, models, choice }: MapSubject, emitters: readonly Emitter[]): MapQuantity {
  const { map } = choice
  if (map.kind === 'share') return { kind: 'share', emitterId: map.heaterId }
  if (map.kind !== 'feels-like') return map
  const waves = new Map(layout.heaters.map((heater) => [heater.id, models.get(heater.model)?.wave]))
  const conditions = {
    airTemperature: brief.airTemperature,
    surroundingsTemperature: openSkyTemperature(brief),
    wind: windOf(brief, map.wind),
    clothing: brief.clothing,
    posture: 'seated' as const,
    absorptance: emitters.map((emitter) => absorptanceOf(waves.get(emitter.id) ?? 'medium-wave')),
    covers: site.covers,
  }
  return { kind: 'feels-like', conditions }
}
