import { expect, test } from '@playwright/test'
import { readJob, signIn, variantOf } from '#tests/support/journey.ts'

/** Boxes that can be scrolled by a few pixels, which shows a scrollbar for nothing where scrollbars take room. */
const slivers = () =>
  [...document.querySelectorAll('*')]
    .filter((box) => {
      const { overflowX, overflowY } = getComputedStyle(box)
      const isSliver = (overflow: string, over: number) => /auto|scroll/.test(overflow) && over > 0 && over < 8
      return (
        isSliver(overflowY, box.scrollHeight - box.clientHeight) ||
        isSliver(overflowX, box.scrollWidth - box.clientWidth)
      )
    })
    .map((box) => box.outerHTML.slice(0, 120))

for (const viewport of [
  { width: 1440, height: 900 },
  { width: 1024, height: 768 },
]) {
  test(`nothing scrolls for nothing at ${viewport.width} × ${viewport.height}`, async ({ page }) => {
    await page.setViewportSize(viewport)
    await signIn(page, 'designer')
    const job = await readJob(page.request, /river terrace/)
    const work = `/jobs/${job.id}/variants/${variantOf(job, 3).id}`
    for (const path of ['/jobs', '/rules', `/jobs/${job.id}/site`, `/jobs/${job.id}/compare`, work]) {
      await page.goto(path)
      await expect(page.getByRole('main')).toBeVisible()
      expect(await page.evaluate(slivers), path).toEqual([])
    }
    // The long panel scrolls by itself; the page is as high as the window.
    const [list, findings] = [page.getByRole('tab', { name: 'List' }), page.getByText(/\d+ pass$/)]
    await expect(list.or(findings)).toBeVisible()
    if (await list.isVisible()) await list.click()
    await expect(page.getByRole('table', { name: /^Heaters/ })).toBeAttached()
    const heights = await page.evaluate(() => [document.documentElement.scrollHeight, window.innerHeight])
    expect(heights[0]).toBe(heights[1])
  })
}
