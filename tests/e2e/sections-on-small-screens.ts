import { expect, test } from '@playwright/test'
import { fingers, middleOf } from '#tests/support/fingers.ts'
import { readJob, signIn, variantOf } from '#tests/support/journey.ts'

test.use({ hasTouch: true, viewport: { width: 1024, height: 768 } })

test('sections and a line of one’s own are reached by finger, on a tablet and on a phone', async ({ page }) => {
  await signIn(page, 'designer')
  const job = await readJob(page.request, /Tansy Weir/)
  await page.goto(`/jobs/${job.id}/variants/${variantOf(job, 3).id}`)
  await page.getByRole('tab', { name: 'Section' }).tap()
  await expect(page.getByText('Section A–A through H4 and H3')).toBeVisible()
  await page.getByRole('button', { name: 'Section along a line' }).tap()
  const end = page.getByRole('button', { name: /^Left end of section C/ })
  const before = await end.getAttribute('aria-label')
  const at = await middleOf(end)
  await fingers(page, [at, [at[0] + 40, at[1] - 60]])
  await expect(end).not.toHaveAttribute('aria-label', before ?? '')
  await expect(page.getByText(/^Section C–C/)).toBeVisible()

  await page.setViewportSize({ width: 390, height: 844 })
  await page.reload()
  await page.getByRole('button', { name: 'Sections' }).tap()
  for (const letter of ['A', 'C']) await expect(page.getByText(`Section ${letter}–${letter}`).first()).toBeVisible()
  expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBe(390)
  await page.goto(`/jobs/${job.id}/variants/${variantOf(job, 3).id}/sizes`)
  await expect(page.getByRole('heading', { name: 'For the customer' })).toBeVisible()
  expect(await page.evaluate(() => document.documentElement.scrollWidth)).toBe(390)
})
