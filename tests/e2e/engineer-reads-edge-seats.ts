import { expect, test } from '@playwright/test'
import { z } from 'zod'
import { askFlux, readJob, signIn, variantOf, watchPage } from '#tests/support/journey.ts'

/** Outer seats of the end tables of the river terrace. */
const edges = ['R1-1', 'W1-1', 'R5-2', 'W5-2']

test('the engineer reads body and head heat at the edge seats and the findings', async ({ page }) => {
  const seen = await watchPage(page)
  await signIn(page, 'engineer')
  const job = await readJob(page.request, /Tansy Weir/)
  const variant = variantOf(job, 2)
  await page.goto(`/jobs/${job.id}/variants/${variant.id}`)
  const seats = job.site.seats.filter((seat) => edges.includes(seat.id))
  const body = await askFlux(
    page.request,
    variant,
    seats.map(({ x, y, bodyHeight }) => ({ x, y, z: bodyHeight })),
  )
  for (const [i, seat] of seats.entries()) {
    expect(body[i]).toBeLessThan(job.name ? 150 : 0)
    await expect(page.locator(`[data-object="${seat.id}"]`)).toHaveAccessibleName(
      `Seat ${seat.id}, ${Math.round(body[i]!)} W/m², below`,
    )
    const row = page.getByRole('row').filter({ has: page.getByText(seat.id, { exact: true }) })
    await expect(row).toContainText(String(Math.round(body[i]!)))
  }
  const csv = await (await page.request.get(`/api/variants/${variant.id}/seats.csv`)).text()
  const [head, ...rows] = csv
    .trim()
    .split(/\r?\n/)
    .map((line) => line.split(','))
  const column = head!.findIndex((name) => /head/i.test(name))
  const edge = rows.find((cells) => cells[0] === 'R1-1')!
  const row = page.getByRole('row').filter({ has: page.getByText('R1-1', { exact: true }) })
  await expect(row).toContainText(String(Math.round(Number(edge[column]))))

  const findings = page.getByRole('region', { name: 'Findings' })
  await expect(findings).toContainText(/below/i)
  await expect(findings).toContainText('Cannot tell')
  await expect(findings).toContainText('Measure first')
  await findings
    .getByText(/seats? (is|are|stays?)? ?below|below target/i)
    .first()
    .click()

  await page.getByRole('button', { name: /R1-1.*how its figures are made/ }).click()
  const panel = page.getByRole('region', { name: 'Seat R1-1' })
  await expect(panel).toContainText(`${Math.round(body[seats.findIndex((s) => s.id === 'R1-1')]!)} W/m²`)
  const explained = z
    .object({ value: z.number(), byHeater: z.array(z.object({ value: z.number() }).loose()) })
    .loose()
    .parse(await (await page.request.get(`/api/variants/${variant.id}/seats/R1-1/explain?quantity=body`)).json())
  expect(explained.byHeater.reduce((sum, part) => sum + part.value, 0)).toBeCloseTo(explained.value, 6)

  await expect(panel).toContainText('Without shade: nothing is taken to stand in the way.')
  await page.getByLabel('Shade', { exact: true }).check()
  await expect(panel.getByRole('table', { name: 'Seen of each heater from the body’s height' })).toContainText('H1')
  const shaded = z
    .object({ value: z.number(), seen: z.array(z.object({ heaterId: z.string(), seen: z.number() })) })
    .parse(
      await (
        await page.request.get(`/api/variants/${variant.id}/seats/R1-1/explain?quantity=body-largest&shade=in-place`)
      ).json(),
    )
  await panel.getByLabel('Figure').selectOption({ label: 'Largest irradiance at the body' })
  await expect(panel).toContainText(`${Math.round(shaded.value)} W/m²`)
  await expect(panel).toContainText('Stop line at 1580 W/m²')
  expect(shaded.seen.length).toBeGreaterThan(0)
  expect(seen.violations).toEqual([])
  expect(seen.errors).toEqual([])
})
