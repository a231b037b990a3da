import type { Brief } from '#app/domain/brief/brief.ts'
import type { HeaterModel } from '#app/domain/heaters/heater-model.ts'
import { bodyOf } from '#app/domain/layout/body.ts'
import type { MountedHeater } from '#app/domain/layout/layout.ts'
import { supportOf } from '#app/domain/layout/supports.ts'
import { beamData } from '#app/domain/rules/beam-data.ts'
import type { HeaterCheck, LayoutCheck } from '#app/domain/rules/check.ts'
import { circuits } from '#app/domain/rules/circuits.ts'
import { clearanceAbove } from '#app/domain/rules/clearance-above.ts'
import { clearanceBelow } from '#app/domain/rules/clearance-below.ts'
import { clearanceFrontOfBeam } from '#app/domain/rules/clearance-front-of-beam.ts'
import { clearanceSideEnd } from '#app/domain/rules/clearance-side-end.ts'
import { lampDistance, sprinklerDistance } from '#app/domain/rules/distance-to-kind.ts'
import type { Finding } from '#app/domain/rules/finding.ts'
import { hangerLength } from '#app/domain/rules/hanger-length.ts'
import { glowNearStep } from '#app/domain/rules/glow-near-step.ts'
import { headFlux } from '#app/domain/rules/head-flux.ts'
import type { House } from '#app/domain/rules/house.ts'
import { ingressProtection } from '#app/domain/rules/ingress-protection.ts'
import { levelAxis } from '#app/domain/rules/level-axis.ts'
import { plainWhereNoStatePasses } from '#app/domain/rules/movable-states.ts'
import { mountOffered } from '#app/domain/rules/mount-offered.ts'
import { mountingHeight } from '#app/domain/rules/mounting-height.ts'
import { nearInfrared } from '#app/domain/rules/near-infrared.ts'
import { poleWind } from '#app/domain/rules/pole-wind.ts'
import { recessBay } from '#app/domain/rules/recess-bay.ts'
import { recessVoid } from '#app/domain/rules/recess-void.ts'
import { seatTarget } from '#app/domain/rules/seat-target.ts'
import { siteGiven } from '#app/domain/rules/site-given.ts'
import { supportLoad } from '#app/domain/rules/support-load.ts'
import { supported } from '#app/domain/rules/supported.ts'
import { tiltRange } from '#app/domain/rules/tilt-range.ts'
import { voltageOffered } from '#app/domain/rules/voltage-offered.ts'
import { withdrawnModel } from '#app/domain/rules/withdrawn-model.ts'
import type { Site } from '#app/domain/site/site.ts'

/** Every rule about one heater, in the order in which they are listed. */
const heaterRules: readonly ((check: HeaterCheck) => Finding | null | readonly Finding[])[] = [
  beamData,
  mountingHeight,
  tiltRange,
  levelAxis,
  mountOffered,
  voltageOffered,
  ingressProtection,
  supported,
  hangerLength,
  supportLoad,
  clearanceAbove,
  clearanceSideEnd,
  clearanceFrontOfBeam,
  clearanceBelow,
  recessBay,
  recessVoid,
  sprinklerDistance,
  lampDistance,
  glowNearStep,
  poleWind,
]

/**
 * All findings of a layout: failing first, then what cannot be told, what is to be measured, what passes; hard stops
 * first in each. Quick enough for each move of the pointer: a heater that has not changed on a site that has not changed
 * is not checked again.
 */
export function checkLayout(check: LayoutCheck): Finding[] {
  const { layout, models } = check
  return inOrder([
    ...siteGiven(check),
    ...layout.heaters.flatMap((heater) => heaterFindings(check, heater, models.get(heater.model))),
    ...headFlux(check),
    ...nearInfrared(check),
    ...seatTarget(check),
    ...circuits(check),
  ])
}

/** A finding that keeps a layout from being submitted: a hard stop that does not pass. */
export const isStopped = ({ weight, outcome }: Finding): boolean => weight === 'hard stop' && outcome !== 'pass'

const outcomes: readonly Finding['outcome'][] = ['fails', 'cannot tell', 'measure first', 'pass']
const weights: readonly Finding['weight'][] = ['hard stop', 'soft', 'advice']

const rank = ({ outcome, weight }: Finding): number => outcomes.indexOf(outcome) * 3 + weights.indexOf(weight)

/** Findings in the order in which they are shown; equals stay as they were. */
const inOrder = (findings: readonly Finding[]): Finding[] => findings.toSorted((a, b) => rank(a) - rank(b))

interface Checked {
  readonly brief: Brief
  readonly model: HeaterModel
  readonly house: House
  readonly findings: readonly Finding[]
}

const checked = new WeakMap<Site, WeakMap<MountedHeater, Checked>>()

function heaterFindings(
  { site, brief, house }: LayoutCheck,
  heater: MountedHeater,
  model: HeaterModel | undefined,
): readonly Finding[] {
  if (!model) return [withdrawnModel(heater, model)]
  const ofSite = checked.get(site) ?? new WeakMap<MountedHeater, Checked>()
  checked.set(site, ofSite)
  const known = ofSite.get(heater)
  if (known && known.brief === brief && known.model === model && known.house === house) return known.findings
  const [body, support] = [bodyOf(heater, model), supportOf(site, heater, model, house.rules)]
  const check = { site, brief, heater, model, body, support, house }
  const found = heaterRules.flatMap((rule) => rule(check) ?? [])
  const findings = [withdrawnModel(heater, model), ...plainWhereNoStatePasses(site, found)]
  ofSite.set(heater, { brief, model, house, findings })
  return findings
}
