import type { Brief } from '#app/domain/brief/brief.ts'
import type { HeaterModel, Mount } from '#app/domain/heaters/heater-model.ts'
import { shortName } from '#app/domain/heaters/short-name.ts'
import type { Site } from '#app/domain/site/site.ts'

/** Whether a model can be placed on a site, and with what. */
export interface ModelChoice {
  readonly model: HeaterModel
  /** The supply that fits it best: its voltage, of those that the brief offers; null when none is listed. */
  readonly supplyVoltage: number | null
  /** Mounts of the model for which the site has something to fix to. */
  readonly mounts: readonly Mount[]
  /** Why it cannot be placed, a sentence each, the supply first; empty when it can. */
  readonly whyNot: readonly string[]
}

/** Voltages that the brief's supply offers, the one between phase and neutral first. */
export const suppliesOf = (brief: Brief): number[] => [
  ...new Set([brief.supply.phaseVoltage, ...(brief.supply.lineVoltage === null ? [] : [brief.supply.lineVoltage])]),
]

/** The catalogue against a site and its supply: what can be placed first, by power; then the rest with their reasons. */
export function listModelChoices(models: readonly HeaterModel[], site: Site, brief: Brief): ModelChoice[] {
  return models
    .map((model) => choiceOf(model, site, brief))
    .sort(
      (a, b) =>
        Number(a.whyNot.length > 0) - Number(b.whyNot.length > 0) ||
        a.model.range.localeCompare(b.model.range, 'en') ||
        powerOf(a.model) - powerOf(b.model),
    )
}

const powerOf = (model: HeaterModel) => model.stages.at(-1) ?? 0

function choiceOf(model: HeaterModel, site: Site, brief: Brief): ModelChoice {
  const supplies = suppliesOf(brief)
  const offered = model.supplyOptions.map((option) => option.voltage)
  const supplyVoltage = supplies.find((voltage) => offered.includes(voltage)) ?? null
  const mounts = model.mounts.filter((mount) => canBeFixed(mount, site))
  const whyNot = [
    supplyVoltage === null ? `Made for ${either(offered)} V; the supply is ${either(supplies)} V.` : null,
    model.status === 'withdrawn' ? 'Withdrawn from the range.' : null,
    model.beam === null ? `No beam data for ${shortName(model)}. It can be seen, not placed.` : null,
    mounts.length === 0 ? `Mounts by ${either(model.mounts)}; the site has nothing for it.` : null,
    tooLow(model, site),
  ]
  return { model, supplyVoltage, mounts, whyNot: whyNot.filter((reason) => reason !== null) }
}

/** A recess box needs a cover with a void; brackets need walls, clamps poles, everything that hangs a member. */
function canBeFixed(mount: Mount, site: Site): boolean {
  switch (mount) {
    case 'wall bracket':
      return site.walls.length > 0
    case 'pole clamp':
      return site.poles.length > 0
    case 'recess box':
      return site.covers.some((cover) => cover.voidDepth !== null)
    default:
      return site.members.length > 0
  }
}

function tooLow(model: HeaterModel, site: Site): string | null {
  const least = model.mountingHeight.min
  const heights = site.covers.flatMap((cover) => cover.corners.map((corner) => corner[2]))
  if (least === null || heights.length === 0) return null
  const room = model.mounts.includes('recess box') ? 0 : model.body.depth
  const highest = Math.max(...heights)
  if (highest >= least + room) return null
  return `Hangs at ${least.toFixed(2)} m or higher; the cover is at ${highest.toFixed(2)} m.`
}

function either(values: readonly (string | number)[]): string {
  const last = values.at(-1)
  return values.length < 2 ? `${last ?? 'nothing'}` : `${values.slice(0, -1).join(', ')} or ${last}`
}
