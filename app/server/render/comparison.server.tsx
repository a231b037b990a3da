import type { ReactElement } from 'react'
import { sheetCautions } from '#app/domain/comparison/sheet-cautions.ts'
import { emitterOf } from '#app/domain/flux/emitter.ts'
import { areaOf } from '#app/domain/site/geometry.ts'
import { planesOf } from '#app/domain/site/planes.ts'
import { ComparisonSheet } from '#app/drawing/sheet/comparison-sheet.tsx'
import { sheetScale } from '#app/drawing/sheet/sheet-facts.ts'
import type { Compared, ComparedLayout } from '#app/server/data/compared.server.ts'
import { answerMapOffThread, layoutFiguresOffThread } from '#app/server/flux.server.ts'
import { dayInWords } from '#app/server/render/day-in-words.server.ts'

/** Cells of a map on the sheet: its figures are read back from the colours, so it is finer than on the page. */
const cells = 60_000

type Models = ReadonlyMap<string, Compared['models'][number]>

function pictureOf({ site, brief }: Compared, models: Models, { heaters }: ComparedLayout, z: number) {
  const emitters = heaters.flatMap((heater) => {
    const model = models.get(heater.model)
    return (model && emitterOf(heater, model)) ?? []
  })
  if (emitters.length === 0) return null
  const cell = Math.max(0.015, Math.sqrt(Math.abs(areaOf(site.floor)) / cells))
  const { levels, edges } = sheetScale(brief)
  return answerMapOffThread({ emitters, floor: site.floor, z, cell, quantity: { kind: 'flux' }, levels, edges })
}

/** The customer's sheet of a comparison; everything heavy is worked out off the event loop. */
export async function comparisonSheet(compared: Compared, organisation: string, day: Date): Promise<ReactElement> {
  const { site, brief, house } = compared
  const models = new Map(compared.models.map((model) => [model.code, model]))
  const plane = planesOf(site).body
  const variants = await Promise.all(
    compared.chosen.map(async (variant) => {
      const { number, title, revision, heaters } = variant
      const layout = { title, heaters }
      const [map, figures] = await Promise.all([
        pictureOf(compared, models, variant, plane),
        layoutFiguresOffThread({ site, brief, layout, models, house }),
      ])
      return { number, title, revision, layout, picture: map?.picture ?? null, ...figures }
    }),
  )
  return (
    <ComparisonSheet
      {...{ site, brief, models, variants, organisation }}
      planeHeight={plane}
      date={dayInWords(day)}
      cautions={sheetCautions({ brief, rules: house.rules, models, units: site.displayUnits, site, variants })}
    />
  )
}
