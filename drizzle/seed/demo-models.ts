import { heaterModelSchema, type HeaterModel, type Mount } from '#app/domain/heaters/heater-model.ts'
import type { HangingData } from '#app/domain/layout/hanging-data.ts'
import { plainHanging } from '#app/domain/layout/plain-hanging.ts'
import { demoFile, type CatalogueEntry } from '#drizzle/seed/demo-file.ts'

const metres = (mm: number): number => mm / 1000

function clearanceOf(given: CatalogueEntry['clearanceToCombustible']) {
  return {
    above: metres(given.above),
    side: metres(given.side),
    end: metres(given.end),
    frontOfBeam: given.frontOfBeam === undefined ? null : metres(given.frontOfBeam),
    below: given.below === undefined ? null : metres(given.below),
  }
}

/** How far each mount of the model may hold it from its support, m; chains hang plumb within the stated limit. */
function mountReachOf(entry: CatalogueEntry): Partial<Record<Mount, number>> {
  const stated: readonly (readonly [Mount, number | null])[] = [
    ['chain', demoFile.hanging.chainSidewaysLimitMm],
    ['drop rods', entry.rodHeadReachMm],
    ['wall bracket', entry.wallBracketReachMm],
    ['pole clamp', entry.poleClampReachMm],
  ]
  return Object.fromEntries(
    stated.flatMap(([mount, reach]) =>
      reach !== null && entry.mounts.includes(mount) ? [[mount, metres(reach)]] : [],
    ),
  )
}

function modelOf(entry: CatalogueEntry): HeaterModel {
  const { above, side, end } = clearanceOf(entry.clearanceToNoncombustible)
  return heaterModelSchema.parse({
    ...entry,
    stages: entry.stagesW,
    supplyOptions: entry.supplyOptions.map((option) => ({
      voltage: option.voltageV,
      phases: option.phases,
      ratedPower: option.ratedPowerW,
      ratedCurrent: option.ratedCurrentA,
    })),
    elementTemperature: entry.elementTempC,
    radiantEfficiencyRange: null,
    beam: entry.beam && { kind: 'angles', ...entry.beam },
    elementLength: metres(entry.elementLengthMm),
    elementAboveLowest: metres(entry.elementAboveLowestMm),
    elementPitch: metres(entry.elementPitchMm),
    body: {
      length: metres(entry.body.length),
      width: metres(entry.body.width),
      depth: metres(entry.body.depth),
      mass: entry.body.massKg,
    },
    suspensionEyePitch: entry.suspensionEyePitch === null ? null : metres(entry.suspensionEyePitch),
    ingressProtection: entry.ip,
    mountingHeight: {
      min: metres(entry.mountingHeight.min),
      recommendedMax: metres(entry.mountingHeight.recommendedMax),
    },
    elementAxisLevelWithinDeg: entry.elementAxisMustBeLevelWithinDeg,
    clearanceToCombustible: clearanceOf(entry.clearanceToCombustible),
    clearanceToNoncombustible: { above, side, end },
    elementLifeHours: entry.elementLifeH,
    mountReach: mountReachOf(entry),
    listPrice: Object.fromEntries(Object.entries(entry.listPrice).filter(([, price]) => price > 0)),
    note: entry.note ?? null,
    voidDepth: entry.recessVoidMm === undefined ? null : metres(entry.recessVoidMm),
  })
}

/** The invented catalogue, eleven models, one of them without beam data and one withdrawn. */
export function demoModels(): HeaterModel[] {
  return demoFile.catalogue.map(modelOf)
}

/** The hanging data of the demo file; what it does not state is as by default. */
export function demoHanging(): HangingData {
  const { chainLinkPitchMm, hardwareAllowanceMm, turnbuckleTakeUpMm } = demoFile.hanging
  const [shorter, longer] = turnbuckleTakeUpMm
  return {
    ...plainHanging,
    linkPitch: metres(chainLinkPitchMm),
    hardwareAllowance: metres(hardwareAllowanceMm),
    shortens: metres(-shorter),
    lengthens: metres(longer),
  }
}
