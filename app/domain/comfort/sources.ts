import { nearInfraredShare } from '#app/domain/comfort/band-share.ts'
import { emitterOf, type Efficiency, type Emitter } from '#app/domain/flux/emitter.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { Layout, MountedHeater } from '#app/domain/layout/layout.ts'

/** One element of a mounted heater as a source of warmth. */
export interface Source {
  readonly heaterId: string
  /** 1-based, in the order along the heater's v. */
  readonly element: number
  /** This element alone, in the frame and beam of its heater. */
  readonly emitter: Emitter
  /** Share of its radiation that clothing and skin take up. */
  readonly absorptance: number
  /** Share of its radiation in the near infrared; null when the element's temperature is not known. */
  readonly nearInfrared: number | null
  /** The element as if it radiated its near-infrared share alone; null with the share. */
  readonly nearInfraredEmitter: Emitter | null
}

/** The elements of a layout, and the heaters whose heat cannot be told: unknown model or no beam data. */
export interface Sources {
  readonly sources: readonly Source[]
  readonly cannotTell: readonly string[]
}

/**
 * Absorptance of clothing and skin by wave type: 0.95 for long and medium wave, about 0.7 for short-wave lamps
 * (ASHRAE Fundamentals: for a source near 2,500 K; the second digit from memory).
 */
export const absorptanceOf = (wave: HeaterModel['wave']): number => (wave === 'short-wave' ? 0.7 : 0.95)

/** The elements of one heater; null when its heat cannot be told. */
function sourcesOfHeater(heater: MountedHeater, model: HeaterModel, efficiency: Efficiency): Source[] | null {
  const emitter = emitterOf(heater, model, efficiency)
  if (!emitter) return null
  const nearInfrared = model.elementTemperature === null ? null : nearInfraredShare(model.elementTemperature)
  return emitter.elements.map((element, i) => {
    const dimmed = nearInfrared === null ? null : { ...element, radiantPower: element.radiantPower * nearInfrared }
    return {
      heaterId: heater.id,
      element: i + 1,
      emitter: { ...emitter, elements: [element] },
      absorptance: absorptanceOf(model.wave),
      nearInfrared,
      nearInfraredEmitter: dimmed && { ...emitter, elements: [dimmed] },
    }
  })
}

const remembered = new WeakMap<MountedHeater, { readonly model: HeaterModel; readonly made: Source[] | null }>()

/** The same objects for the same heater and model, so that what is reckoned from them once is found again. */
function nominalSources(heater: MountedHeater, model: HeaterModel): Source[] | null {
  const known = remembered.get(heater)
  if (known?.model === model) return known.made
  const made = sourcesOfHeater(heater, model, 'nominal')
  remembered.set(heater, { model, made })
  return made
}

/** Every element of the layout, heater by heater, with the low, nominal or high figure of the radiant efficiency. */
export function sourcesOf(
  layout: Pick<Layout, 'heaters'>,
  models: ReadonlyMap<string, HeaterModel>,
  efficiency: Efficiency = 'nominal',
): Sources {
  const cannotTell: string[] = []
  const sources = layout.heaters.flatMap((heater) => {
    const model = models.get(heater.model)
    const nominal = efficiency === 'nominal'
    const own = model && (nominal ? nominalSources(heater, model) : sourcesOfHeater(heater, model, efficiency))
    if (!own) cannotTell.push(heater.id)
    return own ?? []
  })
  return { sources, cannotTell }
}
