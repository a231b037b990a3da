import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'

/** Whether a model glows so that it dazzles who looks into it. */
export const glowsBright = ({ visibleGlow }: Pick<HeaterModel, 'visibleGlow'>): boolean => /bright/.test(visibleGlow)
