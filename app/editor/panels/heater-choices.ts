import type { Brief } from '#app/domain/brief/brief.ts'
import type { HeaterModel, Mount } from '#app/domain/heaters/heater-model.ts'
import { shortName } from '#app/domain/heaters/short-name.ts'
import type { HeaterChange } from '#app/domain/layout/edits.ts'
import type { MountedHeater } from '#app/domain/layout/layout.ts'
import { suppliesOf } from '#app/domain/layout/model-choice.ts'

/** Models to change to: those that can be placed, and the present one whatever it is. */
export function modelOptions(heater: MountedHeater, models: ReadonlyMap<string, HeaterModel>) {
  const offered = [...models.values()].filter(
    (model) => model.code === heater.model || (model.status === 'current' && model.beam !== null),
  )
  const known = offered.map((model) => ({ value: model.code, label: shortName(model) }))
  return models.has(heater.model) ? known : [{ value: heater.model, label: heater.model }, ...known]
}

/** A new model keeps its place; a mount it does not offer becomes its first, a stage and a rating go to their defaults. */
export function modelChange(
  code: string,
  heater: MountedHeater,
  models: ReadonlyMap<string, HeaterModel>,
  brief: Brief,
): HeaterChange {
  const model = models.get(code)
  if (!model) return {}
  const voltages = model.supplyOptions.map((option) => option.voltage)
  const keeps = voltages.includes(heater.supplyVoltage)
  const supplyVoltage = keeps ? heater.supplyVoltage : suppliesOf(brief).find((volts) => voltages.includes(volts))
  return {
    model: code,
    ratedVoltage: null,
    stage: null,
    ...(supplyVoltage === undefined ? {} : { supplyVoltage }),
    ...(model.mounts.includes(heater.mount) ? {} : { mount: model.mounts[0] ?? heater.mount, memberId: null }),
  }
}

/** Mounts the model offers, and the present one whatever it is. */
export function mountOptions(heater: MountedHeater, model: HeaterModel | undefined) {
  const offered: readonly Mount[] = model?.mounts ?? []
  const all = offered.includes(heater.mount) ? offered : [heater.mount, ...offered]
  return all.map((mount) => ({
    value: mount,
    label: capital(offered.includes(mount) ? mount : `${mount}, not offered`),
  }))
}

/** Whether a mount hangs from suspension eyes, so that it may be splayed. */
export const hangs = (mount: Mount): boolean => mount === 'chain' || mount === 'drop rods'

/** The change to a chosen mount; none for one that the model does not offer. */
export function mountChange(chosen: string, model: HeaterModel | undefined): HeaterChange {
  const mount = model?.mounts.find((each) => each === chosen)
  if (!mount) return {}
  return hangs(mount) ? { mount } : { mount, splayed: false }
}

const capital = (text: string) => text.charAt(0).toUpperCase() + text.slice(1)
