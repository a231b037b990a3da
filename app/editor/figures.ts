import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import { shortName } from '#app/domain/heaters/short-name.ts'
import type { MountedHeater } from '#app/domain/layout/layout.ts'
import { formatLength, formatQuantity, fromSi, type DisplayUnits } from '#app/domain/units.ts'
import type { FluxUnit } from '#app/editor/view-choice.ts'

/** A figure that is not there. */
export const noFigure = '–'

const unitSystem = (unit: FluxUnit): DisplayUnits => (unit === 'W/m²' ? 'metric' : 'imperial')

/** An irradiance without its unit: "157", "14.6"; "–" without a figure. */
export function fluxFigure(irradiance: number | null, unit: FluxUnit): string {
  if (irradiance === null || !Number.isFinite(irradiance)) return noFigure
  return fromSi(irradiance, 'irradiance', unitSystem(unit)).toFixed(unit === 'W/m²' ? 0 : 1)
}

/** An irradiance with its unit. */
export const fluxText = (irradiance: number | null, unit: FluxUnit): string =>
  irradiance === null ? noFigure : formatQuantity(irradiance, 'irradiance', unitSystem(unit))

/** A temperature without its unit, one decimal. */
export function warmthFigure(celsius: number | null, units: DisplayUnits): string {
  if (celsius === null || !Number.isFinite(celsius)) return noFigure
  return fromSi(celsius, 'temperature', units)
    .toFixed(units === 'metric' ? 1 : 0)
    .replace('-', '−')
}

/** An angle's number: "22", "−7.5". */
export const degreesFigure = (angle: number): string => `${Math.round(angle * 10) / 10}`.replace('-', '−')

/** A length that nobody typed: whole centimetres or eighths of an inch. */
export const roughLength = (metres: number, units: DisplayUnits): string =>
  formatLength(Math.round(metres * 100) / 100, units)

/** A signed figure with a real minus. */
export const signedFigure = (value: number, digits: number): string => value.toFixed(digits).replace('-', '−')

/** "Betony 2.0, 22°" for readers and headings. */
export function heaterWords(heater: MountedHeater, model: HeaterModel | undefined): string {
  const tilt = heater.tiltDeg === 0 ? 'straight down' : `tilted ${degreesFigure(Math.abs(heater.tiltDeg))}°`
  return `Heater ${heater.id}, ${model ? shortName(model) : heater.model}, ${tilt}`
}

/** "18:42" of a moment, in the reader's own time. */
export const clockOf = (moment: Date): string =>
  moment.toLocaleTimeString('en-GB', { hour: '2-digit', minute: '2-digit' })
