import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import type { MountedHeater } from '#app/domain/layout/layout.ts'

/** What a heater draws on its supply: W, V, A. */
export interface ElectricalPower {
  /** Power drawn at the supply voltage and stage. */
  readonly power: number
  /** Voltage of the option ordered. */
  readonly ratedVoltage: number
  /** Power of that option at its rated voltage and the chosen stage. */
  readonly ratedPower: number
  /** Line current; a three-phase option is taken as balanced. */
  readonly current: number
  /** The supply is not the rated voltage, so the power is not the rated one. */
  readonly voltageDiffers: boolean
}

type SupplyOption = HeaterModel['supplyOptions'][number]

/** The option ordered: by `ratedVoltage` when given, else by the supply voltage; the nearest one when it is not listed. */
function supplyOptionOf(heater: MountedHeater, model: HeaterModel): SupplyOption {
  const wanted = heater.ratedVoltage ?? heater.supplyVoltage
  return model.supplyOptions.reduce((best, option) =>
    Math.abs(option.voltage - wanted) < Math.abs(best.voltage - wanted) ? option : best,
  )
}

/** Share of full power at a 1-based stage; the last stage when absent or beyond the model's stages. */
function stageShare(model: HeaterModel, stage: number | undefined): number {
  const full = model.stages.at(-1) ?? 0
  const chosen = model.stages[(stage ?? model.stages.length) - 1] ?? full
  return full > 0 ? chosen / full : 1
}

/**
 * Electrical power of a mounted heater: P = P_rated · (V / V_rated)^exponent (2 for a metal element, whose resistance
 * hardly changes; the exponent is the model's own figure). Current P / V, or P / (√3 V) on a three-phase option.
 */
export function electricalPower(heater: MountedHeater, model: HeaterModel): ElectricalPower {
  const option = supplyOptionOf(heater, model)
  const ratedPower = option.ratedPower * stageShare(model, heater.stage)
  const power = ratedPower * (heater.supplyVoltage / option.voltage) ** model.powerVoltageExponent
  const current = power / (heater.supplyVoltage * (option.phases === 3 ? Math.sqrt(3) : 1))
  const voltageDiffers = heater.supplyVoltage !== option.voltage
  return { power, ratedVoltage: option.voltage, ratedPower, current, voltageDiffers }
}
