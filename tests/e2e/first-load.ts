import { gzipSync } from 'node:zlib'
import { expect, test, type Page } from '@playwright/test'
import { readJob, signIn, variantOf } from '#tests/support/journey.ts'

/** A minimal page of the framework with the same versions, kB gz. */
const minimal = 103.6

/** Scripts of a page and of its workers, kB gz, when none has come for a while. */
async function scriptsOf(page: Page, url: string): Promise<{ size: number; names: string[] }> {
  const names: string[] = []
  const bodies: Promise<number>[] = []
  page.on('response', (response) => {
    if (!/\.js(\?|$)/.test(response.url()) || !response.ok()) return
    names.push(response.url())
    bodies.push(response.body().then((body) => gzipSync(body).length))
  })
  await page.goto(url)
  await page.waitForLoadState('networkidle')
  for (let known = -1; known < bodies.length;) {
    known = bodies.length
    await page.waitForTimeout(1500)
  }
  page.removeAllListeners('response')
  return { size: (await Promise.all(bodies)).reduce((sum, size) => sum + size, 0) / 1000, names }
}

test('first loads stay small', async ({ page, browser }) => {
  await signIn(page, 'designer')
  const job = await readJob(page.request, /Tansy Weir/)
  const state = await page.context().storageState()
  const fresh = async (url: string) => {
    const context = await browser.newContext({ storageState: state, baseURL: new URL(page.url()).origin })
    const scripts = await scriptsOf(await context.newPage(), url)
    await context.close()
    return scripts
  }
  const jobs = await fresh('/jobs')
  const variant = await fresh(`/jobs/${job.id}/variants/${variantOf(job, 3).id}`)
  const compare = await fresh(`/jobs/${job.id}/compare?variants=2,3`)
  // Workers count: without their scripts the figures below would say less than a person waits for.
  for (const { names } of [variant, compare]) expect(names.join()).toContain('flux.worker')
  const sizes = { jobs: jobs.size, variant: variant.size, compare: compare.size }
  console.log('first-load scripts, kB gz', sizes)
  expect(sizes.jobs / minimal).toBeLessThanOrEqual(1.8)
  expect(sizes.variant / minimal).toBeLessThanOrEqual(2.8)
  expect(sizes.compare / minimal).toBeLessThanOrEqual(2.8)
})
