import { readFileSync } from 'node:fs'
import { expect, test } from '@playwright/test'
import { PNG } from 'pngjs'
import { emitterOf } from '#app/domain/flux/emitter.ts'
import { bruteIrradiance } from '#tests/support/adaptive-integrator.ts'
import { chance } from '#tests/support/chance.ts'
import { askFlux, readJob, readModels, signIn, variantOf, watchPage } from '#tests/support/journey.ts'
import { fitPlan, legendTable, readSheet, shownIrradiance } from '#tests/support/read-sheet.ts'

/** Half a band of the fill (10 W/m²), the picture's grid and its pixels. */
const allowed = 9

test('sales exports the comparison picture, and the picture tells the truth', async ({ page, context }) => {
  const seen = await watchPage(page)
  await signIn(page, 'sales')
  const job = await readJob(page.request, /Tansy Weir/)
  await page.goto(`/jobs/${job.id}/compare?variants=2,3`)
  const [download] = await Promise.all([
    page.waitForEvent('download'),
    page.getByRole('link', { name: 'Picture' }).click(),
  ])
  expect(download.suggestedFilename()).toBe('the-tansy-weir-river-terrace-variants-2-3.png')
  const png = PNG.sync.read(readFileSync(await download.path()))

  const drawing = await page.request.get(`/jobs/${job.id}/compare.svg?variants=2,3`)
  expect(drawing.headers()['content-disposition']).toContain('attachment')
  expect(drawing.headers()['content-security-policy']).toContain("default-src 'none'")
  const reader = await context.newPage()
  const sheet = await readSheet(reader, await drawing.text())
  await reader.close()
  const unit = png.width / sheet.width
  expect(unit).toBeCloseTo(2, 1)
  const table = legendTable(png, sheet.legend, unit)
  expect(table.size).toBeGreaterThan(40)

  const models = await readModels(page.request)
  const random = chance(7)
  for (const [i, number] of [2, 3].entries()) {
    const variant = variantOf(job, number)
    const place = fitPlan(job.site.seats, sheet.plans[i]!)
    const cells = Array.from({ length: 600 }, () => ({ x: 0.3 + random() * 12.6, y: 0.4 + random() * 4.6, z: 0.6 }))
      .flatMap((at) => {
        const { x, y } = place(at.x, at.y)
        const shown = shownIrradiance(png, table, x * unit, y * unit)
        return shown ? [{ at, shown: (shown[0] + shown[1]) / 2 }] : []
      })
      .slice(0, 80)
    expect(cells.length).toBeGreaterThanOrEqual(50)
    const asked = await askFlux(
      page.request,
      variant,
      cells.map((cell) => cell.at),
    )
    for (const [k, { at, shown }] of cells.entries()) {
      expect(Math.abs(Math.min(shown, 600) - Math.min(asked[k]!, 600)), `at ${at.x}, ${at.y}`).toBeLessThan(allowed)
    }
    const emitters = variant.heaters.map((heater) => emitterOf(heater, models.get(heater.model)!)!)
    for (const [k, { at, shown }] of cells.slice(0, 12).entries()) {
      const summed = emitters.reduce((sum, one) => sum + bruteIrradiance(one, [at.x, at.y, at.z], [0, 0, 1]), 0)
      expect(asked[k]! / summed).toBeCloseTo(1, 5)
      expect(Math.abs(Math.min(shown, 600) - Math.min(summed, 600))).toBeLessThan(allowed)
    }
  }
  expect(seen.violations).toEqual([])
  expect(seen.errors).toEqual([])
})

test('sales reads layouts and does not move heaters', async ({ page }) => {
  await signIn(page, 'sales')
  const job = await readJob(page.request, /Tansy Weir/)
  const variant = variantOf(job, 3)
  await page.goto(`/jobs/${job.id}/variants/${variant.id}`)
  await expect(page.locator('[data-object="R3-4"]')).toBeVisible()
  await expect(page.getByRole('button', { name: 'Undo' })).toHaveCount(0)
  const refused = await page.request.put(`/api/variants/${variant.id}`, {
    headers: { Origin: new URL(page.url()).origin, 'If-Match': `"${variant.revision}"`, 'Idempotency-Key': 'sales' },
    data: { title: variant.title, heaters: [] },
  })
  expect(refused.status()).toBe(403)
})
