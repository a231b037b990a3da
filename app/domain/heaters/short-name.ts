import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'

/** The model's name without its kind of infrared: "Betony 2.0". */
export const shortName = (model: Pick<HeaterModel, 'name'>): string =>
  model.name.replace(/ (short|medium|long)-wave.*$/, '')
