import { expect, test, type Browser } from '@playwright/test'
import { z } from 'zod'
import { moveThings } from '#app/domain/site/edits.ts'
import type { Site } from '#app/domain/site/site.ts'
import { endToEndOrigin } from '#tests/support/end-to-end-origin.ts'
import { openJob, readJob, signIn, variantOf, type JourneyVariant } from '#tests/support/journey.ts'

const kept = z.object({ revision: z.number() })
const headers = (revision?: number) => ({
  Origin: endToEndOrigin,
  'Idempotency-Key': crypto.randomUUID(),
  ...(revision === undefined ? {} : { 'If-Match': `"${revision}"` }),
})

/** The engineer signs in elsewhere and saves the site of a job otherwise. */
async function savedByColleague(browser: Browser, url: string, site: Site): Promise<void> {
  const context = await browser.newContext({ baseURL: endToEndOrigin })
  const page = await context.newPage()
  await signIn(page, 'engineer')
  const { revision } = kept.parse(await (await page.request.get(url)).json())
  expect((await page.request.put(url, { headers: headers(revision), data: site })).status()).toBe(200)
  await context.close()
}

test('a rail added to a site that a colleague saved meanwhile: it is said, nothing is lost, and Undo takes the rail away', async ({
  page,
  browser,
}) => {
  await signIn(page, 'designer')
  const river = await readJob(page.request, /Tansy Weir/)
  await openJob(page, 'Two at one site')
  const job = () => readJob(page.request, /^Two at one site/)
  const { id } = await job()
  const url = `/api/jobs/${id}/site`
  const { revision } = kept.parse(await (await page.request.get(url)).json())
  expect((await page.request.put(url, { headers: headers(revision), data: river.site })).status()).toBe(200)
  const layout = { title: 'Between the beams', heaters: variantOf(river, 1).heaters.slice(0, 1) }
  const made = await page.request.post(`/api/jobs/${id}/variants`, { headers: headers(), data: layout })
  const variantId = z.object({ id: z.string() }).parse(await made.json()).id
  const variant = async (): Promise<JourneyVariant> => (await job()).variants.find((each) => each.id === variantId)!

  await page.goto(`/jobs/${id}/variants/${variantId}`)
  await page.getByRole('button', { name: /^Add a rail over H1/ }).click()
  const add = page.getByRole('button', { name: /^Add rail 1 to the site/ })
  await expect(add).toBeVisible()
  const changed = moveThings(river.site, 'seat', ['R1-1'], 0.5, -0.6)
  await savedByColleague(browser, url, changed)
  const seat = page.locator('[data-object="R1-1"]')
  const before = (await seat.boundingBox())!

  const [answer] = await Promise.all([
    page.waitForResponse((response) => response.request().method() === 'PUT' && response.url().endsWith(url)),
    add.click(),
  ])
  expect(answer.status()).toBe(412)
  await expect(page.getByRole('alert').filter({ hasText: /changed the site meanwhile/ })).toContainText(
    'nothing of yours was done to it',
  )
  await expect.poll(async () => (await seat.boundingBox())!.x).toBeGreaterThan(before.x + 5)
  expect((await job()).site).toEqual(changed)
  expect((await variant()).heaters).toEqual(layout.heaters)
  await expect(page.locator('[data-object="H1"]')).toBeVisible()

  await add.click()
  await expect(page.getByText('rail 1 added to the site, span and load to be confirmed')).toBeVisible()
  await expect.poll(async () => (await variant()).heaters[0]?.memberId).toBe('rail-1')
  const railed = (await job()).site
  expect(railed).toEqual({ ...changed, members: [...changed.members, expect.objectContaining({ id: 'rail-1' })] })
  await expect(page.getByRole('button', { name: /^Add a rail over H1/ })).toHaveCount(0)

  await page.getByRole('status').getByRole('button', { name: 'Undo' }).click()
  await expect.poll(async () => (await variant()).heaters).toEqual(layout.heaters)
  expect((await job()).site).toEqual(changed)
  await expect(page.getByRole('button', { name: /^Add a rail over H1/ })).toBeVisible()
})
