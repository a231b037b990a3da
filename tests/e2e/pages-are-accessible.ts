import AxeBuilder from '@axe-core/playwright'
import { expect, test } from '@playwright/test'
import { readJob, signIn, variantOf } from '#tests/support/journey.ts'

const widths = [1440, 1024, 390]
const chromes = ['light', 'dark'] as const

for (const chrome of chromes)
  for (const width of widths)
    test(`no serious finding of axe on any page, ${chrome}, ${width} px`, async ({ page }) => {
      test.setTimeout(180_000)
      await page.emulateMedia({ colorScheme: chrome })
      await page.setViewportSize({ width, height: 900 })
      const check = async (url: string) => {
        await page.goto(url)
        await page.waitForLoadState('networkidle')
        const { violations } = await new AxeBuilder({ page }).analyze()
        const serious = violations.filter(({ impact }) => impact === 'serious' || impact === 'critical')
        expect(
          serious.map(({ id, nodes }) => `${url} ${id}: ${nodes[0]?.html.slice(0, 160)} (${nodes.length})`),
        ).toEqual([])
      }
      await check('/sign-in')
      await check('/reset-password')
      await signIn(page, 'designer')
      const job = await readJob(page.request, /Tansy Weir/)
      for (const path of ['/jobs', '/jobs/new', '/heaters', '/rules', '/rules/hanging', '/team', '/no-such-page'])
        await check(path)
      for (const path of [
        'brief',
        'site',
        'compare?variants=2,3',
        `variants/${variantOf(job, 3).id}`,
        `variants/${variantOf(job, 3).id}/hang`,
      ])
        await check(`/jobs/${job.id}/${path}`)
      const veranda = await readJob(page.request, /Sallow/)
      const { photos } = await (await page.request.get(`/api/jobs/${veranda.id}/photos`)).json()
      for (const path of ['photos', `photos/${photos[0].id}?at=joists`]) await check(`/jobs/${veranda.id}/${path}`)
    })
