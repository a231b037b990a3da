import { expect, test, type Locator, type Page } from '@playwright/test'
import { readJob, signIn, variantOf } from '#tests/support/journey.ts'

/** Tab until the element has the focus, as a person without a mouse would. */
async function tabTo(page: Page, wanted: Locator): Promise<void> {
  for (let i = 0; i < 250; i++) {
    if ((await wanted.count()) > 0 && (await wanted.first().evaluate((e) => e === document.activeElement))) return
    await page.keyboard.press('Tab')
  }
  throw new Error(`not reached by Tab: ${wanted.toString()}`)
}

test('lays out and compares by keyboard alone', async ({ page }) => {
  await signIn(page, 'designer')
  const job = await readJob(page.request, /Sallow Lane/)
  await page.goto(`/jobs/${job.id}/variants/${variantOf(job, 2).id}`)
  await tabTo(page, page.getByRole('button', { name: 'New variant' }))
  await page.keyboard.press('Enter')
  await expect(page.getByText('No heaters yet. Place one on a beam to see the map.')).toBeVisible()

  await tabTo(page, page.getByRole('button', { name: 'Heater', exact: true }))
  await page.keyboard.press('Enter')
  await tabTo(page, page.getByRole('button', { name: 'Place', exact: true }))
  await page.keyboard.press('Enter')
  await tabTo(page, page.getByRole('button', { name: 'Place in the middle' }))
  await page.keyboard.press('Enter')
  const heater = page.locator('[data-object="H1"]')
  await expect(heater).toBeVisible()
  await tabTo(page, heater)
  await page.keyboard.press('Enter')
  const read = async () => variantOf(await readJob(page.request, /Sallow Lane/), 4).heaters[0]!
  await expect.poll(async () => (await readJob(page.request, /Sallow Lane/)).variants.length).toBe(4)
  await expect.poll(async () => (await readJob(page.request, /Sallow Lane/)).variants[3]!.heaters.length).toBe(1)
  const placed = await read()
  await page.keyboard.press('Shift+ArrowRight')
  await page.keyboard.press('PageDown')
  await expect.poll(async () => (await read()).lowestPoint).toBeCloseTo(placed.lowestPoint - 0.01, 6)
  expect((await read()).x).toBeGreaterThan(placed.x)
  await page.keyboard.press('Control+z')
  await expect.poll(async () => (await read()).lowestPoint).toBeCloseTo(placed.lowestPoint, 6)

  await tabTo(page, page.locator('[data-object="T1"]'))
  await expect(page.getByText(/W\/m².*\d+ %/s).first()).toBeVisible()
  await tabTo(page, page.getByRole('link', { name: 'Compare' }))
  await page.keyboard.press('Enter')
  await page.waitForURL(/compare/)
  await expect(page.getByRole('article').nth(1)).toBeVisible()
})
