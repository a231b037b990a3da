import { gzipSync } from 'node:zlib'
import { expect, test, type Page } from '@playwright/test'
import { readJob, signIn, variantOf } from '#tests/support/journey.ts'

/** A minimal page of the framework with the same versions, kB gz. */
const minimal = 103.6

async function scriptsOf(page: Page, url: string): Promise<number> {
  const bodies: Promise<number>[] = []
  page.on('response', (response) => {
    if (/\.js(\?|$)/.test(response.url()) && response.ok())
      bodies.push(response.body().then((body) => gzipSync(body).length))
  })
  await page.goto(url)
  await page.waitForLoadState('networkidle')
  page.removeAllListeners('response')
  return (await Promise.all(bodies)).reduce((sum, size) => sum + size, 0) / 1000
}

test('first loads stay small', async ({ page, browser }) => {
  await signIn(page, 'designer')
  const job = await readJob(page.request, /Tansy Weir/)
  const state = await page.context().storageState()
  const fresh = async (url: string) => {
    const context = await browser.newContext({ storageState: state, baseURL: new URL(page.url()).origin })
    const size = await scriptsOf(await context.newPage(), url)
    await context.close()
    return size
  }
  const sizes = {
    jobs: await fresh('/jobs'),
    variant: await fresh(`/jobs/${job.id}/variants/${variantOf(job, 3).id}`),
    compare: await fresh(`/jobs/${job.id}/compare?variants=2,3`),
  }
  console.log('first-load scripts, kB gz', sizes)
  expect(sizes.jobs / minimal).toBeLessThanOrEqual(1.8)
  expect(sizes.variant / minimal).toBeLessThanOrEqual(2.8)
  expect(sizes.compare / minimal).toBeLessThanOrEqual(2.8)
})
