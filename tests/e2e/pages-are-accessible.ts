import AxeBuilder from '@axe-core/playwright'
import { expect, test } from '@playwright/test'
import { readJob, signIn, variantOf } from '#tests/support/journey.ts'

const widths = [1440, 1024, 390]
const chromes = ['light', 'dark'] as const

for (const width of widths)
  test(`no serious finding of axe on any page, light and dark, ${width} px`, async ({ page }) => {
    test.setTimeout(300_000)
    await page.setViewportSize({ width, height: 900 })
    const check = async (url: string) => {
      await page.emulateMedia({ colorScheme: 'light' })
      await page.goto(url)
      await page.waitForLoadState('networkidle')
      for (const colorScheme of chromes) {
        await page.emulateMedia({ colorScheme })
        // Two frames: the page hears of the change and is drawn.
        await page.evaluate(() => new Promise((done) => requestAnimationFrame(() => requestAnimationFrame(done))))
        const { violations } = await new AxeBuilder({ page }).options({ resultTypes: ['violations'] }).analyze()
        const serious = violations.filter(({ impact }) => impact === 'serious' || impact === 'critical')
        expect(
          serious.map(
            ({ id, nodes }) => `${url} ${colorScheme} ${id}: ${nodes[0]?.html.slice(0, 160)} (${nodes.length})`,
          ),
        ).toEqual([])
      }
    }
    await check('/sign-in')
    await check('/reset-password')
    await signIn(page, 'designer')
    const job = await readJob(page.request, /Tansy Weir/)
    for (const path of [
      '/jobs',
      '/jobs/new',
      '/heaters',
      '/heaters/betony-2-0',
      '/rules',
      '/rules/house',
      '/rules/hanging',
      '/team',
      '/no-such-page',
    ])
      await check(path)
    await page.goto('/rules')
    await check((await page.locator('a[href^="/rules/sets/"]').first().getAttribute('href')) ?? '')
    for (const path of [
      'brief',
      'site',
      'compare?variants=2,3',
      `variants/${variantOf(job, 3).id}`,
      `variants/${variantOf(job, 3).id}/hang`,
      `variants/${variantOf(job, 3).id}/sizes`,
    ])
      await check(`/jobs/${job.id}/${path}`)
    const veranda = await readJob(page.request, /Sallow/)
    const { photos } = await (await page.request.get(`/api/jobs/${veranda.id}/photos`)).json()
    for (const path of ['photos', `photos/${photos[0].id}?at=joists`]) await check(`/jobs/${veranda.id}/${path}`)
  })
