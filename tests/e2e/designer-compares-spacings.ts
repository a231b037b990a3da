import { expect, test, type Locator } from '@playwright/test'
import { askFlux, readJob, signIn, variantOf, watchPage } from '#tests/support/journey.ts'

const squareMetres = async (map: Locator): Promise<number> =>
  Number(/([\d.]+) m²/.exec((await map.getByRole('banner').or(map.locator('header')).innerText()) ?? '')?.[1])

test('the designer compares two spacings for overlap and changes one', async ({ page }) => {
  const seen = await watchPage(page)
  await signIn(page, 'designer')
  await page
    .getByRole('link', { name: /Tansy Weir/ })
    .first()
    .click()
  await page.getByRole('link', { name: 'Compare' }).click()
  const job = await readJob(page.request, /Tansy Weir/)
  await page.goto(`/jobs/${job.id}/compare?variants=2,3`)
  await page
    .getByRole('radio', { name: 'Overlap' })
    .or(page.getByRole('button', { name: 'Overlap' }))
    .click()
  const [two, three] = [
    page.getByRole('article', { name: 'Variant 2' }),
    page.getByRole('article', { name: 'Variant 3' }),
  ]
  await expect(two).toContainText('m² where two or more')
  expect(await squareMetres(two)).not.toBeCloseTo(await squareMetres(three), 0)

  await two.getByRole('link').first().click()
  await page.waitForURL(/variants\/[0-9a-f-]+$/)
  await page.getByLabel('This variant').click()
  await page.getByRole('button', { name: 'Duplicate' }).click()
  await page.waitForURL((url) => !url.pathname.endsWith(variantOf(job, 2).id))
  const copyId = page.url().split('/').at(-1)
  await expect(page.locator(`nav a[href$="${copyId}"]`)).toHaveAttribute('aria-current', 'page')

  const seat = page.locator('[data-object="R1-2"]')
  const before = await seat.getAttribute('aria-label')
  const heater = page.locator('[data-object="H2"]')
  await expect(heater).toBeVisible()
  const box = (await heater.boundingBox())!
  const [x, y] = [box.x + box.width / 2, box.y + box.height / 2]
  await page.keyboard.down('Alt')
  await page.mouse.move(x, y)
  await page.mouse.down()
  for (let i = 1; i <= 8; i++) await page.mouse.move(x - i * 6, y)
  await expect(seat, 'the seat follows the pointer').not.toHaveAttribute('aria-label', before ?? '')
  await page.mouse.up()
  await page.keyboard.up('Alt')
  await expect(page.getByRole('status').filter({ hasText: /^Saved/ })).toBeVisible()

  const moved = (await readJob(page.request, /Tansy Weir/)).variants.find((each) => each.id === copyId)!
  expect(moved.heaters.find((each) => each.id === 'H2')?.x).toBeLessThan(2.5)
  const place = job.site.seats.find((each) => each.id === 'R1-2')!
  const [asked] = await askFlux(page.request, moved, [{ x: place.x, y: place.y, z: place.bodyHeight }])
  await expect(seat).toHaveAccessibleName(new RegExp(`^Seat R1-2, ${Math.round(asked!)} W/m²`))

  await page.reload()
  await expect(seat).toHaveAccessibleName(new RegExp(`^Seat R1-2, ${Math.round(asked!)} W/m²`))
  await page.goto(`/jobs/${job.id}/compare?variants=2,${moved.number}`)
  await expect(page.getByRole('heading', { name: 'What differs' })).toBeVisible()
  await expect(page.getByRole('region', { name: 'Figures side by side' })).toContainText('Overlap')
  expect(seen.violations).toEqual([])
  expect(seen.errors).toEqual([])
})

test('a broken worker leaves no map, exact seats and words that say so', async ({ page }) => {
  await signIn(page, 'designer')
  const job = await readJob(page.request, /Tansy Weir/)
  const variant = variantOf(job, 3)
  await page.goto(`/jobs/${job.id}/variants/${variant.id}`)
  const fills = page.locator('main g[fill-rule="evenodd"] > path[fill^="#"]')
  await expect.poll(() => fills.count()).toBeGreaterThan(8)
  const withMap = await fills.count()
  await page.route('**/assets/flux.worker*', (route) => route.abort())
  await page.reload()
  await expect(page.getByText('No map: it could not be computed on this device.')).toBeVisible()
  await expect(page.locator('[data-object="R3-4"]')).toHaveAccessibleName(/^Seat R3-4, 157 W\/m²/)
  expect(await fills.count()).toBeLessThan(withMap - 8)
})
